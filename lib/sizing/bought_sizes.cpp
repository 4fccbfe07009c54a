// SPDX-License-Identifier: MIT
#include "sizing/bought_sizes.hpp"

#include "sizing/blank.hpp"

#include <bismar/catalogue/preferred_sizes.hpp>

#include <algorithm>
#include <cmath>

namespace bismar {

void tidy(std::vector<double>& values) {
  std::sort(values.begin(), values.end());
  values.erase(
      std::unique(
          values.begin(), values.end(), [](double a, double b) { return b - a <= 1e-9 * b; }),
      values.end());
}

std::vector<double> wanted_sizes(const Sizes& sizes, double lower, double upper) {
  std::vector<double> out;
  switch (sizes.kind) {
    case Sizes::Kind::continuous:
      break;
    case Sizes::Kind::step: {
      const auto first = std::llround(std::ceil(lower / sizes.step * (1.0 - 1e-12)));
      const auto last = std::llround(std::floor(upper / sizes.step * (1.0 + 1e-12)));
      for (auto k = std::max(first, 1LL); k <= last; ++k) {
        out.push_back(static_cast<double>(k) * sizes.step);
      }
      break;
    }
    case Sizes::Kind::series:
      out = preferred_numbers(sizes.series, lower, upper);
      break;
    case Sizes::Kind::list:
      out = sizes.values;
      break;
  }
  tidy(out);
  return out;
}

std::vector<double> sheet_thicknesses(const Catalogue& catalogue,
                                      const Settings& settings,
                                      const MaterialInfo& material,
                                      const Route& route) {
  std::vector<double> out;
  for (const auto& list : catalogue.stock) {
    if (!list.sheet) {
      continue;
    }
    for (const auto& item : list.items) {
      if (is_offered(item, settings) && suits(item, material, route)) {
        out.push_back(item.thickness);
      }
    }
  }
  tidy(out);
  return out;
}

}  // namespace bismar
