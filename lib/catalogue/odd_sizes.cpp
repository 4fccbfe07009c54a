// SPDX-License-Identifier: MIT
#include <bismar/catalogue/odd_sizes.hpp>

#include <algorithm>
#include <cstddef>

#include <bismar/quantity/format.hpp>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

/// Differences of thickness below this are rounding of I_t / W_t.
constexpr double rounding = 1e-9;

bool has_web_and_flange(SectionFamily family) {
  return family == SectionFamily::i_section || family == SectionFamily::channel;
}

bool web_is_thicker(const SectionProperties& section) {
  return has_web_and_flange(section.family) &&
         section.I_t / section.W_t > section.ruling_dimension * (1.0 + rounding);
}

bool same_size(const StockItem& a, const StockItem& b) {
  const SectionProperties& s = a.section;
  const SectionProperties& t = b.section;
  return s.height == t.height && s.width == t.width && s.area == t.area && s.I_y == t.I_y &&
         s.I_z == t.I_z && s.I_t == t.I_t && s.forming == t.forming && a.classes == b.classes &&
         a.groups == b.groups && a.standards == b.standards && a.forms == b.forms &&
         a.material_ids == b.material_ids;
}

}  // namespace

std::vector<std::string> odd_sizes(const StockList& list) {
  std::vector<std::string> out;
  if (list.sheet) {
    return out;
  }
  const auto named = [&](const StockItem& item) {
    return catalogue::quoted(item.id) + " of the list " + catalogue::quoted(list.id);
  };
  for (std::size_t i = 0; i < list.items.size(); ++i) {
    const StockItem& item = list.items[i];
    if (web_is_thicker(item.section)) {
      out.push_back(named(item) + " has a web of " +
                    format_engineering(item.section.I_t / item.section.W_t, "mm") +
                    ", thicker than its flange of " +
                    format_engineering(item.section.ruling_dimension, "mm") +
                    ": have they changed places?");
    }
    const auto end = list.items.begin() + static_cast<std::ptrdiff_t>(i);
    const auto twin = std::find_if(
        list.items.begin(), end, [&](const StockItem& other) { return same_size(other, item); });
    if (twin != end) {
      out.push_back(named(item) + " has the dimensions and materials of " +
                    catalogue::quoted(twin->id) + ".");
    }
  }
  return out;
}

}  // namespace bismar
