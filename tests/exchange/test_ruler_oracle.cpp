// SPDX-License-Identifier: MIT
//
// The ruler against brute force (sampled exchange constants, the convex hull by triples of rows)
// and against what must not change it (order, copies, units).
#include <bismar/exchange/ruler.hpp>
#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <iterator>
#include <limits>
#include <numeric>
#include <optional>
#include <random>
#include <set>
#include <vector>

#include "support/catch.hpp"

namespace {

using Indices = std::vector<std::uint32_t>;
using Table = std::vector<double>;
using bismar::Ruler;
using bismar::RulerStretch;
using bismar::RunnerUp;

constexpr double infinity = std::numeric_limits<double>::infinity();

struct Input {
  Table table;
  Indices labels;

  [[nodiscard]] std::size_t rows() const { return labels.size(); }
  [[nodiscard]] double priced(std::size_t i) const { return table[2 * i]; }
  [[nodiscard]] double cost(std::size_t i) const { return table[2 * i + 1]; }
  [[nodiscard]] double penalty(std::size_t i, double alpha) const {
    return cost(i) + alpha * priced(i);
  }
  /// What rounding may do to a penalty at this alpha.
  [[nodiscard]] double tolerance(double alpha) const {
    double size = 0.0;
    for (std::size_t i = 0; i < rows(); ++i) {
      size = std::max(size, std::abs(cost(i)) + alpha * std::abs(priced(i)));
    }
    return 1e-13 * size;
  }
};

/// Fronts of several kinds: a cloud, a curve with few dominated rows, a grid with ties and
/// collinear rows, costs and amounts of either sign.
Input random_input(std::mt19937_64& random, int kind) {
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  Input input;
  const std::size_t n = 1 + random() % 150;
  const std::size_t labels = 1 + random() % (random() % 2 == 0 ? 4 : n);
  for (std::size_t i = 0; i < n; ++i) {
    double m = 1.0;
    double c = 1.0;
    if (kind == 0) {
      m = std::exp(2.0 * unit(random));
      c = std::exp(3.0 * unit(random));
    } else if (kind == 1) {
      m = 0.05 + unit(random);
      c = 1.0 / m + 0.05 * unit(random);
    } else if (kind == 2) {
      m = static_cast<double>(random() % 12);
      c = static_cast<double>(random() % 12);
    } else {
      m = 4.0 * unit(random) - 2.0;
      c = std::exp(-2.0 * m) - 3.0 + unit(random) * unit(random);
    }
    input.table.insert(input.table.end(), {m, c});
    input.labels.push_back(static_cast<std::uint32_t>(random() % labels));
  }
  return input;
}

/// The part that holds alpha: `to` absent means no upper end.
template <class Part>
const Part& part_at(const std::vector<Part>& parts, double alpha) {
  for (const Part& part : parts) {
    if (part.from <= alpha && (!part.to || alpha <= *part.to)) {
      return part;
    }
  }
  FAIL("no part holds alpha = " << alpha);
  return parts.front();
}

/// The least penalty over the rows, or over those of another label.
double least_penalty(const Input& input,
                     double alpha,
                     std::optional<std::uint32_t> excluded = std::nullopt) {
  double least = infinity;
  for (std::size_t i = 0; i < input.rows(); ++i) {
    if (!excluded || input.labels[i] != *excluded) {
      least = std::min(least, input.penalty(i, alpha));
    }
  }
  return least;
}

/// Everything the ruler says about one alpha, against all rows.
void check_alpha(const Input& input, const Ruler& ruler, double alpha) {
  const double tolerance = input.tolerance(alpha);
  const RulerStretch& stretch = ruler.stretches[ruler.stretch_at(alpha).value()];
  const bismar::RulerVertex& vertex = part_at(stretch.vertices, alpha);
  const double chosen = vertex.cost + alpha * vertex.priced;
  const double best = least_penalty(input, alpha);
  REQUIRE(std::abs(chosen - best) <= tolerance);

  const double rest = least_penalty(input, alpha, stretch.label);
  if (std::isinf(rest)) {
    REQUIRE(stretch.runners_up.empty());
    return;
  }
  const RunnerUp& runner = part_at(stretch.runners_up, alpha);
  REQUIRE(std::abs(runner.cost + alpha * runner.priced - rest) <= tolerance);
  REQUIRE(rest - best >= runner.least_regret - tolerance);
  if (runner.regret_to) {
    REQUIRE(rest - best <= std::max(runner.regret_from, *runner.regret_to) + tolerance);
  }
}

/// The regrets a ruler states, at the places where it states them.
void check_regrets(const Input& input, const Ruler& ruler) {
  for (const RulerStretch& stretch : ruler.stretches) {
    for (const RunnerUp& runner : stretch.runners_up) {
      const auto regret = [&](double alpha) {
        return runner.cost + alpha * runner.priced - least_penalty(input, alpha);
      };
      REQUIRE(std::abs(regret(runner.from) - runner.regret_from) <= input.tolerance(runner.from));
      REQUIRE(std::abs(regret(runner.least_regret_at) - runner.least_regret) <=
              input.tolerance(runner.least_regret_at));
      REQUIRE(runner.regret_to.has_value() == runner.to.has_value());
      if (runner.to) {
        REQUIRE(std::abs(regret(*runner.to) - *runner.regret_to) <= input.tolerance(*runner.to));
      }
      for (const std::uint32_t row : runner.rows) {
        REQUIRE(input.priced(row) == runner.priced);
        REQUIRE(input.cost(row) == runner.cost);
        REQUIRE(input.labels[row] != stretch.label);
      }
    }
  }
}

/// Parts must begin where the one before ends.
template <class Part>
void check_joined(const std::vector<Part>& parts, double from, const std::optional<double>& to) {
  REQUIRE_FALSE(parts.empty());
  REQUIRE(parts.front().from == from);
  REQUIRE(parts.back().to == to);
  for (std::size_t i = 0; i + 1 < parts.size(); ++i) {
    REQUIRE(parts[i].to.has_value());
    REQUIRE(*parts[i].to == parts[i + 1].from);
  }
  for (const Part& part : parts) {
    REQUIRE(part.from < part.to.value_or(infinity));
  }
}

void check_form(const Ruler& ruler, double from, const std::optional<double>& to) {
  check_joined(ruler.stretches, from, to);
  for (std::size_t i = 0; i < ruler.stretches.size(); ++i) {
    const RulerStretch& stretch = ruler.stretches[i];
    check_joined(stretch.vertices, stretch.from, stretch.to);
    if (!stretch.runners_up.empty()) {
      check_joined(stretch.runners_up, stretch.from, stretch.to);
    }
    if (i > 0) {
      REQUIRE(stretch.label != ruler.stretches[i - 1].label);
    }
  }
}

std::set<std::uint32_t> vertex_rows(const Ruler& ruler) {
  std::set<std::uint32_t> rows;
  for (const RulerStretch& stretch : ruler.stretches) {
    for (const bismar::RulerVertex& vertex : stretch.vertices) {
      rows.insert(vertex.rows.begin(), vertex.rows.end());
    }
  }
  return rows;
}

/// Compares two rulers; `row` maps the second one's rows to the first one's. The second table's
/// priced column was multiplied by f_m, its cost column by f_c.
void check_same(const Ruler& a,
                const Ruler& b,
                const std::vector<std::uint32_t>& row,
                double f_m,
                double f_c,
                double relative) {
  const auto is_near = [relative](double x, double y, double size) {
    return std::abs(x - y) <= relative * std::max(std::abs(y), size);
  };
  const auto mapped = [&row](Indices rows) {
    std::transform(rows.begin(), rows.end(), rows.begin(), [&row](auto i) { return row[i]; });
    std::sort(rows.begin(), rows.end());
    return rows;
  };
  const double f_alpha = f_c / f_m;
  REQUIRE(a.stretches.size() == b.stretches.size());
  for (std::size_t i = 0; i < a.stretches.size(); ++i) {
    const RulerStretch& s = a.stretches[i];
    const RulerStretch& t = b.stretches[i];
    REQUIRE(s.label == t.label);
    REQUIRE(is_near(t.from, f_alpha * s.from, 0.0));
    REQUIRE(is_near(t.penalty_from, f_c * s.penalty_from, f_c));
    REQUIRE(s.vertices.size() == t.vertices.size());
    for (std::size_t k = 0; k < s.vertices.size(); ++k) {
      REQUIRE(s.vertices[k].rows == mapped(t.vertices[k].rows));
      REQUIRE(is_near(t.vertices[k].from, f_alpha * s.vertices[k].from, 0.0));
    }
    REQUIRE(s.runners_up.size() == t.runners_up.size());
    for (std::size_t k = 0; k < s.runners_up.size(); ++k) {
      const RunnerUp& r = s.runners_up[k];
      const RunnerUp& q = t.runners_up[k];
      const double size = f_c * (std::abs(r.cost) + r.to.value_or(r.from) * std::abs(r.priced));
      REQUIRE(r.rows == mapped(q.rows));
      REQUIRE(is_near(q.from, f_alpha * r.from, 0.0));
      REQUIRE(is_near(q.regret_from, f_c * r.regret_from, size));
      REQUIRE(is_near(q.least_regret, f_c * r.least_regret, size));
    }
  }
  REQUIRE(a.ties.size() == b.ties.size());
  for (std::size_t i = 0; i < a.ties.size(); ++i) {
    Indices rows = a.ties[i].rows;
    std::sort(rows.begin(), rows.end());
    REQUIRE(rows == mapped(b.ties[i].rows));
    REQUIRE(is_near(b.ties[i].alpha, f_alpha * a.ties[i].alpha, 0.0));
  }
  REQUIRE(a.unsupported.size() == b.unsupported.size());
  for (std::size_t i = 0; i < a.unsupported.size(); ++i) {
    REQUIRE(a.unsupported[i].row == row[b.unsupported[i].row]);
    REQUIRE(is_near(b.unsupported[i].alpha, f_alpha * a.unsupported[i].alpha, 0.0));
    REQUIRE(is_near(b.unsupported[i].least_regret, f_c * a.unsupported[i].least_regret, f_c));
  }
}

std::vector<std::uint32_t> identity(std::size_t n) {
  std::vector<std::uint32_t> result(n);
  std::iota(result.begin(), result.end(), 0U);
  return result;
}

}  // namespace

