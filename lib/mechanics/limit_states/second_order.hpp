// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/limit_state.hpp>

#include <string>
#include <vector>

/// What compression adds to first-order moments, for the limit states that hold stresses against a
/// strength.
namespace bismar::mechanics {

/// In bending about one axis.
struct Amplification {
  double critical = 0.0;  ///< N_cr [N]; 0 where nothing is compressed.
  double share = 0.0;     ///< Factored compression over N_cr.

  /// 1 / (1 - N / N_cr), +infinity at N >= N_cr.
  [[nodiscard]] double factor() const;
  /// Of the range between the whole load case and `stress_ratio` R times it, over that of the
  /// first-order moment: with n = N / N_cr
  ///
  ///     [1 / (1 - n) - R / (1 - R n)] / (1 - R) = 1 / [(1 - n) (1 - R n)]
  ///
  /// for R > 0; below 0 the load case's other end is in tension, which gets no credit.
  [[nodiscard]] double range_factor(double stress_ratio) const;
};

struct Amplifications {
  Amplification y;  ///< Of M_y.
  Amplification z;  ///< Of M_z.
  /// N >= N_cr in a plane that is bent: the deflection grows without bound.
  bool unstable = false;
};

/// Largest compression of the load case with the limit state's factor over Euler's load, with the E
/// of bending and the effective length of the plane, as the deflection takes them; where y and z
/// are no principal axes that of the weak principal axis with the longer effective length.
///
/// The rise is exact for moments in the shape of the buckled member; see the deflection and
/// compression with bending for how far off it is.
///
/// Source: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., section 1.11 (section from
/// memory).
[[nodiscard]] Amplifications amplifications(const CheckInput& input);

/// Whether there is anything to raise: then E is read.
[[nodiscard]] bool is_amplified(const LoadEffects& effects);

/// The forces of a station, own mass added, with its moments raised. Of a member that is not
/// unstable.
[[nodiscard]] InternalForces amplified_forces(const CheckInput& input,
                                              const Station& station,
                                              const Amplifications& raised);
/// Likewise with range_factor().
[[nodiscard]] InternalForces amplified_range_forces(const CheckInput& input,
                                                    const Station& station,
                                                    const Amplifications& raised,
                                                    double stress_ratio);

/// Adds the step of an explanation that says by how much the moments rise, if they do.
void add_amplification_step(const Amplifications& raised,
                            const CheckInput& input,
                            std::vector<std::string>& steps);

/// What is said of a member that is unstable.
[[nodiscard]] Explanation unstable_explanation(const std::string& subject,
                                               const Amplifications& raised,
                                               const CheckInput& input);

}  // namespace bismar::mechanics
