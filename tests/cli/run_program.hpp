// SPDX-License-Identifier: MIT
// Runs the built program as a child process, as a user's shell does.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

namespace cli_test {

struct Ran {
  int code = -1;  ///< Exit code; -1 when it ended by a signal.
  std::string out;
  std::string err;
};

/// @param folder       Working folder.
/// @param environment  "NAME=value" entries on top of the test's own.
[[nodiscard]] Ran run(const std::vector<std::string>& arguments,
                      const std::string& folder = ".",
                      const std::vector<std::string>& environment = {});

/// A folder of the test's own, gone with the object.
class Folder {
 public:
  Folder();
  ~Folder();
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;
  [[nodiscard]] std::string path() const { return path_.string(); }
  [[nodiscard]] std::string file(const std::string& name) const { return (path_ / name).string(); }
  void write(const std::string& name, const std::string& text) const;
  [[nodiscard]] std::string read(const std::string& name) const;
  /// Names of all files in it, sorted.
  [[nodiscard]] std::vector<std::string> names() const;

 private:
  std::filesystem::path path_;
};

/// A job that is solved quickly: few materials, one shape.
extern const std::string quick_job;
/// The same with a cap on the mass that nothing holds.
extern const std::string hopeless_job;

}  // namespace cli_test
