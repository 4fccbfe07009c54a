// SPDX-License-Identifier: MIT
#include <bismar/mechanics/vibration.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <optional>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;
constexpr UniformBeam unit{.bending_stiffness = 1.0, .mass_per_length = 1.0, .length = 1.0};

/// beta L of the unit beam from a frequency.
double root_of(double frequency) { return std::sqrt(2.0 * pi * frequency); }

double lowest(Support support,
              const std::vector<AttachedMass>& masses,
              std::optional<double> second_support = std::nullopt) {
  return lowest_natural_frequency(unit, support, masses, second_support);
}

/// The lowest frequency of the unit beam by cubic finite elements with consistent masses: stiffness
/// and mass matrix in full, inverse iteration. Nodes every 1/100, where masses and supports stand.
/// Its error in the frequency is (beta / 100)^4 / 1440, below 4e-9 for any support. With shear
/// (E I / (G A_s) above zero) the stiffness is that of the Timoshenko beam and the masses are
/// lumped at the nodes, without rotary inertia.
class FiniteElements {
 public:
  FiniteElements(Support support, double second, double shear = 0.0) {
    const double l = 1.0 / elements;
    const double phi = 12.0 * shear / (l * l);
    const double near = (4.0 + phi) * l * l;
    const double far = (2.0 - phi) * l * l;
    const std::array<std::array<double, 4>, 4> k = {{{12, 6 * l, -12, 6 * l},
                                                     {6 * l, near, -6 * l, far},
                                                     {-12, -6 * l, 12, -6 * l},
                                                     {6 * l, far, -6 * l, near}}};
    const std::array<std::array<double, 4>, 4> m = {{{156, 22 * l, 54, -13 * l},
                                                     {22 * l, 4 * l * l, 13 * l, -3 * l * l},
                                                     {54, 13 * l, 156, -22 * l},
                                                     {-13 * l, -3 * l * l, -22 * l, 4 * l * l}}};
    for (std::size_t e = 0; e < elements; ++e) {
      for (std::size_t i = 0; i < 4; ++i) {
        for (std::size_t j = 0; j < 4; ++j) {
          K[2 * e + i][2 * e + j] += k[i][j] / (l * l * l * (1.0 + phi));
          const double lumped = i == j && i % 2 == 0 ? l / 2.0 : 0.0;
          M[2 * e + i][2 * e + j] += shear > 0.0 ? lumped : m[i][j] * l / 420.0;
        }
      }
    }
    held[0] = true;
    held[1] = support != Support::pinned_pinned;
    if (support != Support::cantilever) {
      held[2 * node(second)] = true;
    }
    held[2 * elements + 1] = support == Support::fixed_fixed;
  }
  void add(const AttachedMass& mass) { M[2 * node(mass.at)][2 * node(mass.at)] += mass.mass; }
  double lowest_frequency() {
    for (std::size_t i = 0; i < size; ++i) {
      for (std::size_t j = 0; j < size; ++j) {
        if (held[i] || held[j]) {
          K[i][j] = i == j ? 1.0 : 0.0;
          M[i][j] = 0.0;
        }
      }
    }
    factorise();
    std::vector<double> u(size);
    for (std::size_t i = 0; i < size; ++i) {
      u[i] = held[i] ? 0.0 : 1.0 + 0.01 * static_cast<double>(i % 7);
    }
    double square = 0.0;
    for (int step = 0; step < 400; ++step) {
      std::vector<double> f(size, 0.0);
      double inertia = 0.0;
      for (std::size_t i = 0; i < size; ++i) {
        for (std::size_t j = i < 3 ? 0 : i - 3; j < std::min(size, i + 4); ++j) {
          f[i] += M[i][j] * u[j];
        }
        inertia += u[i] * f[i];
      }
      for (double& value : f) {
        value /= std::sqrt(inertia);
      }
      const std::vector<double> v = solved(f);
      double work = 0.0;
      for (std::size_t i = 0; i < size; ++i) {
        work += v[i] * f[i];
      }
      const double before = square;
      square = 1.0 / work;
      u = v;
      if (step > 5 && std::abs(square - before) < 1e-13 * square) {
        break;
      }
    }
    return std::sqrt(square) / (2.0 * pi);
  }

