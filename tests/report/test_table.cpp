// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/report/table.hpp>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <cstring>
#include <limits>
#include <random>

#include "support/catch.hpp"

using namespace bismar::report;

TEST_CASE("numbers keep their significant digits and never round the integer part away") {
  CHECK(number(0.0123456) == "0.0123");
  CHECK(number(1.0) == "1.00");
  CHECK(number(196.6) == "197");
  CHECK(number(16583.4) == "16583");
  CHECK(number(9.996) == "10.0");
  CHECK(number(0.99996) == "1.00");
  CHECK(number(-0.5) == "-0.500");
  CHECK(number(0.0) == "0");
  CHECK(number(-0.0) == "0");
  CHECK(number(1.234e-5) == "1.23e-05");
  CHECK(number(2.5e9) == "2.50e+09");
  CHECK(number(2.0 / 3.0, 1) == "0.7");
}

TEST_CASE("numbers that are not finite are named") {
  constexpr double inf = std::numeric_limits<double>::infinity();
  for (const auto& text : {number(inf), fixed(inf, 2), exact(inf), money(inf)})
    CHECK(text == "inf");
  CHECK(number(-inf) == "-inf");
  CHECK(number(std::numeric_limits<double>::quiet_NaN()) == "nan");
}

TEST_CASE("money has two decimals, small amounts two digits, and no negative zero") {
  CHECK(money(6.2) == "6.20");
  CHECK(money(0.1) == "0.10");
  CHECK(money(0.034) == "0.034");
  CHECK(money(0.0) == "0.00");
  CHECK(money(3e-17) == "0.00");
  CHECK(money(-3e-17) == "0.00");
  CHECK(fixed(-0.001, 2) == "0.00");
  CHECK(fixed(2.5, 3) == "2.500");
}

TEST_CASE("counts are grouped from five digits on") {
  CHECK(count(0) == "0");
  CHECK(count(4212) == "4212");
  CHECK(count(16583) == "16 583");
  CHECK(count(165204) == "165 204");
  CHECK(count(1234567) == "1 234 567");
}

TEST_CASE("exact numbers read back as the same double") {
  std::mt19937_64 random(20);
  for (int i = 0; i < 20000; ++i) {
    const std::uint64_t bits = random();
    double value = 0.0;
    std::memcpy(&value, &bits, sizeof value);
    if (!std::isfinite(value)) continue;
    const std::string text = exact(value);
    double back = 0.0;
    std::from_chars(text.data(), text.data() + text.size(), back);
    REQUIRE(std::memcmp(&back, &value, sizeof value) == 0);
  }
}

TEST_CASE("the width of a text counts characters, not bytes") {
  CHECK(display_width("") == 0);
  CHECK(display_width("abc") == 3);
  CHECK(display_width("\xC3\x97") == 1);      // multiplication sign
  CHECK(display_width("e\xCC\x81") == 1);     // combining acute accent
  CHECK(display_width("\xE9\x89\x84") == 2);  // the Chinese character for iron
  CHECK(display_width("a\xFF"
                      "b") == 3);         // a byte that is no UTF-8
  CHECK(display_width("\xC0\xAF") == 2);  // overlong form: two stray bytes
}

TEST_CASE("wrapping keeps every character and every line within the width") {
  std::mt19937 random(7);
  const std::string letters = "ab\xC3\xA9-/ ";
  for (int round = 0; round < 500; ++round) {
    std::string text;
    const int length = static_cast<int>(random() % 60);
    for (int i = 0; i < length; ++i) {
      switch (random() % 6) {
        case 0:
          text += ' ';
          break;
        case 1:
          text += "\xC3\xA9";
          break;
        case 2:
          text += '-';
          break;
        default:
          text += static_cast<char>('a' + random() % 26);
      }
    }
    const std::size_t width = 1 + random() % 20;
    std::string joined;
    for (const std::string& line : wrap(text, width)) {
      CHECK(display_width(line) <= width);
      joined += line;
    }
    const auto squeezed = [](std::string s) {
      s.erase(std::remove(s.begin(), s.end(), ' '), s.end());
      return s;
    };
    CHECK(squeezed(joined) == squeezed(text));
  }
  CHECK(wrap("", 5) == std::vector<std::string>{""});
  CHECK(wrap("one\ntwo", 10) == std::vector<std::string>{"one", "two"});
  CHECK(wrap("hot-forging", 6) == std::vector<std::string>{"hot-", "forgin", "g"});
}

TEST_CASE("a table aligns its columns and leaves no trailing blanks") {
  Table table({{"mass\n[kg]", Align::right, false}, {"material", Align::left, true}});
  table.add_row({"0.412", "EN AW-6082"});
  table.add_row({"12.3", "\xC3\x84-steel"});
  CHECK(table.text(100) ==
        " mass\n"
        " [kg]  material\n"
        "-----  ----------\n"
        "0.412  EN AW-6082\n"
        " 12.3  \xC3\x84-steel\n");
}

TEST_CASE("a table gives way to the width and cuts nothing") {
  Table table(
      {{"no.", Align::right, false}, {"words", Align::left, true}, {"more", Align::left, true}});
  table.add_row({"1", "quenched and tempered steel of a long name", "hot-forging + quench-temper"});
  for (const std::size_t width : {100U, 60U, 40U, 30U, 24U}) {
    const std::string text = table.text(width, 1);
    std::string letters;
    for (std::size_t at = 0; at < text.size();) {
      const std::size_t end = text.find('\n', at);
      CHECK(end - at <= width);
      at = end + 1;
    }
    for (const char* word : {"quenched", "steel", "name"}) {
      if (width >= 40) CHECK(text.find(word) != std::string::npos);
    }
    CHECK(std::count(text.begin(), text.end(), 'q') == 2);
  }
}

TEST_CASE("a row with another number of cells is our own defect") {
  Table table({{"a", Align::left, false}});
  CHECK_THROWS_AS(table.add_row({"1", "2"}), bismar::InternalError);
}
