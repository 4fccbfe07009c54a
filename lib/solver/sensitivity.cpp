// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/numeric/function_ref.hpp>
#include <bismar/solver/sensitivity.hpp>

#include <algorithm>
#include <cmath>
#include <string>

namespace bismar {

namespace {

/// Slopes of logarithms that are smaller than this are rounding.
constexpr double level = 1e-9;
/// A size that can move by less than this share does not move.
constexpr double least_room = 1e-7;

bool is_positive(double value) { return std::isfinite(value) && value > 0.0; }

void require(FaultList& faults,
             bool good,
             const std::string& where,
             double value,
             const std::string& allowed) {
  if (!good) {
    faults.add(std::isfinite(value) ? Code::out_of_range : Code::not_finite,
               where,
               "It must be " + allowed + ".");
  }
}

void check_arguments(const SizedDesign& design, const SensitivityOptions& options) {
  FaultList faults;
  require(faults, is_positive(design.size), "size", design.size, "above zero and finite");
  for (std::size_t i = 0; i < design.parameters.size(); ++i) {
    require(faults,
            is_positive(design.parameters[i]),
            "parameters/" + std::to_string(i),
            design.parameters[i],
            "above zero and finite");
  }
  require(faults,
          design.lower >= 0.0 && design.lower <= design.size * (1.0 + options.active),
          "lower",
          design.lower,
          "at least zero and at most the size");
  require(faults,
          std::isfinite(design.upper) && design.upper >= design.size * (1.0 - options.active),
          "upper",
          design.upper,
          "finite and at least the size");
  require(faults,
          options.active > 0.0 && options.active < 1.0,
          "active",
          options.active,
          "between 0 and 1");
  require(faults,
          options.step >= 1e-6 && options.step <= 0.1,
          "step",
          options.step,
          "between 1e-6 and 0.1");
  faults.throw_if_any();
}

[[noreturn]] void no_optimum(const std::string& why) {
  throw Error(Fault{.code = Code::conflict,
                    .where = "size",
                    .found = {},
                    .allowed = "the least feasible size",
                    .message = "The size is no optimum: " + why + "."});
}

/// ln of the outputs: the objective first, then the active limits.
class Outputs {
 public:
  Outputs(const SizedDesign& design, std::vector<std::size_t> active)
      : design_(design), active_(std::move(active)), utilisations_(design.constraints) {}

  [[nodiscard]] std::size_t size() const { return active_.size() + 1; }

  [[nodiscard]] std::vector<double> at(double x, std::span<const double> parameters) {
    std::vector<double> out;
    out.push_back(logarithm(design_.objective(x, parameters), "objective"));
    design_.utilisations(x, parameters, utilisations_);
    for (const std::size_t i : active_) {
      out.push_back(logarithm(utilisations_[i], "utilisations/" + std::to_string(i)));
    }
    return out;
  }

 private:
  static double logarithm(double value, const std::string& where) {
    FaultList faults;
    require(faults, is_positive(value), where, value, "above zero and finite near the optimum");
    faults.throw_if_any();
    return std::log(value);
  }

  const SizedDesign& design_;
  std::vector<std::size_t> active_;
  std::vector<double> utilisations_;
};

/// a + weight (b - a) of each output.
std::vector<double> extrapolated(const std::vector<double>& coarse,
                                 const std::vector<double>& fine,
                                 double weight) {
  std::vector<double> out(coarse.size());
  for (std::size_t i = 0; i < out.size(); ++i) {
    out[i] = coarse[i] + weight * (fine[i] - coarse[i]);
  }
  return out;
}

/// Slopes of `f` at 0, where f(t) has outputs at a displacement t of a logarithm.
std::vector<double> central(double h, FunctionRef<std::vector<double>(double)> f) {
  const auto slope = [&](double step) {
    const auto ahead = f(step);
    auto out = f(-step);
    for (std::size_t i = 0; i < out.size(); ++i) {
      out[i] = (ahead[i] - out[i]) / (2.0 * step);
    }
    return out;
  };
  return extrapolated(slope(h), slope(0.5 * h), 4.0 / 3.0);  // the error in h^2 goes
}

/// The same where only displacements of the sign of h are allowed.
std::vector<double> one_sided(double h, FunctionRef<std::vector<double>(double)> f) {
  const auto here = f(0.0);
  const auto slope = [&](double step) {
    auto out = f(step);
    for (std::size_t i = 0; i < out.size(); ++i) {
      out[i] = (out[i] - here[i]) / step;
    }
    return out;
  };
  const auto first = slope(h);
  const auto second = slope(0.5 * h);
  const auto third = slope(0.25 * h);
  // The error in h goes, then that in h^2.
  return extrapolated(
      extrapolated(first, second, 2.0), extrapolated(second, third, 2.0), 4.0 / 3.0);
}

/// What the size would do a share of the parameter, if this alone held it.
struct Holds {
  std::vector<double> below;  ///< d ln x / d ln p of what holds the size from below.
  std::vector<double> above;
  bool closed_below = false;  ///< A level limit is passed while the parameter falls.
  bool closed_above = false;
};

SidedValue sides(const Holds& holds) {
  const double least = *std::min_element(holds.below.begin(), holds.below.end());
  const double most = *std::max_element(holds.below.begin(), holds.below.end());
  const auto& above = holds.above;
  // While the parameter falls, a rate is a fall of the size: the least of them holds it.
  const bool room_below =
      std::all_of(above.begin(), above.end(), [&](double rate) { return rate - least <= level; });
  const bool room_above =
      std::all_of(above.begin(), above.end(), [&](double rate) { return most - rate <= level; });
  SidedValue out;
  if (room_below && !holds.closed_below) {
    out.below = least;
  }
  if (room_above && !holds.closed_above) {
    out.above = most;
  }
  return out;
}

class Analysis {
 public:
  Analysis(const SizedDesign& design, const SensitivityOptions& options)
      : design_(design), options_(options), outputs_(design, find_active()) {
    out_.at_lower = design.size - design.lower <= options.active * design.size;
    out_.at_upper = design.upper - design.size <= options.active * design.size;
  }

