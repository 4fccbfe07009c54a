// SPDX-License-Identifier: MIT
#include <bismar/mechanics/vibration.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/function_ref.hpp>

#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

void require_mode(FaultList& faults, int mode) {
  if (mode < 1 || mode > 1000) {
    mechanics::add_out_of_range(faults, "mode", mode, "a whole number from 1 to 1000");
  }
}

void require_beam(FaultList& faults, const UniformBeam& beam) {
  mechanics::require_positive(faults, "beam.bending_stiffness", beam.bending_stiffness);
  mechanics::require_positive(faults, "beam.mass_per_length", beam.mass_per_length);
  mechanics::require_positive(faults, "beam.length", beam.length);
}

/// The place between low and high at which f leaves the sign that it has just above low; high where
/// it keeps it. Halving down to neighbouring doubles: nothing can fail to converge.
double leaves_sign(double low, double high, double sign, FunctionRef<double(double)> f) {
  for (;;) {
    const double middle = low + (high - low) / 2.0;
    if (!(low < middle && middle < high)) {
      return high;
    }
    (sign * f(middle) > 0.0 ? low : high) = middle;
  }
}

/// 1 for an even n, -1 for an odd one.
double alternating(int n) { return n % 2 == 0 ? 1.0 : -1.0; }

}  // namespace

// The equations are divided by cosh x, so that no mode overflows. Each has one root between
// neighbouring multiples of pi, where its sign is that of the cosine or of the sine.
double characteristic_root(BeamEnds ends, int mode) {
  FaultList faults;
  require_mode(faults, mode);
  faults.throw_if_any();
  const double n = mode;
  switch (ends) {
    case BeamEnds::fixed_free:
      return leaves_sign((n - 1.0) * pi, n * pi, alternating(mode - 1), [](double x) {
        return std::cos(x) + 1.0 / std::cosh(x);
      });
    case BeamEnds::pinned_pinned:
      return n * pi;
    case BeamEnds::fixed_fixed:
    case BeamEnds::free_free:
      return leaves_sign(n * pi, (n + 1.0) * pi, alternating(mode), [](double x) {
        return std::cos(x) - 1.0 / std::cosh(x);
      });
    case BeamEnds::fixed_pinned:
      // At n pi the function is -cos(n pi) tanh(n pi).
      return leaves_sign(n * pi, (n + 1.0) * pi, -alternating(mode), [](double x) {
        return std::sin(x) - std::cos(x) * std::tanh(x);
      });
  }
  throw InternalError("beam ends without a characteristic equation");
}

// The mass lowers the n-th root from that of the free tip towards the root before it of the tip
// held in place, which no mass can pass.
double tip_mass_root(double mass_ratio, int mode) {
  FaultList faults;
  mechanics::require_not_negative(faults, "mass_ratio", mass_ratio);
  require_mode(faults, mode);
  faults.throw_if_any();
  const double low = mode == 1 ? 0.0 : characteristic_root(BeamEnds::fixed_pinned, mode - 1);
  const double high = characteristic_root(BeamEnds::fixed_free, mode);
  return leaves_sign(low, high, alternating(mode - 1), [mass_ratio](double x) {
    return 1.0 / std::cosh(x) + std::cos(x) +
           mass_ratio * x * (std::cos(x) * std::tanh(x) - std::sin(x));
  });
}

double natural_frequency(const UniformBeam& beam, double root) {
  FaultList faults;
  require_beam(faults, beam);
  mechanics::require_positive(faults, "root", root);
  faults.throw_if_any();
  const double square = root / beam.length * (root / beam.length);
  return square / (2.0 * pi) * std::sqrt(beam.bending_stiffness / beam.mass_per_length);
}

double tip_mass_frequency_estimate(const UniformBeam& beam, double tip_mass) {
  FaultList faults;
  require_beam(faults, beam);
  mechanics::require_not_negative(faults, "tip_mass", tip_mass);
  faults.throw_if_any();
  const double L = beam.length;
  const double mass = tip_mass + 33.0 / 140.0 * beam.mass_per_length * L;
  return std::sqrt(3.0 * beam.bending_stiffness / (L * L * L * mass)) / (2.0 * pi);
}

}  // namespace bismar
