// SPDX-License-Identifier: MIT
#include "pictures.hpp"

#include "files.hpp"

#include <bismar/error.hpp>

#include <fmt/core.h>
#include <spawn.h>
#include <sys/wait.h>
#include <unistd.h>

#include <array>
#include <cerrno>
#include <cstdlib>
#include <filesystem>
#include <optional>
#include <system_error>

extern char** environ;

namespace bismar::cli {

namespace {

namespace fs = std::filesystem;

[[noreturn]] void refuse(Code code,
                         const std::string& path,
                         const std::string& allowed,
                         const std::string& message) {
  Fault fault;
  fault.code = code;
  fault.where = path;
  fault.found = path;
  fault.allowed = allowed;
  fault.message = message;
  throw Error(std::move(fault));
}

std::string ending_of(const std::string& path) { return fs::path(path).extension().string(); }

/// The first rsvg-convert of the search path.
std::optional<std::string> converter() {
  const char* search = std::getenv("PATH");
  std::string_view rest = search == nullptr ? "" : search;
  while (!rest.empty()) {
    const std::size_t end = std::min(rest.find(':'), rest.size());
    const fs::path program = fs::path(rest.substr(0, end)) / "rsvg-convert";
    if (end > 0 && ::access(program.c_str(), X_OK) == 0) {
      return program.string();
    }
    rest.remove_prefix(std::min(end + 1, rest.size()));
  }
  return std::nullopt;
}

/// Runs the converter without a shell: names of files are never read as commands.
void convert(const std::string& program,
             const std::string& format,
             const std::string& from,
             const std::string& to) {
  std::array<std::string, 6> words{program, "--format", format, "--output", to, from};
  std::array<char*, 7> arguments{};
  for (std::size_t i = 0; i < words.size(); ++i) {
    arguments[i] = words[i].data();
  }
  pid_t child = 0;
  const int failure =
      ::posix_spawn(&child, program.c_str(), nullptr, nullptr, arguments.data(), environ);
  int status = 0;
  bool converted = failure == 0;
  while (converted && ::waitpid(child, &status, 0) < 0) {
    converted = errno == EINTR;
  }
  if (!converted || !WIFEXITED(status) || WEXITSTATUS(status) != 0) {
    refuse(
        Code::invalid_argument,
        to,
        "a picture",
        fmt::format("{} could not make this picture. Write .svg and convert it by hand.", program));
  }
}

}  // namespace

void require_picture(const std::string& path) {
  const std::string ending = ending_of(path);
  if (ending != ".svg" && ending != ".png" && ending != ".pdf") {
    refuse(Code::unsupported,
           path,
           ".svg, .png or .pdf",
           "pictures are .svg, .png or .pdf: give the file one of these endings.");
  }
  if (ending != ".svg" && !converter().has_value()) {
    refuse(Code::missing,
           path,
           "rsvg-convert in the search path",
           fmt::format("{} pictures need rsvg-convert, which is not installed (Debian: apt install "
                       "librsvg2-bin). Install it or write .svg.",
                       ending.substr(1)));
  }
  require_writable(path);
}

void write_picture(const std::string& path, std::string_view svg) {
  require_picture(path);
  const std::string ending = ending_of(path);
  if (ending == ".svg") {
    write_file(path, svg);
    return;
  }
  // Both files lie beside the target, so that the last step is a rename on one file system.
  const std::string source = fmt::format("{}.{}.svg", path, ::getpid());
  const std::string made = fmt::format("{}.{}{}", path, ::getpid(), ending);
  std::error_code failure;
  try {
    write_file(source, svg);
    convert(*converter(), ending.substr(1), source, made);
    fs::rename(made, path);
  } catch (...) {
    fs::remove(source, failure);
    fs::remove(made, failure);
    throw;
  }
  fs::remove(source, failure);
}

PictureOptions picture_options(const Job& job, const Part& part) {
  PictureOptions options;
  options.mass_cap = part.limits.mass;
  options.cost_cap = part.limits.cost;
  if (job.exchange.has_value()) {
    options.alpha_from = job.exchange->from;
    options.alpha_to = job.exchange->to;
  }
  options.fold = job.settings.fold;
  options.near = job.settings.near;
  return options;
}

}  // namespace bismar::cli
