// SPDX-License-Identifier: MIT
#include "commands.hpp"

#include <bismar/error.hpp>
#include <bismar/version.hpp>

#include <fmt/core.h>

#include <algorithm>
#include <cstdio>
#include <exception>
#include <new>
#include <string_view>

namespace bismar::cli {

namespace {

std::vector<std::string> command_names(const CLI::App& app) {
  std::vector<std::string> names;
  for (const CLI::App* command : app.get_subcommands(nullptr)) {
    names.push_back(command->get_name());
  }
  return names;
}

std::vector<std::string> option_names(const CLI::App& app) {
  std::vector<std::string> names;
  for (const CLI::Option* option : app.get_options()) {
    for (const std::string& name : option->get_lnames()) {
      names.push_back("--" + name);
    }
  }
  return names;
}

std::string suggestion(const std::string& typed, const std::vector<std::string>& words) {
  const std::vector<std::string_view> views(words.begin(), words.end());
  return did_you_mean(typed, views);
}

std::string joined(const std::vector<std::string>& words) {
  std::string all;
  for (const std::string& word : words) {
    all += (all.empty() ? "" : ", ") + word;
  }
  return all;
}

/// The parser says only that a command is required; the user wants to know which word was wrong.
bool names_a_command(const CLI::App& app, int argc, char** argv) {
  if (argc < 2) {
    fmt::print(stderr,
               "bismar: which command? One of {}. `bismar --help` explains them.\n",
               joined(command_names(app)));
    return false;
  }
  const std::string first = argv[1];
  const std::vector<std::string> commands = command_names(app);
  if (first.starts_with('-') ||
      std::find(commands.begin(), commands.end(), first) != commands.end()) {
    return true;
  }
  fmt::print(stderr,
             "bismar: there is no command \"{}\".{} Commands: {}.\n",
             first,
             suggestion(first, commands),
             joined(commands));
  return false;
}

int explain(const CLI::App& app, const CLI::ParseError& error) {
  const CLI::App* command = app.get_subcommands().empty() ? &app : app.get_subcommands().front();
  const std::string name =
      command == &app ? std::string("bismar") : "bismar " + command->get_name();
  std::vector<std::string> extras = command->remaining();
  if (error.get_exit_code() == static_cast<int>(CLI::ExitCodes::ExtrasError) && !extras.empty()) {
    // Behind a misspelt option its value is left over too: one message is enough.
    const auto option = std::find_if(extras.begin(), extras.end(), [](const std::string& extra) {
      return extra.starts_with('-');
    });
    if (option == extras.end()) {
      fmt::print(stderr, "{}: \"{}\" is one argument too many.\n", name, extras.front());
    } else {
      const std::string typed = option->substr(0, option->find('='));
      fmt::print(stderr,
                 "{}: there is no option \"{}\".{} Options: {}.\n",
                 name,
                 typed,
                 suggestion(typed, option_names(*command)),
                 joined(option_names(*command)));
    }
  } else {
    fmt::print(stderr, "{}: {}. `{} --help` shows the use.\n", name, error.what(), name);
  }
  return bad_input;
}

int run(int argc, char** argv) {
  CLI::App app(
      "Mass-cost fronts of machine parts, and the exchange constants that choose among "
      "them.\nPreliminary sizing: results are no proof of safety.",
      "bismar");
  app.require_subcommand(1);
  app.set_version_flag("--version", "bismar " + std::string(version()));
  app.footer(
      "Exit codes: 0 done; 1 nothing feasible, or a stored result differs; 2 bad input; "
      "3 internal fault.");
  int code = done;
  add_check(app, code);
  add_front(app, code);
  add_sweep(app, code);
  add_why(app, code);
  add_verify(app, code);
  add_new(app, code);
  add_schema(app, code);
  if (!names_a_command(app, argc, argv)) {
    return bad_input;
  }
  try {
    app.parse(argc, argv);
  } catch (const CLI::Success& success) {  // --help and --version
    return app.exit(success) == 0 ? done : internal_fault;
  } catch (const CLI::ParseError& error) {
    return explain(app, error);
  }
  return code;
}

}  // namespace

std::vector<std::size_t> chosen_parts(const Job& job, const std::string& name) {
  if (!name.empty()) {
    return {find_part(job, name)};
  }
  std::vector<std::size_t> all(job.parts.size());
  for (std::size_t i = 0; i < all.size(); ++i) {
    all[i] = i;
  }
  return all;
}

std::size_t one_part(const Job& job, const std::string& name, const std::string& what) {
  if (!name.empty()) {
    return find_part(job, name);
  }
  if (job.parts.size() == 1) {
    return 0;
  }
  std::vector<std::string> names;
  for (const Part& part : job.parts) {
    names.push_back('"' + part.name + '"');
  }
  Fault fault;
  fault.code = Code::missing;
  fault.where = "--part";
  fault.allowed = joined(names);
  fault.message = fmt::format("{} is for one part, and the job has {}. Name one with --part: {}.",
                              what,
                              job.parts.size(),
                              fault.allowed);
  throw Error(std::move(fault));
}

void require_word(const std::string& option,
                  const std::string& found,
                  const std::vector<std::string>& words) {
  if (std::find(words.begin(), words.end(), found) != words.end()) {
    return;
  }
  Fault fault;
  fault.code = Code::unknown_name;
  fault.where = option;
  fault.found = found;
  fault.allowed = joined(words);
  fault.message = fmt::format(
      "\"{}\" is not allowed.{} Allowed: {}.", found, suggestion(found, words), fault.allowed);
  throw Error(std::move(fault));
}

}  // namespace bismar::cli

int main(int argc, char** argv) {
  using namespace bismar;  // NOLINT(google-build-using-namespace): this file is the program
  try {
    return cli::run(argc, argv);
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      fmt::print(stderr, "E{} {}\n", static_cast<int>(fault.code), fault.text());
    }
    return cli::bad_input;
  } catch (const std::bad_alloc&) {
    std::fputs("E900 bismar: out of memory.\n", stderr);
    return cli::internal_fault;
  } catch (const std::exception& error) {
    fmt::print(stderr,
               "E900 bismar: internal fault: {}. This is a defect of the program: please report it "
               "with the job.\n",
               error.what());
    return cli::internal_fault;
  }
}
