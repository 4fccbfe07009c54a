// SPDX-License-Identifier: MIT
// The least height of given proportions.
#include "sizing/free_scratch.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/numeric/root.hpp>

#include <algorithm>
#include <limits>

namespace bismar {

bool FreeSizeProblem::settle(std::size_t group,
                             std::span<double> x,
                             double lower,
                             double upper) const {
  const Mode& mode = modes_[group];
  if (!mode.similar) {
    return false;
  }
  std::array<double, max_dimensions> all{};
  x[0] = 1.0;
  dimensions_of(mode, x, all);
  if (!in_proportion(mode, all)) {
    return false;
  }
  SectionProperties unit;
  try {
    unit = section_at(mode, x);
  } catch (const Error&) {
    return false;
  }
  SectionProperties at;
  std::array<double, 2> objectives{};
  std::vector<double> utilisations(constraints(group));
  double size = lower;
  const auto all_at = [&](double h) {
    scale_into(unit, h, at);
    evaluate_at(mode, at, all, objectives, utilisations);
  };
  all_at(size);
  // Each utilisation that falls raises the size to where it is met; met once, it stays met.
  for (std::size_t i = 0; i < utilisations.size(); ++i) {
    if (!(utilisations[i] > 1.0) || utilisation_trend(group, i, 0) != Trend::falls) {
      continue;
    }
    const auto bracket = smallest_feasible(
        [&](double h) {
          scale_into(unit, h, at);
          return one_utilisation(mode, i, at, all);
        },
        size,
        upper);
    if (!bracket.x) {
      return false;
    }
    size = *bracket.x;
    all_at(size);
  }
  // The plain path may differ by a rounding from the scaled one.
  double step = 4.0 * std::numeric_limits<double>::epsilon();
  for (int tries = 0; tries < 16; ++tries) {
    x[0] = std::min(size, upper);
    evaluate(group, x, objectives, utilisations);
    bool falls = false;
    bool other = false;
    for (std::size_t i = 0; i < utilisations.size(); ++i) {
      if (utilisations[i] > 1.0) {
        (utilisation_trend(group, i, 0) == Trend::falls ? falls : other) = true;
      }
    }
    if (!falls) {
      return !other;
    }
    size *= 1.0 + step;
    step *= 2.0;
  }
  return false;
}

double FreeSizeProblem::one_utilisation(const Mode& mode,
                                        std::size_t constraint,
                                        const SectionProperties& section,
                                        std::span<const double> dimensions) const {
  double u = 0.0;
  if (constraint < constraints_.size()) {
    const auto& one = constraints_[constraint];
    if (one.kind == Constraint::Kind::limit_state) {
      return sizing_.applies(one, constraint, mode.piece, section)
                 ? sizing_.limit_utilisation(one, *mode.piece.step, section)
                 : 0.0;
    }
    std::array<double, 2> objectives{};
    sizing_.evaluate_section(
        base_, std::span(&one, 1), mode.piece, section, objectives, std::span(&u, 1));
    return u;
  }
  std::vector<double> own(FreeConstraint::first_proportion + 2 * mode.proportions.size());
  own_utilisations(mode, section, dimensions, own);
  return own[constraint - constraints_.size()];
}

}  // namespace bismar
