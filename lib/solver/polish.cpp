// SPDX-License-Identifier: MIT
#include "solver/polish.hpp"

#include "solver/pieces.hpp"
#include "solver/quadratic_step.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

/// Displacement of differences. Second ones then err by some 1e-8 of rounding and of curvature.
constexpr double displacement = 1e-4;
/// Longest move of a variable in one step; the model is trusted so far.
constexpr double trust = 0.5;
/// Utilisations below this cannot become active within a step.
constexpr double idle = 0.05;
constexpr int most_rounds = 40;
/// Relative gain below which nothing is left to win.
constexpr double enough = 1e-13;

class Polisher {
 public:
  Polisher(const BoxProblem& problem,
           std::size_t group,
           std::uint32_t size,
           PolishedPoint& point,
           std::size_t& evaluations)
      : problem_(problem), group_(group), size_(size), best_(point), evaluations_(evaluations) {
    trial_ = best_;
    const auto variables = problem.variables(group);
    for (std::size_t v = 0; v < variables.size(); ++v) {
      if (variables[v].kind == Variable::Kind::continuous) {
        add_coordinate(variables[v], static_cast<std::uint32_t>(v));
      }
    }
  }

  void run() {
    if (coordinates_.empty() || (coordinates_.size() == 1 && size_ != no_index)) {
      move_to(here());  // settled exactly, which is all there is to do
      return;
    }
    multipliers_.clear();
    bool compass_helped = true;
    for (int outer = 0; outer < 4 && compass_helped; ++outer) {
      bool settled = false;
      for (int round = 0; round < most_rounds && !settled; ++round) {
        const double before = best_.objectives[0];
        const bool stepped = step();
        settled = !stepped || before - best_.objectives[0] <= enough * std::abs(before);
      }
      compass_helped = promise_ > 1e-11 && compass();
    }
  }

 private:
  /// A continuous variable: its logarithm where it is positive, otherwise itself over its range.
  struct Coordinate {
    std::uint32_t variable = 0;
    bool logarithmic = false;
    double scale = 1.0;
    double lower = 0.0;  ///< Of the piece, as the variable counts.
    double upper = 0.0;
    double low = 0.0;  ///< As the coordinate counts.
    double high = 0.0;
  };

  void add_coordinate(const Variable& variable, std::uint32_t v) {
    std::vector<Stretch> pieces;
    append_stretches(variable, variable.lower, variable.upper, pieces);
    for (const auto& piece : pieces) {
      if (best_.x[v] >= piece.lower && best_.x[v] <= piece.upper && piece.lower < piece.upper) {
        Coordinate made{.variable = v, .logarithmic = piece.lower > 0.0};
        made.scale = made.logarithmic ? 1.0 : piece.upper - piece.lower;
        made.lower = piece.lower;
        made.upper = piece.upper;
        made.low = coordinate(made, piece.lower);
        made.high = coordinate(made, piece.upper);
        coordinates_.push_back(made);
      }
    }
  }

  static double coordinate(const Coordinate& at, double x) {
    return at.logarithmic ? std::log(x) : x / at.scale;
  }
  static double value(const Coordinate& at, double z) {
    return std::clamp(at.logarithmic ? std::exp(z) : z * at.scale, at.lower, at.upper);
  }

  [[nodiscard]] std::vector<double> here() const {
    std::vector<double> z;
    for (const auto& at : coordinates_) {
      z.push_back(coordinate(at, best_.x[at.variable]));
    }
    return z;
  }

  bool evaluate() {
    problem_.evaluate(group_, trial_.x, trial_.objectives, trial_.utilisations);
    ++evaluations_;
    return std::isfinite(trial_.objectives[0]);
  }

  void set(const std::vector<double>& z) {
    trial_.x = best_.x;
    for (std::size_t c = 0; c < coordinates_.size(); ++c) {
      // A coordinate that has not moved keeps its variable bit for bit.
      const auto& at = coordinates_[c];
      if (z[c] != coordinate(at, best_.x[at.variable])) {
        trial_.x[at.variable] = value(at, z[c]);
      }
    }
  }

