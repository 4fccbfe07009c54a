// SPDX-License-Identifier: MIT
#pragma once

#include "solver/posynomial_problem.hpp"

#include <random>

namespace bismar::test {

/// Draws groups of posynomial problems. Variable 0 is a size: objectives rise with it and each
/// utilisation rises or falls; in the others anything goes.
class PosynomialMaker {
 public:
  explicit PosynomialMaker(unsigned seed) : random_(seed) {}

  double real(double low, double high) {
    return std::uniform_real_distribution<double>(low, high)(random_);
  }
  int pick(int low, int high) { return std::uniform_int_distribution<int>(low, high)(random_); }

  /// @param rough  Powers are whole and often zero, so that trends and slopes of zero are common.
  Posynomial posynomial(
      std::size_t variables, std::size_t terms, double low, double high, bool rough) {
    Posynomial out;
    for (std::size_t t = 0; t < terms; ++t) {
      Posynomial::Term term;
      term.factor = real(0.5, 2.0);
      term.powers.push_back(real(low, high));
      for (std::size_t v = 1; v < variables; ++v) {
        term.powers.push_back(rough ? static_cast<double>(pick(-1, 1)) : real(-1.5, 1.5));
      }
      out.terms.push_back(term);
    }
    return out;
  }

  PosynomialProblem::Group group(std::size_t objectives, std::vector<Variable> variables) {
    PosynomialProblem::Group out;
    const std::size_t n = variables.size();
    out.variables = std::move(variables);
    const bool rough = pick(0, 2) == 0;
    for (std::size_t j = 0; j < objectives; ++j) {
      // One in six objectives does not depend on the size at all.
      const bool level = pick(0, 5) == 0;
      out.objectives.push_back(posynomial(n, 2, level ? 0.0 : 0.2, level ? 0.0 : 2.0, rough));
    }
    for (int i = pick(1, 2); i > 0; --i) {
      out.utilisations.push_back(
          posynomial(n, 1 + static_cast<std::size_t>(pick(0, 1)), -3.0, -0.8, rough));
    }
    // A limit that rises with the size: it may leave a sliver, or nothing.
    if (pick(0, 1) == 0) {
      out.utilisations.push_back(posynomial(n, 1, 0.1, 1.5, rough));
      const double scale = real(0.2, 0.9);
      for (auto& term : out.utilisations.back().terms) {
        term.factor *= scale;
      }
    }
    // A cap on the first objective cuts the front.
    if (pick(0, 2) == 0) {
      auto cap = out.objectives.front();
      const double scale = real(0.1, 0.5);
      for (auto& term : cap.terms) {
        term.factor *= scale;
      }
      out.utilisations.push_back(cap);
    }
    return out;
  }

  /// Steps: beyond a size, outputs are multiplied by a factor each.
  void add_step(PosynomialProblem::Group& group) {
    auto& size = group.variables[0];
    size.breakpoints = {real(size.lower * 1.1, size.upper * 0.9)};
    for (auto* list : {&group.objectives, &group.utilisations}) {
      for (auto& sum : *list) {
        sum.jump = pick(0, 1) == 0 ? 1.0 : real(0.5, 2.0);
      }
    }
  }

  std::vector<Variable> continuous(std::size_t count) {
    std::vector<Variable> out;
    for (std::size_t v = 0; v < count; ++v) {
      out.push_back(between(0.5, 4.0));
    }
    return out;
  }

  /// Sets and whole numbers only.
  std::vector<Variable> discrete(std::size_t count, int most) {
    std::vector<Variable> out;
    for (std::size_t v = 0; v < count; ++v) {
      if (pick(0, 1) == 0) {
        out.push_back(whole(1.0, static_cast<double>(pick(2, most))));
        continue;
      }
      std::vector<double> values;
      double at = 0.4;
      for (int i = pick(1, most); i > 0; --i) {
        at *= real(1.05, 1.5);
        values.push_back(at);
      }
      out.push_back(one_of_values(values));
    }
    return out;
  }

  std::mt19937& engine() { return random_; }

 private:
  std::mt19937 random_;
};

}  // namespace bismar::test
