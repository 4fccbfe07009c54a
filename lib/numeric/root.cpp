// SPDX-License-Identifier: MIT
#include <bismar/numeric/root.hpp>

#include <bismar/error.hpp>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <limits>
#include <string>

namespace bismar {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
// How many halvings the band may lag behind bisection, so that good steps are not cut short.
constexpr double band_slack = 8.0;

std::string number_text(double value) {
  char buffer[32];
  const auto result = std::to_chars(buffer, buffer + sizeof buffer, value);
  return {buffer, result.ptr};
}

void check_arguments(double lo, double hi, const RootOptions& options) {
  FaultList faults;
  if (!(lo > 0.0) || !std::isfinite(lo)) {
    faults.add(
        {Code::invalid_argument,
         "lo",
         number_text(lo),
         "0 < lo <= hi",
         "the lower end of the range is " + number_text(lo) + "; give a finite number above zero"});
  }
  if (!std::isfinite(hi) || !(hi >= lo)) {
    faults.add({Code::invalid_argument,
                "hi",
                number_text(hi),
                "finite, hi >= lo",
                "the upper end of the range is " + number_text(hi) +
                    "; give a finite number that is not below the lower end"});
  }
  if (!(options.relative_width >= 0.0) || !(options.relative_width < 1.0)) {
    faults.add({Code::invalid_argument,
                "relative_width",
                number_text(options.relative_width),
                "0 <= relative_width < 1",
                "the relative width is " + number_text(options.relative_width) +
                    "; give a number from 0 to below 1"});
  }
  faults.throw_if_any();
}

/// ln(x / reference) without the cancellation that ln x - ln reference has close to the reference.
double log_ratio(double x, double reference) {
  if (x > 0.5 * reference && x < 2.0 * reference) {
    return std::log1p((x - reference) / reference);
  }
  return std::log(x) - std::log(reference);
}

double log_value(double value) { return value > 0.0 ? std::log(value) : -infinity; }

/// A place of the bracket: x and ln g(x).
struct Place {
  double x = 0.0;
  double log_g = 0.0;
};

/// The search on either kind of monotone function. Distances d are |ln(x / feasible.x)|, so that
/// the feasible end is 0 and the infeasible end is the width, whichever way x runs.
class Search {
 public:
  Search(FunctionRef<double(double)> g, double direction, const RootOptions& options)
      : g_(g), direction_(direction), relative_width_(options.relative_width) {}

  LimitBracket run(double feasible_end, double infeasible_end) {
    LimitBracket result;
    const double start = evaluate(feasible_end);
    result.value = start;
    if (!(start <= 1.0)) {
      result.evaluations = evaluations_;
      return result;
    }
    const double other = infeasible_end == feasible_end ? start : evaluate(infeasible_end);
    if (other <= 1.0) {
      result.x = infeasible_end;
      result.value = other;
      result.evaluations = evaluations_;
      return result;
    }
    feasible_ = {feasible_end, log_value(start)};
    feasible_value_ = start;
    infeasible_ = {infeasible_end, log_value(other)};
    narrow();
    result.x = feasible_.x;
    result.value = feasible_value_;
    result.infeasible = infeasible_.x;
    result.evaluations = evaluations_;
    return result;
  }

 private:
  double evaluate(double x) {
    ++evaluations_;
    const double value = g_(x);
    if (std::isnan(value)) {
      throw Error(Fault{Code::not_finite,
                        "g",
                        "NaN at x = " + number_text(x),
                        "a number or +infinity",
                        "the function is not a number at x = " + number_text(x) +
                            "; it must have a value over the whole range"});
    }
    return value;
  }

  [[nodiscard]] bool is_done() const {
    const double small = std::min(feasible_.x, infeasible_.x);
    const double large = std::max(feasible_.x, infeasible_.x);
    return large - small <= relative_width_ * large || std::nextafter(small, infinity) >= large;
  }

  void narrow() {
    const double target = std::max(relative_width_, 0x1p-53);
    double width = distance(infeasible_.x);
    // After k steps the width is at most target * 2^(halvings - k): the band below sees to that.
    double halvings = std::ceil(std::log2(std::max(width / target, 1.0))) + band_slack;
    while (!is_done()) {
      width = distance(infeasible_.x);
      halvings -= 1.0;
      const double reach = target * std::exp2(halvings);
      double d = estimate(width, target);
      d = std::clamp(d, std::min(width - reach, 0.5 * width), std::max(reach, 0.5 * width));
      take(d);
    }
  }

