// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"

#include <bismar/error.hpp>

#include <fmt/core.h>

#include <filesystem>
#include <memory>
#include <string>
#include <system_error>

namespace bismar::cli {

namespace {

int run(const std::string& kind, const std::string& path) {
  require_word("new", kind, {"member"});
  std::error_code failure;
  if (!path.empty() && std::filesystem::exists(path, failure)) {
    FaultList faults;
    faults.add(
        Code::conflict, path, "the file exists already and is left as it is. Name another one.");
    faults.throw_if_any();
  }
  deliver(path, starter_job());
  return done;
}

}  // namespace

void add_new(CLI::App& app, int& code) {
  CLI::App* command = app.add_subcommand("new", "Writes a starter job with comments");
  const auto kind = std::make_shared<std::string>();
  const auto path = std::make_shared<std::string>();
  command->add_option("KIND", *kind, "member")->required();
  command->add_option("FILE", *path, "File to write; default the terminal");
  command->callback([kind, path, &code] { code = run(*kind, *path); });
}

}  // namespace bismar::cli
