// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/job/job.hpp>
#include <bismar/report/pictures.hpp>

#include <string>
#include <string_view>

namespace bismar::cli {

/// Checks name and folder of a picture before the work is done.
/// @throws bismar::Error  unsupported: another ending than .svg, .png or .pdf; missing: a converter
/// for
///   the latter two is not installed; and as write_file.
void require_picture(const std::string& path);

/// Writes an SVG text as the ending of `path` says. PNG and PDF go through rsvg-convert.
void write_picture(const std::string& path, std::string_view svg);

/// Caps, scale and fold as the job says.
[[nodiscard]] PictureOptions picture_options(const Job& job, const Part& part);

}  // namespace bismar::cli