TEST_CASE("100,000 exchange constants over random tables agree with trying every row") {
  std::mt19937_64 random(401);
  std::uniform_real_distribution<double> exponent(-4.0, 4.0);
  for (int trial = 0; trial < 400; ++trial) {
    const Input input = random_input(random, trial % 4);
    const Ruler ruler = bismar::exchange_ruler(input.table, input.labels);
    check_form(ruler, 0.0, std::nullopt);
    check_regrets(input, ruler);
    for (int i = 0; i < 250; ++i) {
      check_alpha(input, ruler, std::pow(10.0, exponent(random)));
    }
  }
}

TEST_CASE("a ruler cut to a range agrees with trying every row inside it") {
  std::mt19937_64 random(402);
  std::uniform_real_distribution<double> exponent(-3.0, 3.0);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  for (int trial = 0; trial < 300; ++trial) {
    const Input input = random_input(random, trial % 4);
    const double a = std::pow(10.0, exponent(random));
    const double from = trial % 3 == 0 ? 0.0 : a;
    const double to = a * (1.0 + std::pow(10.0, exponent(random)));
    const Ruler ruler = bismar::exchange_ruler(input.table, input.labels, {.from = from, .to = to});
    check_form(ruler, from, to);
    check_regrets(input, ruler);
    for (int i = 0; i < 50; ++i) {
      check_alpha(input, ruler, from + (to - from) * unit(random));
    }
    check_alpha(input, ruler, from);
    check_alpha(input, ruler, to);
  }
}

