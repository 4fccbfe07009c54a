// SPDX-License-Identifier: MIT
#include "run_program.hpp"

#include <bismar/job/job.hpp>
#include <bismar/report/text_report.hpp>
#include <bismar/version.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <filesystem>
#include <string>

using Catch::Matchers::Contains;
using cli_test::Folder;
using cli_test::hopeless_job;
using cli_test::quick_job;
using cli_test::Ran;
using cli_test::run;

TEST_CASE("--help and --version answer on standard output") {
  const Ran help = run({"--help"});
  CHECK(help.code == 0);
  CHECK(help.err.empty());
  for (const char* word :
       {"check", "front", "sweep", "why", "verify", "new", "schema", "Exit codes: 0 done"}) {
    CHECK_THAT(help.out, Contains(word));
  }
  const Ran version = run({"--version"});
  CHECK(version.code == 0);
  CHECK(version.out == "bismar " + std::string(bismar::version()) + "\n");
  CHECK(run({"front", "--help"}).code == 0);
}

TEST_CASE("schema prints the schema of the library") {
  const Ran ran = run({"schema"});
  CHECK(ran.code == 0);
  CHECK(ran.err.empty());
  CHECK(ran.out == bismar::job_schema());
}

TEST_CASE("new writes a starter job that check accepts, and overwrites nothing") {
  const Folder folder;
  CHECK(run({"new", "member"}).out == bismar::starter_job());
  const Ran made = run({"new", "member", "job.json"}, folder.path());
  CHECK(made.code == 0);
  CHECK(made.out.empty());
  CHECK(folder.read("job.json") == bismar::starter_job());
  const Ran checked = run({"check", "job.json"}, folder.path());
  CHECK(checked.code == 0);
  CHECK_THAT(checked.out, Contains("job.json is a valid job: 1 part."));
  const Ran again = run({"new", "member", "job.json"}, folder.path());
  CHECK(again.code == 2);
  CHECK(again.err ==
        "E5 job.json: the file exists already and is left as it is. Name another one.\n");
}

TEST_CASE("front prints funnel, front, ruler and caution") {
  const Folder folder;
  folder.write("job.json", quick_job);
  const Ran ran = run({"front", "job.json"}, folder.path());
  CHECK(ran.code == 0);
  CHECK(ran.err.empty());
  CHECK_THAT(ran.out, Contains("lever"));
  CHECK_THAT(ran.out, Contains("Exchange ruler"));
  CHECK_THAT(ran.out, Contains("Preliminary") || Contains("preliminary"));
  CHECK(ran.out.find('\033') == std::string::npos);  // no colour into a file
  CHECK(run({"front", "job.json", "--part", "lever"}, folder.path()).out == ran.out);
  const Ran explained = run({"front", "job.json", "--explain"}, folder.path());
  CHECK(explained.code == 0);
  CHECK(explained.out.size() > ran.out.size());
}

TEST_CASE("front writes text, CSV and JSON to files, whole and nothing else") {
  const Folder folder;
  folder.write("job.json", quick_job);
  for (const char* format : {"text", "csv", "json"}) {
    INFO(format);
    const Ran printed = run({"front", "job.json", "--format", format}, folder.path());
    const Ran written =
        run({"front", "job.json", "--format", format, "--output", "out"}, folder.path());
    CHECK(printed.code == 0);
    CHECK(written.code == 0);
    CHECK(written.out.empty());
    if (std::string(format) != "json") {  // whose telemetry holds the time taken
      CHECK(folder.read("out") == printed.out);
    }
    CHECK(folder.names() == std::vector<std::string>{"job.json", "out"});
  }
}

TEST_CASE("verify accepts a stored result and names what was changed in it") {
  const Folder folder;
  folder.write("job.json", quick_job);
  REQUIRE(
      run({"front", "job.json", "--format", "json", "--output", "r.json"}, folder.path()).code ==
      0);
  const Ran same = run({"verify", "r.json"}, folder.path());
  CHECK(same.code == 0);
  CHECK_THAT(same.out, Contains(": nothing differs."));
  std::string text = folder.read("r.json");
  const std::size_t at = text.find("\"mass\": ", text.find("\"designs\""));
  REQUIRE(at != std::string::npos);
  text.insert(at + 8, "1");
  folder.write("changed.json", text);
  const Ran changed = run({"verify", "changed.json"}, folder.path());
  CHECK(changed.code == 1);
  CHECK_THAT(changed.out, Contains("digest: stored fnv1a64:"));
  CHECK_THAT(changed.out, Contains("/ mass: stored 1"));
}

TEST_CASE("sweep prints the ruler per choice, from and to") {
  const Folder folder;
  folder.write("job.json", quick_job);
  const Ran whole = run({"sweep", "job.json"}, folder.path());
  CHECK(whole.code == 0);
  CHECK_THAT(whole.out, Contains("exchange ruler"));
  for (const char* per : {"material", "design", "shape", "route"}) {
    INFO(per);
    CHECK(run({"sweep", "job.json", "--per", per}, folder.path()).code == 0);
  }
  const Ran csv = run({"sweep", "job.json", "--format", "csv"}, folder.path());
  const Ran part =
      run({"sweep", "job.json", "--format", "csv", "--from", "10 EUR/kg", "--to", "11 EUR/kg"},
          folder.path());
  CHECK(csv.code == 0);
  CHECK(part.code == 0);
  CHECK(part.out.size() <= csv.out.size());
  CHECK(std::count(part.out.begin(), part.out.end(), '\n') >= 2);
}

