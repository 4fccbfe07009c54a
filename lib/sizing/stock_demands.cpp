// SPDX-License-Identifier: MIT
#include "sizing/stock_demands.hpp"

#include <algorithm>
#include <cmath>

namespace bismar {

StockDemands::StockDemands(const SizingProblem& problem, const StockList& list)
    : places_(list.items.size(), no_place), table_(0, 0) {
  for (std::size_t i = 0; i < list.items.size(); ++i) {
    if (is_offered(list.items[i], problem.settings())) {
      items_.push_back(static_cast<std::uint32_t>(i));
    }
  }
  std::stable_sort(items_.begin(), items_.end(), [&](std::uint32_t a, std::uint32_t b) {
    return list.items[a].section.area < list.items[b].section.area;
  });
  for (std::size_t place = 0; place < items_.size(); ++place) {
    places_[items_[place]] = static_cast<std::uint32_t>(place);
  }

  // Row by row: most terms ask nothing under the loads at hand, and are not kept.
  std::vector<std::vector<double>> rows(first_term, std::vector<double>(items_.size()));
  for (std::size_t place = 0; place < items_.size(); ++place) {
    const auto& section = list.items[items_[place]].section;
    rows[thin_wall][place] = 1.0 / section.wall;
    rows[thick_wall][place] = section.wall;
    rows[light][place] = 1.0 / section.area;
    rows[heavy][place] = section.area;
  }
  for (const LimitState* state : limit_states()) {
    const SeparableBound* bound = state->separable();
    if (bound == nullptr) {
      continue;
    }
    for (std::size_t c = 0; c < problem.effects().size(); ++c) {
      if (c > 0 && !state->reads_loads()) {
        break;
      }
      std::vector<std::vector<double>> own(bound->terms(), std::vector<double>(items_.size()));
      std::vector<double> demands(bound->terms());
      for (std::size_t place = 0; place < items_.size(); ++place) {
        bound->demands({list.items[items_[place]].section,
                        problem.effects()[c],
                        problem.member_limits(),
                        problem.part().body.length},
                       demands);
        for (std::size_t t = 0; t < own.size(); ++t) {
          // A number beyond all numbers decides nothing.
          own[t][place] = std::isnan(demands[t]) ? 0.0 : demands[t];
        }
      }
      Terms terms{.state = state, .load_case = c, .first = rows.size(), .kept = {}};
      for (std::size_t t = 0; t < own.size(); ++t) {
        if (std::any_of(own[t].begin(), own[t].end(), [](double d) { return d > 0.0; })) {
          terms.kept.push_back(t);
          rows.push_back(std::move(own[t]));
        }
      }
      if (!terms.kept.empty()) {
        terms_.push_back(std::move(terms));
      }
    }
  }
  table_ = DemandTable(rows.size(), items_.size());
  for (std::size_t k = 0; k < rows.size(); ++k) {
    for (std::size_t place = 0; place < items_.size(); ++place) {
      table_.set(k, place, rows[k][place]);
    }
  }
}

}  // namespace bismar
