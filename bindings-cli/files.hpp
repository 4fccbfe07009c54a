// SPDX-License-Identifier: MIT
#pragma once

#include <string>
#include <string_view>

namespace bismar::cli {

/// Writes the file whole or not at all: into a temporary file beside it, which then takes its name.
/// @throws bismar::Error  invalid_argument: the folder is missing or cannot be written to, the path
/// is
///   a folder, the disk is full.
void write_file(const std::string& path, std::string_view text);

/// Whether `path` can be written, as far as can be told before the work is done.
/// @throws bismar::Error  as write_file.
void require_writable(const std::string& path);

/// To standard output, or to a file where `path` is not empty.
void deliver(const std::string& path, std::string_view text);

/// To standard output.
/// @throws bismar::Error  invalid_argument: it cannot be written to.
void print(std::string_view text);

}  // namespace bismar::cli
