// SPDX-License-Identifier: MIT
#include "sizing/blank.hpp"

#include "sizing/strength.hpp"
#include "sizing/words.hpp"

#include <bismar/sizing/cost.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

/// Largest height at which the part, allowance included, fits into a bar. All dimensions of the
/// part are multiples of its height: `unit` is its section at height 1.
double largest_size_in(const StockItem& item,
                       const SectionProperties& unit,
                       SectionFamily list,
                       double allowance) {
  const double larger = std::max(unit.height, unit.width);
  const double smaller = std::min(unit.height, unit.width);
  const bool round_part =
      unit.family == SectionFamily::solid_round || unit.family == SectionFamily::solid_ellipse;
  if (list == SectionFamily::solid_round) {
    // A round or elliptical part needs its larger diameter, an angular one its diagonal. The
    // diagonal of the enlarged rectangle grows faster than linearly by the allowance: solve the
    // quadratic.
    if (round_part) {
      return (item.section.height - allowance) / larger;
    }
    const double a = larger * larger + smaller * smaller;
    const double b = 2.0 * allowance * (larger + smaller);
    const double c = 2.0 * allowance * allowance - item.section.height * item.section.height;
    const double discriminant = b * b - 4.0 * a * c;
    return c >= 0.0 ? 0.0 : (-b + std::sqrt(discriminant)) / (2.0 * a);
  }
  const double bar_larger = std::max(item.section.height, item.section.width);
  const double bar_smaller = std::min(item.section.height, item.section.width);
  return std::min((bar_larger - allowance) / larger, (bar_smaller - allowance) / smaller);
}

bool is_solid(SectionFamily family) {
  return family == SectionFamily::solid_round || family == SectionFamily::solid_square ||
         family == SectionFamily::solid_rectangle;
}

/// Keeps, by rising largest size, those that no other beats in both room and weight.
std::vector<Blank> lightest(std::vector<Blank> all) {
  std::sort(all.begin(), all.end(), [](const Blank& a, const Blank& b) {
    if (a.largest_size != b.largest_size) {
      return a.largest_size > b.largest_size;
    }
    return a.area != b.area ? a.area < b.area : a.item->id < b.item->id;
  });
  std::vector<Blank> kept;
  double least = std::numeric_limits<double>::infinity();
  // From the roomiest down: a smaller one is worth keeping only if it is lighter than all roomier
  // ones.
  for (const auto& blank : all) {
    if (blank.area < least) {
      least = blank.area;
      kept.push_back(blank);
    }
  }
  std::reverse(kept.begin(), kept.end());
  return kept;
}

}  // namespace

std::optional<Purchase> buy_length(double area,
                                   double density,
                                   double length,
                                   std::span<const double> stock_lengths,
                                   double kerf) {
  if (stock_lengths.empty()) {
    return Purchase{area * density * length, 0.0, 1.0};
  }
  std::optional<Purchase> best;
  for (const double bar : stock_lengths) {
    const auto pieces = static_cast<double>(pieces_per_bar(bar, length, kerf));
    if (pieces < 1.0) {
      continue;
    }
    const double mass = area * density * bar / pieces;
    if (!best || mass < best->mass) {
      best = Purchase{mass, bar, pieces};
    }
  }
  return best;
}

bool suits(const StockItem& item, const MaterialInfo& material, const Route& route) {
  return made_of(item, material) && shares_word(item.forms, route.takes);
}

bool any_suits(const StockList& list, const MaterialInfo& material, const Route& route) {
  return std::any_of(list.items.begin(), list.items.end(), [&](const StockItem& item) {
    return suits(item, material, route);
  });
}

bool is_offered(const StockItem& item, const Settings& settings) {
  return settings.doubtful_sizes || item.availability != Availability::doubtful;
}

std::vector<UsableItem> blank_stock(const MaterialInfo& material,
                                    const Route& route,
                                    const Catalogue& catalogue,
                                    const Settings& settings) {
  std::vector<UsableItem> out;
  for (const auto& list : catalogue.stock) {
    if (!list.sheet && !is_solid(list.family)) {
      continue;
    }
    for (const auto& item : list.items) {
      if (suits(item, material, route) && is_offered(item, settings)) {
        out.push_back({&item, &list});
      }
    }
  }
  return out;
}

std::vector<Blank> blanks(const SectionProperties& unit,
                          double length,
                          double height_max,
                          std::span<const UsableItem> stock,
                          const Settings& settings) {
  if (stock.empty()) {
    // No list of the catalogue holds the material: a rectangular or round blank cut to measure.
    Blank blank;
    blank.largest_size = height_max;
    return {blank};
  }
  auto all = all_blanks(length, stock, settings);
  for (Blank& blank : all) {
    blank.largest_size = room_in(blank, unit, settings);
  }
  return lightest(std::move(all));
}

