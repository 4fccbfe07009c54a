// SPDX-License-Identifier: MIT
#include "commands.hpp"
#include "files.hpp"

#include <memory>
#include <string>

namespace bismar::cli {

void add_schema(CLI::App& app, int& code) {
  CLI::App* command = app.add_subcommand("schema", "Prints the JSON Schema of job files");
  const auto output = std::make_shared<std::string>();
  command->add_option("--output", *output, "Write to this file, not to the terminal");
  command->callback([output, &code] {
    deliver(*output, job_schema());
    code = done;
  });
}

}  // namespace bismar::cli