TEST_CASE("vertices, ties and unsupported rows are those of the hull by triples of rows") {
  std::mt19937_64 random(403);
  std::size_t ties = 0;
  for (int trial = 0; trial < 600; ++trial) {
    // Small whole numbers: the cross products below are exact.
    Input input;
    const std::size_t n = 1 + random() % 40;
    const std::uint64_t size = 4 + random() % 30;
    for (std::size_t i = 0; i < n; ++i) {
      const auto m = static_cast<double>(random() % size);
      const double extra = static_cast<double>(random() % 4) * static_cast<double>(random() % size);
      const double c = trial % 2 == 0 ? static_cast<double>(random() % size)
                                      : static_cast<double>(size) - m + std::floor(extra / 4.0);
      input.table.insert(input.table.end(), {m, c});
      input.labels.push_back(static_cast<std::uint32_t>(random() % 5));
    }
    const Indices front = bismar::front_2d(input.table);
    std::set<std::uint32_t> expected_vertices;
    std::set<std::uint32_t> expected_ties;
    std::set<std::uint32_t> expected_unsupported;
    for (const std::uint32_t p : front) {
      double highest = -infinity;  // of p above a line through two rows on either side of it
      for (const std::uint32_t a : front) {
        for (const std::uint32_t b : front) {
          if (input.priced(a) > input.priced(p) && input.priced(p) > input.priced(b)) {
            highest =
                std::max(highest,
                         (input.cost(p) - input.cost(a)) * (input.priced(a) - input.priced(b)) -
                             (input.cost(b) - input.cost(a)) * (input.priced(a) - input.priced(p)));
          }
        }
      }
      auto& kind = highest < 0.0   ? expected_vertices
                   : highest > 0.0 ? expected_unsupported
                                   : expected_ties;
      kind.insert(p);
    }

    const Ruler ruler = bismar::exchange_ruler(input.table, input.labels);
    std::set<std::uint32_t> tied;
    for (const bismar::RulerTie& tie : ruler.ties) {
      tied.insert(tie.rows.begin(), tie.rows.end());
      for (const std::uint32_t row : tie.rows) {
        REQUIRE(input.penalty(row, tie.alpha) ==
                Approx(least_penalty(input, tie.alpha)).epsilon(1e-14));
      }
    }
    std::set<std::uint32_t> unsupported;
    for (const bismar::UnsupportedRow& row : ruler.unsupported) {
      unsupported.insert(row.row);
      REQUIRE(row.label == input.labels[row.row]);
    }
    REQUIRE(vertex_rows(ruler) == expected_vertices);
    REQUIRE(tied == expected_ties);
    REQUIRE(unsupported == expected_unsupported);
    ties += tied.size();
  }
  CHECK(ties > 200);
}

