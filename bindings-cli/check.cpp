// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"
#include "terminal.hpp"

#include <bismar/report/text_report.hpp>

#include <fmt/core.h>

#include <memory>
#include <string>

namespace bismar::cli {

namespace {

int run(const std::string& path) {
  const Job job = load_job(path);
  validate(job);
  std::string text;
  for (const Part& part : job.parts) {
    text += check_text(part, job.catalogue, text_options(false));
    text += '\n';
  }
  for (const std::string& warning : job.catalogue.warnings) {
    text += fmt::format("Note: {}\n", warning);
  }
  text += fmt::format("{} is a valid job: {} {}.\n",
                      path,
                      job.parts.size(),
                      job.parts.size() == 1 ? "part" : "parts");
  print(text);
  return done;
}

}  // namespace

void add_check(CLI::App& app, int& code) {
  CLI::App* command = app.add_subcommand("check", "Says whether a job is valid, and what it says");
  const auto path = std::make_shared<std::string>();
  command->add_option("JOB", *path, "Job file (JSON)")->required();
  command->callback([path, &code] { code = run(*path); });
}

}  // namespace bismar::cli
