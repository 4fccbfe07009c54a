// SPDX-License-Identifier: MIT
// Invented results for the tests of reports and pictures: gear of hand-worked canal sluice gates.
#pragma once

#include <bismar/sizing/result.hpp>

#include <cmath>
#include <cstddef>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace synthetic {

inline bismar::Design design(std::string name, std::string size, double mass, double cost) {
  bismar::Design d;
  d.material = name;
  d.material_name = std::move(name);
  d.shape = "ellipse";
  d.size_text = std::move(size);
  d.route = "hot-forging";
  d.treatment = "quench-temper";
  d.finish = "none";
  d.id = d.material + "/ellipse " + d.size_text + "/hot-forging+quench-temper/none";
  d.mass = mass;
  d.cost = cost;
  d.section.height = 0.0243;
  d.section.width = 0.0194;
  d.section.wall = 0.0194;
  d.utilisations = {{"yield", "winding", 0.71, 1.5},
                    {"deflection", "winding", 0.9987, 1.0},
                    {"mass cap", "", 0.8, 1.0}};
  d.governing = 1;
  d.cost_breakdown.lines = {{"material", 0.6 * cost, "0.5 kg at 1.2 EUR/kg"},
                            {"tooling", 0.4 * cost, "2000 EUR over 2000 parts"}};
  d.cost_breakdown.total = cost;
  d.cost_breakdown.low = 0.8 * cost;
  d.cost_breakdown.high = 1.3 * cost;
  d.cost_breakdown.bought_mass = 1.1 * mass;
  d.cost_breakdown.blank = "round bar 25, 19 of 300 mm from 6 m";
  return d;
}

/// The choice at every alpha and its runner-up, from the definition: the least of C + alpha m over
/// the front, then over the designs of all other materials. Every design is its own material.
class RulerBuilder {
 public:
  explicit RulerBuilder(const bismar::Result& result) : designs_(result.designs) {}

  bismar::ExchangeRuler build(std::size_t front) {
    bismar::ExchangeRuler ruler;
    std::vector<bool> chosen(front, false);
    walk(
        0.0, std::nullopt, std::nullopt, [&](std::size_t d, double from, std::optional<double> to) {
          bismar::NamedStretch s;
          s.from = from;
          s.to = to;
          s.design = d;
          s.choice = designs_[d].material_name;
          s.mass = designs_[d].mass;
          s.cost = designs_[d].cost;
          s.penalty_from = at(d, from);
          if (to) s.penalty_to = at(d, *to);
          walk(from, to, d, [&](std::size_t r, double a, std::optional<double> b) {
            bismar::NamedStretch::RunnerUp up;
            up.from = a;
            up.to = b;
            up.choice = designs_[r].material_name;
            up.mass = designs_[r].mass;
            up.cost = designs_[r].cost;
            up.regret_from = at(r, a) - at(d, a);
            if (b) up.regret_to = at(r, *b) - at(d, *b);
            s.runners_up.push_back(up);
          });
          if (d < front) chosen[d] = true;
          ruler.stretches.push_back(s);
        });
    for (std::size_t d = 0; d < front; ++d) {
      if (chosen[d]) continue;
      // The least regret lies at a breakpoint, since the least penalty is concave in alpha.
      bismar::UnsupportedDesign u{d, 0.0, 0.0};
      bool first = true;
      for (const auto& s : ruler.stretches) {
        const double regret = at(d, s.from) - at(s.design, s.from);
        if (first || regret < u.regret) u = {d, regret, s.from};
        first = false;
      }
      ruler.unsupported.push_back(u);
    }
    return ruler;
  }

 private:
  [[nodiscard]] double at(std::size_t d, double alpha) const {
    return designs_[d].cost + alpha * designs_[d].mass;
  }

  // The lower envelope of the penalty lines on [from, to), without the one left out.
  template <typename Visit>
  void walk(double from,
            std::optional<double> to,
            std::optional<std::size_t> without,
            Visit visit) {
    std::optional<std::size_t> now;
    for (std::size_t d = 0; d < designs_.size(); ++d) {
      if (without && designs_[d].material_name == designs_[*without].material_name) continue;
      const bool better = !now || at(d, from) < at(*now, from) ||
                          (at(d, from) == at(*now, from) && designs_[d].mass < designs_[*now].mass);
      if (better) now = d;
    }
    double start = from;
    while (now) {
      std::optional<std::size_t> next;
      double crossing = 0.0;
      for (std::size_t d = 0; d < designs_.size(); ++d) {
        if (without && designs_[d].material_name == designs_[*without].material_name) continue;
        if (!(designs_[d].mass < designs_[*now].mass)) continue;
        const double x =
            (designs_[d].cost - designs_[*now].cost) / (designs_[*now].mass - designs_[d].mass);
        if (!next || x < crossing || (x == crossing && designs_[d].mass < designs_[*next].mass)) {
          next = d;
          crossing = x;
        }
      }
      if (!next || (to && crossing >= *to)) {
        visit(*now, start, to);
        return;
      }
      if (crossing > start) {
        visit(*now, start, std::optional<double>(crossing));
        start = crossing;
      }
      now = next;
    }
  }

