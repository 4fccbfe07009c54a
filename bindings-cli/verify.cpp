// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"

#include <bismar/job/result_json.hpp>

#include <fmt/core.h>

#include <memory>
#include <string>

namespace bismar::cli {

namespace {

int run(const std::string& path, const std::string& tables) {
  const StoredResult stored = read_result(path, tables);
  const Verification found = verify(stored);
  std::string text;
  for (const Difference& difference : found.differences) {
    text += difference.text() + '\n';
  }
  text += fmt::format(
      "{} {} evaluated anew, {} numbers compared, largest difference {:.1e}: {}.\n",
      found.designs,
      found.designs == 1 ? "design" : "designs",
      found.values,
      found.largest_difference,
      found.differences.empty()
          ? std::string("nothing differs")
          : fmt::format("{} {}",
                        found.differences.size(),
                        found.differences.size() == 1 ? "thing differs" : "things differ"));
  print(text);
  return found.differences.empty() ? done : nothing_feasible;
}

}  // namespace

void add_verify(CLI::App& app, int& code) {
  CLI::App* command =
      app.add_subcommand("verify", "Evaluates every design of a stored result anew");
  const auto path = std::make_shared<std::string>();
  const auto tables = std::make_shared<std::string>();
  command->add_option("RESULT", *path, "Result file of `front --format json`")->required();
  command->add_option(
      "--tables", *tables, "Folder that the job's own tables lie in; default the result's");
  command->callback([path, tables, &code] { code = run(*path, *tables); });
}

}  // namespace bismar::cli
