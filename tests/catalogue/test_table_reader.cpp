// SPDX-License-Identifier: MIT
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/quantity/currency.hpp>

#include <array>
#include <random>
#include <string>
#include <vector>

#include "support/catch.hpp"

using bismar::Code;
using bismar::FaultList;
using bismar::Presence;
using bismar::QuantityKind;
using bismar::Range;
using bismar::TableFormat;
using bismar::TableReader;

namespace {

std::vector<std::string> texts(const FaultList& faults) {
  std::vector<std::string> result;
  for (const bismar::Fault& fault : faults.faults()) result.push_back(fault.text());
  return result;
}

using Texts = std::vector<std::string>;

/// The value of the only number column of a table with one data row.
struct OneCell {
  std::optional<Range> range;
  Texts faults;
};
OneCell one_cell(const std::string& header,
                 const std::string& cell,
                 const std::string& name,
                 QuantityKind kind,
                 const TableFormat& format = {}) {
  FaultList faults;
  const char d = format.delimiter;
  TableReader table(
      "x" + std::string(1, d) + header + "\n1" + d + cell + "\n", "t.csv", format, faults);
  static_cast<void>(table.text_column("x"));
  const auto column = table.number_column(name, kind);
  table.finish_columns();
  OneCell result;
  if (faults.empty()) result.range = table.range(0, column);
  result.faults = texts(faults);
  return result;
}

}  // namespace

TEST_CASE("columns are found by name in any order and letter case, in the unit of their header") {
  FaultList faults;
  TableReader table(
      "Density  [g/cm3],NAME,yield strength [ksi],Young\xE2\x80\x99s modulus [GPa]\n"
      "7.85, mild steel ,36,200..210\n",
      "t.csv",
      {},
      faults);
  const auto name = table.text_column("name", Presence::required);
  const auto density = table.number_column("density", QuantityKind::density, Presence::required);
  const auto strength = table.number_column("yield strength", QuantityKind::stress);
  const auto modulus = table.number_column("Young's modulus", QuantityKind::stress);
  table.finish_columns();
  CHECK(table.text(0, name) == "mild steel");
  CHECK(table.required_value(0, density) == Approx(7850.0).epsilon(1e-15));
  // 1 psi = 6.894757 kPa: NIST SP 811 (2008), appendix B.8, from memory.
  CHECK(table.value(0, strength).value() == Approx(36 * 6.894757e6).epsilon(1e-6));
  CHECK(table.range(0, modulus) == Range{200e9, 210e9});
  CHECK(faults.empty());
  CHECK(table.notes().empty());
  CHECK(table.unknown_columns().empty());
}

TEST_CASE("two columns min and max make a range, a min alone is the one value") {
  FaultList faults;
  TableReader table(
      "strength min [MPa],strength max "
      "[GPa],id\n235,0.36,a\n235,,b\n,,c\n,0.3,d\n400,0.3,e\n1..2,0.4,f\n",
      "t.csv",
      {},
      faults);
  const auto strength = table.number_column("strength", QuantityKind::stress);
  table.finish_columns();
  CHECK(table.range(0, strength) == Range{235e6, 360e6});
  CHECK(table.range(1, strength) == Range{235e6, 235e6});
  CHECK_FALSE(table.range(2, strength));
  CHECK(faults.empty());
  for (std::size_t row = 3; row < 6; ++row) CHECK_FALSE(table.range(row, strength));
  CHECK(texts(faults) ==
        Texts{"t.csv:5:2: \"strength max [GPa]\": an upper end without a lower end is no value to "
              "count on: fill in \"strength min\", or move the limit to the notes.",
              "t.csv:6:2: \"strength max [GPa]\": the upper end is below the lower end in "
              "\"strength min\".",
              "t.csv:7:1: \"strength min [MPa]\": \"1..2\" is a range; one value is needed here."});
}

TEST_CASE("a lone max column, and a pair beside the whole, are faults of the header") {
  CHECK(one_cell("a max [MPa]", "1", "a", QuantityKind::stress).faults ==
        Texts{"t.csv:1:2: \"a max\" has no partner \"a min\": an upper end alone is no value."});
  FaultList faults;
  TableReader table("a [MPa],a min [MPa]\n1,2\n", "t.csv", {}, faults);
  CHECK_FALSE(table.number_column("a", QuantityKind::stress).is_present());
  CHECK(texts(faults) ==
        Texts{"t.csv:1:2: \"a min\" stands beside \"a\": keep the one column or the pair."});
}