std::vector<Blank> all_blanks(double length,
                              std::span<const UsableItem> stock,
                              const Settings& settings) {
  std::vector<Blank> bars;
  std::vector<Blank> plates;
  for (const auto& [item, list] : stock) {
    Blank blank;
    blank.item = item;
    blank.plate = list->sheet;
    blank.ruling_dimension = list->sheet ? item->thickness : item->section.ruling_dimension;
    // Per metre of width: the order of plates is that of thickness.
    blank.area = list->sheet ? item->thickness : item->section.area;
    const bool long_enough =
        item->lengths.empty() ||
        *std::max_element(item->lengths.begin(), item->lengths.end()) >= length;
    const double smallest =
        list->sheet ? item->thickness : std::min(item->section.height, item->section.width);
    if (smallest > settings.machining_allowance && long_enough) {
      (list->sheet ? plates : bars).push_back(blank);
    }
  }
  auto& out = bars.empty() ? plates : bars;
  std::sort(out.begin(), out.end(), [](const Blank& a, const Blank& b) {
    return a.area != b.area ? a.area < b.area : a.item->id < b.item->id;
  });
  return out;
}

double room_in(const Blank& blank, const SectionProperties& section, const Settings& settings) {
  const double allowance = settings.machining_allowance;
  return blank.plate ? (blank.item->thickness - allowance) / std::min(section.height, section.width)
                     : largest_size_in(*blank.item, section, blank.item->section.family, allowance);
}

bool holds_as_much(const Blank& other,
                   const Blank& own,
                   SectionFamily part,
                   const Interval& height,
                   const Interval& width,
                   const Settings& settings) {
  const bool round_part =
      part == SectionFamily::solid_round || part == SectionFamily::solid_ellipse;
  /// The larger and the smaller side; of a round bar for a round part only the larger one counts.
  struct Sides {
    double larger;
    double smaller;
  };
  const auto sides = [&](const Blank& blank) -> std::optional<Sides> {
    constexpr double any = std::numeric_limits<double>::infinity();
    if (blank.plate) {
      return Sides{any, blank.item->thickness - settings.machining_allowance};
    }
    const auto& section = blank.item->section;
    const double large = std::max(section.height, section.width) - settings.machining_allowance;
    const double small = std::min(section.height, section.width) - settings.machining_allowance;
    if (section.family == SectionFamily::solid_round) {
      return round_part ? std::optional(Sides{large, any}) : std::nullopt;
    }
    return Sides{large, small};
  };
  const auto theirs = sides(other);
  const auto ours = sides(own);
  if (!theirs || !ours) {
    return false;
  }
  const double most_large = std::max(height.upper(), width.upper());
  const double least_large = std::max(height.lower(), width.lower());
  const double most_small = std::min(height.upper(), width.upper());
  const double least_small = std::min(height.lower(), width.lower());
  // The other one is limited by its larger side over the whole box, or by its smaller side.
  const bool by_larger = theirs->larger * most_small <= theirs->smaller * least_large;
  const bool by_smaller = theirs->smaller * most_large <= theirs->larger * least_small;
  return (by_larger && ours->larger <= theirs->larger) ||
         (by_smaller && ours->smaller <= theirs->smaller);
}

double strength_thickness(const SectionProperties& section, const MaterialInfo& material) {
  // EN 10083 and its kin give the steps of hardened bar by diameter; other solids count by their
  // equivalent diameter 4 A / U, which for a wide flat is twice its thickness (EN 10083-2, "d <= 16
  // or t <= 8"; from memory). Walls, plates and rows that are only sold as plate count by
  // thickness.
  const bool solid = section.inner_perimeter == 0.0 && section.plates.empty();
  if (solid && is_hardened_bar_grade(material)) {
    return 4.0 * section.area / section.perimeter;
  }
  return section.ruling_dimension;
}

double blank_thickness(const Blank& blank, const MaterialInfo& material) {
  if (blank.plate) {
    return is_hardened_bar_grade(material) ? 2.0 * blank.item->thickness : blank.item->thickness;
  }
  return strength_thickness(blank.item->section, material);
}

std::optional<Purchase> buy(const Blank& blank,
                            const SectionProperties& section,
                            double density,
                            double length,
                            const Settings& settings) {
  const double allowance = settings.machining_allowance;
  if (blank.item == nullptr) {
    const double h = section.height + allowance;
    const double b = section.width + allowance;
    const bool round = section.family == SectionFamily::solid_round;
    const double area = round ? 0.25 * 3.141592653589793 * h * h : h * b;
    return Purchase{area * density * (length + settings.kerf), 0.0, 1.0};
  }
  if (blank.plate) {
    const double across = std::max(section.height, section.width) + allowance + settings.kerf;
    const double mass = across * blank.item->thickness * density * (length + settings.kerf);
    return Purchase{mass, 0.0, 1.0};
  }
  return buy_length(blank.item->section.area, density, length, blank.item->lengths, settings.kerf);
}

std::string describe_stock(const std::string& designation,
                           const Purchase& purchase,
                           double length) {
  if (purchase.bar_length == 0.0) {
    return designation + ", cut to measure";
  }
  return designation + ", " + plain(purchase.pieces) + " of " + plain(length * 1e3, 6) +
         " mm from " + plain(purchase.bar_length, 4) + " m";
}

std::string describe(const Blank& blank, const Purchase& purchase, double length) {
  if (blank.item == nullptr) {
    return "blank cut to measure (no stock list of the catalogue holds this material)";
  }
  if (blank.plate) {
    return blank.item->designation + ", cut to width";
  }
  return describe_stock(blank.item->designation, purchase, length);
}

}  // namespace bismar
