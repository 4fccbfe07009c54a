// SPDX-License-Identifier: MIT
// What README.md shows is what the program does.
#include "cli/run_program.hpp"
#include "support/catch.hpp"

#include <fstream>
#include <sstream>
#include <string>

namespace {

std::string readme() {
  std::ifstream file(std::string(BISMAR_TEST_DATA_DIR) + "/../README.md");
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

/// The first fenced block of a language.
std::string block(const std::string& language) {
  const std::string text = readme();
  const std::string opening = "```" + language + "\n";
  const auto from = text.find(opening);
  REQUIRE(from != std::string::npos);
  const auto start = from + opening.size();
  return text.substr(start, text.find("```", start) - start);
}

std::string demo() { return std::string(BISMAR_TEST_DATA_DIR) + "/jobs/crank_lever.json"; }

}  // namespace

TEST_CASE("the ruler in the README is the one that the demo prints") {
  const auto ran = cli_test::run({"front", demo()});
  REQUIRE(ran.code == 0);
  INFO(ran.out);
  CHECK(ran.out.find(block("console")) != std::string::npos);
}

TEST_CASE("the spreadsheet of the README works beside the starter tables") {
  const cli_test::Folder folder;
  folder.write("shop.csv", block("csv"));
  std::ifstream file(demo());
  std::ostringstream text;
  text << file.rdbuf();
  std::string job = text.str();
  const std::string key = "\"currency\": \"EUR\",";
  const auto at = job.find(key);
  REQUIRE(at != std::string::npos);
  // Two fences are marked json; the catalogue is the one that begins with its key.
  const std::string all = readme();
  const auto from = all.find("\"catalogue\":");
  REQUIRE(from != std::string::npos);
  const std::string catalogue = all.substr(from, all.find("\n", from) - from);
  job.insert(at + key.size(), "\n  " + catalogue + ",");
  folder.write("job.json", job);
  const auto checked = cli_test::run({"check", "job.json"}, folder.path());
  INFO(checked.out << checked.err);
  REQUIRE(checked.code == 0);
  const auto why = cli_test::run({"why", "job.json", "house-steel"}, folder.path());
  INFO(why.out << why.err);
  CHECK(why.code == 0);
  CHECK(why.out.find("shop.csv") != std::string::npos);
}

TEST_CASE("every command that the README names exists") {
  const std::string all = readme();
  for (const std::string command : {"new", "check", "front", "sweep", "why", "verify", "schema"}) {
    CHECK(all.find("bismar " + command) != std::string::npos);
    CHECK(cli_test::run({command, "--help"}).code == 0);
  }
}