TEST_CASE("semicolon and decimal comma by option, where lists stand between bars") {
  FaultList faults;
  TableFormat format;
  format.delimiter = ';';
  format.decimal = ',';
  TableReader table(
      "forms;E [GPa];nu\nbar | plate;68,5..70,0;0,33\nbar;70.1;0,3\n", "t.csv", format, faults);
  const auto forms = table.text_column("forms");
  const auto E = table.number_column("E", QuantityKind::stress);
  const auto nu = table.number_column("nu", QuantityKind::ratio);
  table.finish_columns();
  CHECK(table.list(0, forms) == Texts{"bar", "plate"});
  CHECK(table.range(0, E) == Range{68.5e9, 70e9});
  CHECK(table.value(0, nu) == 0.33);
  CHECK(faults.empty());
  CHECK_FALSE(table.range(1, E));
  REQUIRE(faults.size() == 1);
  CHECK(faults.faults()[0].where == "t.csv:3:2");
  CHECK(faults.faults()[0].code == Code::cell_invalid);
  CHECK(faults.faults()[0].found == "70.1");
}

TEST_CASE("a format that contradicts itself is a fault") {
  FaultList faults;
  TableFormat format;
  format.decimal = ',';
  format.currency = "EURO";
  const TableReader comma("a\n1\n", "t.csv", format, faults);
  format.decimal = ':';
  format.currency = "EUR";
  const TableReader colon("a\n1\n", "t.csv", format, faults);
  REQUIRE(faults.size() == 3);
  CHECK(faults.faults()[0].where == "decimal");
  CHECK(faults.faults()[1].where == "currency");
  CHECK(faults.faults()[1].code == Code::unknown_name);
  CHECK(faults.faults()[2].where == "decimal");
}

TEST_CASE("a required column that is missing is a fault with the likeliest misspelling") {
  FaultList faults;
  TableReader table("densty [kg/m3],remark\n7850,x\n", "t.csv", {}, faults);
  static_cast<void>(table.number_column("density", QuantityKind::density, Presence::required));
  static_cast<void>(table.text_column("forms", Presence::required));
  static_cast<void>(table.text_column("remarks"));
  table.finish_columns();
  CHECK(texts(faults) ==
        Texts{"t.csv:1: the column \"density [kg/m3]\" is missing. Did you mean it by \"densty\"?",
              "t.csv:1: the column \"forms\" is missing."});
  CHECK(faults.faults()[0].code == Code::column_missing);
  REQUIRE(table.notes().size() == 1);
  CHECK(table.notes()[0] ==
        "t.csv:1:2: the column \"remark\" is not one the library knows. Did you mean \"remarks\"?");
}

TEST_CASE("one column that holds other delimiters points to the delimiter") {
  FaultList faults;
  TableReader table("name;density [kg/m3]\nx;7850\n", "t.csv", {}, faults);
  static_cast<void>(table.text_column("name", Presence::required));
  table.finish_columns();
  REQUIRE(faults.size() == 1);
  CHECK(faults.faults()[0].message ==
        "the column \"name\" is missing. The header has one column only, so the delimiter is "
        "probably another one.");
}

TEST_CASE("units of headers: missing, unknown, of another dimension") {
  const auto code = [](const std::string& header, QuantityKind kind) {
    FaultList faults;
    TableReader table("a" + header + "\n1\n", "t.csv", {}, faults);
    static_cast<void>(table.number_column("a", kind));
    REQUIRE(faults.size() == 1);
    CHECK(faults.faults()[0].where == "t.csv:1:1");
    return faults.faults()[0].code;
  };
  CHECK(code("", QuantityKind::density) == Code::unit_missing);
  CHECK(code(" [kg/m4x]", QuantityKind::density) == Code::unit_unknown);
  CHECK(code(" [MPa]", QuantityKind::density) == Code::unit_wrong);
  CHECK(code(" [degC]", QuantityKind::temperature_difference) == Code::unit_wrong);
  CHECK(code(" [%]", QuantityKind::co2_per_mass) == Code::unit_wrong);
  CHECK(one_cell("a", "1", "a", QuantityKind::density).faults ==
        Texts{"t.csv:1:2: \"a\": the header names no unit: write it behind the name, as \"a "
              "[kg/m3]\"."});
}

TEST_CASE("ratios and counts may go without unit, temperatures may be in degC") {
  CHECK(one_cell("a", "0.3", "a", QuantityKind::ratio).range == Range{0.3, 0.3});
  CHECK(one_cell("a [-]", "0.3", "a", QuantityKind::ratio).range == Range{0.3, 0.3});
  CHECK(one_cell("a [%]", "25", "a", QuantityKind::ratio).range == Range{0.25, 0.25});
  CHECK(one_cell("a", "12", "a", QuantityKind::count).range == Range{12, 12});
  const auto read = one_cell("a [degC]", "-20..100", "a", QuantityKind::temperature).range;
  REQUIRE(read);
  CHECK(read->low == Approx(253.15).epsilon(1e-15));
  CHECK(read->high == Approx(373.15).epsilon(1e-15));
}

