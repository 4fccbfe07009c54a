// SPDX-License-Identifier: MIT
// The lowest natural frequency of a beam that carries masses, in a beam of L = E I = rho A = 1: the
// square of the angular frequency is then lambda = beta^4, and a mass is its ratio mu to the mass
// of the beam.
#include "mechanics/carried_masses.hpp"

#include <bismar/mechanics/vibration.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <limits>
#include <optional>
#include <span>
#include <string>
#include <vector>

namespace bismar {

namespace {

/// A station may miss L by this much after unit conversion; it is then taken as L.
constexpr double end_slack = 1e-12;

struct PointMass {
  double at = 0.0;
  double ratio = 0.0;  ///< mu
};

struct Problem {
  Support support = Support::cantilever;
  double second = 1.0;  ///< Where the second support stands; not read for a cantilever.
  std::span<const PointMass> masses;  ///< In order along the beam.
  [[nodiscard]] bool overhangs() const {
    return support != Support::cantilever && support != Support::fixed_fixed && second < 1.0;
  }
};

// --- deflection under a unit force
// -----------------------------------------------------------------

/// Deflection at one place of a span of length 1 under a unit force at the other, x <= y.
double within_span(Support support, double x, double y) {
  const double rest = 1.0 - y;
  switch (support) {
    case Support::cantilever:
      return x * x * (3.0 * y - x) / 6.0;
    case Support::pinned_pinned:
      return x * rest * (y * (2.0 - y) - x * x) / 6.0;
    case Support::fixed_pinned:
      return x * x * rest * (3.0 * y * (2.0 - y) - x * (2.0 + y * (2.0 - y))) / 12.0;
    case Support::fixed_fixed:
      return x * x * rest * rest * (3.0 * y - x * (1.0 + 2.0 * y)) / 6.0;
  }
  throw InternalError("support without a deflection");
}

/// G(x, y), overhang included.
double unit_deflection(const Problem& problem, double a, double b) {
  const double x = std::min(a, b);
  const double y = std::max(a, b);
  if (!problem.overhangs()) {
    return within_span(problem.support, x, y);
  }
  const double s = problem.second;
  if (y <= s) {
    return s * s * s * within_span(problem.support, x / s, y / s);
  }
  const bool pinned = problem.support == Support::pinned_pinned;
  if (x <= s) {
    // The overhang turns with the support.
    const double slope = pinned ? x * (s * s - x * x) / (6.0 * s) : x * x * (s - x) / (4.0 * s);
    return -(y - s) * slope;
  }
  const double p = x - s;
  const double q = y - s;
  return p * p * (3.0 * q - p) / 6.0 + s / (pinned ? 3.0 : 4.0) * p * q;
}

/// Integral of a polynomial of up to seventh degree: exact.
template <class Function>
double integral(double from, double to, Function f) {
  constexpr std::array<double, 2> node = {0.3399810435848563, 0.8611363115940526};
  constexpr std::array<double, 2> weight = {0.6521451548625461, 0.3478548451374538};
  const double half = (to - from) / 2.0;
  const double middle = from + half;
  double sum = 0.0;
  for (std::size_t g = 0; g < node.size(); ++g) {
    sum += weight[g] * half * (f(middle - half * node[g]) + f(middle + half * node[g]));
  }
  return sum;
}

/// Integral of G(x, x) over a span of length 1.
double own_sum(Support support) {
  switch (support) {
    case Support::cantilever:
      return 1.0 / 12.0;
    case Support::pinned_pinned:
      return 1.0 / 90.0;
    case Support::fixed_pinned:
      return 1.0 / 210.0;
    case Support::fixed_fixed:
      return 1.0 / 420.0;
  }
  throw InternalError("support without a sum of Dunkerley");
}

/// Sum of 1/lambda_n over all modes: the trace of the operator that deflection and mass make.
double dunkerley_sum(const Problem& problem) {
  double sum = own_sum(problem.support);
  if (problem.overhangs()) {
    const double s = problem.second;
    const double o = 1.0 - s;
    const double turn = problem.support == Support::pinned_pinned ? 3.0 : 4.0;
    sum = sum * s * s * s * s + o * o * o * o / 12.0 + s / turn * o * o * o / 3.0;
  }
  for (const PointMass& mass : problem.masses) {
    sum += mass.ratio * unit_deflection(problem, mass.at, mass.at);
  }
  return sum;
}

/// Rayleigh's quotient of the shape that a force at `at` makes, an upper bound of lambda_1.
double rayleigh_quotient(const Problem& problem, double at) {
  const auto shape = [&](double x) { return unit_deflection(problem, x, at); };
  const auto square = [&](double x) { return shape(x) * shape(x); };
  const double support = problem.overhangs() ? problem.second : 1.0;
  const double first = std::min(at, support);
  const double second = std::max(at, support);
  double inertia = integral(0.0, first, square) + integral(first, second, square) +
                   integral(second, 1.0, square);
  for (const PointMass& mass : problem.masses) {
    inertia += mass.ratio * square(mass.at);
  }
  const double work = shape(at);
  return inertia > 0.0 ? work / inertia : std::numeric_limits<double>::infinity();
}

/// The better of two shapes: of a force in the middle or at the free end, and at the mass that has
/// most to say.
double least_rayleigh_quotient(const Problem& problem) {
  const bool at_end = problem.support == Support::cantilever || problem.second < 0.7;
  double least = rayleigh_quotient(problem, at_end ? 1.0 : problem.second / 2.0);
  double most = 0.0;
  double place = 0.0;
  for (const PointMass& mass : problem.masses) {
    const double share = mass.ratio * unit_deflection(problem, mass.at, mass.at);
    if (share > most) {
      most = share;
      place = mass.at;
    }
  }
  return most > 0.0 ? std::min(least, rayleigh_quotient(problem, place)) : least;
}

// --- the exact vibration
// ---------------------------------------------------------------------------

/// w, w', w'' and w''' at one place.
using State = std::array<double, 4>;

/// No first root is larger, whatever the support: fixed at both ends, beta = 4.7300; one support
/// more makes at most the second root of the beam without it (4.6941 for a cantilever), and masses
/// lower it.
constexpr double largest_first_root = 500.57;
constexpr std::size_t krylov_terms = 10;

/// 1 / (4 j + k)!
constexpr auto krylov_coefficients = [] {
  std::array<std::array<double, 4>, krylov_terms> c{};
  double factorial = 1.0;
  for (std::size_t n = 0; n < 4 * krylov_terms; ++n) {
    factorial *= n > 0 ? static_cast<double>(n) : 1.0;
    c[n / 4][n % 4] = 1.0 / factorial;
  }
  return c;
}();

/// The functions of Krylov at one length l: S_k = sum over j of lambda^j l^(4j+k) / (4j+k)!. Ten
/// terms leave out less than 1e-19 up to the largest first root; all are positive, so that nothing
/// cancels, as it does in the closed forms with cosh - cos.
std::array<double, 4> krylov(double lambda, double l) {
  const double x4 = lambda * l * l * l * l;
  std::size_t j = x4 < 1.0 ? 5 : x4 < 32.0 ? 7 : krylov_terms;
  std::array<double, 4> s = krylov_coefficients[--j];
  while (j-- > 0) {
    for (std::size_t k = 0; k < 4; ++k) {
      s[k] = s[k] * x4 + krylov_coefficients[j][k];
    }
  }
  s[1] *= l;
  s[2] *= l * l;
  s[3] *= l * l * l;
  return s;
}

State carried(const State& u, const std::array<double, 4>& s, double lambda) {
  return {u[0] * s[0] + u[1] * s[1] + u[2] * s[2] + u[3] * s[3],
          lambda * u[0] * s[3] + u[1] * s[0] + u[2] * s[1] + u[3] * s[2],
          lambda * (u[0] * s[2] + u[1] * s[3]) + u[2] * s[0] + u[3] * s[1],
          lambda * (u[0] * s[1] + u[1] * s[2] + u[2] * s[3]) + u[3] * s[0]};
}

/// The two motions that the first support leaves open, carried along the beam.
class Motion {
 public:
  Motion(const Problem& problem, double lambda)
      : lambda_(lambda),
        a_(problem.support == Support::pinned_pinned ? State{0, 1, 0, 0} : State{0, 0, 1, 0}),
        b_{0, 0, 0, 1} {}

