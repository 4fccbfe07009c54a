// SPDX-License-Identifier: MIT
#include "run_program.hpp"

#include "support/catch.hpp"

#include <string>
#include <vector>

using Catch::Matchers::Contains;
using cli_test::Folder;
using cli_test::quick_job;
using cli_test::Ran;
using cli_test::run;

namespace {

const std::string two_parts = [] {
  std::string text = quick_job;
  const std::size_t begin = text.find("    {\n      \"name\"");
  const std::size_t end = text.find("\n  ],");
  std::string second = text.substr(begin, end - begin);
  second.replace(second.find("\"lever\""), 7, "\"rod\"");
  text.insert(end, ",\n" + second);
  return text;
}();

}  // namespace

TEST_CASE("every misuse of the command line ends with 2 and one clear message") {
  const Folder folder;
  folder.write("job.json", quick_job);
  folder.write("two.json", two_parts);
  struct Case {
    std::vector<std::string> arguments;
    std::string message;
  };
  const std::vector<Case> cases = {
      {{},
       "bismar: which command? One of check, front, sweep, why, verify, new, schema. "
       "`bismar --help` explains them.\n"},
      {{"frnt", "job.json"},
       "bismar: there is no command \"frnt\". Did you mean \"front\"? Commands: check, front, "
       "sweep, "
       "why, verify, new, schema.\n"},
      {{"front"}, "bismar front: JOB is required. `bismar front --help` shows the use.\n"},
      {{"front", "job.json", "--formt", "csv"},
       "bismar front: there is no option \"--formt\". Did you mean \"--format\"? Options: --help, "
       "--part, --format, --plot, --output, --explain.\n"},
      {{"check", "job.json", "more"}, "bismar check: \"more\" is one argument too many.\n"},
      {{"front", "job.json", "--format", "jsno"},
       "E7 --format: \"jsno\" is not allowed. Did you mean \"json\"? Allowed: text, json, csv.\n"},
      {{"sweep", "job.json", "--per", "mass"},
       "E7 --per: \"mass\" is not allowed. Allowed: material, design, shape, route.\n"},
      {{"sweep", "job.json", "--from", "5 EUR/kg", "--to", "4 EUR/kg"},
       "E5 --from: --from must lie below --to.\n"},
      {{"sweep", "job.json", "--from", "0 EUR/kg"},
       "E3 --from: \"0 EUR/kg\" must be above zero.\n"},
      {{"new", "membre"},
       "E7 new: \"membre\" is not allowed. Did you mean \"member\"? Allowed: member.\n"},
      {{"front", "job.json", "--part", "levr"},
       "E7 the job has no part \"levr\". Did you mean \"lever\"? Its parts: \"lever\".\n"},
      {{"front", "two.json", "--format", "csv"},
       "E4 --part: --format csv is for one part, and the job has 2. Name one with --part: "
       "\"lever\", "
       "\"rod\".\n"},
      {{"front", "two.json", "--plot", "p.svg"},
       "E4 --part: --plot is for one part, and the job has 2. Name one with --part: \"lever\", "
       "\"rod\".\n"},
      {{"front", "job.json", "--plot", "p.gif"},
       "E9 p.gif: pictures are .svg, .png or .pdf: give the file one of these endings.\n"},
      {{"front", "job.json", "--plot", "no/p.svg"},
       "E1 no/p.svg: cannot write this file: there is no folder no. Make it first.\n"},
      {{"front", "job.json", "--output", "no/out"},
       "E1 no/out: cannot write this file: there is no folder no. Make it first.\n"},
      {{"front", "job.json", "--output", "."},
       "E1 .: cannot write this file: it is a folder. Name a file in it.\n"},
      {{"verify", "job.json"},
       "E4 job.json:1:1: this is no stored result: it has no \"bismar_result\". A result is "
       "written "
       "by `bismar front JOB --format json`.\n"},
  };
  for (const Case& test : cases) {
    std::string line = "bismar";
    for (const std::string& argument : test.arguments) {
      line += ' ' + argument;
    }
    INFO(line);
    const Ran ran = run(test.arguments, folder.path());
    CHECK(ran.code == 2);
    CHECK(ran.out.empty());
    CHECK(ran.err == test.message);
  }
  CHECK(folder.names() == std::vector<std::string>{"job.json", "two.json"});
}

TEST_CASE("every command that reads a job tells all its faults and ends with 2") {
  const Folder folder;
  folder.write("bad.json", R"({ "bismar": 1, "tilte": "x", "parts": [{ "name": "a" }] })");
  for (const std::vector<std::string>& arguments :
       {std::vector<std::string>{"check", "bad.json"},
        std::vector<std::string>{"front", "bad.json"},
        std::vector<std::string>{"sweep", "bad.json"},
        std::vector<std::string>{"why", "bad.json", "s235jr-as-rolled"}}) {
    const Ran ran = run(arguments, folder.path());
    CHECK(ran.code == 2);
    CHECK(ran.out.empty());
    CHECK(ran.err ==
          "E201 bad.json:1:16 /tilte: no such key as \"tilte\" here. Did you mean \"title\"? "
          "Allowed: \"bismar\", \"title\", \"currency\", \"rates\", \"catalogue\", \"settings\", "
          "\"parts\" or \"exchange\".\n"
          "E4 bad.json:1:40 /parts/0: the key \"member\" is missing: an object.\n");
  }
}

TEST_CASE("files that are not there, or are no jobs, end with 2 and name themselves") {
  const Folder folder;
  folder.write("empty.json", "");
  folder.write("text.json", "a job, perhaps");
  folder.write("deep.json", std::string(100000, '['));
  folder.write("binary.json", std::string("\0\1\2\xFF", 4));
  for (const char* name : {"missing.json", "empty.json", "text.json", "deep.json", "binary.json"}) {
    INFO(name);
    const Ran ran = run({"check", name}, folder.path());
    CHECK(ran.code == 2);
    CHECK(ran.out.empty());
    CHECK_THAT(ran.err, Contains(name));
    CHECK(ran.err.size() < 1000);
  }
  CHECK(run({"check", "."}, folder.path()).code == 2);
  CHECK(run({"verify", "missing.json"}, folder.path()).code == 2);
}

TEST_CASE("a part that the catalogue check refuses is named by its place in the job") {
  const Folder folder;
  std::string text = quick_job;
  const std::string from = R"("round": { "diameter": "8 mm..60 mm" })";
  text.replace(text.find(from), from.size(), R"("round": { "diameter": "8 mm..60 mm",
    "sizes": { "step": "1e-6 mm" } })");
  folder.write("job.json", text);
  const Ran ran = run({"check", "job.json"}, folder.path());
  CHECK(ran.code == 2);
  CHECK_THAT(ran.err, Contains("job.json:8:20 /parts/0/member/shapes/0/sizes/step: The step"));
}
