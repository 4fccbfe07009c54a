// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"
#include "pictures.hpp"
#include "terminal.hpp"

#include <bismar/error.hpp>
#include <bismar/job/result_json.hpp>
#include <bismar/quantity/parse.hpp>
#include <bismar/report/text_report.hpp>

#include <fmt/core.h>

#include <cstdio>
#include <memory>
#include <optional>
#include <string>

namespace bismar::cli {

namespace {

struct Options {
  std::string job;
  std::string part;
  std::string per = "material";
  std::string from;
  std::string to;
  std::string format = "text";
  std::string plot;
  std::string output;
};

Per per_of(const std::string& word) {
  return word == "design"  ? Per::design
         : word == "shape" ? Per::shape
         : word == "route" ? Per::route
                           : Per::material;
}

std::optional<double> constant(const std::string& option, const std::string& text, const Job& job) {
  if (text.empty()) {
    return std::nullopt;
  }
  FaultList faults;
  try {
    const double value = parse_quantity(text, QuantityKind::price_per_mass, &job.rates);
    if (value > 0.0) {
      return value;
    }
    faults.add(Code::out_of_range, option, "\"" + text + "\" must be above zero.");
  } catch (const Error& error) {
    faults.append(error, option);
  }
  faults.throw_if_any();
  return std::nullopt;
}

/// Keeps the stretches that reach into [from, to].
void cut(ExchangeRuler& ruler, const std::optional<double>& from, const std::optional<double>& to) {
  std::erase_if(ruler.stretches, [&](const NamedStretch& stretch) {
    return (from.has_value() && stretch.to.has_value() && *stretch.to <= *from) ||
           (to.has_value() && stretch.from >= *to);
  });
}

int run(const Options& options) {
  require_word("--per", options.per, {"material", "design", "shape", "route"});
  require_word("--format", options.format, {"text", "csv"});
  Job job = load_job(options.job);
  validate(job);
  const std::size_t index = one_part(job, options.part, "sweep");
  const Part& part = job.parts[index];
  const std::optional<double> from = constant("--from", options.from, job);
  const std::optional<double> to = constant("--to", options.to, job);
  if (from.has_value() && to.has_value() && !(*from < *to)) {
    FaultList faults;
    faults.add(Code::conflict, "--from", "--from must lie below --to.");
    faults.throw_if_any();
  }
  if (!options.plot.empty()) {
    require_picture(options.plot);
  }
  if (!options.output.empty()) {
    require_writable(options.output);
  }

  Result result;
  {
    ProgressLine progress;
    result = front(part, job.catalogue, job.settings, progress.run_options());
  }
  if (result.front_count == 0) {
    fmt::print(stderr, "{}: no design holds all limits.\n", result.part);
    deliver(options.output,
            options.format == "csv"
                ? ruler_csv(result, ExchangeRuler{})
                : front_text(result, nullptr, text_options(!options.output.empty())));
    return nothing_feasible;
  }
  ExchangeRuler ruler =
      exchange_ruler(result, part, job.catalogue, per_of(options.per), job.settings);
  if (!options.plot.empty()) {
    PictureOptions picture = picture_options(job, part);
    picture.alpha_from = from.has_value() ? from : picture.alpha_from;
    picture.alpha_to = to.has_value() ? to : picture.alpha_to;
    write_picture(options.plot, ruler_svg(result, ruler, picture));
  }
  cut(ruler, from, to);
  deliver(options.output,
          options.format == "csv"
              ? ruler_csv(result, ruler)
              : ruler_text(result, ruler, text_options(!options.output.empty())));
  return done;
}

}  // namespace

void add_sweep(CLI::App& app, int& code) {
  CLI::App* command = app.add_subcommand(
      "sweep", "Which choice wins for which worth of a kilogram: the exchange ruler");
  const auto options = std::make_shared<Options>();
  command->add_option("JOB", options->job, "Job file (JSON)")->required();
  command->add_option("--part", options->part, "The part with this name");
  command->add_option("--per", options->per, "material (default), design, shape or route");
  command->add_option("--from", options->from, "Only from this worth upwards: \"0.5 EUR/kg\"");
  command->add_option("--to", options->to, "Only up to this worth: \"500 EUR/kg\"");
  command->add_option("--format", options->format, "text (default) or csv");
  command->add_option("--plot", options->plot, "Also a picture: FILE.svg, FILE.png or FILE.pdf");
  command->add_option("--output", options->output, "Write to this file, not to the terminal");
  command->callback([options, &code] { code = run(*options); });
}

}  // namespace bismar::cli
