// SPDX-License-Identifier: MIT
// Text of tables: blanks, letter case, quoting in messages. Nothing here looks at the locale.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace bismar::catalogue {

/// Without blanks, tabs and line ends at both ends, nor the no-break spaces of spreadsheets.
[[nodiscard]] std::string_view trim(std::string_view text);

/// For comparing names: ASCII letters lower, runs of blanks (no-break ones too) one space, none at
/// the ends, and the typographic apostrophe of word processors as '.
[[nodiscard]] std::string folded(std::string_view text);

/// In double quotes for a message; a long text is cut in the middle, control characters are shown
/// as spaces.
[[nodiscard]] std::string quoted(std::string_view text);

/// The parts between separators, trimmed; empty parts are kept, an empty text has none.
[[nodiscard]] std::vector<std::string_view> split(std::string_view text, char separator);

}  // namespace bismar::catalogue