TEST_CASE("why answers for a material") {
  const Folder folder;
  folder.write("job.json", quick_job);
  const Ran ran = run({"why", "job.json", "s235jr-as-rolled"}, folder.path());
  CHECK(ran.code == 0);
  CHECK_THAT(ran.out, Contains("S235JR"));
  const Ran unknown = run({"why", "job.json", "s235jr-as-roled"}, folder.path());
  CHECK(unknown.code == 2);
  CHECK_THAT(unknown.err, Contains("\"s235jr-as-rolled\""));
}

TEST_CASE("why offers the ids that contain what was typed, and says how a material is named") {
  const Folder folder;
  folder.write("job.json", quick_job);
  const Ran part_of_id = run({"why", "job.json", "s235jr"}, folder.path());
  CHECK(part_of_id.code == 2);
  CHECK_THAT(part_of_id.err, Contains("There is no material \"s235jr\" in the catalogue."));
  CHECK_THAT(part_of_id.err, Contains("Did you mean \"s235jr-as-rolled\""));
  CHECK_THAT(part_of_id.err, Contains("A material is named by its id"));
  // Names count as well, in any letter case; many are counted.
  CHECK_THAT(run({"why", "job.json", "titanium grade 1"}, folder.path()).err,
             Contains("\"titanium-grade-1-annealed\""));
  CHECK_THAT(run({"why", "job.json", "S3"}, folder.path()).err, Contains(" more?"));
}

TEST_CASE("why names the load case of each check, and equal ones once") {
  const Folder folder;
  std::string text = quick_job;
  const std::string list = "\"load_cases\": [";
  const std::size_t at = text.find(list);
  REQUIRE(at != std::string::npos);
  folder.write("job.json", text);
  // One load case needs no name.
  CHECK_THAT(run({"why", "job.json", "s235jr-as-rolled"}, folder.path()).out,
             Contains("- Yield: "));
  const std::string other =
      R"({ "name": "pushed", "support": "cantilever", "loads": [{ "force": "1 N", "at": "end" }] },)";
  text.insert(at + list.size(), other);
  folder.write("two.json", text);
  const Ran two = run({"why", "two.json", "s235jr-as-rolled"}, folder.path());
  INFO(two.out << two.err);
  CHECK(two.code == 0);
  CHECK_THAT(two.out, Contains("- Yield, in load case \"pushed\": "));
  CHECK(two.out.find("- Yield: ") == std::string::npos);
  // The same load twice.
  text = quick_job;
  const std::size_t open = text.find('{', at);
  std::size_t close = open;
  int depth = 0;
  do {
    depth += text[close] == '{' ? 1 : text[close] == '}' ? -1 : 0;
    ++close;
  } while (depth > 0);
  std::string twin = text.substr(open, close - open);
  twin.insert(1, "\"name\": \"twin\", ");
  text.insert(open, twin + ", ");
  folder.write("twins.json", text);
  const Ran twins = run({"why", "twins.json", "s235jr-as-rolled"}, folder.path());
  INFO(twins.out << twins.err);
  CHECK_THAT(twins.out, Contains("- Yield, in every load case: "));
  CHECK(twins.out.find("in load case") == std::string::npos);
}

TEST_CASE("where nothing is feasible the exit code is 1 and the reason is told") {
  const Folder folder;
  folder.write("job.json", hopeless_job);
  const Ran ran = run({"front", "job.json"}, folder.path());
  CHECK(ran.code == 1);
  CHECK(ran.err == "lever: no design holds all limits.\n");
  CHECK_THAT(ran.out, Contains("mass cap"));
  CHECK(run({"sweep", "job.json"}, folder.path()).code == 1);
  const Ran json =
      run({"front", "job.json", "--format", "json", "--output", "r.json"}, folder.path());
  CHECK(json.code == 1);
  CHECK(run({"verify", "r.json"}, folder.path()).code == 0);
}

TEST_CASE("pictures are written as SVG, PNG and PDF") {
  const Folder folder;
  folder.write("job.json", quick_job);
  const Ran svg = run({"front", "job.json", "--plot", "p.svg"}, folder.path());
  CHECK(svg.code == 0);
  CHECK_THAT(folder.read("p.svg"), Contains("<svg") && Contains("</svg>"));
  CHECK(run({"sweep", "job.json", "--plot", "s.svg"}, folder.path()).code == 0);
  CHECK_THAT(folder.read("s.svg"), Contains("</svg>"));

  // Without a converter the other two say what is missing, before any work is done.
  const Ran bare = run({"front", "job.json", "--plot", "p.png"}, folder.path(), {"PATH=/nowhere"});
  CHECK(bare.code == 2);
  CHECK(bare.out.empty());
  CHECK(bare.err ==
        "E4 p.png: png pictures need rsvg-convert, which is not installed (Debian: apt install "
        "librsvg2-bin). Install it or write .svg.\n");

  if (std::filesystem::exists("/usr/bin/rsvg-convert")) {
    const std::vector<std::string> path = {"PATH=/usr/bin"};
    CHECK(run({"front", "job.json", "--plot", "p.png"}, folder.path(), path).code == 0);
    CHECK(folder.read("p.png").rfind("\x89PNG", 0) == 0);
    CHECK(run({"front", "job.json", "--plot", "p.pdf"}, folder.path(), path).code == 0);
    CHECK(folder.read("p.pdf").rfind("%PDF", 0) == 0);
    CHECK(folder.names() ==
          std::vector<std::string>{"job.json", "p.pdf", "p.png", "p.svg", "s.svg"});
  }
}

TEST_CASE("results do not depend on the locale of the shell") {
  const Folder folder;
  folder.write("job.json", quick_job);
  const Ran plain = run({"front", "job.json", "--format", "csv"}, folder.path(), {"LC_ALL=C"});
  const Ran comma =
      run({"front", "job.json", "--format", "csv"}, folder.path(), {"LC_ALL=de_DE.UTF-8"});
  CHECK(plain.code == 0);
  CHECK(comma.out == plain.out);
}
