// SPDX-License-Identifier: MIT
#include "files.hpp"

#include <bismar/error.hpp>

#include <fmt/core.h>
#include <unistd.h>

#include <cerrno>
#include <cstdio>
#include <filesystem>
#include <system_error>

namespace bismar::cli {

namespace {

namespace fs = std::filesystem;

[[noreturn]] void refuse(const std::string& path, const std::string& reason) {
  Fault fault;
  fault.code = Code::invalid_argument;
  fault.where = path;
  fault.found = path;
  fault.allowed = "a file that can be written";
  fault.message = "cannot write this file: " + reason + '.';
  throw Error(std::move(fault));
}

std::string reason_of(int number) { return std::generic_category().message(number); }

fs::path folder_of(const fs::path& path) {
  return path.has_parent_path() ? path.parent_path() : fs::path(".");
}

}  // namespace

void require_writable(const std::string& path) {
  std::error_code failure;
  const fs::path folder = folder_of(path);
  if (!fs::is_directory(folder, failure)) {
    refuse(path, fmt::format("there is no folder {}. Make it first", folder.string()));
  }
  if (fs::is_directory(path, failure)) {
    refuse(path, "it is a folder. Name a file in it");
  }
  if (::access(folder.c_str(), W_OK) != 0) {
    refuse(path, fmt::format("the folder {}: {}", folder.string(), reason_of(errno)));
  }
}

void write_file(const std::string& path, std::string_view text) {
  require_writable(path);
  const fs::path target(path);
  const fs::path temporary =
      folder_of(target) / fmt::format(".{}.{}.part", target.filename().string(), ::getpid());
  std::FILE* file = std::fopen(temporary.c_str(), "wb");
  if (file == nullptr) {
    refuse(path, reason_of(errno));
  }
  bool written = std::fwrite(text.data(), 1, text.size(), file) == text.size();
  written = std::fflush(file) == 0 && written;
  int number = written ? 0 : errno;
  if (std::fclose(file) != 0 && written) {
    written = false;
    number = errno;
  }
  std::error_code failure;
  if (written) {
    fs::rename(temporary, target, failure);
    number = failure.value();
  }
  if (!written || failure) {
    std::error_code ignored;
    fs::remove(temporary, ignored);
    refuse(path, reason_of(number));
  }
}

void print(std::string_view text) {
  if (std::fwrite(text.data(), 1, text.size(), stdout) != text.size() || std::fflush(stdout) != 0) {
    refuse("standard output", reason_of(errno));
  }
}

void deliver(const std::string& path, std::string_view text) {
  if (path.empty()) {
    print(text);
  } else {
    write_file(path, text);
  }
}

}  // namespace bismar::cli
