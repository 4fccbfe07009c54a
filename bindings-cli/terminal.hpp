// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/report/text_report.hpp>
#include <bismar/sizing/front.hpp>

#include <chrono>

namespace bismar::cli {

/// Width and colour of texts: the terminal's, or 100 columns without colour for a file or a pipe.
/// @param to_file  The text goes to a file of its own.
[[nodiscard]] TextOptions text_options(bool to_file);

/// A progress line on standard error: only on a terminal, only when the work takes longer than
/// about half a second, gone when the object is.
class ProgressLine {
 public:
  ProgressLine();
  ~ProgressLine();
  ProgressLine(const ProgressLine&) = delete;
  ProgressLine& operator=(const ProgressLine&) = delete;
  ProgressLine(ProgressLine&&) = delete;
  ProgressLine& operator=(ProgressLine&&) = delete;

  [[nodiscard]] RunOptions run_options();

 private:
  void show(double share);
  std::chrono::steady_clock::time_point start_ = std::chrono::steady_clock::now();
  bool is_terminal_;
  bool shown_ = false;
};

}  // namespace bismar::cli
