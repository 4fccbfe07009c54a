// SPDX-License-Identifier: MIT
#include <bismar/sizing/cost.hpp>

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <string>

namespace bismar {

double ResourceCost::material_term() const { return mass * material_price / (1.0 - scrap); }

double ResourceCost::tooling_term() const {
  const double sets = tool_life ? std::ceil(quantity / *tool_life) : 1.0;
  return tooling / quantity * sets;
}

double ResourceCost::time_term() const {
  return (capital / (load_factor * write_off) + overhead) / rate;
}

double ResourceCost::total() const {
  FaultList faults;
  const auto check = [&](bool good, const char* field, const char* allowed) {
    if (!good) {
      faults.add({Code::out_of_range,
                  field,
                  {},
                  allowed,
                  std::string("The ") + field + " must be " + allowed + "."});
    }
  };
  check(std::isfinite(mass) && mass >= 0.0, "mass", "finite and not negative");
  check(std::isfinite(material_price) && material_price >= 0.0,
        "material_price",
        "finite and not negative");
  check(scrap >= 0.0 && scrap < 1.0, "scrap", "at least 0 and below 1");
  check(std::isfinite(tooling) && tooling >= 0.0, "tooling", "finite and not negative");
  check(std::isfinite(quantity) && quantity > 0.0, "quantity", "finite and positive");
  check(!tool_life || *tool_life > 0.0, "tool_life", "positive");
  check(std::isfinite(rate) && rate > 0.0, "rate", "finite and positive");
  check(std::isfinite(capital) && capital >= 0.0, "capital", "finite and not negative");
  check(load_factor > 0.0 && load_factor <= 1.0, "load_factor", "above 0 and at most 1");
  check(std::isfinite(write_off) && write_off > 0.0, "write_off", "finite and positive");
  check(std::isfinite(overhead) && overhead >= 0.0, "overhead", "finite and not negative");
  faults.throw_if_any();
  return material_term() + tooling_term() + time_term();
}

std::optional<double> break_even_quantity(double fixed_a,
                                          double unit_a,
                                          double fixed_b,
                                          double unit_b) {
  const double saved = unit_a - unit_b;
  const double invested = fixed_b - fixed_a;
  // Both must point the same way: dearer to start, cheaper to run.
  if (saved == 0.0 || !(invested / saved >= 0.0)) {
    return std::nullopt;
  }
  return invested / saved;
}

std::uint64_t pieces_per_bar(double bar, double length, double kerf) {
  if (!(bar >= 0.0) || !(length > 0.0) || !(kerf >= 0.0) || !std::isfinite(bar + kerf)) {
    throw Error({Code::out_of_range,
                 "pieces_per_bar",
                 {},
                 "bar and kerf not negative, length positive",
                 "A bar and a saw cut cannot be negative, and a piece must have a length."});
  }
  const double pieces = (bar + kerf) / (length + kerf);
  // A quotient that is a whole number but for rounding counts as that number.
  return static_cast<std::uint64_t>(std::floor(pieces * (1.0 + 1e-12)));
}

ProcessCost process_cost(const Route& route,
                         double mass,
                         double length,
                         double quantity,
                         double batch,
                         RangeEnd range_end,
                         CostEnd end) {
  const double sized = route.rate_basis == RateBasis::metre ? mass / length : mass;
  const auto scaled = [&](const Range& range, double exponent, CostEnd cheap_end) {
    if (end != CostEnd::usual) {
      return end == cheap_end ? range.low : range.high;
    }
    const double mean = range.at(range_end);
    if (!route.reference_mass || exponent == 0.0) {
      return mean;
    }
    return std::clamp(
        mean * std::pow(sized / *route.reference_mass, exponent), range.low, range.high);
  };
  ProcessCost cost;
  cost.tooling_each = scaled(route.tooling_cost, route.tooling_mass_exponent, CostEnd::cheap);
  cost.tool_sets = route.tool_life ? std::ceil(quantity / *route.tool_life) : 1.0;
  cost.tooling = cost.tooling_each * cost.tool_sets / quantity;
  const double rate = scaled(route.rate, -route.rate_mass_exponent, CostEnd::dear);
  switch (route.rate_basis) {
    case RateBasis::metre:
      cost.seconds = length / rate;
      break;
    case RateBasis::kilogram:
      cost.seconds = mass / rate;
      break;
    case RateBasis::part:
    case RateBasis::spot:
    case RateBasis::assembly:
      cost.seconds = 1.0 / rate;
      break;
  }
  cost.rate_of_time = route.overhead;
  if (route.capital > 0.0) {
    cost.rate_of_time += route.capital / (route.load_factor * route.write_off);
  }
  cost.time = cost.seconds * cost.rate_of_time;
  if (route.kind == RouteKind::treatment) {
    // The charge of a batch is at least the minimum: what the time does not fill is set-up.
    cost.set_up = std::max(0.0, route.setup_cost / batch - cost.time);
  } else {
    cost.set_up = (route.setup_cost + route.setup_time * cost.rate_of_time) / batch;
  }
  return cost;
}

}  // namespace bismar