  [[nodiscard]] bool feasible() const {
    return std::all_of(
        trial_.utilisations.begin(), trial_.utilisations.end(), [](double u) { return u <= 1.0; });
  }

  /// Tries a point, made feasible; takes it where it is better.
  bool move_to(const std::vector<double>& z) {
    set(z);
    if (size_ != no_index) {
      const auto along = std::find_if(coordinates_.begin(),
                                      coordinates_.end(),
                                      [&](const auto& at) { return at.variable == size_; });
      if (along != coordinates_.end() &&
          !problem_.settle(group_, trial_.x, along->lower, along->upper)) {
        ++evaluations_;
        return false;
      }
    }
    if (!evaluate() || !(feasible() || (size_ == no_index && restore(z)))) {
      return false;
    }
    if (!(trial_.objectives < best_.objectives)) {
      return false;
    }
    std::swap(best_, trial_);
    return true;
  }

  /// Steps across the utilisations above 1, as few and short as they can be.
  bool restore(std::vector<double> z) {
    const std::size_t n = coordinates_.size();
    for (int round = 0; round < 6; ++round) {
      std::vector<std::size_t> above;
      for (std::size_t i = 0; i < limits_.size(); ++i) {
        if (trial_.utilisations[limits_[i]] > 1.0) {
          above.push_back(i);
        }
      }
      const std::size_t m = above.size();
      if (m == 0 || m > n) {
        return m == 0 && feasible();
      }
      std::vector<double> normal(m * m);
      std::vector<double> weights(m);
      for (std::size_t r = 0; r < m; ++r) {
        weights[r] = -std::log(trial_.utilisations[limits_[above[r]]]) - 1e-13;
        for (std::size_t c = 0; c < m; ++c) {
          for (std::size_t v = 0; v < n; ++v) {
            normal[r * m + c] += slopes_[(above[r] + 1) * n + v] * slopes_[(above[c] + 1) * n + v];
          }
        }
      }
      if (!solve_linear(normal, weights)) {
        return false;
      }
      for (std::size_t v = 0; v < n; ++v) {
        for (std::size_t r = 0; r < m; ++r) {
          z[v] += weights[r] * slopes_[(above[r] + 1) * n + v];
        }
        z[v] = std::clamp(z[v], coordinates_[v].low, coordinates_[v].high);
      }
      set(z);
      if (!evaluate()) {
        return false;
      }
      if (feasible()) {
        return true;
      }
    }
    return false;
  }

  /// What the model is of: the first objective, then the utilisations that may become active.
  [[nodiscard]] bool outputs(const std::vector<double>& z, std::vector<double>& out) {
    set(z);
    if (!evaluate()) {
      return false;
    }
    out.clear();
    out.push_back(objective_logarithmic_ ? std::log(trial_.objectives[0])
                                         : trial_.objectives[0] / objective_scale_);
    for (const std::size_t i : limits_) {
      out.push_back(std::log(trial_.utilisations[i]));
    }
    return std::all_of(out.begin(), out.end(), [](double y) { return std::isfinite(y); });
  }

  void choose_limits() {
    std::vector<std::size_t> chosen;
    for (std::size_t i = 0; i < best_.utilisations.size(); ++i) {
      if (best_.utilisations[i] > idle) {
        chosen.push_back(i);
      }
    }
    if (chosen != limits_) {
      limits_ = std::move(chosen);
      multipliers_.clear();
    }
    objective_logarithmic_ = best_.objectives[0] > 0.0;
    objective_scale_ = std::max(std::abs(best_.objectives[0]), 1e-300);
  }

