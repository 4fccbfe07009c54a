// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <bismar/export.hpp>
#include <bismar/mechanics/section_box.hpp>
#include <bismar/numeric/function_ref.hpp>

#include <cstddef>
#include <cstdint>
#include <vector>

namespace bismar {

/// Lower bounds of the section area that a shape needs, for many materials.
///
/// The ratios of the shape are covered by boxes. In a box a separable condition
/// (separable_bound.hpp) asks factor * D(size) <= capacity, and D(size) >= c / size^q for the c and
/// q of its best section at sizes that go to zero (and likewise at those that grow without end), as
/// every demand is made of powers of the size; so that
///
///     size >= (factor c / capacity)^(1/q),   A >= a size^2 = [a c^(2/q)] [(factor /
///     capacity)^(2/q)]
///
/// The first bracket is a number of the box, the second one of the material: the loop over the
/// boxes only multiplies and compares. Boxes are split where a bound is asked for that they decide,
/// and stay split for the materials that follow.
class BISMAR_API ShapeBounds {
 public:
  /// Keeps views of both. `forming` decides corner radii.
  ShapeBounds(const SizingProblem& problem, std::size_t shape, Forming forming);

  /// The second brackets of a material, in all its thickness steps at its best.
  struct Needs {
    std::vector<double> weights;  ///< [conditions]; 0: says nothing.
  };
  [[nodiscard]] Needs needs(const std::vector<StepState>& states) const;

  /// A lower bound of the area [m^2]: no feasible section of the shape has less. Boxes that decide
  /// it are split until `enough` says so of the bound, or they are small.
  [[nodiscard]] double least_area(const Needs& needs, FunctionRef<bool(double)> enough);

  [[nodiscard]] std::size_t boxes() const { return ratios_.size(); }

 private:
  struct Condition {
    std::size_t source = 0;
    std::size_t term = 0;
    double power = 0.0;     ///< q; 0: the demand does not change with the size.
    bool at_large = false;  ///< c is that of sizes without end.
  };
  /// A limit state with separable conditions in a load case.
  struct Source {
    const LimitState* state = nullptr;
    std::size_t load_case = 0;
    std::vector<BestSection> kinds;  ///< Best sections that some material asks for.
    std::vector<double> small;  ///< [terms] demands of the box being filled, at a small size ...
    std::vector<double> large;  ///< ... and at a large one.
  };
  void find_sources();
  void find_conditions();
  void look(const std::vector<Interval>& ratios);
  void sample_demands(const Source& source, double size, std::vector<double>& out);
  void demands(Source& source, double size, std::vector<double>& out);
  void fill(std::size_t box);
  [[nodiscard]] bool split(std::size_t box);
  [[nodiscard]] double area_of(std::size_t box, const Needs& needs) const;

  const SizingProblem& problem_;
  const Shape& shape_;
  Forming forming_;
  std::vector<Source> sources_;
  std::vector<Condition> conditions_;  ///< The last one, of the least height, has no source.
  std::vector<std::vector<Interval>> ratios_;  ///< [box][dimension], the height's 1.
  std::vector<double> factors_;                ///< [box][condition]: the first brackets.
  std::vector<char> rough_;                    ///< [box] not enclosed yet.
  std::vector<double> areas_;                  ///< [box] for the material being asked for.
  SectionProperties sample_;                   ///< One of the shape at a height of 1 m.
  SectionBox enclosure_;
  bool enclosed_ = false;
  double rough_area_ = 0.0;
  SectionProperties best_;
  SectionProperties scaled_;
  std::vector<double> out_;
};

}  // namespace bismar
