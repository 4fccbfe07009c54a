// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/section_trends.hpp>

#include <array>
#include <string_view>

namespace bismar::mechanics {

/// Trends of one family when one size grows: one letter a quantity in the order of SectionQuantity,
/// r rises, f falls, c constant, n neither. The order, in groups:
///     area, perimeter, inner perimeter | I_y I_z I_t I_w | W_el,y W_el,z W_pl,y W_pl,z W_t |
///     A_v,y A_v,z A_v,junction A_v,flange A_s,y A_s,z | junction ratio |
///     height width wall ruling | plate ratio | i_y i_z
struct TrendRow {
  SectionFamily family;
  SizeVariable variable;
  std::string_view any;
  std::string_view slender;  ///< Empty: as `any`.
};

// clang-format off
inline constexpr std::array<TrendRow, 30> trend_rows = [] {
  using F = SectionFamily;
  using V = SizeVariable;
  return std::array<TrendRow, 30>{{
      {F::solid_round, V::height, "rrcrrrcrrrrrrrccrrcrrrrcrr", ""},
      {F::solid_square, V::height, "rrcrrrcrrrrrrrccrrcrrrrcrr", ""},
      {F::solid_rectangle, V::height, "rrcrrrcrrrrrrrccrrcrcrrcrc", ""},
      {F::solid_rectangle, V::width, "rrcrrrcrrrrrrrccrrccrrrccr", ""},
      {F::solid_ellipse, V::height, "rrcrrrcrrrrrrrccrrcrcrrcrc", ""},
      {F::solid_ellipse, V::width, "rrcrrrcrrrrrrrccrrccrrrccr", ""},
      {F::solid_hexagon, V::height, "rrcrrrcrrrrrrrccrrcrrrrcrr", ""},
      {F::round_tube, V::height, "rrrrrrcrrrrrrrccrrcrrccrrr", ""},
      {F::round_tube, V::wall, "rcfrrrcrrrrrrrccrrcccrrfff", ""},
      {F::rectangular_tube, V::height, "rrrrrrcrrrrrrrrcnrrrcccrrr", "rrrrrrcrrrrrrrrcfrrrcccrrr"},
      {F::rectangular_tube, V::width, "rrrrrrcrrrrrrrncrnccrccrrr", ""},
      {F::rectangular_tube, V::wall, "rffnnncnnrrnrrrcnnfccrrfff", "rffrrrcrrrrrrrrcrrfccrrfff"},
      {F::elliptical_tube, V::height, "rrrrrrcrrrrrnrccnrcrcccnrr", ""},
      {F::elliptical_tube, V::width, "rrrrrrcrrrrrrnccrnccrccnrr", ""},
      {F::elliptical_tube, V::wall, "rcfrrrcrrrrnrrccnncccrrfff", "rcfrrrcrrrrrrrccrrcccrrfff"},
      {F::i_section, V::height, "rrcrrrrrrrrrrrrrcnrrcccrrf", "rrcrrrrrrrrrrrrrcrrrcccrrf"},
      {F::i_section, V::width, "rrcrrrrrnrrrnrnfrrccrccrrr", "rrcrrrrrrrrrrrnfrrccrcccrr"},
      {F::i_section, V::web, "rfcrrrcrrrrnrrrrcrcccrcffn", "rfcrrrcrrrrrrrrrcrcccrcfff"},
      {F::i_section, V::flange, "rccrrnnrrrrnrnnrrrfccrrfnr", "rccrrrrrrrrnrnfrrrfcccrfnr"},
      {F::channel, V::height, "rrcrrrrrrrrrnrrrcnrrcccrrn", "rrcrrrrrrrrrnrrrcrrrcccrrn"},
      {F::channel, V::width, "rrcrrrrrnrrrnrnfrrccrccrrr", "rrcrrrrrrrrrrrnfrrccrccrrr"},
      {F::channel, V::web, "rfcrrnnrnrrnnrrrcrcccrcffn", "rfcrrrrrnrrrnrrrcrcccrcffn"},
      {F::channel, V::flange, "rccrrnnrrrrnnnnrrrfccrrfnn", "rccrrrrrrrrnrnfrrrfcccrfnn"},
      {F::tee, V::height, "rrcrrrrnrrrrrncncncrcccrrf", "rrcrrrrrrrrrrrcrcrcrcccrrf"},
      {F::tee, V::width, "rrcrrrrrnrrrnncnrnccrccrnr", "rrcrrrrrrrrrrfcfrnccrccrfr"},
      {F::tee, V::web, "rccrrrrrrrrnrrcncncccrcfnn", "rccrrrrrrrrrrrcrcrcccrcfrf"},
      {F::tee, V::flange, "rccrrnnnrrrnrncrrncccrrfnr", "rccrrrrnrrrnrfcrrnccccrffr"},
      {F::angle, V::height, "rrcrrrrnrrrrnncccrcrcccrrn", "rrcrrrrrrrrrnrcccrcrcccrrn"},
      {F::angle, V::width, "rrcrrrrrnrrrnnccrcccrccrnr", "rrcrrrrrrrrrrnccrcccrccrnr"},
      {F::angle, V::wall, "rccrrnrrrrrnnnccrrcccrrfnn", "rccrrrrrrrrrrrccrrcccrrfff"},
  }};
}();
// clang-format on

}  // namespace bismar::mechanics