  void move_to(double x) {
    if (x > at_) {
      const std::array<double, 4> s = krylov(lambda_, x - at_);
      a_ = carried(a_, s, lambda_);
      b_ = carried(b_, s, lambda_);
      at_ = x;
    }
  }
  void pass_mass(double ratio) {
    a_[3] += ratio * lambda_ * a_[0];
    b_[3] += ratio * lambda_ * b_[0];
  }
  /// One motion without deflection here is left, and the unknown reaction makes the other.
  void pass_support() {
    for (std::size_t i = 1; i < 4; ++i) {
      a_[i] = a_[i] * b_[0] - b_[i] * a_[0];
    }
    a_[0] = 0.0;
    b_ = {0.0, 0.0, 0.0, 1.0};
  }
  /// Zero where some motion has both components zero.
  [[nodiscard]] double determinant(std::size_t i, std::size_t j) const {
    return a_[i] * b_[j] - a_[j] * b_[i];
  }

 private:
  double lambda_;
  double at_ = 0.0;
  State a_;
  State b_;
};

/// The determinant of the conditions at the far end: zero at each natural frequency.
double end_conditions(const Problem& problem, double lambda) {
  Motion motion(problem, lambda);
  bool before_support = problem.overhangs();
  for (const PointMass& mass : problem.masses) {
    if (before_support && mass.at > problem.second) {
      motion.move_to(problem.second);
      motion.pass_support();
      before_support = false;
    }
    motion.move_to(mass.at);
    motion.pass_mass(mass.ratio);
  }
  if (before_support) {
    motion.move_to(problem.second);
    motion.pass_support();
  }
  motion.move_to(1.0);
  if (problem.support == Support::cantilever || problem.overhangs()) {
    return motion.determinant(2, 3);
  }
  return motion.determinant(0, problem.support == Support::fixed_fixed ? 1 : 2);
}

/// The same at lambda = 0, where masses do nothing.
double end_conditions_at_rest(const Problem& problem) {
  const double s = problem.second;
  switch (problem.support) {
    case Support::cantilever:
      return 1.0;
    case Support::pinned_pinned:
      return problem.overhangs() ? -s * s : 1.0;
    case Support::fixed_pinned:
      return problem.overhangs() ? -s * s * s / 3.0 : 1.0 / 3.0;
    case Support::fixed_fixed:
      return 1.0 / 12.0;
  }
  throw InternalError("support without end conditions");
}

/// A value of the end conditions over those at rest.
struct Sample {
  double lambda = 0.0;
  double value = 1.0;
};

/// The first lambda at which the end conditions hold. Over their value at rest they are
///
///     f = product over all modes of (1 - lambda / lambda_n),   f'(0) = -S (Dunkerley's sum)
///
/// (entire, of order 1/4, with real positive roots), which falls to the first root and is convex up
/// to it, so that the secant through two places below it never passes it.
class FirstRoot {
 public:
  explicit FirstRoot(const Problem& problem)
      : problem_(problem), rest_(end_conditions_at_rest(problem)) {}

