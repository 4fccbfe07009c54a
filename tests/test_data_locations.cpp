// SPDX-License-Identifier: MIT
#include "data_locations.hpp"

#include "support/catch.hpp"

#include <algorithm>
#include <filesystem>
#include <set>
#include <string>
#include <vector>

namespace fs = std::filesystem;

TEST_CASE("From the build tree the first data folder that exists is the one of the sources") {
  const std::vector<std::string> locations = bismar::detail::data_locations();
  const auto found = std::find_if(locations.begin(), locations.end(), [](const std::string& path) {
    return fs::is_directory(path);
  });
  REQUIRE(found != locations.end());
  CHECK(fs::equivalent(*found, BISMAR_TEST_DATA_DIR));
}

TEST_CASE("Every data folder is an absolute path and is named once") {
  const std::vector<std::string> locations = bismar::detail::data_locations();
  CHECK(std::set<std::string>(locations.begin(), locations.end()).size() == locations.size());
  for (const std::string& path : locations) {
    CHECK(fs::path(path).is_absolute());
  }
}

TEST_CASE("The data folders do not depend on the working directory") {
  const std::vector<std::string> before = bismar::detail::data_locations();
  const fs::path here = fs::current_path();
  fs::current_path(fs::path("/"));
  const std::vector<std::string> after = bismar::detail::data_locations();
  fs::current_path(here);
  CHECK(before == after);
}