  Sensitivity run() {
    const double m = design_.objective(design_.size, design_.parameters);
    along_size();
    const double objective_slope = size_slopes_[0];
    if (objective_slope < -level) {
      no_optimum("the objective falls with it");
    }
    bool held = out_.at_lower;
    for (std::size_t i = 0; i < out_.active.size(); ++i) {
      const double slope = size_slopes_[i + 1];
      if (std::abs(slope) > level) {
        out_.active[i].relative_multiplier = -objective_slope / slope;
        out_.active[i].multiplier = -objective_slope / slope * m;
      }
      held = held || slope < -level;
    }
    if (!held) {
      no_optimum("no limit is active that a smaller one would break");
    }
    for (std::size_t p = 0; p < design_.parameters.size(); ++p) {
      along_parameter(p);
    }
    return std::move(out_);
  }

 private:
  std::vector<std::size_t> find_active() {
    std::vector<double> u(design_.constraints);
    design_.utilisations(design_.size, design_.parameters, u);
    std::vector<std::size_t> active;
    for (std::size_t i = 0; i < u.size(); ++i) {
      if (!(u[i] <= 1.0 + options_.active)) {
        no_optimum("limit " + std::to_string(i) + " is not met");
      }
      if (u[i] >= 1.0 - options_.active) {
        active.push_back(i);
        out_.active.push_back({i, {}, {}});
      }
    }
    return active;
  }

  void along_size() {
    // Room for displacements of ln x; a bound at zero leaves all of it.
    const double down =
        design_.lower > 0.0 ? std::log(design_.size / design_.lower) : 2.0 * options_.step;
    const double up = std::log(design_.upper / design_.size);
    const auto f = [&](double t) {
      const double x = std::clamp(design_.size * std::exp(t), design_.lower, design_.upper);
      return outputs_.at(x, design_.parameters);
    };
    const double h = options_.step;
    if (std::min(down, up) >= h) {
      size_slopes_ = central(h, f);
    } else if (std::max(down, up) >= least_room) {
      size_slopes_ = up >= down ? one_sided(std::min(h, up), f) : one_sided(-std::min(h, down), f);
    } else {
      // The only size there is: bounds hold it from both sides.
      size_slopes_.assign(outputs_.size(), 0.0);
    }
  }

  void along_parameter(std::size_t p) {
    std::vector<double> parameters = design_.parameters;
    const auto slopes = central(options_.step, [&](double t) {
      parameters[p] = design_.parameters[p] * std::exp(t);
      return outputs_.at(design_.size, parameters);
    });
    Holds holds;
    if (out_.at_lower) {
      holds.below.push_back(0.0);
    }
    if (out_.at_upper) {
      holds.above.push_back(0.0);
    }
    for (std::size_t i = 1; i < slopes.size(); ++i) {
      const double with_size = size_slopes_[i];
      if (std::abs(with_size) <= level) {
        holds.closed_below = holds.closed_below || slopes[i] < -level;
        holds.closed_above = holds.closed_above || slopes[i] > level;
      } else {
        (with_size < 0.0 ? holds.below : holds.above).push_back(-slopes[i] / with_size);
      }
    }
    const SidedValue size = sides(holds);
    const auto objective = [&](double rate) { return slopes[0] + size_slopes_[0] * rate; };
    SidedValue m;
    if (size.below) {
      m.below = objective(*size.below);
    }
    if (size.above) {
      m.above = objective(*size.above);
    }
    out_.size.push_back(size);
    out_.objective.push_back(m);
  }

  const SizedDesign& design_;
  const SensitivityOptions& options_;
  Sensitivity out_;
  Outputs outputs_;
  std::vector<double> size_slopes_;  ///< d ln / d ln x of the outputs.
};

}  // namespace

Sensitivity sensitivity(const SizedDesign& design, const SensitivityOptions& options) {
  check_arguments(design, options);
  return Analysis(design, options).run();
}

}  // namespace bismar