 private:
  static constexpr std::size_t elements = 100;
  static constexpr std::size_t size = 2 * elements + 2;
  using Matrix = std::vector<std::vector<double>>;
  Matrix K = Matrix(size, std::vector<double>(size, 0.0));
  Matrix M = Matrix(size, std::vector<double>(size, 0.0));
  std::vector<bool> held = std::vector<bool>(size, false);

  static std::size_t node(double x) { return static_cast<std::size_t>(std::lround(x * elements)); }
  /// K = L D L^T in place, three diagonals below the main one.
  void factorise() {
    for (std::size_t k = 0; k < size; ++k) {
      for (std::size_t i = k + 1; i < std::min(size, k + 4); ++i) {
        const double factor = K[i][k] / K[k][k];
        for (std::size_t j = k + 1; j <= i; ++j) {
          K[i][j] -= factor * K[j][k];
        }
      }
      for (std::size_t i = k + 1; i < std::min(size, k + 4); ++i) {
        K[i][k] /= K[k][k];
      }
    }
  }
  [[nodiscard]] std::vector<double> solved(std::vector<double> b) const {
    for (std::size_t k = 0; k < size; ++k) {
      for (std::size_t i = k + 1; i < std::min(size, k + 4); ++i) {
        b[i] -= K[i][k] * b[k];
      }
    }
    for (std::size_t k = size; k-- > 0;) {
      b[k] /= K[k][k];
      for (std::size_t i = k + 1; i < std::min(size, k + 4); ++i) {
        b[k] -= K[i][k] * b[i];
      }
    }
    return b;
  }
};

}  // namespace

TEST_CASE("The characteristic roots satisfy their equations and approach multiples of pi") {
  for (const int n : {1, 2, 3, 7, 50}) {
    const double free = characteristic_root(BeamEnds::fixed_free, n);
    CHECK(std::cos(free) == Approx(-1.0 / std::cosh(free)).margin(1e-13));
    const double fixed = characteristic_root(BeamEnds::fixed_fixed, n);
    CHECK(std::cos(fixed) == Approx(1.0 / std::cosh(fixed)).margin(1e-13));
    CHECK(fixed == characteristic_root(BeamEnds::free_free, n));
    const double pinned = characteristic_root(BeamEnds::fixed_pinned, n);
    CHECK(std::tan(pinned) == Approx(std::tanh(pinned)).epsilon(1e-12));
    CHECK(characteristic_root(BeamEnds::pinned_pinned, n) == n * pi);
  }
  CHECK(characteristic_root(BeamEnds::fixed_free, 1000) == Approx(999.5 * pi).epsilon(1e-15));
  CHECK(characteristic_root(BeamEnds::fixed_fixed, 1000) == Approx(1000.5 * pi).epsilon(1e-15));
  CHECK(characteristic_root(BeamEnds::fixed_pinned, 1000) == Approx(1000.25 * pi).epsilon(1e-15));
}

TEST_CASE("A tip mass takes the roots from the free tip to the tip held in place") {
  for (const int n : {1, 2, 5}) {
    CHECK(tip_mass_root(0.0, n) ==
          Approx(characteristic_root(BeamEnds::fixed_free, n)).epsilon(1e-15));
    CHECK(tip_mass_root(1.0, n) < tip_mass_root(0.5, n));
  }
  CHECK(tip_mass_root(1e12, 2) ==
        Approx(characteristic_root(BeamEnds::fixed_pinned, 1)).epsilon(1e-10));
  // A heavy mass on a spring of 3 E I / L^3.
  CHECK(tip_mass_root(1e9, 1) == Approx(std::pow(3e-9, 0.25)).epsilon(1e-9));
}

TEST_CASE("Rayleigh's estimate with 33/140 is never below the exact tip mass frequency") {
  for (const double mu : {0.0, 1e-3, 0.1, 1.0, 10.0, 1e4}) {
    const double exact = natural_frequency(unit, tip_mass_root(mu, 1));
    const double estimate = tip_mass_frequency_estimate(unit, mu);
    CHECK(estimate >= exact * (1.0 - 1e-12));
    CHECK(estimate <= 1.0147 * exact);
  }
}

