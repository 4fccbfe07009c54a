// SPDX-License-Identifier: MIT
#include "sizing/study.hpp"

#include <bismar/error.hpp>
#include <bismar/exchange/ruler.hpp>
#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/sizing/front.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <map>

namespace bismar {

namespace {

/// A feasible design of a result, kept on or near the front or not.
struct Row {
  Candidate candidate;
  double size = 0.0;
  FreeSizes free_sizes = {};
  double mass = 0.0;
  double cost = 0.0;
};

std::string label_of(const Row& row,
                     const Result& result,
                     std::size_t index,
                     const Part& part,
                     const Catalogue& catalogue,
                     Per per) {
  const auto labels = names(row.candidate, part, catalogue);
  switch (per) {
    case Per::design:
      // Designs that were not kept have no id; candidate and row tell them apart.
      return index < result.designs.size()
                 ? result.designs[index].id
                 : labels.material + "/" + labels.shape + "/" + labels.route +
                       (labels.treatment.empty() ? "" : "+" + labels.treatment) + "/" +
                       labels.finish + " #" + std::to_string(index);
    case Per::material:
      return labels.material;
    case Per::shape:
      return labels.shape;
    case Per::route:
      return labels.route;
  }
  return labels.material;
}

/// Mass and cost of a row with its density and price at given ends; its size stays.
struct Corner {
  double mass = 0.0;
  double cost = 0.0;
};

class Band {
 public:
  Band(const Part& part, const Catalogue& catalogue, const Settings& settings)
      : problem_(part, catalogue, settings) {}

  /// Breakpoint between the design that holds below and the one that holds above, over all ends of
  /// their price and density ranges; those of one material move together.
  BreakpointBand breakpoint(const Row& below, const Row& above) {
    const auto low = corners(below);
    const auto high = corners(above);
    const bool same = below.candidate.material == above.candidate.material;
    double least = std::numeric_limits<double>::infinity();
    double most = 0.0;
    for (std::size_t i = 0; i < low.size(); ++i) {
      for (std::size_t j = 0; j < high.size(); ++j) {
        if (same && i != j) {
          continue;
        }
        const double saved = low[i].mass - high[j].mass;
        const double paid = high[j].cost - low[i].cost;
        // No mass saved at these ends: no worth of a kilogram makes the upper one the choice.
        const double alpha =
            saved <= 0.0 ? std::numeric_limits<double>::infinity() : std::max(0.0, paid / saved);
        least = std::min(least, alpha);
        most = std::max(most, alpha);
      }
    }
    return {least, std::isfinite(most) ? std::optional(most) : std::nullopt};
  }

 private:
  std::array<Corner, 4> corners(const Row& row) {
    const auto& compiled = problem_.add(row.candidate, row.size, row.free_sizes);
    const auto detail = problem_.detail(problem_.groups() - 1, row.size);
    if (detail.piece->step == nullptr || !detail.purchase) {
      throw Error(
          {Code::conflict,
           "result",
           {},
           "a result of this part, catalogue and settings",
           "The result does not fit the part, catalogue and settings that it is read with."});
    }
    const auto& step = *detail.piece->step;
    const auto density = problem_.catalogue()
                             .materials.value(Property::density, step.row)
                             .value_or(Range{step.density, step.density});
    std::array<Corner, 4> out;
    std::size_t k = 0;
    for (const double rho : {density.low, density.high}) {
      const double ratio = rho / step.density;
      Purchase purchase = *detail.purchase;
      purchase.mass *= ratio;
      const double net = detail.net_mass * ratio;
      for (const double price : {step.price.low, step.price.high}) {
        const MadePart made{detail.section, net, purchase};
        out[k++] = {net + compiled.cost->finish_mass(detail.section),
                    compiled.cost->total(made, {price, price}, price)};
      }
    }
    return out;
  }

  SizingProblem problem_;
};

}  // namespace

ExchangeRuler exchange_ruler(const Result& result,
                             const Part& part,
                             const Catalogue& catalogue,
                             Per per,
                             const Settings& settings) {
  const FloatingPointGuard guard;
  std::vector<Row> rows;
  for (const auto& design : result.designs) {
    rows.push_back({design.candidate, design.size, design.free_sizes, design.mass, design.cost});
  }
  for (const auto& point : result.others) {
    rows.push_back({point.candidate, point.size, point.free_sizes, point.mass, point.cost});
  }
  std::vector<double> objectives;
  std::vector<std::uint32_t> labels;
  std::vector<std::string> words;
  std::map<std::string, std::uint32_t> numbers;
  for (std::size_t i = 0; i < rows.size(); ++i) {
    objectives.insert(objectives.end(), {rows[i].mass, rows[i].cost});
    auto word = label_of(rows[i], result, i, part, catalogue, per);
    const auto [entry, added] = numbers.try_emplace(word, static_cast<std::uint32_t>(words.size()));
    if (added) {
      words.push_back(std::move(word));
    }
    labels.push_back(entry->second);
  }

  const auto ruler = exchange_ruler(objectives, labels);
  ExchangeRuler out;
  out.per = per;
  Band band(part, catalogue, settings);
  const Row* previous = nullptr;
  for (const auto& stretch : ruler.stretches) {
    const auto& first = stretch.vertices.front();
    NamedStretch named;
    named.from = stretch.from;
    named.to = stretch.to;
    named.design = first.rows.front();
    named.choice = words[stretch.label];
    named.penalty_from = stretch.penalty_from;
    named.penalty_to = stretch.penalty_to;
    named.mass = first.priced;
    named.cost = first.cost;
    for (const auto& other : stretch.runners_up) {
      const Row& row = rows[other.rows.front()];
      named.runners_up.push_back({other.from,
                                  other.to,
                                  words[other.label],
                                  row.candidate,
                                  row.mass,
                                  row.cost,
                                  other.regret_from,
                                  other.regret_to});
    }
    if (previous != nullptr) {
      named.from_band = band.breakpoint(*previous, rows[named.design]);
    }
    previous = &rows[stretch.vertices.back().rows.front()];
    out.stretches.push_back(std::move(named));
  }
  for (const auto& one : ruler.unsupported) {
    // Only designs of the front can be non-dominated.
    out.unsupported.push_back({one.row, one.least_regret, one.alpha});
  }
  return out;
}

}  // namespace bismar
