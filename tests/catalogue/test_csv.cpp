// SPDX-License-Identifier: MIT
// The CSV grammar is that of RFC 4180 (October 2005), section 2, from memory of its seven rules;
// line ends other than CRLF, the byte order mark and blank rows are common practice, no source.
#include <bismar/catalogue/csv.hpp>

#include <array>
#include <cstdio>
#include <filesystem>
#include <random>
#include <string>
#include <vector>

#include "support/catch.hpp"

using bismar::Code;
using bismar::CsvDocument;
using bismar::CsvWriter;
using bismar::FaultList;

namespace {

CsvDocument good(const std::string& text, char delimiter = ',') {
  FaultList faults;
  CsvDocument document = CsvDocument::parse(text, "t.csv", delimiter, faults);
  for (const bismar::Fault& fault : faults.faults()) UNSCOPED_INFO(fault.text());
  REQUIRE(faults.empty());
  return document;
}

std::vector<std::string> texts(const FaultList& faults) {
  std::vector<std::string> result;
  for (const bismar::Fault& fault : faults.faults()) result.push_back(fault.text());
  return result;
}

std::vector<std::string> faults_of(const std::string& text, char delimiter = ',') {
  FaultList faults;
  static_cast<void>(CsvDocument::parse(text, "t.csv", delimiter, faults));
  return texts(faults);
}

}  // namespace

TEST_CASE("plain cells are read with their places") {
  const CsvDocument document = good("a,b\n1,2\n3, 4 \n");
  REQUIRE(document.columns() == 2);
  REQUIRE(document.rows() == 2);
  CHECK(document.header(1) == "b");
  CHECK(document.cell(0, 0) == "1");
  CHECK(document.cell(1, 1) == " 4 ");
  CHECK(document.line(1) == 3);
  CHECK(document.where(1, 1) == "t.csv:3:2");
  CHECK(document.where_header(0) == "t.csv:1:1");
}

TEST_CASE("quoted cells hold delimiters, doubled quotes and line ends") {
  const CsvDocument document =
      good("a,b,c\r\n\"x,1\",\"say \"\"so\"\"\",\"two\r\nlines\"\r\n\"\",p,q");
  REQUIRE(document.rows() == 2);
  CHECK(document.cell(0, 0) == "x,1");
  CHECK(document.cell(0, 1) == "say \"so\"");
  CHECK(document.cell(0, 2) == "two\r\nlines");
  CHECK(document.cell(1, 0).empty());
  CHECK(document.line(0) == 2);
  CHECK(document.line(1) == 4);
}

TEST_CASE(
    "LF, CRLF and CR end lines, the last one may be missing, a byte order mark is passed over") {
  for (const std::string end : {"\n", "\r\n", "\r"}) {
    const CsvDocument document = good(
        "\xEF\xBB\xBF"
        "a,b" +
        end + "1,2" + end + "3,4");
    REQUIRE(document.rows() == 2);
    CHECK(document.header(0) == "a");
    CHECK(document.cell(1, 1) == "4");
    CHECK(document.line(1) == 3);
  }
}

TEST_CASE("rows of nothing but blanks and delimiters are no rows") {
  const CsvDocument document = good("\n\na,b\n\n1,2\n , \n,,,,\n3,4\n\n");
  REQUIRE(document.rows() == 2);
  CHECK(document.header_line() == 3);
  CHECK(document.line(0) == 5);
  CHECK(document.line(1) == 8);
  CHECK(good("a\n\"\"\n").rows() == 1);
}

TEST_CASE("another delimiter leaves commas alone") {
  const CsvDocument document = good("a;b\n1,5;2\n", ';');
  CHECK(document.cell(0, 0) == "1,5");
}

TEST_CASE("every fault of the form has its line and cell, and all are reported at once") {
  CHECK(faults_of("a,b,c\n1,2\n1,2,3\n1,2,3,4\n") ==
        std::vector<std::string>{"t.csv:2:3: the row has 2 cells, the header has 3: add or remove "
                                 "delimiters, or quote the "
                                 "cell that holds one.",
                                 "t.csv:4:4: the row has 4 cells, the header has 3: add or remove "
                                 "delimiters, or quote the "
                                 "cell that holds one."});
  CHECK(
      faults_of("a,b\n1,x\"y\n\"p\"q,2\n") ==
      std::vector<std::string>{
          "t.csv:2:2: a quote inside an unquoted cell: put the whole cell in quotes and double the "
          "quotes inside it.",
          "t.csv:3:1: text behind the closing quote of a cell: double every quote inside a quoted "
          "cell."});
  CHECK(faults_of("a,b\n1,2\n3,\"open\n5,6\n") ==
        std::vector<std::string>{"t.csv:3:2: the quote that opens this cell is never closed."});
  CHECK(faults_of("a,b,A \n1,2,3\n") ==
        std::vector<std::string>{
            "t.csv:1:3: the header \"A \" is already that of column 1: rename one of them."});
  CHECK(faults_of("") ==
        std::vector<std::string>{"t.csv:1:1: the table is empty: it needs a header "
                                 "row and at least one data row."});
  CHECK(faults_of("\xEF\xBB\xBF\n\n").size() == 1);
  CHECK(faults_of("\na,b\n") ==
        std::vector<std::string>{
            "t.csv:2:1: the table has a header but no data row: add at least one."});
}

