// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cstddef>
#include <utility>

namespace bismar {

namespace {

std::string joined_text(std::span<const Fault> faults) {
  std::string text;
  for (const Fault& fault : faults) {
    if (!text.empty()) {
      text += '\n';
    }
    text += fault.text();
  }
  return text;
}

/// ASCII only, and not std::tolower: the answer must not depend on the host's locale.
std::string lower_case(std::string_view word) {
  std::string lower(word);
  for (char& c : lower) {
    if (c >= 'A' && c <= 'Z') {
      c = static_cast<char>(c - 'A' + 'a');
    }
  }
  return lower;
}

/// Damerau-Levenshtein distance, by the dynamic programme of Lowrance and Wagner, "An Extension of
/// the String-to-String Correction Problem", J. ACM 22 (1975) 177-183: a swapped pair may be edited
/// further, so that the distance is the true least number of edits ("ca" to "abc" takes 2).
std::size_t edit_distance(std::string_view a, std::string_view b) {
  const std::size_t columns = b.size() + 1;
  std::vector<std::size_t> table((a.size() + 1) * columns);
  const auto distance = [&](std::size_t i, std::size_t j) -> std::size_t& {
    return table[i * columns + j];
  };
  std::array<std::size_t, 256> last_row_with{};  // per byte: its last place in `a`, counted from 1
  for (std::size_t i = 0; i <= a.size(); ++i) {
    distance(i, 0) = i;
  }
  for (std::size_t j = 0; j <= b.size(); ++j) {
    distance(0, j) = j;
  }
  for (std::size_t i = 1; i <= a.size(); ++i) {
    std::size_t last_match = 0;  // the last place in b, before j, of the letter a[i - 1]
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const std::size_t swap_row = last_row_with[static_cast<unsigned char>(b[j - 1])];
      const std::size_t swap_column = last_match;
      const bool same = a[i - 1] == b[j - 1];
      std::size_t least = std::min({distance(i - 1, j) + 1,
                                    distance(i, j - 1) + 1,
                                    distance(i - 1, j - 1) + (same ? 0 : 1)});
      if (swap_row > 0 && swap_column > 0) {
        // Delete what lies between the pair in `a`, swap, insert what lies between it in `b`.
        const std::size_t between = (i - swap_row - 1) + (j - swap_column - 1);
        least = std::min(least, distance(swap_row - 1, swap_column - 1) + between + 1);
      }
      distance(i, j) = least;
      if (same) {
        last_match = j;
      }
    }
    last_row_with[static_cast<unsigned char>(a[i - 1])] = i;
  }
  return distance(a.size(), b.size());
}

}  // namespace

std::string Fault::text() const { return where.empty() ? message : where + ": " + message; }

Error::Error(std::vector<Fault> faults) : faults_(std::move(faults)) {
  if (faults_.empty()) {
    throw InternalError("bismar::Error was made without a fault");
  }
  text_ = joined_text(faults_);
}

Error::Error(Fault fault) : Error(std::vector<Fault>{std::move(fault)}) {}
Error::Error(const Error&) = default;
Error& Error::operator=(const Error&) = default;
Error::Error(Error&&) noexcept = default;
Error& Error::operator=(Error&&) noexcept = default;
Error::~Error() = default;

InternalError::InternalError(const std::string& what) : std::logic_error(what) {}
InternalError::~InternalError() = default;

void FaultList::add(Code code, std::string where, std::string message) {
  Fault fault;
  fault.code = code;
  fault.where = std::move(where);
  fault.message = std::move(message);
  faults_.push_back(std::move(fault));
}

void FaultList::append(const Error& other, std::string_view prefix) {
  for (const Fault& fault : other.faults()) {
    Fault moved = fault;
    moved.where.insert(0, prefix);
    faults_.push_back(std::move(moved));
  }
}

void FaultList::throw_if_any() const {
  if (!faults_.empty()) {
    throw Error(faults_);
  }
}

std::optional<std::string> nearest_word(std::string_view typed,
                                        std::span<const std::string_view> words) {
  const std::string wanted = lower_case(typed);
  const std::size_t allowed = typed.size() / 3 + 1;
  std::optional<std::string_view> nearest;
  std::size_t least = allowed + 1;
  for (const std::string_view word : words) {
    const std::size_t distance = edit_distance(wanted, lower_case(word));
    if (distance < least) {
      least = distance;
      nearest = word;
    }
  }
  return nearest.has_value() ? std::optional<std::string>(*nearest) : std::nullopt;
}

std::string did_you_mean(std::string_view typed, std::span<const std::string_view> words) {
  const std::optional<std::string> nearest = nearest_word(typed, words);
  return nearest.has_value() ? " Did you mean \"" + *nearest + "\"?" : std::string();
}

}  // namespace bismar
