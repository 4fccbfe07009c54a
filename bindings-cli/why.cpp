// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"
#include "terminal.hpp"

#include <bismar/report/text_report.hpp>
#include <bismar/sizing/front.hpp>

#include <fmt/core.h>

#include <memory>
#include <string>

namespace bismar::cli {

namespace {

struct Options {
  std::string job;
  std::string material;
  std::string part;
  std::string output;
};

int run(const Options& options) {
  const Job job = load_job(options.job);
  validate(job);
  if (!options.output.empty()) {
    require_writable(options.output);
  }
  std::string text;
  const std::vector<std::size_t> parts = chosen_parts(job, options.part);
  for (const std::size_t index : parts) {
    const Part& part = job.parts[index];
    if (parts.size() > 1) {
      text += fmt::format("{}{}\n", text.empty() ? "" : "\n", part.name);
    }
    text += why_text(why(options.material, part, job.catalogue, job.settings),
                     job.currency,
                     text_options(!options.output.empty()));
  }
  deliver(options.output, text);
  return done;
}

}  // namespace

void add_why(CLI::App& app, int& code) {
  CLI::App* command = app.add_subcommand("why", "Where one material stands in a job, and why");
  const auto options = std::make_shared<Options>();
  command->add_option("JOB", options->job, "Job file (JSON)")->required();
  command->add_option("MATERIAL", options->material, "Id of a material")->required();
  command->add_option("--part", options->part, "Only for the part with this name");
  command->add_option("--output", options->output, "Write to this file, not to the terminal");
  command->callback([options, &code] { code = run(*options); });
}

}  // namespace bismar::cli