TEST_CASE("the least regret of an unsupported row is the least over all breakpoints") {
  std::mt19937_64 random(404);
  std::size_t rows = 0;
  for (int trial = 0; trial < 300; ++trial) {
    const Input input = random_input(random, trial % 4);
    const Ruler ruler = bismar::exchange_ruler(input.table, input.labels);
    std::vector<double> breakpoints;
    for (const RulerStretch& stretch : ruler.stretches) {
      for (const bismar::RulerVertex& vertex : stretch.vertices) {
        breakpoints.push_back(vertex.from);
      }
    }
    for (const bismar::UnsupportedRow& row : ruler.unsupported) {
      const auto regret = [&](double alpha) {
        return input.penalty(row.row, alpha) - least_penalty(input, alpha);
      };
      const double tolerance = input.tolerance(row.alpha);
      REQUIRE(row.least_regret > 0.0);
      REQUIRE(std::abs(regret(row.alpha) - row.least_regret) <= tolerance);
      for (const double alpha : breakpoints) {
        REQUIRE(regret(alpha) >= row.least_regret - input.tolerance(alpha));
      }
      ++rows;
    }
  }
  CHECK(rows > 300);
}

TEST_CASE("units that differ by a power of two change the ruler by exactly that factor") {
  std::mt19937_64 random(405);
  for (int trial = 0; trial < 200; ++trial) {
    const Input input = random_input(random, trial % 4);
    Input scaled = input;
    for (std::size_t i = 0; i < input.rows(); ++i) {
      scaled.table[2 * i] *= 0x1p-40;
      scaled.table[2 * i + 1] *= 0x1p17;
    }
    check_same(bismar::exchange_ruler(input.table, input.labels),
               bismar::exchange_ruler(scaled.table, scaled.labels),
               identity(input.rows()),
               0x1p-40,
               0x1p17,
               0.0);
  }
}

