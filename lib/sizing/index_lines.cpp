// SPDX-License-Identifier: MIT
#include "sizing/index_lines.hpp"

#include "sizing/explain.hpp"

#include <bismar/error.hpp>
#include <bismar/quantity/format.hpp>
#include <bismar/sizing/index.hpp>

#include <cmath>
#include <optional>

namespace bismar {

namespace {

/// Elasticities of this size are rounding of the differences that they are made of.
constexpr double nothing = 5e-4;

std::string exponent(double value) {
  return format_significant(std::abs(value) < nothing ? 0.0 : value, 3);
}

/// "-0.500", or "-0.667 for a worse value, 0 for a better one" where the sides differ.
std::optional<std::string> sides(const SidedValue& value) {
  if (!value.below || !value.above) {
    return std::nullopt;
  }
  if (std::abs(*value.below - *value.above) < nothing) {
    return exponent(*value.below);
  }
  return exponent(*value.below) + " downwards and " + exponent(*value.above) + " upwards";
}

void add_free(const DesignIndices& indices, std::vector<std::string>& lines) {
  std::string held;
  for (const GoverningLimit& one : indices.governing) {
    held += (held.empty() ? "" : " and ") + one.limit;
  }
  std::string powers;
  for (const PropertyElasticity& one : indices.elasticities) {
    const auto text = sides(one.mass);
    if (text && *text != "0") {
      powers += (powers.empty() ? "" : "; ") + one.name + ", exponent " + *text;
    }
  }
  if (!powers.empty()) {
    lines.push_back("Held by " + held +
                    ", its mass goes with powers of the material's properties: " + powers + ".");
  }
}

std::string difference(double value, const std::string& amount, std::string_view more) {
  return amount + (value < 0.0 ? " less" : std::string(" ") + std::string(more));
}

std::string neighbour(const NextSize& next, const char* which, const std::string& currency) {
  std::string line =
      std::string("The next ") + which + " size, " + next.size_text + ", is " +
      difference(next.mass_difference, mass_text(std::abs(next.mass_difference)), "more") +
      " and " +
      difference(
          next.cost_difference, money_text(std::abs(next.cost_difference), currency), "more");
  if (next.feasible) {
    return line + ", and holds.";
  }
  line += "; it breaks " + next.limit + " at u = " + format_significant(next.utilisation, 3);
  for (std::size_t i = 0; i < next.needed.size(); ++i) {
    const NeededChange& change = next.needed[i];
    line += (i == 0 ? ". It would hold if the " : ", or if the ") + change.name + " were " +
            format_significant(change.factor, 3) + " times as high";
  }
  return line + ".";
}

}  // namespace

std::vector<std::string> index_lines(const Design& design,
                                     const Part& part,
                                     const Catalogue& catalogue,
                                     const Settings& settings) {
  std::vector<std::string> lines;
  DesignIndices indices;
  try {
    indices = design_indices(design, part, catalogue, settings);
  } catch (const Error&) {
    return lines;  // a size that no limit holds has no index
  }
  if (indices.free_size) {
    add_free(indices, lines);
  }
  if (indices.lighter) {
    lines.push_back(neighbour(*indices.lighter, "lighter", catalogue.currency));
  }
  if (indices.heavier) {
    lines.push_back(neighbour(*indices.heavier, "heavier", catalogue.currency));
  }
  return lines;
}

}  // namespace bismar