TEST_CASE("A frequency follows stiffness, mass and length as the formula says") {
  // Steel strip 300 x 20 x 5 mm pinned at both ends, by hand: E I = 43.75 N m2, 0.785 kg/m.
  const UniformBeam strip{.bending_stiffness = 43.75, .mass_per_length = 0.785, .length = 0.3};
  const double by_hand = pi / (2.0 * 0.09) * std::sqrt(43.75 / 0.785);
  CHECK(lowest_natural_frequency(strip, Support::pinned_pinned) == Approx(by_hand).epsilon(1e-14));
  CHECK(by_hand == Approx(130.296).epsilon(1e-5));
  // Masses scale with the beam.
  const std::array<AttachedMass, 1> mass = {{{.mass = 0.785 * 0.3 * 2.0, .at = 0.12}}};
  const double factor = std::sqrt(43.75 / 0.785) / 0.09;
  CHECK(lowest_natural_frequency(strip, Support::fixed_fixed, mass) ==
        Approx(factor * lowest(Support::fixed_fixed, {{.mass = 2.0, .at = 0.4}})).epsilon(1e-12));
}

TEST_CASE("The general solution meets the closed forms") {
  for (const double mu : {1e-6, 0.2, 1.0, 5.0, 1e3, 1e9}) {
    CHECK(root_of(lowest(Support::cantilever, {{.mass = mu, .at = 1.0}})) ==
          Approx(tip_mass_root(mu, 1)).epsilon(1e-12));
  }
  // A mass on a support does nothing.
  for (const Support support :
       {Support::cantilever, Support::pinned_pinned, Support::fixed_pinned, Support::fixed_fixed}) {
    CHECK(lowest(support, {{.mass = 7.0, .at = 0.0}}) ==
          Approx(lowest(support, {})).epsilon(1e-12));
    if (support != Support::cantilever) {
      CHECK(lowest(support, {{.mass = 7.0, .at = 1.0}}) ==
            Approx(lowest(support, {})).epsilon(1e-12));
    }
  }
  // A heavy mass in the middle of springs of 48, 192 and 768/7 E I / L^3.
  const auto heavy = [](Support support) {
    return std::pow(root_of(lowest(support, {{.mass = 1e9, .at = 0.5}})), 4) * 1e9;
  };
  CHECK(heavy(Support::pinned_pinned) == Approx(48.0).epsilon(1e-7));
  CHECK(heavy(Support::fixed_fixed) == Approx(192.0).epsilon(1e-7));
  CHECK(heavy(Support::fixed_pinned) == Approx(768.0 / 7.0).epsilon(1e-7));
  // A mass that is split in two at the same place.
  CHECK(lowest(Support::fixed_pinned, {{.mass = 1.0, .at = 0.3}, {.mass = 2.0, .at = 0.3}}) ==
        Approx(lowest(Support::fixed_pinned, {{.mass = 3.0, .at = 0.3}})).epsilon(1e-13));
}

TEST_CASE("An overhang runs from the beam on two supports to the cantilever") {
  CHECK(lowest(Support::pinned_pinned, {}, 1.0) == lowest(Support::pinned_pinned, {}));
  CHECK(root_of(lowest(Support::fixed_pinned, {}, 1.0 - 1e-7)) ==
        Approx(characteristic_root(BeamEnds::fixed_pinned, 1)).epsilon(1e-5));
  CHECK(root_of(lowest(Support::fixed_pinned, {}, 1e-5)) ==
        Approx(characteristic_root(BeamEnds::fixed_free, 1)).epsilon(1e-4));
  CHECK(root_of(lowest(Support::pinned_pinned, {}, 1e-5)) ==
        Approx(characteristic_root(BeamEnds::fixed_free, 1)).epsilon(1e-4));
  // A pin in the node of the second mode of a free beam on a pin leaves that mode alone.
  const double second_mode = characteristic_root(BeamEnds::fixed_pinned, 1);
  const auto shape = [second_mode](double x) {
    return std::sin(second_mode * x) / std::sin(second_mode) +
           std::sinh(second_mode * x) / std::sinh(second_mode);
  };
  double low = 0.5;
  double high = 0.9;
  for (int step = 0; step < 60; ++step) {
    const double middle = (low + high) / 2.0;
    (shape(low) * shape(middle) > 0.0 ? low : high) = middle;
  }
  CHECK(root_of(lowest(Support::pinned_pinned, {}, low)) == Approx(second_mode).epsilon(1e-9));
}