TEST_CASE("every cell that its column cannot accept is a fault with its place and text") {
  const auto fault = [](const std::string& header, const std::string& cell, QuantityKind kind) {
    const OneCell read = one_cell(header, cell, "a", kind);
    CHECK_FALSE(read.range);
    REQUIRE(read.faults.size() == 1);
    CHECK(read.faults[0].rfind("t.csv:2:2: \"" + header + "\": ", 0) == 0);
    return read.faults[0].substr(read.faults[0].find(": \"" + header + "\": ") + 6 + header.size());
  };
  CHECK(fault("a [MPa]", "500..400", QuantityKind::stress).find("500..400") != std::string::npos);
  CHECK(fault("a [MPa]", "n/a", QuantityKind::stress).find("Leave the cell empty") !=
        std::string::npos);
  for (const std::string cell : {"#DIV/0!",
                                 "1 000",
                                 "12,5",
                                 "nan",
                                 "inf",
                                 "1e400",
                                 "12 MPa",
                                 "1...2",
                                 "..2",
                                 "1..",
                                 "0x10",
                                 "\xE2\x88\x92 5"}) {
    FaultList faults;
    TableReader table("a [MPa];b\n" + cell + ";1\n", "t.csv", {.delimiter = ';'}, faults);
    const auto column = table.number_column("a", QuantityKind::stress);
    CHECK_FALSE(table.range(0, column));
    INFO(cell);
    REQUIRE(faults.size() == 1);
    CHECK(faults.faults()[0].where == "t.csv:2:1");
    CHECK(faults.faults()[0].found == cell);
    CHECK(faults.faults()[0].code == Code::cell_invalid);
  }
  CHECK(fault("a [degC]", "-300", QuantityKind::temperature) == "\"-300\" is below absolute zero.");
  CHECK(fault("a", "1.5", QuantityKind::count) ==
        "\"1.5\" is no count: it must be whole and not negative.");
  CHECK(fault("a [GPa]", "1e307", QuantityKind::stress) ==
        "\"1e307\" is too large for the unit of its column.");
}

TEST_CASE("required cells, single values, words, flags and lists have their faults") {
  FaultList faults;
  TableReader table(
      "name,n [MPa],flag,rating,list\n"
      ",,maybe,gud,a;;b\n"
      "x,1..2,YES,Good,a; b\n",
      "t.csv",
      {},
      faults);
  const auto name = table.text_column("name");
  const auto n = table.number_column("n", QuantityKind::stress);
  const auto flag = table.text_column("flag");
  const auto rating = table.text_column("rating");
  const auto list = table.text_column("list");
  const auto absent = table.text_column("other");
  const auto absent_number = table.number_column("else", QuantityKind::stress);
  table.finish_columns();
  constexpr std::array<std::string_view, 3> words = {"poor", "fair", "good"};
  CHECK(table.required_text(0, name).empty());
  CHECK(table.required_value(0, n) == 0.0);
  CHECK_FALSE(table.flag(0, flag));
  CHECK_FALSE(table.word(0, rating, words));
  CHECK(table.list(0, list).empty());
  CHECK_FALSE(table.value(1, n));
  CHECK(
      texts(faults) ==
      Texts{"t.csv:2:1: \"name\": the cell must not be empty.",
            "t.csv:2:2: \"n [MPa]\": the cell must not be empty.",
            "t.csv:2:3: \"flag\": \"maybe\" is not one of yes, no, true, false, 1 or 0.",
            "t.csv:2:4: \"rating\": \"gud\" is not one of poor, fair or good. Did you mean "
            "\"good\"?",
            "t.csv:2:5: \"list\": the list has an empty item: remove the separator \";\" too many.",
            "t.csv:3:2: \"n [MPa]\": \"1..2\" is a range; one value is needed here."});
  CHECK(faults.faults()[0].code == Code::missing);
  CHECK(table.flag(1, flag) == true);
  CHECK(table.word(1, rating, words) == std::size_t{2});
  CHECK(table.list(1, list) == Texts{"a", "b"});
  CHECK(table.text(0, absent).empty());
  CHECK(table.list(0, absent).empty());
  CHECK_FALSE(table.range(0, absent_number));
}

TEST_CASE("the same name with two units is a fault, cells without header too") {
  FaultList faults;
  const TableReader table("a [MPa],A [GPa],,b [x\n1,2,,4\n1,2,z,4\n", "t.csv", {}, faults);
  CHECK(texts(faults).size() == 3);
  CHECK(faults.faults()[0].where == "t.csv:1:2");
  CHECK(faults.faults()[0].code == Code::duplicate);
  CHECK(faults.faults()[1].where == "t.csv:3:3");
  CHECK(faults.faults()[2].where == "t.csv:1:4");
}

