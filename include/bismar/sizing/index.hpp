// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/sizing/part.hpp>
#include <bismar/sizing/result.hpp>
#include <bismar/solver/sensitivity.hpp>

#include <optional>
#include <string>
#include <vector>

namespace bismar {

/// What holds the size of a design.
struct GoverningLimit {
  std::string limit;      ///< As in Utilisation::limit; "least size" or "thickness step or blank"
                          ///< where the size stands at such a bound.
  std::string load_case;  ///< Empty where no load case is meant.
  /// Mass that a unit of utilisation beyond 1 would save, if this limit alone held the size [kg];
  /// absent for a bound and for what the size does not move.
  std::optional<double> mass_per_utilisation = {};
  /// d ln m / d ln u: the share of the mass saved a share by which the limit is relaxed [-].
  std::optional<double> mass_elasticity = {};
};

/// How a design of free size answers to one property of its material, d ln (.) / d ln P. Below and
/// above differ where several limits hold the size together; absent where no size is feasible.
struct PropertyElasticity {
  std::string name;  ///< As limit states call it ("Young's modulus"), or "price".
  Property property = Property::density;
  double value = 0.0;        ///< P as the governing limit states read it (factors of use applied).
  SidedValue mass;           ///< Of the mass, finish included.
  SidedValue material_cost;  ///< Of what the material of one part costs to buy.
  SidedValue cost;           ///< Of the whole unit cost.
};

/// By how much one property alone must change for a size to hold.
struct NeededChange {
  std::string name;
  Property property = Property::density;
  double factor = 1.0;  ///< On the value, in [0.1, 10].
};

/// A neighbour of a design in a list of sizes.
struct NextSize {
  double size = 0.0;  ///< As Design::size.
  std::string size_text;
  double mass = 0.0;             ///< [kg]
  double cost = 0.0;             ///< [currency]
  double mass_difference = 0.0;  ///< Over the design [kg]; negative for the lighter one.
  double cost_difference = 0.0;  ///< The price of the next size [currency].
  bool feasible = false;
  std::string limit;         ///< The largest utilisation of all, ...
  std::string load_case;     ///< ... its load case, ...
  double utilisation = 0.0;  ///< ... and its value: by so much would its load have to fall.
  /// Each property that alone could make it hold. Empty where it holds already, or where something
  /// else than a limit state is broken, or where no factor within 10 is enough.
  std::vector<NeededChange> needed;
};

/// The material indices of one design.
struct DesignIndices {
  bool free_size = false;  ///< A continuous size: elasticities; else a list: neighbours.
  std::vector<GoverningLimit> governing;         ///< Free size only.
  std::vector<PropertyElasticity> elasticities;  ///< Free size only; density first, price last.
  std::optional<NextSize> lighter;               ///< Lists: next below in mass, feasible or not.
  std::optional<NextSize> heavier;               ///< Lists: next above in mass.
};

/// How mass and cost of a design depend on the properties of its material: the material indices of
/// the part as it is, with all its limits and prices, not of an ideal tie or beam.
///
/// Free size: elasticities by the multipliers of the limits that hold it (see `sensitivity` in
/// solver/sensitivity.hpp for formula and accuracy). A mass elasticity of -1/2 to E and 1 to the
/// density is the index E^(1/2) / rho. The properties are density, those that the governing limit
/// states read, and price; all others have none. Each is moved as the limit states see it, after
/// the factors of use and at the strength step of the design: they hold while the design stays in
/// its thickness step and blank. The axial modulus moves with E. A limit of the job on a property
/// itself stays as it is met.
///
/// Stock and lists of sizes: the next lighter and heavier size that can be bought, their difference
/// in mass and cost, and what would have to improve for the lighter one to hold: a property alone,
/// each limit state evaluated again at the changed value, to 1e-6 on the feasible side.
///
/// @param design  Of a result of `front`, `why` or `evaluate`; only its candidate and size are
/// read.
/// @param part, catalogue, settings  Those that it was made with.
/// @throws bismar::Error  as `evaluate`; conflict at "size": a free size that no limit holds, or
///   that breaks one, such as a size that was rounded up.
/// Source: as `sensitivity`.
[[nodiscard]] BISMAR_API DesignIndices design_indices(const Design& design,
                                                      const Part& part,
                                                      const Catalogue& catalogue,
                                                      const Settings& settings = {});

}  // namespace bismar
