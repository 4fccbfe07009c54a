// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/job/job.hpp>

#include "full_job.hpp"

#include "support/catch.hpp"

#include <unistd.h>

#include <atomic>
#include <filesystem>
#include <fstream>
#include <string>
#include <vector>

using namespace bismar;
using job_test::small_job;
using job_test::with;

namespace {

/// A folder for tables, gone with the object.
class Folder {
 public:
  Folder() {
    static std::atomic<int> counter = 0;
    path_ = std::filesystem::temp_directory_path() /
            ("bismar-job-" + std::to_string(::getpid()) + "-" + std::to_string(counter++));
    std::filesystem::create_directories(path_);
  }
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;
  ~Folder() {
    std::error_code ignored;
    std::filesystem::remove_all(path_, ignored);
  }
  void write(const std::string& name, const std::string& text) const {
    std::ofstream file(path_ / name, std::ios::binary);
    file << text;
    REQUIRE(file.good());
  }
  [[nodiscard]] std::string path() const { return path_.string(); }

 private:
  std::filesystem::path path_;
};

/// The small job with this under "catalogue".
std::string job_with(const std::string& catalogue) {
  return with(small_job, "\"bismar\": 1,", "\"bismar\": 1, \"catalogue\": " + catalogue + ",");
}

std::vector<Fault> faults_of(const std::string& text, const std::string& folder) {
  try {
    static_cast<void>(load_job_text(text, "job.json", folder));
  } catch (const Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

const std::string own_materials =
    "id,name,class,forms,processes,density [kg/m3],Young's modulus [GPa],yield strength [MPa],"
    "elongation [%],price [EUR/kg],sound speed [m/s]\n"
    "own-steel,Own steel,steel,bar,machining;sawing,7850,210,300,20,1.1,5100\n";

}  // namespace

TEST_CASE("own materials join the starter's, with their own columns") {
  const Folder folder;
  folder.write("own.csv", own_materials);
  const Job starter = load_job_text(small_job, "j");
  const Job job =
      load_job_text(job_with(R"({ "materials": ["starter", "own.csv"] })"), "j", folder.path());
  CHECK(job.catalogue.materials.size() == starter.catalogue.materials.size() + 1);
  const auto own = job.catalogue.materials.find("own-steel");
  REQUIRE(own.has_value());
  const std::size_t row = job.catalogue.materials.steps(*own)[0].row;
  CHECK(job.catalogue.materials.value(Property::density, row)->low == 7850.0);
  CHECK(job.catalogue.materials.value(Property::price, row)->low == Approx(1.1).epsilon(1e-15));
  CHECK(job.catalogue.materials.extra("sound speed [m/s]", row).has_value());
  // Nothing of the starter's is lost on the way.
  const auto plain = starter.catalogue.materials.find("s235jr-as-rolled");
  const auto joined = job.catalogue.materials.find("s235jr-as-rolled");
  REQUIRE(plain.has_value());
  REQUIRE(joined.has_value());
  const auto& before = starter.catalogue.materials;
  const auto& after = job.catalogue.materials;
  REQUIRE(before.steps(*plain).size() == after.steps(*joined).size());
  CHECK(before.info(*plain).processes == after.info(*joined).processes);
  CHECK(before.info(*plain).corrosion == after.info(*joined).corrosion);
  for (std::size_t i = 0; i < before.steps(*plain).size(); ++i) {
    CHECK(before.steps(*plain)[i].above == after.steps(*joined)[i].above);
    CHECK(before.steps(*plain)[i].up_to == after.steps(*joined)[i].up_to);
    for (const PropertyInfo& property : properties()) {
      INFO(property.name);
      CHECK(before.value(property.property, before.steps(*plain)[i].row) ==
            after.value(property.property, after.steps(*joined)[i].row));
      CHECK(before.provenance(property.property, before.steps(*plain)[i].row).evidence ==
            after.provenance(property.property, after.steps(*joined)[i].row).evidence);
    }
  }
}

TEST_CASE("a limit may name a column of an own table, in its unit") {
  const Folder folder;
  folder.write("own.csv", own_materials);
  const std::string limited = with(job_with(R"({ "materials": ["own.csv"] })"),
                                   "\"name\": \"bar\",",
                                   R"("name": "bar", "limits": { "properties": [)"
                                   R"({ "property": "sound speed", "at_least": "4 km/s" }] },)");
  const Job job = load_job_text(limited, "j", folder.path());
  REQUIRE(job.parts.at(0).limits.properties.size() == 1);
  CHECK(job.parts[0].limits.properties[0].at_least == 4000.0);
  const std::vector<Fault> faults =
      faults_of(with(limited, "\"4 km/s\"", "\"4 MPa\""), folder.path());
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].code == Code::unit_wrong);
}

