// SPDX-License-Identifier: MIT
// A table in a file of its own, gone with the object, and the faults that reading it gives.
#pragma once

#include <bismar/error.hpp>

#include <atomic>
#include <filesystem>
#include <fstream>
#include <string>
#include <string_view>
#include <vector>

#include <unistd.h>

#include "support/catch.hpp"

namespace test {

class TemporaryTable {
 public:
  TemporaryTable(std::string_view name, std::string_view text) {
    static std::atomic<int> counter = 0;
    folder_ = std::filesystem::temp_directory_path() /
              ("bismar-test-" + std::to_string(::getpid()) + "-" + std::to_string(counter++));
    std::filesystem::create_directories(folder_);
    path_ = folder_ / name;
    std::ofstream file(path_, std::ios::binary);
    file << text;
    REQUIRE(file.good());
  }
  TemporaryTable(const TemporaryTable&) = delete;
  TemporaryTable& operator=(const TemporaryTable&) = delete;
  ~TemporaryTable() {
    std::error_code ignored;
    std::filesystem::remove_all(folder_, ignored);
  }
  [[nodiscard]] std::string path() const { return path_.string(); }
  /// "file:line:column" as faults give it.
  [[nodiscard]] std::string at(int line, int column) const {
    return path() + ":" + std::to_string(line) + ":" + std::to_string(column);
  }

 private:
  std::filesystem::path folder_;
  std::filesystem::path path_;
};

/// The faults that `act` throws; none is a failure of the test.
template <class Act>
std::vector<bismar::Fault> faults_of(Act&& act) {
  try {
    static_cast<void>(act());
  } catch (const bismar::Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  FAIL("no fault was thrown");
  return {};
}

/// Whether a fault of this code stands at this place and its message holds this text.
inline bool has_fault(const std::vector<bismar::Fault>& faults,
                      bismar::Code code,
                      const std::string& where,
                      std::string_view text) {
  for (const bismar::Fault& fault : faults) {
    if (fault.code == code && fault.where == where &&
        fault.message.find(text) != std::string::npos) {
      return true;
    }
  }
  for (const bismar::Fault& fault : faults) UNSCOPED_INFO(fault.text());
  return false;
}

}  // namespace test