  /// Slopes and curvatures of all outputs, by differences that stay inside the pieces.
  bool differentiate(const std::vector<double>& z) {
    const std::size_t n = z.size();
    const double h = displacement;
    std::vector<double> centre(z);
    for (std::size_t v = 0; v < n; ++v) {
      const auto& at = coordinates_[v];
      if (at.high - at.low < 4.0 * h) {
        return false;
      }
      centre[v] = std::clamp(z[v], at.low + h, at.high - h);
    }
    std::vector<double> middle;
    std::vector<std::vector<double>> ahead(n);
    std::vector<double> behind;
    std::vector<double> both;
    if (!outputs(centre, middle)) {
      return false;
    }
    const std::size_t k = middle.size();
    slopes_.assign(k * n, 0.0);
    curvatures_.assign(k * n * n, 0.0);
    std::vector<double> at = centre;
    for (std::size_t v = 0; v < n; ++v) {
      at[v] = centre[v] + h;
      if (!outputs(at, ahead[v])) {
        return false;
      }
      at[v] = centre[v] - h;
      if (!outputs(at, behind)) {
        return false;
      }
      at[v] = centre[v];
      for (std::size_t i = 0; i < k; ++i) {
        slopes_[i * n + v] = (ahead[v][i] - behind[i]) / (2.0 * h);
        curvatures_[(i * n + v) * n + v] = (ahead[v][i] - 2.0 * middle[i] + behind[i]) / (h * h);
      }
    }
    for (std::size_t v = 0; v < n; ++v) {
      for (std::size_t w = 0; w < v; ++w) {
        at[v] = centre[v] + h;
        at[w] = centre[w] + h;
        if (!outputs(at, both)) {
          return false;
        }
        at[v] = centre[v];
        at[w] = centre[w];
        for (std::size_t i = 0; i < k; ++i) {
          const double mixed = (both[i] - ahead[v][i] - ahead[w][i] + middle[i]) / (h * h);
          curvatures_[(i * n + v) * n + w] = mixed;
          curvatures_[(i * n + w) * n + v] = mixed;
        }
      }
    }
    // At a bound the differences stood beside the point: the curvature takes the slopes back.
    for (std::size_t i = 0; i < k; ++i) {
      for (std::size_t v = 0; v < n; ++v) {
        for (std::size_t w = 0; w < n; ++w) {
          slopes_[i * n + v] += curvatures_[(i * n + v) * n + w] * (z[w] - centre[w]);
        }
      }
    }
    return true;
  }

  /// The Lagrangian's curvature, made positive definite by what changes least along the active
  /// utilisations.
  [[nodiscard]] std::vector<double> model_matrix(std::size_t n) const {
    std::vector<double> plain(n * n);
    if (multipliers_.empty()) {
      for (std::size_t v = 0; v < n; ++v) {
        plain[v * n + v] = 1.0;
      }
      return plain;
    }
    const auto add_curvature = [&](std::size_t output, double weight) {
      for (std::size_t e = 0; e < n * n; ++e) {
        plain[e] += weight * curvatures_[output * n * n + e];
      }
    };
    add_curvature(0, 1.0);
    for (std::size_t i = 0; i < limits_.size(); ++i) {
      if (multipliers_[i] > 0.0) {
        add_curvature(i + 1, multipliers_[i]);
      }
    }
    for (double weight : {0.0, 1.0, 10.0, 100.0}) {
      auto matrix = plain;
      for (std::size_t i = 0; i < limits_.size(); ++i) {
        if (multipliers_[i] > 0.0) {
          add_square(matrix, i + 1, n, weight);
        }
      }
      if (is_positive_definite(matrix, n, 1e-6)) {
        return matrix;
      }
    }
    for (double shift = 1e-3; shift < 1e9; shift *= 4.0) {
      auto matrix = plain;
      for (std::size_t v = 0; v < n; ++v) {
        matrix[v * n + v] += shift;
      }
      if (is_positive_definite(matrix, n, 1e-6)) {
        return matrix;
      }
    }
    std::fill(plain.begin(), plain.end(), 0.0);
    for (std::size_t v = 0; v < n; ++v) {
      plain[v * n + v] = 1.0;
    }
    return plain;
  }

  void add_square(std::vector<double>& matrix,
                  std::size_t output,
                  std::size_t n,
                  double weight) const {
    for (std::size_t v = 0; v < n; ++v) {
      for (std::size_t w = 0; w < n; ++w) {
        matrix[v * n + w] += weight * slopes_[output * n + v] * slopes_[output * n + w];
      }
    }
  }