TEST_CASE("a table with semicolons and decimal commas is read by option") {
  const Folder folder;
  folder.write("own.csv",
               "id;name;class;forms;processes;density [kg/m3];Young's modulus [GPa];"
               "yield strength [MPa];elongation [%];price [EUR/kg]\n"
               "own-steel;Own steel;steel;bar;machining;7850;210;300;20;1,25\n");
  const Job job = load_job_text(
      job_with(R"({ "materials": [{ "file": "own.csv", "delimiter": ";", "decimal": "," }] })"),
      "j",
      folder.path());
  CHECK(job.catalogue.materials.size() == 1);
  CHECK(job.catalogue.materials.value(Property::price, 0)->low == 1.25);
  REQUIRE(job.sources.size() == 6);
  CHECK(job.sources[0].kind == "materials");
  CHECK(job.sources[0].file == "own.csv");
}

TEST_CASE("a material that is in two tables needs a word about which counts") {
  const Folder folder;
  folder.write("own.csv", own_materials);
  folder.write("again.csv",
               "id,name,class,forms,processes,density [kg/m3],Young's modulus [GPa],"
               "yield strength [MPa],elongation [%],price [EUR/kg]\n"
               "own-steel,Own steel,steel,bar,machining,7850,210,300,20,9\n");
  const std::vector<Fault> faults =
      faults_of(job_with(R"({ "materials": ["own.csv", "again.csv"] })"), folder.path());
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].code == Code::duplicate);
  CHECK(
      faults[0].message ==
      "the material \"own-steel\" of again.csv is in an earlier table too. Give it another id, or "
      "write {\"file\": \"again.csv\", \"replaces\": true} to put it in the place of the earlier "
      "one.");
  const Job job = load_job_text(
      job_with(R"({ "materials": ["own.csv", { "file": "again.csv", "replaces": true }] })"),
      "j",
      folder.path());
  CHECK(job.catalogue.materials.size() == 1);
  CHECK(job.catalogue.materials.value(Property::price, 0)->low == 9.0);
}

TEST_CASE("faults of an own table carry its file, row and column, beside faults of the job") {
  const Folder folder;
  folder.write("own.csv",
               "id,name,class,forms,processes,density [kg/m3],price [EUR/kg]\n"
               "own-steel,Own steel,steel,bar,machining,heavy,1.1\n");
  const std::vector<Fault> faults =
      faults_of(with(job_with(R"({ "materials": ["starter", "own.csv"] })"), "\"300 mm\"", "300"),
                folder.path());
  REQUIRE(faults.size() == 2);
  CHECK(faults[0].code == Code::unit_missing);
  CHECK(faults[1].where == folder.path() + "/own.csv:2:6");
}

TEST_CASE("the digest of a table changes with a byte of it") {
  const Folder folder;
  folder.write("own.csv", own_materials);
  const std::string text = job_with(R"({ "materials": ["own.csv"] })");
  const std::string before = load_job_text(text, "j", folder.path()).sources.at(0).digest;
  CHECK(load_job_text(text, "j", folder.path()).sources.at(0).digest == before);
  folder.write("own.csv", with(own_materials, ",5100", ",5101"));
  CHECK(load_job_text(text, "j", folder.path()).sources.at(0).digest != before);
}