  [[nodiscard]] double distance(double x) const { return direction_ * log_ratio(x, feasible_.x); }

  /// The x at distance d, strictly between the two ends.
  [[nodiscard]] double place(double d) const {
    const double t = direction_ * d;
    const double x = std::abs(t) < 1.0 ? feasible_.x + feasible_.x * std::expm1(t)
                                       : std::exp(std::log(feasible_.x) + t);
    const double small = std::min(feasible_.x, infeasible_.x);
    const double large = std::max(feasible_.x, infeasible_.x);
    return std::clamp(x, std::nextafter(small, infinity), std::nextafter(large, 0.0));
  }

  /// Where ln g is expected to be zero, kept at least half the wanted width away from both ends: a
  /// step that lands beside the crossing then closes the bracket.
  [[nodiscard]] double estimate(double width, double target) {
    const double v_f = feasible_.log_g;
    const double v_n = infeasible_.log_g;
    if (!std::isfinite(v_f) || !std::isfinite(v_n)) {
      return 0.5 * width;
    }
    double d = width * (v_f / (v_f - v_n));
    if (has_old_) {
      const double d_old = distance(old_.x);
      const double v_old = old_.log_g;
      // Chandrupatla's test says whether the three places are smooth enough for a quadratic; the
      // newest place and the other end are the bracket, the old one lies outside of it.
      const bool old_is_feasible = d_old < 0.0;
      const double d_a = old_is_feasible ? 0.0 : width;
      const double v_a = old_is_feasible ? v_f : v_n;
      const double d_b = old_is_feasible ? width : 0.0;
      const double v_b = old_is_feasible ? v_n : v_f;
      const double xi = (d_a - d_b) / (d_old - d_b);
      const double phi = (v_a - v_b) / (v_old - v_b);
      if (phi * phi < xi && (1.0 - phi) * (1.0 - phi) < 1.0 - xi) {
        const double t =
            (v_a / (v_b - v_a)) * (v_old / (v_b - v_old)) +
            ((d_old - d_a) / (d_b - d_a)) * (v_a / (v_old - v_a)) * (v_b / (v_old - v_b));
        const double quadratic = d_a + t * (d_b - d_a);
        if (quadratic > 0.0 && quadratic < width) {
          d = quadratic;
        }
      }
    }
    // Steps that keep falling on one side never close the bracket: go twice as far from the better
    // end, and further each time.
    const double stretch = same_side_ >= 2 ? std::exp2(same_side_ - 1) : 1.0;
    const double nearest = 0.5 * target * stretch;
    if (same_side_ >= 2) {
      d = last_was_feasible_ ? stretch * d : width - stretch * (width - d);
    }
    if (2.0 * nearest >= width) {
      return 0.5 * width;
    }
    return std::clamp(d, nearest, width - nearest);
  }

  void take(double d) {
    const double x = place(d);
    const double value = evaluate(x);
    const bool is_feasible = value <= 1.0;
    same_side_ = is_feasible == last_was_feasible_ ? same_side_ + 1 : 1;
    last_was_feasible_ = is_feasible;
    Place& end = is_feasible ? feasible_ : infeasible_;
    old_ = end;
    has_old_ = std::isfinite(old_.log_g);
    end = {x, log_value(value)};
    if (is_feasible) {
      feasible_value_ = value;
    }
  }

  FunctionRef<double(double)> g_;
  double direction_;  // +1 when the infeasible x are larger, -1 when they are smaller
  double relative_width_;
  Place feasible_;
  Place infeasible_;
  Place old_;  // the end that the last step replaced
  double feasible_value_ = 0.0;
  bool has_old_ = false;
  bool last_was_feasible_ = false;
  int same_side_ = 0;
  int evaluations_ = 0;
};

}  // namespace

LimitBracket smallest_feasible(FunctionRef<double(double)> g,
                               double lo,
                               double hi,
                               const RootOptions& options) {
  check_arguments(lo, hi, options);
  return Search(g, -1.0, options).run(hi, lo);
}

LimitBracket largest_feasible(FunctionRef<double(double)> g,
                              double lo,
                              double hi,
                              const RootOptions& options) {
  check_arguments(lo, hi, options);
  return Search(g, 1.0, options).run(lo, hi);
}

}  // namespace bismar
