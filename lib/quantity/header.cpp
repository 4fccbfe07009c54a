// SPDX-License-Identifier: MIT
#include <bismar/quantity/parse.hpp>

#include "text.hpp"

#include <cstddef>

namespace bismar {

namespace {

using quantity_text::fail;
using quantity_text::quoted;
using quantity_text::trimmed;

constexpr std::string_view allowed_heading =
    R"(a name and its unit in square brackets, as in "density [kg/m3]")";

[[noreturn]] void refuse(Code code, std::string_view heading, const std::string& what) {
  fail(code,
       heading,
       allowed_heading,
       "The heading " + quoted(heading) + ' ' + what + "; write it as in \"density [kg/m3]\".");
}

}  // namespace

Header split_header(std::string_view text) {
  const std::string_view heading = trimmed(text);
  const std::size_t open = heading.find('[');
  const std::size_t close = heading.find(']');
  const std::string_view name = trimmed(heading.substr(0, open));
  if (close != std::string_view::npos && (open == std::string_view::npos || close < open)) {
    refuse(Code::table_malformed, heading, "closes a bracket that was not opened");
  }
  if (name.empty()) {
    refuse(Code::empty, heading, heading.empty() ? "is empty" : "has no name before its unit");
  }
  if (open == std::string_view::npos) {
    return {std::string(name), std::nullopt};
  }
  if (close == std::string_view::npos) {
    refuse(Code::table_malformed, heading, "opens a bracket and does not close it");
  }
  if (close + 1 != heading.size()) {
    refuse(Code::table_malformed, heading, "goes on behind its unit");
  }
  const std::string_view unit = trimmed(heading.substr(open + 1, close - open - 1));
  if (unit.empty()) {
    refuse(Code::unit_missing, heading, "has empty brackets");
  }
  if (unit.find('[') != std::string_view::npos) {
    refuse(Code::table_malformed, heading, "opens two brackets");
  }
  return {std::string(name), std::string(unit)};
}

}  // namespace bismar