  [[nodiscard]] double find() const {
    const double sum = dunkerley_sum(problem_);
    const double quotient = std::min(least_rayleigh_quotient(problem_), largest_first_root);
    // A single heavy mass makes both bounds equal.
    constexpr double slack = 4e-9;
    const Sample low = {1.0 / sum * (1.0 - slack), 1.0};
    const Sample high = sample(quotient * (1.0 + slack));
    // Three roots below the quotient would make the sum more than 3 over it, and the sign says that
    // their number is odd.
    if (sum * quotient < 3.0 && high.value <= 0.0) {
      // The other roots' share of the slope: each is far above, and their sum is known.
      const double others = std::exp(-std::max(0.0, sum * quotient - 1.0));
      return between(low, high, high.lambda * (1.0 + high.value / others));
    }
    return from_below(sample(low.lambda));
  }

 private:
  [[nodiscard]] Sample sample(double lambda) const {
    return {lambda, end_conditions(problem_, lambda) / rest_};
  }

  static double secant(const Sample& a, const Sample& b) {
    return b.lambda - b.value * (b.lambda - a.lambda) / (b.value - a.value);
  }

  /// Secants between a place above zero and one not above it; halves where they leave the bracket
  /// or do not shorten. The error of a step is about the product of the two before it, so that a
  /// step of 1e-9 leaves nothing to be seen.
  [[nodiscard]] double between(Sample low, Sample high, double guess) const {
    constexpr double small_step = 1e-9;
    Sample last = high;
    double length = high.lambda - low.lambda;
    for (;;) {
      const double middle = low.lambda + (high.lambda - low.lambda) / 2.0;
      if (!(low.lambda < middle && middle < high.lambda)) {
        return low.lambda;
      }
      const bool inside = guess >= low.lambda && guess <= high.lambda;
      const double step = std::abs(guess - last.lambda);
      if (inside && step <= small_step * high.lambda) {
        return guess;
      }
      const bool shortens = inside && step <= length / 2.0;
      length = shortens ? step : (high.lambda - low.lambda) / 2.0;
      const Sample next = sample(shortens ? guess : middle);
      (next.value > 0.0 ? low : high) = next;
      guess = secant(last, next);
      last = next;
    }
  }

