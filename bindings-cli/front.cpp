// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"
#include "pictures.hpp"
#include "terminal.hpp"

#include <bismar/job/result_json.hpp>
#include <bismar/report/text_report.hpp>

#include <fmt/core.h>

#include <cstdio>
#include <memory>
#include <string>
#include <utility>

namespace bismar::cli {

namespace {

struct Options {
  std::string job;
  std::string part;
  std::string format = "text";
  std::string plot;
  std::string output;
  bool explain = false;
};

std::string text_of(const Job& job,
                    const std::vector<PartResult>& results,
                    const Options& options) {
  TextOptions look = text_options(!options.output.empty());
  look.fold = job.settings.fold;
  look.near = job.settings.near;
  look.reasons = options.explain;
  look.all = options.explain;
  std::string text;
  for (const PartResult& part : results) {
    text += text.empty() ? "" : "\n";
    text += front_text(part.result, &*part.ruler, look);
  }
  return text;
}

int run(const Options& options) {
  require_word("--format", options.format, {"text", "json", "csv"});
  const Job job = load_job(options.job);
  validate(job);
  const std::vector<std::size_t> parts = chosen_parts(job, options.part);
  if (options.format == "csv") {
    static_cast<void>(one_part(job, options.part, "--format csv"));
  }
  if (!options.plot.empty()) {
    static_cast<void>(one_part(job, options.part, "--plot"));
    require_picture(options.plot);
  }
  if (!options.output.empty()) {
    require_writable(options.output);
  }

  // Every reason can only be told of candidates that were examined.
  Settings settings = job.settings;
  if (options.explain && options.format == "text") {
    settings.explain = Explain::full;
  }
  std::vector<PartResult> results;
  {
    ProgressLine progress;
    for (const std::size_t index : parts) {
      const Part& part = job.parts[index];
      PartResult found;
      found.result = front(part, job.catalogue, settings, progress.run_options());
      found.ruler = exchange_ruler(found.result, part, job.catalogue, Per::material, settings);
      results.push_back(std::move(found));
    }
  }

  if (options.format == "json") {
    deliver(options.output, result_json(job, results));
  } else if (options.format == "csv") {
    deliver(options.output, front_csv(results.front().result));
  } else {
    deliver(options.output, text_of(job, results, options));
  }
  if (!options.plot.empty()) {
    const PartResult& only = results.front();
    write_picture(options.plot,
                  front_picture_svg(
                      only.result, *only.ruler, picture_options(job, job.parts[parts.front()])));
  }

  int code = done;
  for (const PartResult& part : results) {
    if (part.result.front_count == 0) {
      fmt::print(stderr, "{}: no design holds all limits.\n", part.result.part);
      code = nothing_feasible;
    }
  }
  return code;
}

}  // namespace

void add_front(CLI::App& app, int& code) {
  CLI::App* command = app.add_subcommand("front", "Sizes the parts of a job: mass-cost fronts");
  const auto options = std::make_shared<Options>();
  command->add_option("JOB", options->job, "Job file (JSON)")->required();
  command->add_option("--part", options->part, "Only the part with this name");
  command->add_option("--format", options->format, "text (default), json or csv");
  command->add_option("--plot", options->plot, "Also a picture: FILE.svg, FILE.png or FILE.pdf");
  command->add_option("--output", options->output, "Write to this file, not to the terminal");
  command->add_flag("--explain",
                    options->explain,
                    "Every design on its own line, and every reason for an exclusion");
  command->callback([options, &code] { code = run(*options); });
}

}  // namespace bismar::cli