TEST_CASE("prices keep the currency of their header, and two currencies are a fault") {
  FaultList faults;
  TableReader table("p [USD/lb],q [EUR/kg],r [1/kg],s [USD/kg]\n1,2,3,4\n", "t.csv", {}, faults);
  CHECK(table.currency() == "EUR");
  const auto p = table.number_column("p", QuantityKind::price_per_mass);
  const auto s = table.number_column("s", QuantityKind::price_per_mass);
  CHECK(table.currency() == "USD");
  CHECK(faults.empty());
  CHECK(table.value(0, p).value() == Approx(1.0 / 0.45359237).epsilon(1e-14));  // 1 lb exactly
  CHECK(table.value(0, s) == 4.0);
  static_cast<void>(table.number_column("q", QuantityKind::price_per_mass));
  static_cast<void>(table.number_column("r", QuantityKind::price_per_mass));
  CHECK(
      texts(faults) ==
      Texts{"t.csv:1:2: prices in EUR beside prices in USD: one table has one currency, or the job "
            "states a rate.",
            "t.csv:1:3: prices in EUR beside prices in USD: one table has one currency, or the job "
            "states a rate."});
}

TEST_CASE("with rates every price becomes the job's currency, and a missing rate is a fault") {
  bismar::CurrencyRates rates("EUR");
  rates.set("USD", 0.5);
  TableFormat format;
  format.rates = &rates;
  format.currency = "USD";
  CHECK(one_cell("p [USD/kg]", "3", "p", QuantityKind::price_per_mass, format).range ==
        Range{1.5, 1.5});
  CHECK(one_cell("p [EUR/kg]", "3", "p", QuantityKind::price_per_mass, format).range ==
        Range{3.0, 3.0});
  CHECK(one_cell("p [/kg]", "3", "p", QuantityKind::price_per_mass, format).range ==
        Range{1.5, 1.5});
  CHECK(one_cell("p [CHF/kg]", "3", "p", QuantityKind::price_per_mass, format).faults.size() == 1);
}

TEST_CASE("columns left over are numbers when they have a unit or hold numbers only") {
  FaultList faults;
  TableReader table(
      "a,damping [%],order,mixed,empty\nx,2,17,1,\nx,3..4,,b,\n", "t.csv", {}, faults);
  static_cast<void>(table.text_column("a"));
  table.finish_columns();
  const auto unknown = table.unknown_columns();
  REQUIRE(unknown.size() == 4);
  const auto damping = table.as_numbers(unknown[0]);
  REQUIRE(damping);
  CHECK(table.range(1, *damping) == Range{0.03, 0.04});
  const auto order = table.as_numbers(unknown[1]);
  REQUIRE(order);
  CHECK(table.value(0, *order) == 17.0);
  CHECK_FALSE(table.as_numbers(unknown[2]));
  CHECK_FALSE(table.as_numbers(unknown[3]));
  CHECK(faults.empty());
}

TEST_CASE("random tables give faults or values, never a crash") {
  std::mt19937 random(11);
  const std::vector<std::string> headers = {"a [MPa]",
                                            "a min [MPa]",
                                            "a max [GPa]",
                                            "b",
                                            "b [",
                                            "c [EUR/kg]",
                                            "[x]",
                                            "",
                                            "list",
                                            "A [ksi]"};
  const std::vector<std::string> cells = {
      "1", "1..2", "..", "-1", "x;y", ";", "1e999", "", " ", "\"\"", "nan", "3..1", "yes"};
  std::size_t read = 0;
  for (int round = 0; round < 4000; ++round) {
    const std::size_t columns = 1 + random() % 5;
    std::string text;
    for (std::size_t row = 0; row < 4; ++row) {
      for (std::size_t i = 0; i < columns; ++i) {
        text += i == 0 ? "" : ",";
        text += row == 0 ? headers[random() % headers.size()] : cells[random() % cells.size()];
      }
      text += '\n';
    }
    FaultList faults;
    TableReader table(text, "t.csv", {}, faults);
    const auto a = table.number_column("a", QuantityKind::stress, Presence::required);
    const auto b = table.text_column("b");
    const auto c = table.number_column("c", QuantityKind::price_per_mass);
    const auto list = table.text_column("list");
    table.finish_columns();
    for (std::size_t row = 0; row < table.rows(); ++row) {
      const auto range = table.range(row, a);
      if (range) {
        ++read;
        REQUIRE(range->low <= range->high);
      }
      static_cast<void>(table.required_text(row, b));
      static_cast<void>(table.required_value(row, c));
      static_cast<void>(table.list(row, list));
    }
    for (const bismar::Fault& fault : faults.faults()) {
      REQUIRE(fault.where.rfind("t.csv:", 0) == 0);
      REQUIRE_FALSE(fault.message.empty());
    }
  }
  CHECK(read > 100);
}
