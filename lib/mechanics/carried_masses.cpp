// SPDX-License-Identifier: MIT
// The lowest natural frequency of a beam that carries masses, in a beam of L = E I = rho A = 1: a
// frequency is then beta^2, and a mass is its ratio mu to the mass of the beam.
#include <bismar/mechanics/vibration.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/root.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <limits>
#include <optional>
#include <span>
#include <string>
#include <utility>
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
  std::vector<PointMass> masses;
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

/// Integral over the beam of a polynomial of up to seventh degree between the breaks: exact.
template <class Function>
double integral(std::vector<double> breaks, Function f) {
  constexpr std::array<double, 2> node = {0.3399810435848563, 0.8611363115940526};
  constexpr std::array<double, 2> weight = {0.6521451548625461, 0.3478548451374538};
  std::sort(breaks.begin(), breaks.end());
  double sum = 0.0;
  for (std::size_t k = 0; k + 1 < breaks.size(); ++k) {
    const double half = (breaks[k + 1] - breaks[k]) / 2.0;
    const double middle = breaks[k] + half;
    for (std::size_t g = 0; g < node.size(); ++g) {
      sum += weight[g] * half * (f(middle - half * node[g]) + f(middle + half * node[g]));
    }
  }
  return sum;
}

std::vector<double> breaks_of(const Problem& problem) {
  return problem.overhangs() ? std::vector<double>{0.0, problem.second, 1.0}
                             : std::vector<double>{0.0, 1.0};
}

/// Sum of 1/beta_n^4 over all modes: the trace of the operator that deflection and mass make.
double dunkerley_sum(const Problem& problem) {
  double sum =
      integral(breaks_of(problem), [&](double x) { return unit_deflection(problem, x, x); });
  for (const PointMass& mass : problem.masses) {
    sum += mass.ratio * unit_deflection(problem, mass.at, mass.at);
  }
  return sum;
}

/// Rayleigh's quotient of the shape that a force at `at` makes, an upper bound of beta_1^4.
double rayleigh_quotient(const Problem& problem, double at) {
  std::vector<double> breaks = breaks_of(problem);
  breaks.push_back(at);
  const auto shape = [&](double x) { return unit_deflection(problem, x, at); };
  double inertia = integral(std::move(breaks), [&](double x) { return shape(x) * shape(x); });
  for (const PointMass& mass : problem.masses) {
    inertia += mass.ratio * shape(mass.at) * shape(mass.at);
  }
  const double work = shape(at);
  return inertia > 0.0 ? work / inertia : std::numeric_limits<double>::infinity();
}

double least_rayleigh_quotient(const Problem& problem) {
  const bool one_sided = problem.support == Support::cantilever;
  double least = rayleigh_quotient(problem, one_sided ? 1.0 : problem.second / 2.0);
  if (problem.overhangs()) {
    least = std::min(least, rayleigh_quotient(problem, 1.0));
  }
  for (const PointMass& mass : problem.masses) {
    least = std::min(least, rayleigh_quotient(problem, mass.at));
  }
  return least;
}

// --- the exact vibration
// ---------------------------------------------------------------------------

/// w, w', w'' and w''' at one place.
using State = std::array<double, 4>;

/// The functions of Krylov at one length l: S_k = sum over j of (beta^4)^j l^(4j+k) / (4j+k)!.
std::array<double, 4> krylov(double beta, double l) {
  const double x = beta * l;
  if (x < 1.0) {
    // The differences of the closed forms would lose digits here; the series needs few terms.
    const double x4 = x * x * x * x;
    std::array<double, 4> s{};
    double power = 1.0;
    for (std::size_t k = 0; k < 4; ++k) {
      double term = power;
      double sum = term;
      double n = static_cast<double>(k);
      while (std::abs(term) > 1e-18 * sum) {
        term *= x4 / ((n + 1.0) * (n + 2.0) * (n + 3.0) * (n + 4.0));
        sum += term;
        n += 4.0;
      }
      s[k] = sum;
      power *= l / (static_cast<double>(k) + 1.0);
    }
    return s;
  }
  const double ch = std::cosh(x);
  const double sh = std::sinh(x);
  const double c = std::cos(x);
  const double s = std::sin(x);
  return {(ch + c) / 2.0,
          (sh + s) / (2.0 * beta),
          (ch - c) / (2.0 * beta * beta),
          (sh - s) / (2.0 * beta * beta * beta)};
}

State carried(const State& u, const std::array<double, 4>& s, double beta4) {
  return {u[0] * s[0] + u[1] * s[1] + u[2] * s[2] + u[3] * s[3],
          beta4 * u[0] * s[3] + u[1] * s[0] + u[2] * s[1] + u[3] * s[2],
          beta4 * (u[0] * s[2] + u[1] * s[3]) + u[2] * s[0] + u[3] * s[1],
          beta4 * (u[0] * s[1] + u[1] * s[2] + u[2] * s[3]) + u[3] * s[0]};
}