TEST_CASE("Random members with any masses vibrate as finite elements with consistent masses do") {
  std::mt19937 random(21);
  const auto below = [&](int n) { return std::uniform_int_distribution<int>(0, n - 1)(random); };
  for (int n = 0; n < 250; ++n) {
    const auto support = static_cast<Support>(below(4));
    const bool may_overhang = support == Support::pinned_pinned || support == Support::fixed_pinned;
    std::optional<double> second;
    if (may_overhang && below(2) == 0) {
      second = 0.01 * (1 + below(100));
    }
    std::vector<AttachedMass> masses;
    for (int k = below(6); k > 0; --k) {
      masses.push_back(
          {.mass = std::pow(10.0, std::uniform_real_distribution<double>(-3.0, 3.0)(random)),
           .at = 0.01 * below(101)});
    }
    FiniteElements beam(support, second.value_or(1.0));
    std::string told;
    for (const AttachedMass& mass : masses) {
      beam.add(mass);
      told += " " + std::to_string(mass.mass) + " at " + std::to_string(mass.at);
    }
    INFO("trial " << n << ", support " << static_cast<int>(support) << ", second "
                  << second.value_or(-1.0) << ", masses" << told);
    CHECK(lowest(support, masses, second) == Approx(beam.lowest_frequency()).epsilon(2e-8));
  }
}

TEST_CASE("A bar in shear vibrates as a column of air does") {
  // By hand: waves of sqrt(G A_s / m) = 20 m/s go 4 times along a cantilever of 2.5 m in a period,
  // and twice along a bar held at both ends.
  const ShearBeam bar{.shear_stiffness = 1200.0, .mass_per_length = 3.0, .length = 2.5};
  CHECK(lowest_shear_frequency(bar, Support::cantilever) == Approx(2.0).epsilon(1e-14));
  CHECK(lowest_shear_frequency(bar, Support::pinned_pinned) == Approx(4.0).epsilon(1e-14));
  CHECK(lowest_shear_frequency(bar, Support::fixed_fixed) == Approx(4.0).epsilon(1e-14));
  // A heavy tip on a spring of G A_s / L = 480 N/m; in the middle of a span, of 4 G A_s / L.
  const auto heavy = [&](Support support, double at) {
    const std::array<AttachedMass, 1> mass = {{{.mass = 1e9, .at = at}}};
    return std::pow(2.0 * pi * lowest_shear_frequency(bar, support, mass), 2) * 1e9;
  };
  CHECK(heavy(Support::cantilever, 2.5) == Approx(480.0).epsilon(1e-6));
  CHECK(heavy(Support::pinned_pinned, 1.25) == Approx(1920.0).epsilon(1e-6));
  CHECK(heavy(Support::fixed_fixed, 1.25) == Approx(1920.0).epsilon(1e-6));
  // Fixed and pinned, the slender member carries 11/16 and 5/16 of the force in its middle:
  // (121 + 25) / 256 / 2 of L / (G A_s).
  CHECK(heavy(Support::fixed_pinned, 1.25) == Approx(480.0 * 512.0 / 146.0).epsilon(1e-6));
  // At the end of an overhang of 0.5 m over a span of 2 m: a quarter of the force in the span, and
  // three eighths where the far end is fixed.
  const std::array<AttachedMass, 1> end = {{{.mass = 1e9, .at = 2.5}}};
  CHECK(std::pow(2.0 * pi * lowest_shear_frequency(bar, Support::pinned_pinned, end, 2.0), 2) *
            1e9 ==
        Approx(1200.0 / (0.5 + 2.0 / 16.0)).epsilon(1e-6));
  CHECK(std::pow(2.0 * pi * lowest_shear_frequency(bar, Support::fixed_pinned, end, 2.0), 2) *
            1e9 ==
        Approx(1200.0 / (0.5 + 2.0 * 9.0 / 64.0)).epsilon(1e-6));
}