  const std::vector<bismar::Design>& designs_;
};

struct Study {
  bismar::Result result;
  bismar::ExchangeRuler ruler;
};

inline Study finish(bismar::Result result, std::size_t front) {
  result.currency = "EUR";
  result.front_count = front;
  using Stage = bismar::FunnelLine::Stage;
  const std::size_t near = result.designs.size() - front;
  result.funnel.lines = {{Stage::cannot_exist, "the route does not leave this shape", 31200},
                         {Stage::undecided, "elongation", 41},
                         {Stage::infeasible, "deflection", 212},
                         {Stage::not_better, "", 57},
                         {Stage::near, "", near},
                         {Stage::front, "", front}};
  result.funnel.considered = 31200 + 41 + 212 + 57 + near + front;
  bismar::ExchangeRuler ruler = RulerBuilder(result).build(front);
  return {std::move(result), std::move(ruler)};
}

/// The crank lever: six front designs, one of them chosen by no alpha, two near ones.
inline Study lever() {
  bismar::Result r;
  r.part = "crank lever 300 (invented)";
  r.designs = {design("Ti-6Al-4V, annealed", "23.9 x 19.1 mm", 0.486, 41.20),
               design("AZ80A, forged, artificially aged", "32.8 x 26.2 mm", 0.365, 0.0),
               design("EN AW-7075, T6", "28.9 x 23.1 mm", 0.442, 9.85),
               design("EN AW-6082, T6", "29.3 x 23.4 mm", 0.437, 7.92),
               design("42CrMo4, quenched and tempered", "23.4 x 18.7 mm", 0.810, 6.95),
               design("C45E, quenched and tempered", "23.6 x 18.9 mm", 0.824, 6.31),
               design("S355J2, normalized", "24.9 x 19.9 mm", 0.918, 5.87)};
  r.designs.erase(r.designs.begin());  // the titanium lever is dominated
  r.designs[0].cost = 14.60;
  r.designs[1].mass = 0.402;
  r.designs[0].notes = {"price from memory, not compared with a source"};
  r.designs[1].notes = {"typical strength divided by 1.25",
                        "price from memory, not compared with a source"};
  r.designs[2].buyable_size = 0.030;
  r.designs[2].buyable_mass = 0.458;
  r.designs[2].buyable_cost = 8.11;
  r.designs[2].buyable_feasible = true;
  const std::size_t front = r.designs.size();
  r.designs.push_back(design("25CrMo4, quenched and tempered", "23.7 x 19.0 mm", 0.831, 6.40));
  r.designs.push_back(design("EN AW-6061, T6", "29.5 x 23.6 mm", 0.445, 8.05));
  for (int i = 0; i < 400; ++i) {
    // A fixed sequence that fills the region above the front.
    const double u = std::fmod(0.754877666 * (i + 1), 1.0);
    const double v = std::fmod(0.569840291 * (i + 1), 1.0);
    r.others.push_back({{}, 0.02, 0.46 + 0.9 * u, 7.5 + 3.0 * (1.0 - u) + 22.0 * v * v});
  }
  r.undecided = {"PA 66, 30 % glass fibre: elongation", "beech, D40: shear modulus"};
  r.notes = {"Starter prices are orders of magnitude."};
  return finish(std::move(r), front);
}

/// `n` designs that all lie on the hull, breakpoints in geometric progression.
inline Study convex(std::size_t n, double ratio = 1.6, double first = 0.5) {
  bismar::Result r;
  r.part = "gate stem (invented)";
  std::vector<std::pair<double, double>> points = {{2.0, 3.0}};  // heaviest and cheapest first
  double alpha = first;
  for (std::size_t i = 1; i < n; ++i) {
    const double mass = points.back().first * (n > 12 ? 0.93 : 0.8);
    points.push_back({mass, points.back().second + alpha * (points.back().first - mass)});
    alpha *= ratio;
  }
  for (std::size_t i = n; i-- > 0;) {
    r.designs.push_back(design("alloy " + std::to_string(i + 1) + ", quenched and tempered",
                               "round bar " + std::to_string(20 + i),
                               points[i].first,
                               points[i].second));
    r.designs.back().stock_item = "round-bar-" + std::to_string(20 + i);
  }
  return finish(std::move(r), n);
}

inline Study nothing_feasible() {
  bismar::Result r;
  r.part = "strut with <too> tight & small limits";
  return finish(std::move(r), 0);
}

}  // namespace synthetic
