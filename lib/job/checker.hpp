// SPDX-License-Identifier: MIT
#pragma once

#include "format.hpp"
#include "json_document.hpp"

#include <bismar/error.hpp>
#include <bismar/quantity/currency.hpp>

#include <cstddef>
#include <map>
#include <span>
#include <string>
#include <string_view>
#include <unordered_map>
#include <unordered_set>
#include <utility>
#include <vector>

namespace bismar::detail {

/// Holds a JSON value against a format and collects every fault with its place.
class Checker {
 public:
  Checker(const JsonDocument& document, FaultList& faults) : document_(document), faults_(faults) {}

  /// The currencies to read money with; without, money is not read (its currency is a fault
  /// already).
  void use(const CurrencyRates* rates) { rates_ = rates; }
  [[nodiscard]] bool reads_money() const { return rates_ != nullptr; }

  /// A value that was found bad before is not checked again.
  void check(const JsonValue& value, const Format& format, const std::string& pointer);

  /// Tells the pointer of a value that is looked at before it is checked.
  void place(const JsonValue& value, std::string pointer) {
    pointers_[&value] = std::move(pointer);
  }

  /// Whether the value itself (not what it contains) was found right.
  [[nodiscard]] bool good(const JsonValue& value) const { return !bad_.contains(&value); }
  [[nodiscard]] std::size_t faults() const { return faults_.size(); }
  [[nodiscard]] std::string where(const JsonValue& value) const;
  /// Pointer and "file:line:column" of every value that was looked at.
  [[nodiscard]] std::map<std::string, std::string> places() const;

  void add(Code code,
           const JsonValue& value,
           std::string found,
           std::string allowed,
           std::string message);
  /// A word that is in no list: names the nearest, and a short list whole.
  void add_unknown(const JsonValue& value,
                   std::string_view what,
                   std::span<const std::string_view> words);
  /// Takes over the faults of a text that could not be read.
  void append(const Error& error, const JsonValue& value);
  /// Takes over faults that have places of their own.
  void append(const Error& error) { faults_.append(error); }

 private:
  void check_text(const JsonValue& value, const Format& format);
  void check_word(const JsonValue& value, const Format& format, std::string_view otherwise);
  void check_whole(const JsonValue& value, const Format& format);
  void check_quantity(const JsonValue& value, const Format& format);
  void check_sign(const JsonValue& value, const Format& format, double least);
  void check_list(const JsonValue& value, const Format& format, const std::string& pointer);
  void check_object(const JsonValue& value, std::span<const Key> keys, const std::string& pointer);
  void check_map(const JsonValue& value, const Format& format, const std::string& pointer);
  void check_tagged(const JsonValue& value, const Format& format, const std::string& pointer);
  void check_any_of(const JsonValue& value, const Format& format, const std::string& pointer);
  void add_wrong_type(const JsonValue& value, const std::string& allowed);
  void add_unknown_key(const JsonValue::Member& member,
                       const std::string& pointer,
                       std::span<const std::string_view> keys);

  const JsonDocument& document_;
  FaultList& faults_;
  const CurrencyRates* rates_ = nullptr;
  std::unordered_map<const JsonValue*, std::string> pointers_;
  std::unordered_set<const JsonValue*> bad_;
};

/// "a", "b" or "c"
[[nodiscard]] std::string in_words(std::span<const std::string_view> words);

}  // namespace bismar::detail
