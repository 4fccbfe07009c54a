// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/job/job.hpp>

#include <CLI/CLI.hpp>

#include <cstddef>
#include <string>
#include <vector>

namespace bismar::cli {

/// What the program returns to the shell.
enum ExitCode : int {
  done = 0,
  nothing_feasible = 1,  ///< Also: a stored result that differs.
  bad_input = 2,
  internal_fault = 3,
};

/// Each adds its command; the returned code is written to `code` when the command runs.
void add_check(CLI::App& app, int& code);
void add_front(CLI::App& app, int& code);
void add_sweep(CLI::App& app, int& code);
void add_why(CLI::App& app, int& code);
void add_verify(CLI::App& app, int& code);
void add_new(CLI::App& app, int& code);
void add_schema(CLI::App& app, int& code);

/// The part with this name, or all parts where the name is empty.
[[nodiscard]] std::vector<std::size_t> chosen_parts(const Job& job, const std::string& name);

/// The one part that is meant.
/// @param what  What can hold one part only: "--plot".
/// @throws bismar::Error  missing: the job has several parts and none was named.
[[nodiscard]] std::size_t one_part(const Job& job,
                                   const std::string& name,
                                   const std::string& what);

/// The word if it is one of `words`.
/// @throws bismar::Error  unknown_name, with the nearest word.
void require_word(const std::string& option,
                  const std::string& found,
                  const std::vector<std::string>& words);

}  // namespace bismar::cli
