// SPDX-License-Identifier: MIT
#include "terminal.hpp"

#include <fmt/core.h>
#include <sys/ioctl.h>
#include <unistd.h>

#include <algorithm>
#include <cstdio>
#include <cstdlib>
#include <string_view>

namespace bismar::cli {

namespace {

/// See no-color.org: any value but an empty one turns colour off.
bool colour_is_wanted() {
  const char* no_color = std::getenv("NO_COLOR");
  const char* terminal = std::getenv("TERM");
  return (no_color == nullptr || *no_color == '\0') &&
         (terminal == nullptr || std::string_view(terminal) != "dumb");
}

}  // namespace

TextOptions text_options(bool to_file) {
  TextOptions options;
  if (to_file || ::isatty(STDOUT_FILENO) == 0) {
    return options;
  }
  options.colour = colour_is_wanted();
  winsize size{};
  if (::ioctl(STDOUT_FILENO, TIOCGWINSZ, &size) == 0 && size.ws_col > 0) {
    options.width = std::clamp<std::size_t>(size.ws_col, 60, 160);
  }
  return options;
}

ProgressLine::ProgressLine() : is_terminal_(::isatty(STDERR_FILENO) != 0) {}

ProgressLine::~ProgressLine() {
  if (shown_) {
    std::fputs("\r\033[K", stderr);
  }
}

RunOptions ProgressLine::run_options() {
  RunOptions run;
  if (is_terminal_) {
    run.progress = [this](double share) { show(share); };
  }
  return run;
}

void ProgressLine::show(double share) {
  if (std::chrono::steady_clock::now() - start_ < std::chrono::milliseconds(500)) {
    return;
  }
  shown_ = true;
  fmt::print(stderr, "\rsizing {:3.0f} %", 100.0 * std::clamp(share, 0.0, 1.0));
  std::fflush(stderr);
}

}  // namespace bismar::cli
