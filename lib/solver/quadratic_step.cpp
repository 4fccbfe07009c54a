// SPDX-License-Identifier: MIT
#include "solver/quadratic_step.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace bismar {

bool solve_linear(std::vector<double>& a, std::vector<double>& b) {
  const std::size_t n = b.size();
  for (std::size_t c = 0; c < n; ++c) {
    std::size_t pivot = c;
    for (std::size_t r = c + 1; r < n; ++r) {
      if (std::abs(a[r * n + c]) > std::abs(a[pivot * n + c])) {
        pivot = r;
      }
    }
    if (!(std::abs(a[pivot * n + c]) > 1e-300)) {
      return false;
    }
    if (pivot != c) {
      std::swap_ranges(a.begin() + static_cast<std::ptrdiff_t>(c * n),
                       a.begin() + static_cast<std::ptrdiff_t>((c + 1) * n),
                       a.begin() + static_cast<std::ptrdiff_t>(pivot * n));
      std::swap(b[c], b[pivot]);
    }
    for (std::size_t r = c + 1; r < n; ++r) {
      const double factor = a[r * n + c] / a[c * n + c];
      for (std::size_t j = c; j < n; ++j) {
        a[r * n + j] -= factor * a[c * n + j];
      }
      b[r] -= factor * b[c];
    }
  }
  for (std::size_t c = n; c-- > 0;) {
    for (std::size_t j = c + 1; j < n; ++j) {
      b[c] -= a[c * n + j] * b[j];
    }
    b[c] /= a[c * n + c];
  }
  return std::all_of(b.begin(), b.end(), [](double value) { return std::isfinite(value); });
}

bool is_positive_definite(std::vector<double> a, std::size_t n, double least) {
  for (std::size_t c = 0; c < n; ++c) {
    if (!(a[c * n + c] > least)) {
      return false;
    }
    for (std::size_t r = c + 1; r < n; ++r) {
      const double factor = a[r * n + c] / a[c * n + c];
      for (std::size_t j = c; j < n; ++j) {
        a[r * n + j] -= factor * a[c * n + j];
      }
    }
  }
  return true;
}

namespace {

/// Steps shorter than this are what rounding leaves of none.
constexpr double no_step = 1e-12;

class ActiveSet {
 public:
  explicit ActiveSet(const QuadraticProgram& program)
      : program_(program),
        n_(program.variables),
        out_{std::vector<double>(n_), std::vector<double>(program.limits.size())} {}

  QuadraticStep run() {
    const std::size_t most = 20 + 4 * (n_ + program_.limits.size());
    for (std::size_t round = 0; round < most; ++round) {
      if (!solve_equalities()) {
        break;
      }
      double longest = 0.0;
      for (std::size_t v = 0; v < n_; ++v) {
        longest = std::max(longest, std::abs(solution_[v]));
      }
      if (longest <= no_step) {
        if (!drop_one()) {
          break;
        }
        continue;
      }
      advance();
    }
    return std::move(out_);
  }

 private:
  [[nodiscard]] double along(std::size_t row, const std::vector<double>& direction) const {
    double sum = 0.0;
    for (std::size_t v = 0; v < n_; ++v) {
      sum += program_.rows[row * n_ + v] * direction[v];
    }
    return sum;
  }

  /// The step to the least point on the working limits, then their multipliers.
  bool solve_equalities() {
    const std::size_t size = n_ + working_.size();
    matrix_.assign(size * size, 0.0);
    solution_.assign(size, 0.0);
    for (std::size_t r = 0; r < n_; ++r) {
      solution_[r] = -program_.gradient[r];
      for (std::size_t c = 0; c < n_; ++c) {
        matrix_[r * size + c] = program_.matrix[r * n_ + c];
        solution_[r] -= program_.matrix[r * n_ + c] * out_.step[c];
      }
    }
    for (std::size_t w = 0; w < working_.size(); ++w) {
      for (std::size_t v = 0; v < n_; ++v) {
        const double entry = program_.rows[working_[w] * n_ + v];
        matrix_[(n_ + w) * size + v] = entry;
        matrix_[v * size + n_ + w] = entry;
      }
    }
    if (!solve_linear(matrix_, solution_)) {
      return false;
    }
    std::fill(out_.multipliers.begin(), out_.multipliers.end(), 0.0);
    for (std::size_t w = 0; w < working_.size(); ++w) {
      out_.multipliers[working_[w]] = std::max(0.0, solution_[n_ + w]);
    }
    return true;
  }

  /// Leaves the limit that holds back most; false: none does.
  bool drop_one() {
    std::size_t worst = working_.size();
    double least = 0.0;
    for (std::size_t w = 0; w < working_.size(); ++w) {
      if (solution_[n_ + w] < least) {
        least = solution_[n_ + w];
        worst = w;
      }
    }
    if (worst == working_.size()) {
      return false;
    }
    working_.erase(working_.begin() + static_cast<std::ptrdiff_t>(worst));
    return true;
  }

  /// As far as the first limit that is not working yet.
  void advance() {
    double share = 1.0;
    std::size_t blocking = program_.limits.size();
    for (std::size_t i = 0; i < program_.limits.size(); ++i) {
      if (std::find(working_.begin(), working_.end(), i) != working_.end()) {
        continue;
      }
      const double rate = along(i, solution_);
      if (rate > 1e-14) {
        const double room = std::max(0.0, program_.limits[i] - along(i, out_.step)) / rate;
        if (room < share) {
          share = room;
          blocking = i;
        }
      }
    }
    for (std::size_t v = 0; v < n_; ++v) {
      out_.step[v] += share * solution_[v];
    }
    if (blocking != program_.limits.size()) {
      working_.push_back(blocking);
    }
  }

  const QuadraticProgram& program_;
  std::size_t n_;
  QuadraticStep out_;
  std::vector<std::size_t> working_;
  std::vector<double> matrix_;
  std::vector<double> solution_;  ///< Step, then multipliers of the working limits.
};

}  // namespace

QuadraticStep solve_quadratic(const QuadraticProgram& program) { return ActiveSet(program).run(); }

}  // namespace bismar