TEST_CASE("other units change the ruler by their factor within 1e-12") {
  std::mt19937_64 random(406);
  for (int trial = 0; trial < 200; ++trial) {
    // Not the grid: its exact ties are broken by such a factor, as they must be.
    const Input input = random_input(random, trial % 2 == 0 ? 0 : 3);
    Input scaled = input;
    for (std::size_t i = 0; i < input.rows(); ++i) {
      scaled.table[2 * i] *= 1.0 / 0.45359237;
      scaled.table[2 * i + 1] *= 1.0837;
    }
    check_same(bismar::exchange_ruler(input.table, input.labels),
               bismar::exchange_ruler(scaled.table, scaled.labels),
               identity(input.rows()),
               1.0 / 0.45359237,
               1.0837,
               1e-12);
  }
}

TEST_CASE("the order of the rows does not matter where no two are equal") {
  std::mt19937_64 random(407);
  for (int trial = 0; trial < 200; ++trial) {
    const Input input = random_input(random, trial % 2 == 0 ? 1 : 3);
    std::vector<std::uint32_t> order = identity(input.rows());
    std::shuffle(order.begin(), order.end(), random);
    Input shuffled;
    for (const std::uint32_t i : order) {
      shuffled.table.insert(shuffled.table.end(), {input.priced(i), input.cost(i)});
      shuffled.labels.push_back(input.labels[i]);
    }
    check_same(bismar::exchange_ruler(input.table, input.labels),
               bismar::exchange_ruler(shuffled.table, shuffled.labels),
               order,
               1.0,
               1.0,
               0.0);
  }
}

TEST_CASE("rows entered twice are found twice, and nothing else changes") {
  std::mt19937_64 random(408);
  for (int trial = 0; trial < 200; ++trial) {
    const Input input = random_input(random, trial % 4);
    Input twice = input;
    twice.table.insert(twice.table.end(), input.table.begin(), input.table.end());
    twice.labels.insert(twice.labels.end(), input.labels.begin(), input.labels.end());
    const auto n = static_cast<std::uint32_t>(input.rows());
    const Ruler once = bismar::exchange_ruler(input.table, input.labels);
    const Ruler both = bismar::exchange_ruler(twice.table, twice.labels);
    const auto doubled = [n](Indices rows) {
      const Indices copy = rows;
      std::transform(
          copy.begin(), copy.end(), std::back_inserter(rows), [n](auto i) { return i + n; });
      std::sort(rows.begin(), rows.end());
      return rows;
    };
    REQUIRE(once.stretches.size() == both.stretches.size());
    for (std::size_t i = 0; i < once.stretches.size(); ++i) {
      const RulerStretch& s = once.stretches[i];
      const RulerStretch& t = both.stretches[i];
      REQUIRE(s.label == t.label);
      REQUIRE(s.from == t.from);
      REQUIRE(s.to == t.to);
      REQUIRE(s.vertices.size() == t.vertices.size());
      for (std::size_t k = 0; k < s.vertices.size(); ++k) {
        REQUIRE(doubled(s.vertices[k].rows) == t.vertices[k].rows);
      }
      REQUIRE(s.runners_up.size() == t.runners_up.size());
      for (std::size_t k = 0; k < s.runners_up.size(); ++k) {
        REQUIRE(doubled(s.runners_up[k].rows) == t.runners_up[k].rows);
        REQUIRE(s.runners_up[k].least_regret == t.runners_up[k].least_regret);
      }
    }
    REQUIRE(2 * once.unsupported.size() == both.unsupported.size());
  }
}

TEST_CASE("a curve of 200,000 vertices, each a label of its own, is ruled in one pass") {
  Input input;
  const std::uint32_t n = 200'000;
  for (std::uint32_t i = 0; i < n; ++i) {
    const double m = 1.0 + static_cast<double>(i) / n;
    input.table.insert(input.table.end(), {m, 1.0 / m});
    input.labels.push_back(i);
  }
  const Ruler ruler = bismar::exchange_ruler(input.table, input.labels);
  check_form(ruler, 0.0, std::nullopt);
  // Neighbouring breakpoints differ by some 1e-5, far more than rounding.
  CHECK(ruler.stretches.size() == n);
  for (const RulerStretch& stretch : ruler.stretches) {
    REQUIRE(stretch.runners_up.size() <= 3);
    REQUIRE_FALSE(stretch.runners_up.empty());
  }
}