  [[nodiscard]] QuadraticStep model_step(const std::vector<double>& z) const {
    const std::size_t n = z.size();
    QuadraticProgram program;
    program.variables = n;
    program.matrix = model_matrix(n);
    program.gradient.assign(slopes_.begin(), slopes_.begin() + static_cast<std::ptrdiff_t>(n));
    program.rows.assign(slopes_.begin() + static_cast<std::ptrdiff_t>(n), slopes_.end());
    for (const std::size_t i : limits_) {
      program.limits.push_back(std::max(0.0, -std::log(best_.utilisations[i])));
    }
    for (std::size_t v = 0; v < n; ++v) {
      for (const double sign : {1.0, -1.0}) {
        const auto& at = coordinates_[v];
        const double room = sign > 0.0 ? at.high - z[v] : z[v] - at.low;
        program.rows.insert(program.rows.end(), n, 0.0);
        program.rows[program.rows.size() - n + v] = sign;
        program.limits.push_back(std::clamp(room, 0.0, trust));
      }
    }
    return solve_quadratic(program);
  }

  /// One round; false: nothing better was found.
  bool step() {
    choose_limits();
    const auto z = here();
    if (!differentiate(z)) {
      promise_ = infinity;
      return false;
    }
    const auto keep_multipliers = [&](const QuadraticStep& found) {
      multipliers_.assign(found.multipliers.begin(),
                          found.multipliers.begin() + static_cast<std::ptrdiff_t>(limits_.size()));
    };
    if (multipliers_.empty()) {
      keep_multipliers(model_step(z));
    }
    const auto found = model_step(z);
    keep_multipliers(found);
    promise_ = 0.0;
    for (std::size_t v = 0; v < z.size(); ++v) {
      promise_ -= slopes_[v] * found.step[v];
    }
    double share = 1.0;
    for (int halving = 0; halving < 10; ++halving, share *= 0.5) {
      auto to = z;
      for (std::size_t v = 0; v < z.size(); ++v) {
        to[v] = std::clamp(z[v] + share * found.step[v], coordinates_[v].low, coordinates_[v].high);
      }
      if (move_to(to)) {
        return true;
      }
    }
    return false;
  }

  /// Steps along each variable, tenfold shorter when none helps.
  bool compass() {
    bool helped = false;
    for (double length = 1e-2; length > 5e-10; length *= 0.1) {
      bool moved = true;
      for (int round = 0; round < 20 && moved; ++round) {
        moved = false;
        for (std::size_t v = 0; v < coordinates_.size(); ++v) {
          if (coordinates_[v].variable == size_) {
            continue;
          }
          for (const double sign : {1.0, -1.0}) {
            auto to = here();
            to[v] = std::clamp(to[v] + sign * length, coordinates_[v].low, coordinates_[v].high);
            moved = move_to(to) || moved;
          }
        }
        helped = helped || moved;
      }
    }
    return helped;
  }

  static constexpr double infinity = std::numeric_limits<double>::infinity();

  const BoxProblem& problem_;
  std::size_t group_;
  std::uint32_t size_;
  PolishedPoint& best_;
  std::size_t& evaluations_;
  PolishedPoint trial_;
  std::vector<Coordinate> coordinates_;
  std::vector<std::size_t> limits_;  ///< Utilisations in the model.
  bool objective_logarithmic_ = true;
  double objective_scale_ = 1.0;
  std::vector<double> slopes_;       ///< [outputs x coordinates]
  std::vector<double> curvatures_;   ///< [outputs x coordinates x coordinates]
  std::vector<double> multipliers_;  ///< [limits_]; empty: not known yet.
  double promise_ = 0.0;             ///< Fall of the objective that the last model step promised.
};

}  // namespace

void polish(const BoxProblem& problem,
            std::size_t group,
            std::uint32_t size,
            PolishedPoint& point,
            std::size_t& evaluations) {
  Polisher(problem, group, size, point, evaluations).run();
}

}  // namespace bismar
