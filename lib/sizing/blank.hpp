// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/numeric/interval.hpp>
#include <bismar/sizing/part.hpp>

#include <optional>
#include <span>
#include <string>
#include <vector>

namespace bismar {

/// What is bought to make one part.
struct Purchase {
  double mass = 0.0;        ///< Bought per part, offcut and kerf included [kg].
  double bar_length = 0.0;  ///< Stock length chosen [m]; 0 = to measure.
  double pieces = 0.0;      ///< Parts out of one bar or plate length.
};

/// The stock length of `item` that wastes least for parts of `length`, or nothing when every one is
/// too short.
[[nodiscard]] std::optional<Purchase> buy_length(
    double area, double density, double length, std::span<const double> stock_lengths, double kerf);

/// A bar or plate that a machined part is cut from.
struct Blank {
  const StockItem* item =
      nullptr;                ///< Null: to measure, no list of the catalogue holds the material.
  double largest_size = 0.0;  ///< Largest height of the part that still fits [m].
  double ruling_dimension = 0.0;  ///< Where the strength of the blank is read [m].
  double area = 0.0;              ///< Cross-section per part [m^2]; for plate see `plate`.
  bool plate = false;             ///< Cut from plate: the width bought follows the part.
};

/// Whether the item is made of the material, in a form that the route takes.
[[nodiscard]] bool suits(const StockItem& item, const MaterialInfo& material, const Route& route);
/// Whether at least one size of the list suits.
[[nodiscard]] bool any_suits(const StockList& list,
                             const MaterialInfo& material,
                             const Route& route);
/// Whether the study offers the size: doubtful ones only on request.
[[nodiscard]] bool is_offered(const StockItem& item, const Settings& settings);

/// A stock item that a material and a route can share, with its list.
struct UsableItem {
  const StockItem* item = nullptr;
  const StockList* list = nullptr;
};

/// Solid bars and plates of this material in a form that the route takes; the same for every shape,
/// so they are looked up once for a material and route.
[[nodiscard]] std::vector<UsableItem> blank_stock(const MaterialInfo& material,
                                                  const Route& route,
                                                  const Catalogue& catalogue,
                                                  const Settings& settings);

/// The dimension that the strength steps of a material are read at [m]: 4 A / U of a solid of a
/// hardened bar grade, else the ruling dimension.
[[nodiscard]] double strength_thickness(const SectionProperties& section,
                                        const MaterialInfo& material);
/// The same of a blank.
[[nodiscard]] double blank_thickness(const Blank& blank, const MaterialInfo& material);

/// Every bar that is long enough, or every plate where there is none, by rising area;
/// `largest_size` is unset. Not for an empty stock.
[[nodiscard]] std::vector<Blank> all_blanks(double length,
                                            std::span<const UsableItem> stock,
                                            const Settings& settings);
/// How often the section, allowance included, could be enlarged and still fit into the blank; below
/// 1 it does not fit.
[[nodiscard]] double room_in(const Blank& blank,
                             const SectionProperties& section,
                             const Settings& settings);

/// Whether `other` surely holds every section that `own` holds, of all with these heights and
/// widths: where both are limited by the same side, which no comparison of room_in() over a box
/// would tell.
[[nodiscard]] bool holds_as_much(const Blank& other,
                                 const Blank& own,
                                 SectionFamily part,
                                 const Interval& height,
                                 const Interval& width,
                                 const Settings& settings);

/// Blanks for a machined part of these proportions (`unit`: its section at height 1 m) and length,
/// by rising largest size, each the lightest that holds every size up to it. Bars first; plate
/// where the material has no bar that is long enough.
[[nodiscard]] std::vector<Blank> blanks(const SectionProperties& unit,
                                        double length,
                                        double height_max,
                                        std::span<const UsableItem> stock,
                                        const Settings& settings);

/// What the part buys of this blank.
[[nodiscard]] std::optional<Purchase> buy(const Blank& blank,
                                          const SectionProperties& section,
                                          double density,
                                          double length,
                                          const Settings& settings);

/// "round bar 45, 19 of 300 mm from 6 m".
[[nodiscard]] std::string describe(const Blank& blank, const Purchase& purchase, double length);
[[nodiscard]] std::string describe_stock(const std::string& designation,
                                         const Purchase& purchase,
                                         double length);

}  // namespace bismar
