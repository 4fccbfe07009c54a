// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>
#include <exception>
#include <optional>
#include <span>
#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// What is wrong with an input. Values come in families with gaps and are only ever appended, so
/// that a stored code keeps its meaning; which code an input gives is documented and tested.
enum class Code : std::int32_t {
  // 1..: arguments
  invalid_argument = 1,  ///< A value that the function cannot accept.
  not_finite = 2,        ///< NaN or infinity where a finite number is needed.
  out_of_range = 3,      ///< A finite number outside its documented range.
  missing = 4,           ///< Something required is absent.
  conflict = 5,          ///< Two statements that cannot both hold.
  duplicate = 6,         ///< The same name or id twice.
  unknown_name = 7,      ///< A word that is in none of the allowed lists.
  empty = 8,             ///< A list or table with nothing in it.
  unsupported = 9,       ///< Understood, but this version cannot do it.
  // 50..: text with units
  unit_missing = 50,      ///< A bare number where a unit is needed.
  unit_unknown = 51,      ///< No such unit.
  unit_wrong = 52,        ///< A unit of another dimension.
  unit_ambiguous = 53,    ///< Text that can be read in two ways.
  number_malformed = 54,  ///< Text that is no number.
  // 100..: tables
  table_unreadable = 100,  ///< The file cannot be opened or read.
  table_malformed = 101,   ///< Quotes, columns or encoding are wrong.
  column_missing = 102,    ///< A required column is absent.
  cell_invalid = 103,      ///< A cell that its column cannot accept.
  // 200..: jobs
  json_malformed = 200,       ///< Not JSON.
  unknown_key = 201,          ///< A key that the format does not have.
  wrong_type = 202,           ///< A JSON value of another kind.
  version_unsupported = 203,  ///< A format version that this library cannot read.
  // 900..: ours
  internal = 900,  ///< A defect of this library.
};

/// One fault of an input: where it is, what was found, what is allowed, and the sentence to show.
struct Fault {
  Code code = Code::invalid_argument;
  std::string
      where;  ///< A field, a JSON pointer, or file:row:column; empty when there is no place.
  std::string found;    ///< What stood there, as the user wrote it.
  std::string allowed;  ///< What may stand there.
  std::string message;  ///< One sentence that names the fault and its remedy.

  /// "where: message", or the message alone when there is no place.
  [[nodiscard]] BISMAR_API std::string text() const;
};

/// The caller's data are wrong. Carries every fault of the input, not only the first.
class BISMAR_API Error : public std::exception {
 public:
  explicit Error(std::vector<Fault> faults);
  explicit Error(Fault fault);
  Error(const Error&);
  Error& operator=(const Error&);
  Error(Error&&) noexcept;
  Error& operator=(Error&&) noexcept;
  ~Error() override;  // the key function: one type information for all shared libraries

  /// The faults in the order in which they were met; never empty.
  [[nodiscard]] std::span<const Fault> faults() const noexcept { return faults_; }
  /// Every fault's text, one a line.
  [[nodiscard]] const char* what() const noexcept override { return text_.c_str(); }

 private:
  std::vector<Fault> faults_;
  std::string text_;
};

/// A defect of this library: never a wrong input, never a silent number.
class BISMAR_API InternalError : public std::logic_error {
 public:
  explicit InternalError(const std::string& what);
  InternalError(const InternalError&) = default;
  InternalError& operator=(const InternalError&) = default;
  ~InternalError() override;
};

/// Collects faults so that an input is reported whole.
class BISMAR_API FaultList {
 public:
  void add(Fault fault) { faults_.push_back(std::move(fault)); }
  void add(Code code, std::string where, std::string message);
  /// Takes over the faults of `other`, each place prefixed with `prefix`.
  void append(const Error& other, std::string_view prefix = {});
  [[nodiscard]] bool empty() const noexcept { return faults_.empty(); }
  [[nodiscard]] std::size_t size() const noexcept { return faults_.size(); }
  [[nodiscard]] std::span<const Fault> faults() const noexcept { return faults_; }
  /// @throws bismar::Error with all faults, if there is any.
  void throw_if_any() const;

 private:
  std::vector<Fault> faults_;
};

/// The word of `words` that `typed` most likely means: the least edit distance (insertions,
/// deletions, substitutions and swaps of neighbours count one each, letter case nothing), ties to
/// the earlier word; nothing when every word is further away than a third of the typed length + 1.
[[nodiscard]] BISMAR_API std::optional<std::string> nearest_word(
    std::string_view typed, std::span<const std::string_view> words);

/// " Did you mean "x"?" for the nearest word, or an empty text.
[[nodiscard]] BISMAR_API std::string did_you_mean(std::string_view typed,
                                                  std::span<const std::string_view> words);

}  // namespace bismar