TEST_CASE("Bending and shear together stay below finite elements that have both") {
  std::mt19937 random(22);
  const auto below = [&](int n) { return std::uniform_int_distribution<int>(0, n - 1)(random); };
  double least = 1.0;
  for (int n = 0; n < 200; ++n) {
    const auto support = static_cast<Support>(below(4));
    std::optional<double> second;
    if ((support == Support::pinned_pinned || support == Support::fixed_pinned) && below(2) == 0) {
      second = 0.01 * (20 + below(81));
    }
    // E I / (G A_s L^2) from a length of 29 times to one of 3 times the height.
    const double shear = std::pow(10.0, std::uniform_real_distribution<double>(-3.5, -1.5)(random));
    std::vector<AttachedMass> masses;
    for (int k = below(3); k > 0; --k) {
      masses.push_back(
          {.mass = std::pow(10.0, std::uniform_real_distribution<double>(-1.0, 2.0)(random)),
           .at = 0.01 * below(101)});
    }
    FiniteElements beam(support, second.value_or(1.0), shear);
    for (const AttachedMass& mass : masses) {
      beam.add(mass);
    }
    const double exact = beam.lowest_frequency();
    const double bending = lowest(support, masses, second);
    const double alone = lowest_shear_frequency(
        {.shear_stiffness = 1.0 / shear, .mass_per_length = 1.0, .length = 1.0},
        support,
        masses,
        second);
    const double together = 1.0 / std::hypot(1.0 / bending, 1.0 / alone);
    INFO("trial " << n << ", support " << static_cast<int>(support) << ", second "
                  << second.value_or(-1.0) << ", shear " << shear);
    CHECK(together <= exact * (1.0 + 2e-4));  // the error of the lumped masses
    CHECK(together >= 0.7 * exact);
    least = std::min(least, together / exact);
    if (support == Support::pinned_pinned && !second && masses.empty()) {
      CHECK(together == Approx(exact).epsilon(2e-4));
    }
  }
  CHECK(least < 0.99);
}

TEST_CASE("Many masses in any order vibrate as the same ones in order") {
  std::vector<AttachedMass> masses;
  for (int k = 0; k < 20; ++k) {
    masses.push_back({.mass = 0.1 + 0.05 * k, .at = 0.05 * (k * 7 % 20)});
  }
  const double mixed = lowest(Support::fixed_pinned, masses, 0.8);
  std::sort(masses.begin(), masses.end(), [](const AttachedMass& a, const AttachedMass& b) {
    return a.at < b.at;
  });
  CHECK(mixed == lowest(Support::fixed_pinned, masses, 0.8));
  FiniteElements beam(Support::fixed_pinned, 0.8);
  for (const AttachedMass& mass : masses) {
    beam.add(mass);
  }
  CHECK(mixed == Approx(beam.lowest_frequency()).epsilon(2e-8));
}

TEST_CASE("A mass lowers the frequency and a shorter lever of it raises it again") {
  double before = lowest(Support::cantilever, {});
  for (const double at : {0.1, 0.3, 0.6, 0.8, 1.0}) {
    const double here = lowest(Support::cantilever, {{.mass = 2.0, .at = at}});
    CHECK(here < before);
    before = here;
  }
}

TEST_CASE("Vibration refuses what it cannot mean") {
  const auto faults = [](const auto& call) {
    try {
      call();
    } catch (const Error& error) {
      std::string text;
      for (const Fault& fault : error.faults()) {
        text += fault.where + ";";
      }
      return text;
    }
    return std::string("none");
  };
  CHECK(faults([] { return characteristic_root(BeamEnds::fixed_free, 0); }) == "mode;");
  CHECK(faults([] { return tip_mass_root(-1.0, 1001); }) == "mass_ratio;mode;");
  CHECK(faults([] { return natural_frequency({.bending_stiffness = 1.0}, 0.0); }) ==
        "beam.mass_per_length;beam.length;root;");
  CHECK(faults([] { return tip_mass_frequency_estimate(unit, -1.0); }) == "tip_mass;");
  CHECK(faults([] {
          return lowest(Support::cantilever, {{.mass = 0.0, .at = 1.5}, {.mass = 1.0, .at = -1.0}});
        }) == "masses/0/mass;masses/0/at;masses/1/at;");
  CHECK(faults([] { return lowest(Support::pinned_pinned, {}, 1.5); }) == "second_support;");
  CHECK(faults([] { return lowest(Support::fixed_fixed, {}, 0.5); }) == "second_support;");
  CHECK(faults([] {
          const std::array<AttachedMass, 1> mass = {{{.mass = 0.0, .at = 1.5}}};
          return lowest_shear_frequency({.shear_stiffness = -1.0}, Support::cantilever, mass, 0.5);
        }) ==
        "beam.shear_stiffness;beam.mass_per_length;beam.length;masses/0/mass;second_support;");
}

}  // namespace bismar
