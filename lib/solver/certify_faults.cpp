// SPDX-License-Identifier: MIT
#include "solver/certify_faults.hpp"

#include <algorithm>
#include <cmath>
#include <string>

namespace bismar {

namespace {

void require(FaultList& faults,
             bool good,
             const std::string& where,
             double value,
             const std::string& allowed) {
  if (!good) {
    faults.add({std::isfinite(value) ? Code::out_of_range : Code::not_finite,
                where,
                std::to_string(value),
                allowed,
                "It must be " + allowed + "."});
  }
}

void add_set_faults(const Variable& variable, const std::string& where, FaultList& faults) {
  const auto& values = variable.values;
  if (values.empty()) {
    faults.add(Code::empty, where, "The ordered set has no value. Leave the group out.");
  } else if (!std::all_of(
                 values.begin(), values.end(), [](double x) { return std::isfinite(x); })) {
    faults.add(Code::not_finite, where, "A value of the ordered set is not finite.");
  } else if (std::adjacent_find(values.begin(), values.end(), [](double a, double b) {
               return !(a < b);
             }) != values.end()) {
    faults.add(Code::invalid_argument, where, "The values of the ordered set do not ascend.");
  }
}

void add_variable_faults(const Variable& variable, const std::string& where, FaultList& faults) {
  if (variable.kind == Variable::Kind::ordered_set) {
    add_set_faults(variable, where, faults);
    return;
  }
  if (!std::isfinite(variable.lower) || !std::isfinite(variable.upper)) {
    faults.add(Code::not_finite, where, "A bound is not finite. Bound the variable on both sides.");
    return;
  }
  if (variable.lower > variable.upper) {
    faults.add(Code::out_of_range, where, "The lower bound lies above the upper one.");
    return;
  }
  if (variable.kind == Variable::Kind::integer) {
    if (std::ceil(variable.lower) > std::floor(variable.upper)) {
      faults.add(Code::out_of_range, where, "No whole number lies between the bounds.");
    }
    if (std::max(std::abs(variable.lower), std::abs(variable.upper)) > 9007199254740992.0) {
      faults.add(Code::out_of_range, where, "A bound lies beyond 2^53: not every number is there.");
    }
    return;
  }
  const auto& at = variable.breakpoints;
  if (std::adjacent_find(at.begin(), at.end(), [](double a, double b) { return !(a < b); }) !=
          at.end() ||
      !std::all_of(at.begin(), at.end(), [&](double x) {
        return x > variable.lower && x < variable.upper;
      })) {
    faults.add(Code::invalid_argument,
               where,
               "The breakpoints do not ascend strictly between the bounds.");
  }
}

}  // namespace

void add_option_faults(const CertifyOptions& options, std::size_t objectives, FaultList& faults) {
  require(faults,
          options.epsilon >= 0.0 && options.epsilon < 1.0,
          "epsilon",
          options.epsilon,
          "at least 0 and below 1");
  require(faults,
          options.delta >= 0.0 && options.delta < 1.0,
          "delta",
          options.delta,
          "at least 0 and below 1");
  require(faults,
          options.near >= 0.0 && std::isfinite(options.near),
          "near",
          options.near,
          "at least 0 and finite");
  if (!options.absolute.empty() && options.absolute.size() != objectives) {
    faults.add(Code::conflict, "absolute", "There must be none, or one an objective.");
  }
  for (std::size_t j = 0; j < options.absolute.size(); ++j) {
    require(faults,
            options.absolute[j] >= 0.0 && std::isfinite(options.absolute[j]),
            "absolute[" + std::to_string(j) + "]",
            options.absolute[j],
            "at least 0 and finite");
  }
  if (options.boxes_per_group == 0) {
    faults.add(Code::out_of_range, "boxes_per_group", "A group takes at least one box.");
  }
  if (options.boxes_kept == 0) {
    faults.add(Code::out_of_range, "boxes_kept", "At least one box must be kept.");
  }
  if (objectives == 0) {
    faults.add(Code::empty, "objectives", "The problem has no objective.");
  }
}

void add_group_faults(const BoxProblem& problem,
                      std::size_t group,
                      const CertifyOptions& options,
                      FaultList& faults) {
  const std::string where = "groups[" + std::to_string(group) + "]";
  const auto variables = problem.variables(group);
  if (variables.empty()) {
    faults.add(Code::empty, where, "The group has no variable.");
  }
  bool continuous = false;
  for (std::size_t v = 0; v < variables.size(); ++v) {
    add_variable_faults(variables[v], where + ".variables[" + std::to_string(v) + "]", faults);
    continuous = continuous || variables[v].kind == Variable::Kind::continuous;
  }
  const bool all_absolute =
      !options.absolute.empty() &&
      std::all_of(
          options.absolute.begin(), options.absolute.end(), [](double a) { return a > 0.0; });
  if (continuous && options.epsilon == 0.0 && !all_absolute) {
    faults.add({Code::unsupported,
                "epsilon",
                "0",
                "above 0",
                "An epsilon of 0 can be kept on sets and whole numbers only; " + where +
                    " has a continuous variable."});
  }
}

}  // namespace bismar