/// The two motions that the first support leaves open, carried along the beam.
class Motion {
 public:
  Motion(const Problem& problem, double beta)
      : beta_(beta),
        a_(problem.support == Support::pinned_pinned ? State{0, 1, 0, 0} : State{0, 0, 1, 0}),
        b_{0, 0, 0, 1} {}

  void move_to(double x) {
    if (x > at_) {
      const std::array<double, 4> s = krylov(beta_, x - at_);
      a_ = carried(a_, s, beta4());
      b_ = carried(b_, s, beta4());
      at_ = x;
    }
  }
  void pass_mass(double ratio) {
    a_[3] += ratio * beta4() * a_[0];
    b_[3] += ratio * beta4() * b_[0];
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
  [[nodiscard]] double beta4() const { return beta_ * beta_ * beta_ * beta_; }
  double beta_;
  double at_ = 0.0;
  State a_;
  State b_;
};

/// The determinant of the conditions at the far end: zero at each natural frequency.
double end_conditions(const Problem& problem, double beta) {
  Motion motion(problem, beta);
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

/// The first root of the end conditions, see the header for why it is the first.
double first_root(const Problem& problem) {
  const double sum = dunkerley_sum(problem);
  const double quotient = least_rayleigh_quotient(problem);
  constexpr double slack = 1e-9;  // a single heavy mass makes both bounds equal
  const double low = std::pow(sum, -0.25) * (1.0 - slack);
  double high = std::pow(quotient, 0.25) * (1.0 + slack);
  const double unit = end_conditions(problem, low);
  const auto falling = [&](double beta) { return end_conditions(problem, beta) / unit; };
  double from = low;
  if (sum * quotient >= 3.0 || falling(high) > 0.0) {
    constexpr int steps = 256;
    const double ratio = std::pow(high / low, 1.0 / steps);
    double to = low;
    do {
      from = to;
      to = from * ratio;
    } while (falling(to) > 0.0 && to < high);
    high = to;
  }
  // The exponential turns a change of sign into a crossing of 1.
  const LimitBracket bracket = largest_feasible(
      [&](double beta) { return std::exp(-falling(beta)); }, from, high, {.relative_width = 1e-15});
  if (!bracket.x || !bracket.infeasible) {
    throw InternalError("no natural frequency between its bounds");
  }
  return *bracket.x;
}

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

void check(const UniformBeam& beam,
           Support support,
           std::span<const AttachedMass> masses,
           const std::optional<double>& second_support) {
  FaultList faults;
  mechanics::require_positive(faults, "beam.bending_stiffness", beam.bending_stiffness);
  mechanics::require_positive(faults, "beam.mass_per_length", beam.mass_per_length);
  mechanics::require_positive(faults, "beam.length", beam.length);
  const bool length_known = std::isfinite(beam.length) && beam.length > 0.0;
  const double end = beam.length * (1.0 + end_slack);
  for (std::size_t i = 0; i < masses.size(); ++i) {
    const std::string where = "masses/" + std::to_string(i);
    mechanics::require_positive(faults, where + "/mass", masses[i].mass);
    mechanics::require_not_negative(faults, where + "/at", masses[i].at);
    if (length_known && std::isfinite(masses[i].at) && masses[i].at > end) {
      mechanics::add_out_of_range(
          faults, where + "/at", masses[i].at, "a place on the beam, between 0 and its length");
    }
  }
  if (second_support) {
    mechanics::require_positive(faults, "second_support", *second_support);
    if (length_known && std::isfinite(*second_support) && *second_support > end) {
      mechanics::add_out_of_range(
          faults, "second_support", *second_support, "a place on the beam, up to its length");
    }
    if (support != Support::pinned_pinned && support != Support::fixed_pinned) {
      faults.add(Code::conflict,
                 "second_support",
                 "Only a beam whose second support is a pin may overhang it; give the support as "
                 "pinned at both ends or as fixed and pinned.");
    }
  }
  faults.throw_if_any();
}

}  // namespace

double lowest_natural_frequency(const UniformBeam& beam,
                                Support support,
                                std::span<const AttachedMass> masses,
                                std::optional<double> second_support) {
  check(beam, support, masses, second_support);
  Problem problem;
  problem.support = support;
  problem.second = std::min(1.0, second_support.value_or(beam.length) / beam.length);
  if (masses.empty() && !problem.overhangs()) {
    return natural_frequency(beam, bare_root(support));
  }
  const double own = beam.mass_per_length * beam.length;
  for (const AttachedMass& mass : masses) {
    problem.masses.push_back(
        {.at = std::min(1.0, mass.at / beam.length), .ratio = mass.mass / own});
  }
  std::sort(problem.masses.begin(),
            problem.masses.end(),
            [](const PointMass& a, const PointMass& b) { return a.at < b.at; });
  return natural_frequency(beam, first_root(problem));
}

}  // namespace bismar
