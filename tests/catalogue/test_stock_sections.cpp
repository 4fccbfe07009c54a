// SPDX-License-Identifier: MIT
// Sections of the starter sizes against the properties that stand in the same rows. Those columns
// came with the data: computed from the dimensions by another program and compared there with
// public data sets of the EN tables (area, I and W within 0.62 %, I_t of rolled sections within 4.1
// %, hollow sections within 0.48 %). They are printed to five figures, so half a unit of the fifth
// figure is allowed, and more only where a reason stands beside it.
#include <bismar/catalogue/stock.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <map>
#include <string>
#include <vector>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "support/catch.hpp"

using bismar::QuantityKind;
using bismar::SectionProperties;

namespace {

constexpr double five_figures = 0.5001e-4;

struct Compared {
  const char* column;
  QuantityKind kind;
  double SectionProperties::*property;
};

constexpr std::array compared = {
    Compared{"area", QuantityKind::area, &SectionProperties::area},
    Compared{"I_y", QuantityKind::second_moment, &SectionProperties::I_y},
    Compared{"I_z", QuantityKind::second_moment, &SectionProperties::I_z},
    Compared{"W_el_y", QuantityKind::section_modulus, &SectionProperties::W_el_y},
    Compared{"W_el_z", QuantityKind::section_modulus, &SectionProperties::W_el_z},
    Compared{"W_pl_y", QuantityKind::section_modulus, &SectionProperties::W_pl_y},
    Compared{"I_t", QuantityKind::second_moment, &SectionProperties::I_t},
    Compared{"W_t", QuantityKind::section_modulus, &SectionProperties::W_t},
};

/// Largest relative difference of each column, and how many cells were compared.
struct Comparison {
  std::map<std::string, double> worst;
  std::map<std::string, std::string> where;
  std::size_t cells = 0;
};

Comparison compare(const std::string& id) {
  const std::string path = std::string(BISMAR_TEST_DATA_DIR) + "/stock/" + id + ".csv";
  const bismar::StockList list = bismar::read_stock(path);
  bismar::FaultList faults;
  bismar::TableReader table(bismar::read_table_file(path), path, {}, faults);
  std::vector<bismar::TableReader::NumberColumn> columns;
  for (const Compared& c : compared) columns.push_back(table.number_column(c.column, c.kind));
  table.finish_columns();
  REQUIRE(table.rows() == list.items.size());

  Comparison result;
  for (std::size_t row = 0; row < table.rows(); ++row) {
    for (std::size_t i = 0; i < compared.size(); ++i) {
      if (!columns[i].is_present()) continue;
      const double stated = table.required_value(row, columns[i]);
      const double own = list.items[row].section.*(compared[i].property);
      const double difference = std::abs(own / stated - 1.0);
      ++result.cells;
      double& worst = result.worst[compared[i].column];
      if (difference >= worst) {
        worst = difference;
        result.where[compared[i].column] = list.items[row].id;
      }
    }
  }
  REQUIRE(faults.empty());
  return result;
}

using Allowed = std::map<std::string, double>;

void check(const char* id, std::size_t cells, const Allowed& allowed = {}) {
  const Comparison result = compare(id);
  CHECK(result.cells == cells);
  for (const auto& [column, worst] : result.worst) {
    INFO(id << " " << column << " at " << result.where.at(column));
    const auto exception = allowed.find(column);
    CHECK(worst <= (exception == allowed.end() ? five_figures : exception->second));
  }
}

}  // namespace

TEST_CASE("sections of bars and timber have the properties that their rows state") {
  check("round-bar", 56 * 5);
  // The rows of square bar rest on the rounded coefficients 0.1406 a^4 and 0.208 a^3.
  check("square-bar", 33 * 5, {{"I_t", 2e-4}, {"W_t", 9e-4}});
  check("flat-bar", 152 * 6);
  check("timber", 381 * 6);
}

TEST_CASE("hollow sections have the properties that their rows state") {
  check("chs", 110 * 6);
  check("shs", 96 * 7);
  check("rhs", 105 * 7);
  check("aluminium-round-tube", 78 * 6);
  check("aluminium-rectangular-tube", 56 * 7);
}

TEST_CASE("rolled sections have the properties that their rows state") {
  check("ipe", 18 * 7);
  check("hea", 19 * 7);
  check("heb", 19 * 7);
  // The rows of channels were integrated by strips: up to 1e-4 off in the area of UPE, which for
  // parallel flanges is 2 b t_f + (h - 2 t_f) t_w + (2 - pi/2) r^2 exactly (test below).
  check(
      "upe",
      14 * 6,
      {{"area", 1.1e-4}, {"I_y", 1.1e-4}, {"I_z", 1.1e-4}, {"W_el_y", 1.1e-4}, {"W_el_z", 1.1e-4}});
  // Their toe radii are rounded to half a millimetre (UPN 100: 4.5 mm), ours are half the root
  // radius (4.25 mm), which tells most in I_z. EN 10365 prints 13.5 cm2, 206 cm4, 29.3 cm4 for UPN
  // 100.
  check("upn",
        16 * 6,
        {{"area", 6e-4}, {"I_y", 8e-4}, {"I_z", 3e-3}, {"W_el_y", 8e-4}, {"W_el_z", 3.6e-3}});
}

TEST_CASE("a channel with parallel flanges has the area of its rectangles and fillets") {
  const bismar::StockList list =
      bismar::read_stock(std::string(BISMAR_TEST_DATA_DIR) + "/stock/upe.csv");
  const auto upe_220 = std::find_if(
      list.items.begin(), list.items.end(), [](const auto& item) { return item.id == "upe-220"; });
  REQUIRE(upe_220 != list.items.end());
  const double pi = 3.14159265358979323846;
  // h 220, b 85, t_w 6.5, t_f 12, r 13 mm
  const double area = 2 * 85 * 12 + (220 - 2 * 12) * 6.5 + (2 - pi / 2) * 13 * 13;
  CHECK(upe_220->section.area * 1e6 == Approx(area).epsilon(1e-12));
}

TEST_CASE("no list of sections is left out of the comparison") {
  // 33 + 56 + 152 + 381 + 110 + 96 + 105 + 78 + 56 + 18 + 19 + 19 + 14 + 16
  std::size_t sizes = 0;
  for (const char* id : {"round-bar",
                         "square-bar",
                         "flat-bar",
                         "timber",
                         "chs",
                         "shs",
                         "rhs",
                         "aluminium-round-tube",
                         "aluminium-rectangular-tube",
                         "ipe",
                         "hea",
                         "heb",
                         "upe",
                         "upn"}) {
    sizes += bismar::read_stock(std::string(BISMAR_TEST_DATA_DIR) + "/stock/" + id + ".csv")
                 .items.size();
  }
  CHECK(sizes == 1153);
}
