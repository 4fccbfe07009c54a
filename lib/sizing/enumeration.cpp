// SPDX-License-Identifier: MIT
#include "sizing/enumeration.hpp"

#include "sizing/blank.hpp"
#include "sizing/words.hpp"

#include <algorithm>
#include <tuple>

namespace bismar {

namespace {

/// What the rules of existence, of blanks and of bought sizes read of a material.
auto kind_of(const MaterialInfo& info) {
  return std::tie(info.material_class,
                  info.condition,
                  info.group,
                  info.standard,
                  info.isotropic,
                  info.in_plane_only,
                  info.use,
                  info.forms,
                  info.processes,
                  info.corrosion);
}

}  // namespace

std::vector<std::uint32_t> stock_lists(const Part& part, const Catalogue& catalogue) {
  std::vector<std::uint32_t> out;
  const bool all = contains_word(part.body.stock, "all");
  for (std::size_t i = 0; i < catalogue.stock.size(); ++i) {
    const auto& list = catalogue.stock[i];
    if (!list.sheet && (all || contains_word(part.body.stock, list.id))) {
      out.push_back(static_cast<std::uint32_t>(i));
    }
  }
  return out;
}

std::vector<std::uint32_t> finish_choices(const Part& part, const Catalogue& catalogue) {
  std::vector<std::uint32_t> out;
  for (const auto& id : part.finishes) {
    if (id == "none") {
      out.push_back(Candidate::none);
      continue;
    }
    for (std::size_t i = 0; i < catalogue.finishes.size(); ++i) {
      if (catalogue.finishes[i].id == id) {
        out.push_back(static_cast<std::uint32_t>(i));
      }
    }
  }
  return out;
}

std::vector<std::uint32_t> route_choices(const Part& part, const Catalogue& catalogue) {
  const auto& limits = part.limits;
  std::vector<std::uint32_t> out;
  for (std::size_t i = 0; i < catalogue.routes.size(); ++i) {
    const auto& route = catalogue.routes[i];
    const bool asked = limits.routes.empty() || contains_word(limits.routes, route.id);
    // A route that runs after another one (bending after cutting) leaves no prismatic shape of its
    // own.
    if (route.kind == RouteKind::primary && asked &&
        !contains_word(limits.forbidden_routes, route.id)) {
      out.push_back(static_cast<std::uint32_t>(i));
    }
  }
  return out;
}

std::size_t doubtful_sizes(const Part& part, const Catalogue& catalogue, const Settings& settings) {
  std::size_t count = 0;
  for (const auto list : stock_lists(part, catalogue)) {
    const auto& items = catalogue.stock[list].items;
    count += static_cast<std::size_t>(
        std::count_if(items.begin(), items.end(), [&](const StockItem& item) {
          return !is_offered(item, settings);
        }));
  }
  return count;
}

KindOrder::KindOrder(const Catalogue& catalogue) {
  for (const auto& list : catalogue.stock) {
    for (const auto& item : list.items) {
      named_.insert(item.material_ids.begin(), item.material_ids.end());
    }
  }
}

bool KindOrder::operator()(const MaterialInfo* a, const MaterialInfo* b) const {
  const auto kind_a = kind_of(*a);
  const auto kind_b = kind_of(*b);
  if (kind_a != kind_b) {
    return kind_a < kind_b;
  }
  const std::string none;
  return (is_named(*a) ? a->id : none) < (is_named(*b) ? b->id : none);
}

Enumeration::Enumeration(const Part& part, const Catalogue& catalogue)
    : part_(part),
      catalogue_(catalogue),
      lists_(stock_lists(part, catalogue)),
      finishes_(finish_choices(part, catalogue)),
      routes_(route_choices(part, catalogue)),
      kinds_(KindOrder(catalogue)) {
  per_route_ = (part.body.shapes.size() + lists_.size()) * finishes_.size();
  for (const auto route : routes_) {
    std::vector<bool> can;
    for (const auto& shape : part.body.shapes) {
      can.push_back(!shape_rules(catalogue.routes[route], shape.family, false) &&
                    !proportion_rules(catalogue.routes[route], shape));
    }
    for (const auto list : lists_) {
      can.push_back(!shape_rules(catalogue.routes[route], catalogue.stock[list].family, true));
    }
    can_leave_.push_back(std::move(can));
  }
}

const Enumeration::Kind& Enumeration::of(std::uint32_t material) {
  const auto& info = catalogue_.materials.info(material);
  // The job's own filters may name a material by its id.
  if (const auto broken = material_rules(info, part_.limits)) {
    Kind& kind = not_asked_for_[broken->rule];
    kind.considered = per_route_ * routes_.size();
    kind.cannot_exist[broken->rule] = kind.considered;
    return kind;
  }
  const auto [entry, added] = kinds_.try_emplace(&info);
  if (added) {
    make(info, entry->second);
  }
  return entry->second;
}

void Enumeration::make(const MaterialInfo& info, Kind& kind) const {
  kind.considered = per_route_ * routes_.size();
  for (std::size_t r = 0; r < routes_.size(); ++r) {
    add_route(info, r, kind);
  }
}

void Enumeration::add_route(const MaterialInfo& info, std::size_t r, Kind& kind) const {
  const auto& route = catalogue_.routes[routes_[r]];
  if (const auto broken = route_rules(info, route)) {
    kind.cannot_exist[broken->rule] += per_route_;
    return;
  }
  const auto treatments = needed_treatments(info, route, catalogue_);
  if (treatments.empty()) {
    kind.cannot_exist[Rule::condition_lost] += per_route_;
    return;
  }
  kind.considered += per_route_ * (treatments.size() - 1);
  Candidate candidate;
  candidate.route = routes_[r];
  const std::size_t each = finishes_.size() * treatments.size();
  for (std::size_t s = 0; s < can_leave_[r].size(); ++s) {
    const bool from_stock = s >= part_.body.shapes.size();
    candidate.shape = from_stock ? Candidate::none : static_cast<std::uint32_t>(s);
    candidate.stock = from_stock ? lists_[s - part_.body.shapes.size()] : Candidate::none;
    if (!can_leave_[r][s]) {
      kind.cannot_exist[Rule::output_form] += each;
    } else if (!from_stock && drawn_form_rules(info, route, part_.body.shapes[s].family)) {
      kind.cannot_exist[Rule::input_form] += each;
    } else if (from_stock && !any_suits(catalogue_.stock[candidate.stock], info, route)) {
      kind.cannot_exist[Rule::stock_family] += each;
    } else {
      for (const auto treatment : treatments) {
        candidate.treatment = treatment;
        add_finishes(candidate, info, kind);
      }
    }
  }
}

void Enumeration::add_finishes(Candidate candidate, const MaterialInfo& info, Kind& kind) const {
  for (const auto finish : finishes_) {
    candidate.finish = finish;
    if (finish != Candidate::none && finish_rules(info, catalogue_.finishes[finish])) {
      ++kind.cannot_exist[Rule::finish];
    } else {
      kind.candidates.push_back(candidate);
    }
  }
}

}  // namespace bismar
