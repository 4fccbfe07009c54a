// SPDX-License-Identifier: MIT
#include "sizing/candidate_cost.hpp"

#include "sizing/strength.hpp"
#include "sizing/words.hpp"

#include <algorithm>
#include <numeric>

namespace bismar {

CandidateCost::CandidateCost(const Part& part,
                             const Catalogue& catalogue,
                             const Settings& settings,
                             const Candidate& candidate)
    : part_(part),
      catalogue_(catalogue),
      settings_(settings),
      route_(catalogue.routes[candidate.route]),
      treatment_(candidate.treatment == Candidate::none ? nullptr
                                                        : &catalogue.routes[candidate.treatment]),
      finish_(candidate.finish == Candidate::none ? nullptr
                                                  : &catalogue.finishes[candidate.finish]),
      batch_(part.batch.value_or(part.quantity)) {}

double CandidateCost::pick(const Range& range, CostEnd end) const {
  switch (end) {
    case CostEnd::cheap:
      return range.low;
    case CostEnd::dear:
      return range.high;
    case CostEnd::usual:
      break;
  }
  return range.at(settings_.route_end);
}

double CandidateCost::finished_area(const SectionProperties& section) const {
  // A bath reaches the bore of a tube; plating, paint and powder do not.
  const bool bath = finish_ != nullptr && is_bath(*finish_);
  const double perimeter = section.perimeter + (bath ? section.inner_perimeter : 0.0);
  return perimeter * part_.body.length + 2.0 * section.area;
}

double CandidateCost::finish_mass(const SectionProperties& section) const {
  if (finish_ == nullptr || !finish_->added_mass) {
    return 0.0;
  }
  return finish_->added_mass->mid() * finished_area(section);
}

double CandidateCost::finish_cost(const MadePart& made, CostEnd end) const {
  if (finish_ == nullptr) {
    return 0.0;
  }
  double cost = 0.0;
  if (finish_->per_area && finish_->cost_per_area) {
    cost = pick(*finish_->cost_per_area, end) * finished_area(made.section);
  } else if (finish_->cost_per_mass) {
    cost = pick(*finish_->cost_per_mass, end) * made.net_mass;
  }
  return std::max(cost, finish_->minimum_lot / batch_);
}

double CandidateCost::operation_cost(const OperationUse& use, CostEnd end) const {
  const auto& operation = *catalogue_.find_operation(use.operation);
  const double rate = pick(operation.rate, end);
  return use.units * (pick(operation.time, end) * rate + pick(operation.consumables, end)) +
         operation.setup_time * rate / batch_;
}

double CandidateCost::Terms::total() const {
  return material - credit + route.total() + treatment.total() + rejects +
         std::accumulate(operations.begin(), operations.end(), 0.0) + finish;
}

CandidateCost::Terms CandidateCost::terms(const MadePart& made,
                                          const Range& price,
                                          double usual_price,
                                          CostEnd end) const {
  Terms t;
  t.price = end == CostEnd::cheap ? price.low : end == CostEnd::dear ? price.high : usual_price;
  // A mill or die minimum is bought whole even when the parts need less.
  t.bought = std::max(made.purchase.mass, route_.min_order / part_.quantity);
  t.material = t.bought * t.price;
  t.credit = settings_.scrap_credit * t.price * std::max(0.0, made.purchase.mass - made.net_mass);
  t.route = process_cost(
      route_, made.net_mass, part_.body.length, part_.quantity, batch_, settings_.route_end, end);
  if (treatment_ != nullptr) {
    t.treatment = process_cost(*treatment_,
                               made.net_mass,
                               part_.body.length,
                               part_.quantity,
                               batch_,
                               settings_.route_end,
                               end);
    // Scraps of a chain multiply: a part lost in treatment takes with it all that was spent so far.
    const double spent = t.material - t.credit + t.route.total() + t.treatment.total();
    t.rejects = spent * treatment_->scrap / (1.0 - treatment_->scrap);
  }
  for (const auto& use : part_.operations) {
    t.operations.push_back(operation_cost(use, end));
  }
  t.finish = finish_cost(made, end);
  return t;
}

double CandidateCost::total(const MadePart& made,
                            const Range& price,
                            double usual_price,
                            CostEnd end) const {
  return terms(made, price, usual_price, end).total();
}

CostBreakdown CandidateCost::breakdown(const MadePart& made,
                                       const Range& price,
                                       double usual_price) const {
  const Terms t = terms(made, price, usual_price, CostEnd::usual);
  const auto& money = catalogue_.currency;
  CostBreakdown out;
  const auto line = [&](std::string item, double amount, std::string how) {
    if (amount != 0.0) {
      out.lines.push_back({std::move(item), amount, std::move(how)});
    }
  };
  line("material",
       t.material,
       plain(t.bought, 4) + " kg bought for a part of " + plain(made.net_mass, 4) + " kg, at " +
           plain(t.price, 4) + " " + money + "/kg");
  line("scrap sold back",
       -t.credit,
       plain(made.purchase.mass - made.net_mass, 4) + " kg at " +
           plain(settings_.scrap_credit * 100.0, 3) + " % of the price");
  line("tooling",
       t.route.tooling,
       plain(t.route.tool_sets, 4) + " tool set" + (t.route.tool_sets == 1.0 ? "" : "s") + " at " +
           plain(t.route.tooling_each, 4) + " " + money + " over " + plain(part_.quantity, 8) +
           " parts");
  line("set-up", t.route.set_up, "over a batch of " + plain(batch_, 8));
  line("machine and labour",
       t.route.time,
       plain(t.route.seconds / 60.0, 3) + " min at " + plain(t.route.rate_of_time * 3600.0, 4) +
           " " + money + "/h");
  if (treatment_ != nullptr) {
    line("treatment",
         t.treatment.total(),
         treatment_->title + ", tooling " + plain(t.treatment.tooling, 3) + ", time " +
             plain(t.treatment.time, 3) + ", batch charge " + plain(t.treatment.set_up, 3));
    line("rejects", t.rejects, plain(treatment_->scrap * 100.0, 3) + " % of the treated parts");
  }
  for (std::size_t i = 0; i < t.operations.size(); ++i) {
    const auto& use = part_.operations[i];
    const auto& operation = *catalogue_.find_operation(use.operation);
    line("operation",
         t.operations[i],
         operation.title + ", " + plain(use.units, 4) + " x " + operation.unit);
  }
  if (finish_ != nullptr) {
    line("finish",
         t.finish,
         finish_->title + ", " + plain(finished_area(made.section) * 1e4, 4) + " cm2");
  }
  out.total = t.total();
  out.low = total(made, price, usual_price, CostEnd::cheap);
  out.high = total(made, price, usual_price, CostEnd::dear);
  out.bought_mass = t.bought;
  return out;
}

}  // namespace bismar
