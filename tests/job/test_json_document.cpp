// SPDX-License-Identifier: MIT
#include "job/json_document.hpp"

#include "support/catch.hpp"

#include <string>

using bismar::Code;
using bismar::Fault;
using bismar::FaultList;
using bismar::detail::JsonDocument;
using bismar::detail::JsonValue;

namespace {

struct Parsed {
  JsonDocument document;
  FaultList faults;
  bool good = false;
};

Parsed parse(const std::string& text) {
  Parsed parsed;
  parsed.good = parsed.document.parse(text, "job.json", parsed.faults);
  return parsed;
}

Fault only_fault(const Parsed& parsed) {
  REQUIRE(parsed.faults.size() == 1);
  return parsed.faults.faults()[0];
}

}  // namespace

TEST_CASE("every JSON value knows its line and column, comments or not") {
  const Parsed parsed = parse(
      "{ // a comment with \"quotes\", {braces} and a : colon\n"
      "  \"a\" : /* one */ 12.5 /* two */,\n"
      "\t\"b\":[true,\"x\\\"y\" ,null,-3e2/*c*/,[ ] ],\r\n"
      "  \"\u00e4\u00f6\": { \"c\": \"//no comment\" }, \"d\": false }");
  REQUIRE(parsed.good);
  REQUIRE(parsed.faults.empty());
  const JsonValue& root = parsed.document.root();
  const auto place = [&](const JsonValue& value) {
    return parsed.document.where(value.offset, {});
  };
  CHECK(place(root) == "job.json:1:1");
  CHECK(place(*root.find("a")) == "job.json:2:19");
  CHECK(root.find("a")->number == 12.5);
  const JsonValue& b = *root.find("b");
  CHECK(place(b) == "job.json:3:6");
  REQUIRE(b.items.size() == 5);
  CHECK(place(b.items[0]) == "job.json:3:7");
  CHECK(place(b.items[1]) == "job.json:3:12");
  CHECK(b.items[1].text == "x\"y");
  CHECK(place(b.items[2]) == "job.json:3:20");
  CHECK(place(b.items[3]) == "job.json:3:25");
  CHECK(b.items[3].number == -300.0);
  CHECK(place(b.items[4]) == "job.json:3:35");
  // Columns count characters, not bytes.
  CHECK(place(*root.find("\u00e4\u00f6")) == "job.json:4:9");
  CHECK(place(*root.find("\u00e4\u00f6")->find("c")) == "job.json:4:16");
  CHECK(root.find("\u00e4\u00f6")->find("c")->text == "//no comment");
  CHECK(place(*root.find("d")) == "job.json:4:39");
}

TEST_CASE("a byte order mark is passed over and not counted") {
  const Parsed parsed = parse("\xEF\xBB\xBF{\"a\": 1}");
  REQUIRE(parsed.good);
  CHECK(parsed.document.where(parsed.document.root().find("a")->offset, "/a") == "job.json:1:7 /a");
}

TEST_CASE("UTF-16 is named as what it is") {
  const Fault fault = only_fault(parse(std::string("\xFF\xFE{\0}\0", 6)));
  CHECK(fault.code == Code::json_malformed);
  CHECK(fault.message == "the file is UTF-16. Save it as UTF-8.");
}

TEST_CASE("a repeated key is a fault at its second place, with its pointer") {
  const Parsed parsed = parse("{\"x\": [ {\"a/b\": 1,\n \"a/b\": 2} ]}");
  const Fault fault = only_fault(parsed);
  CHECK(fault.code == Code::duplicate);
  CHECK(fault.where == "job.json:2:2 /x/0/a~1b");
  CHECK(fault.found == "a/b");
  CHECK(parsed.good);  // the rest can still be looked at
}

TEST_CASE("the same key in different objects is no fault") {
  CHECK(parse("{\"a\": {\"a\": 1}, \"b\": [{\"a\": 1}, {\"a\": 1}]}").faults.empty());
}

TEST_CASE("what is no JSON is refused with its place") {
  const std::string text = GENERATE(as<std::string>{},
                                    "",
                                    "{",
                                    "{\"a\": }",
                                    "{\"a\": 1,}",
                                    "{'a': 1}",
                                    "{\"a\": NaN}",
                                    "{\"a\": Infinity}",
                                    "{\"a\": 01}",
                                    "{\"a\": 1} x",
                                    "{\"a\": \"\xFF\"}",
                                    "{\"a\": \"line\nbreak\"}",
                                    "/* never closed");
  const Parsed parsed = parse(text);
  INFO(text);
  CHECK_FALSE(parsed.good);
  const Fault fault = only_fault(parsed);
  CHECK(fault.code == Code::json_malformed);
  CHECK(fault.where.rfind("job.json:", 0) == 0);
  CHECK(fault.message.rfind("this is not JSON: ", 0) == 0);
  CHECK(fault.message.find("nlohmann") == std::string::npos);
  CHECK(fault.message.find("json.exception") == std::string::npos);
}

TEST_CASE("the place of a syntax fault is where it stands") {
  CHECK(only_fault(parse("{\n  \"a\": 1\n  \"b\": 2\n}")).where == "job.json:3:5");
}

TEST_CASE("a number too large for a double is refused with its place") {
  const Fault fault = only_fault(parse("{\"a\": [1, 1e999]}"));
  CHECK(fault.code == Code::not_finite);
  CHECK(fault.where == "job.json:1:11 /a/1");
  CHECK(fault.found == "1e999");
}

TEST_CASE("nesting is read up to 64 levels and refused beyond") {
  const auto nested = [](std::size_t levels) {
    return std::string(levels, '[') + std::string(levels, ']');
  };
  CHECK(parse(nested(64)).good);
  const Parsed parsed = parse(nested(65));
  CHECK_FALSE(parsed.good);
  CHECK(only_fault(parsed).code == Code::json_malformed);
  CHECK_FALSE(parse(std::string(2000000, '[')).good);
}

TEST_CASE("the compact text drops comments and keeps keys, numbers and escapes") {
  const Parsed parsed = parse("{ \"b\": 1.50, // x\n \"a\": [\"\\u00e4\\n\", {}, null, true] }");
  REQUIRE(parsed.good);
  CHECK(to_compact_text(parsed.document.root()) ==
        "{\"b\":1.50,\"a\":[\"\u00e4\\n\",{},null,true]}");
}