  /// Secants from at rest on, all below the root but for rounding.
  [[nodiscard]] double from_below(Sample next) const {
    constexpr double small_step = 1e-15;
    Sample last;
    while (next.value > 0.0) {
      const double guess = secant(last, next);
      if (!(guess > next.lambda * (1.0 + small_step))) {
        return next.lambda;
      }
      last = next;
      next = sample(guess);
    }
    return between(last, next, secant(last, next));
  }

  const Problem& problem_;
  double rest_;
};

double bare_root(Support support) {
  static const std::array<double, 4> roots = {characteristic_root(BeamEnds::fixed_free, 1),
                                              characteristic_root(BeamEnds::pinned_pinned, 1),
                                              characteristic_root(BeamEnds::fixed_pinned, 1),
                                              characteristic_root(BeamEnds::fixed_fixed, 1)};
  switch (support) {
    case Support::cantilever:
      return roots[0];
    case Support::pinned_pinned:
      return roots[1];
    case Support::fixed_pinned:
      return roots[2];
    case Support::fixed_fixed:
      return roots[3];
  }
  throw InternalError("support without a characteristic root");
}

}  // namespace

namespace mechanics {

void require_carried(FaultList& faults,
                     double length,
                     Support support,
                     std::span<const AttachedMass> masses,
                     const std::optional<double>& second_support) {
  const bool length_known = std::isfinite(length) && length > 0.0;
  const double end = length * (1.0 + end_slack);
  for (std::size_t i = 0; i < masses.size(); ++i) {
    const std::string where = "masses/" + std::to_string(i);
    require_positive(faults, where + "/mass", masses[i].mass);
    require_not_negative(faults, where + "/at", masses[i].at);
    if (length_known && std::isfinite(masses[i].at) && masses[i].at > end) {
      add_out_of_range(
          faults, where + "/at", masses[i].at, "a place on the beam, between 0 and its length");
    }
  }
  if (second_support) {
    require_positive(faults, "second_support", *second_support);
    if (length_known && std::isfinite(*second_support) && *second_support > end) {
      add_out_of_range(
          faults, "second_support", *second_support, "a place on the beam, up to its length");
    }
    if (support != Support::pinned_pinned && support != Support::fixed_pinned) {
      faults.add(Code::conflict,
                 "second_support",
                 "Only a beam whose second support is a pin may overhang it; give the support as "
                 "pinned at both ends or as fixed and pinned.");
    }
  }
}

}  // namespace mechanics

double lowest_natural_frequency(const UniformBeam& beam,
                                Support support,
                                std::span<const AttachedMass> masses,
                                std::optional<double> second_support) {
  FaultList faults;
  mechanics::require_positive(faults, "beam.bending_stiffness", beam.bending_stiffness);
  mechanics::require_positive(faults, "beam.mass_per_length", beam.mass_per_length);
  mechanics::require_positive(faults, "beam.length", beam.length);
  mechanics::require_carried(faults, beam.length, support, masses, second_support);
  faults.throw_if_any();
  Problem problem;
  problem.support = support;
  problem.second = std::min(1.0, second_support.value_or(beam.length) / beam.length);
  if (masses.empty() && !problem.overhangs()) {
    return natural_frequency(beam, bare_root(support));
  }
  // Sizing asks for thousands of frequencies: no memory is taken for the few masses of a member.
  std::array<PointMass, 8> few;
  std::vector<PointMass> many(masses.size() > few.size() ? masses.size() : 0);
  const std::span<PointMass> places =
      many.empty() ? std::span<PointMass>(few).first(masses.size()) : std::span<PointMass>(many);
  const double own = beam.mass_per_length * beam.length;
  std::transform(masses.begin(), masses.end(), places.begin(), [&](const AttachedMass& mass) {
    return PointMass{.at = std::min(1.0, mass.at / beam.length), .ratio = mass.mass / own};
  });
  std::sort(places.begin(), places.end(), [](const PointMass& a, const PointMass& b) {
    return a.at < b.at;
  });
  problem.masses = places;
  const double lambda = FirstRoot(problem).find();
  return natural_frequency(beam, std::sqrt(std::sqrt(lambda)));
}

}  // namespace bismar