TEST_CASE("bytes that are no UTF-8 text are one clear fault") {
  CHECK(faults_of("a,b\n1,caf\xE9\n") ==
        std::vector<std::string>{
            "t.csv:2:2: byte 6 of the line is not UTF-8: save the file as \"CSV UTF-8\"."});
  CHECK(faults_of(std::string("a,b\n\0,2\n", 8)) ==
        std::vector<std::string>{"t.csv:2:1: byte 1 of the line is a NUL: this is no CSV text."});
  CHECK(faults_of(std::string("\xFF\xFE"
                              "a\0",
                              4)) ==
        std::vector<std::string>{"t.csv:1:1: the file is UTF-16 text: save it as \"CSV UTF-8\"."});
  // Overlong slash, a surrogate, a value past U+10FFFF, a lone continuation, a cut sequence.
  for (const std::string bytes :
       {"\xC0\xAF", "\xED\xA0\x80", "\xF4\x90\x80\x80", "\x80", "\xE2\x82"}) {
    CHECK(faults_of("a\n" + bytes).size() == 1);
  }
  CHECK(faults_of("a\n\xC2\xB5m \xE2\x88\x9Am \xF0\x9F\x94\xA9\n").empty());
}

TEST_CASE("the codes of faults are those documented") {
  const auto code = [](const std::string& text) {
    FaultList faults;
    static_cast<void>(CsvDocument::parse(text, "t.csv", ',', faults));
    return faults.faults()[0].code;
  };
  CHECK(code("a,b\n1\n") == Code::table_malformed);
  CHECK(code("a,a\n1,2\n") == Code::duplicate);
  CHECK(code("") == Code::empty);
  FaultList faults;
  static_cast<void>(CsvDocument::parse("a\n1\n", "t.csv", '"', faults));
  REQUIRE(faults.size() == 1);
  CHECK(faults.faults()[0].code == Code::invalid_argument);
  CHECK_THROWS_AS(CsvWriter('\n'), bismar::Error);
}

TEST_CASE("a cell of many megabytes is read whole") {
  const std::string huge(8'000'000, 'x');
  const CsvDocument document = good("a,b\n" + huge + ",\"" + huge + "\"\"\"\n");
  CHECK(document.cell(0, 0).size() == huge.size());
  CHECK(document.cell(0, 1).size() == huge.size() + 1);
}

TEST_CASE("what the writer writes the reader reads back, cell by cell") {
  std::mt19937 random(20240607);
  const std::array<std::string, 12> pieces = {
      "a", "1.5", ",", ";", "\"", "\n", "\r", "\r\n", " ", "\xC2\xA0", "\xEF\xBB\xBF", "\xC2\xB5"};
  for (int round = 0; round < 2000; ++round) {
    const char delimiter = round % 2 == 0 ? ',' : ';';
    const std::size_t columns = 1 + random() % 4;
    std::vector<std::vector<std::string>> rows(1 + random() % 4);
    for (auto& row : rows) {
      row.resize(columns);
      for (std::string& cell : row) {
        for (std::size_t n = random() % 5; n > 0; --n) cell += pieces[random() % pieces.size()];
      }
    }
    for (std::size_t i = 0; i < columns; ++i)
      rows[0][i].insert(0, std::string("h").append(std::to_string(i)));
    rows.push_back(std::vector<std::string>(columns));  // a row of empty cells
    CsvWriter writer(delimiter);
    for (const auto& row : rows) writer.add_row(std::span<const std::string>(row));
    const CsvDocument document = good(writer.text(), delimiter);
    REQUIRE(document.rows() == rows.size() - 1);
    for (std::size_t i = 0; i < columns; ++i) {
      REQUIRE(document.header(i) == rows[0][i]);
      for (std::size_t r = 1; r < rows.size(); ++r) REQUIRE(document.cell(r - 1, i) == rows[r][i]);
    }
  }
}

TEST_CASE("random bytes give faults or cells, never a crash") {
  std::mt19937 random(7);
  const std::string alphabet = "a1,;\"\n\r \t.\xEF\xBB\xBF\xC3\xA9";
  std::size_t with_faults = 0;
  for (int round = 0; round < 20000; ++round) {
    std::string text;
    for (std::size_t n = random() % 60; n > 0; --n) {
      text += random() % 50 == 0 ? static_cast<char>(random() % 256)
                                 : alphabet[random() % alphabet.size()];
    }
    FaultList faults;
    const CsvDocument document = CsvDocument::parse(text, "t.csv", ',', faults);
    with_faults += faults.empty() ? 0U : 1U;
    std::size_t bytes = 0;
    for (std::size_t r = 0; r < document.rows(); ++r) {
      for (std::size_t c = 0; c < document.columns(); ++c) bytes += document.cell(r, c).size();
    }
    REQUIRE(bytes <= text.size());
    REQUIRE((!faults.empty() || document.rows() > 0));
  }
  CHECK(with_faults > 0);
}

TEST_CASE("a file is read whole, and a file that cannot be read is a fault with its path") {
  const std::filesystem::path folder = std::filesystem::temp_directory_path();
  const std::filesystem::path path = folder / "bismar_test_csv_read.csv";
  const std::string content = std::string(200'000, 'y') + "\r\nend";
  std::FILE* file = std::fopen(path.string().c_str(), "wb");
  REQUIRE(file != nullptr);
  REQUIRE(std::fwrite(content.data(), 1, content.size(), file) == content.size());
  REQUIRE(std::fclose(file) == 0);
  CHECK(bismar::read_table_file(path.string()) == content);
  std::filesystem::remove(path);
  try {
    static_cast<void>(bismar::read_table_file(path.string()));
    FAIL("a missing file was read");
  } catch (const bismar::Error& error) {
    REQUIRE(error.faults().size() == 1);
    CHECK(error.faults()[0].code == Code::table_unreadable);
    CHECK(error.faults()[0].where == path.string());
  }
  CHECK_THROWS_AS(bismar::read_table_file(folder.string()), bismar::Error);
}
