// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <cstddef>
#include <span>

namespace bismar {

/// What a demand is made of: all but the material. References: valid during the call only.
struct DemandInput {
  const SectionProperties& section;
  const LoadEffects& effects;
  const MemberLimits& limits;
  double length = 0.0;  ///< [m]
};

/// What a capacity is made of: all but the section. References: valid during the call only.
struct CapacityInput {
  const MemberMaterial& material;
  const LoadEffects& effects;
  const MemberLimits& limits;
};

/// Conditions that a limit state cannot be met without, each a number of the section against a
/// number of the material. With the largest share
///
///     r = factor * max over t of demand_t(section) / capacity_t(material)
///
/// u >= r wherever r > 1, so that u <= 1 only if factor * demand_t <= capacity_t for every term t
/// (but for rounding: a relative 1e-9 is ample). They decide most pairs of a material and a size by
/// one comparison a term, of numbers made once a section and once a material; what they let pass is
/// not thereby feasible, unless the bound is exact().
///
/// Own mass, which couples section and density, is left out of a demand that acts against a
/// strength: acting_forces() only ever adds to the magnitudes of the forces, and each such limit
/// state rises with them.
class BISMAR_API SeparableBound {
 public:
  SeparableBound() = default;
  SeparableBound(const SeparableBound&) = delete;
  SeparableBound& operator=(const SeparableBound&) = delete;
  SeparableBound(SeparableBound&&) = delete;
  SeparableBound& operator=(SeparableBound&&) = delete;
  virtual ~SeparableBound();

  /// Number of terms; the same for every input.
  [[nodiscard]] virtual std::size_t terms() const = 0;
  /// Demands, >= 0, in whatever unit the capacity has; 0 where the section is of a kind that the
  /// limit state does not apply to, or where the load case asks nothing of the term.
  /// @param out  [terms()]
  virtual void demands(const DemandInput& input, std::span<double> out) const = 0;
  /// Capacities, > 0; +infinity where the term says nothing about this material. The values that
  /// the limit state needs() are present.
  /// @param out  [terms()]
  virtual void capacities(const CapacityInput& input, std::span<double> out) const = 0;
  /// Whether u = factor * max over t of demand_t / capacity_t, but for rounding.
  [[nodiscard]] virtual bool exact(const CapacityInput& input) const = 0;
};

}  // namespace bismar
