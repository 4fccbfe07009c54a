// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/separable_bound.hpp>

#include <cstddef>
#include <span>

/// Separable bounds that several limit states share.
namespace bismar::mechanics {

/// Of a limit state that reads no material at all: its own utilisation is the demand, against 1.
class MaterialFreeBound final : public SeparableBound {
 public:
  explicit MaterialFreeBound(const LimitState& state) : state_(state) {}
  [[nodiscard]] std::size_t terms() const override { return 1; }
  void demands(const DemandInput& input, std::span<double> out) const override;
  void capacities(const CapacityInput& input, std::span<double> out) const override;
  [[nodiscard]] bool exact(const CapacityInput&) const override { return true; }

 private:
  const LimitState& state_;
};

/// Largest von Mises stress of the loads without own mass in the full section [Pa].
[[nodiscard]] double equivalent_stress_of_loads(const DemandInput& input);

/// Of deflections and rotations. One term for bending, sqrt(sum of squares of both axes), and one
/// for each axis with its own compression: with the first-order part a = A / E and N / N_cr = B / E
///
///     a / (1 - N / N_cr) <= 1   if and only if   A + B <= E
///
/// (where a + n > 1 the left side is at least a + n, as n (1 - a - n) < 0) and two for what only
/// own mass and only shear do, against E / rho and G.
class DeformationBound final : public SeparableBound {
 public:
  enum class Kind : std::uint8_t { deflection, deflection_with_shear, rotation };
  explicit DeformationBound(Kind kind) : kind_(kind) {}
  [[nodiscard]] std::size_t terms() const override { return 4; }
  void demands(const DemandInput& input, std::span<double> out) const override;
  void capacities(const CapacityInput& input, std::span<double> out) const override;
  [[nodiscard]] bool exact(const CapacityInput& input) const override;

 private:
  Kind kind_;
};

/// Of columns that buckle in bending, with Z = pi^2 I / (K L)^2, so that N_cr = E Z:
///
///     N / A <= f                      the reduction factor is at most 1
///     N / Z <= E                      and at most 1 / lambda^2, so that N_b <= N_cr
///     N / sqrt(A Z) <= C sqrt(E f)    and at most C / lambda, C the largest chi lambda of the
///     curve
///
/// Why chi <= 1 / lambda^2: the curves solve (lambda^2 - y)(1 - y) = alpha (lambda - lambda_0) y
/// with y = chi lambda^2 and a right side that is not negative, and y is the lesser root, below
/// both 1 and lambda^2. Johnson's parabola lies below Euler's curve, which it touches.
class FlexuralBound final : public SeparableBound {
 public:
  [[nodiscard]] std::size_t terms() const override { return 4; }
  void demands(const DemandInput& input, std::span<double> out) const override;
  void capacities(const CapacityInput& input, std::span<double> out) const override;
  [[nodiscard]] bool exact(const CapacityInput&) const override { return false; }
};

}  // namespace bismar::mechanics
