// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/blank.hpp"

#include <bismar/sizing/cost.hpp>
#include <bismar/sizing/result.hpp>

#include <vector>

namespace bismar {

/// A part as made: what the cost looks at.
struct MadePart {
  const SectionProperties& section;
  double net_mass = 0.0;  ///< Without finish [kg].
  Purchase purchase;
};

/// Unit cost of one candidate: material, route, treatment, operations, finish.
class CandidateCost {
 public:
  CandidateCost(const Part& part,
                const Catalogue& catalogue,
                const Settings& settings,
                const Candidate& candidate);

  /// Unit cost [currency]; rises with the section or stays.
  [[nodiscard]] double total(const MadePart& made,
                             const Range& price,
                             double usual_price,
                             CostEnd end = CostEnd::usual) const;
  [[nodiscard]] CostBreakdown breakdown(const MadePart& made,
                                        const Range& price,
                                        double usual_price) const;
  /// Mass of the finish [kg].
  [[nodiscard]] double finish_mass(const SectionProperties& section) const;

 private:
  struct Terms {
    double bought = 0.0;
    double price = 0.0;
    double material = 0.0;
    double credit = 0.0;
    ProcessCost route;
    ProcessCost treatment;
    double rejects = 0.0;
    std::vector<double> operations;
    double finish = 0.0;
    [[nodiscard]] double total() const;
  };
  [[nodiscard]] Terms terms(const MadePart& made,
                            const Range& price,
                            double usual_price,
                            CostEnd end) const;
  [[nodiscard]] double pick(const Range& range, CostEnd end) const;
  [[nodiscard]] double operation_cost(const OperationUse& use, CostEnd end) const;
  [[nodiscard]] double finish_cost(const MadePart& made, CostEnd end) const;
  [[nodiscard]] double finished_area(const SectionProperties& section) const;

  const Part& part_;
  const Catalogue& catalogue_;
  const Settings& settings_;
  const Route& route_;
  const Route* treatment_;
  const Finish* finish_;
  double batch_;
};

}  // namespace bismar
