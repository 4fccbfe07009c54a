// SPDX-License-Identifier: MIT
#pragma once

#include "checker.hpp"

#include <bismar/job/job.hpp>

#include <optional>
#include <set>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::detail {

/// Turns values that a Checker found right into a job. What is absent or was a fault reads as
/// absent; names are held against the catalogue here, because the format does not know them.
class JobReader {
 public:
  JobReader(const JsonDocument& document, Checker& checker, Job& job)
      : document_(document), checker_(checker), job_(job) {}

  void read_title(const JsonValue& root);
  void read_catalogue(const JsonValue* value);
  void read_settings(const JsonValue* value);
  void read_exchange(const JsonValue* value);
  void read_parts(const JsonValue* value);

 private:
  using Words = std::vector<std::string_view>;

  // values
  [[nodiscard]] const JsonValue* get(const JsonValue& object, std::string_view key) const;
  [[nodiscard]] std::optional<double> quantity(const JsonValue& object,
                                               std::string_view key,
                                               QuantityKind kind) const;
  [[nodiscard]] std::optional<double> quantity(const JsonValue& value, QuantityKind kind) const;
  [[nodiscard]] std::optional<std::string> text(const JsonValue& object,
                                                std::string_view key) const;
  void set(bool& target, const JsonValue& object, std::string_view key) const;
  void set(double& target, const JsonValue& object, std::string_view key, QuantityKind kind) const;
  void set(std::optional<double>& target,
           const JsonValue& object,
           std::string_view key,
           QuantityKind kind) const;
  /// The texts of a list, each held against `words`.
  [[nodiscard]] std::vector<std::string> names(const JsonValue& object,
                                               std::string_view key,
                                               std::string_view what,
                                               const Words& words);

  // parts
  void collect_words();
  [[nodiscard]] Part read_part(const JsonValue& value);
  void read_member(const JsonValue& value, Member& member);
  void read_shape(const JsonValue& value, Member& member);
  /// One number, or a range as text.
  [[nodiscard]] static Ratio read_ratio(const JsonValue& value);
  void read_sizes(const JsonValue* value, const Shape& shape, Sizes& sizes);
  void read_load_case(const JsonValue& value, const Member& member, LoadCase& load_case);
  void read_load(const JsonValue& value, double length, LoadCase& load_case);
  [[nodiscard]] std::optional<double> station(const JsonValue& load,
                                              std::string_view key,
                                              double length);
  void read_own_mass(const JsonValue& value, LoadCase& load_case);
  void read_details(const JsonValue& value, double length, MemberDetails& details);
  [[nodiscard]] std::vector<SectionPoint> read_corners(const JsonValue& value);
  void read_limits(const JsonValue& value, Limits& limits);
  void read_property_limit(const JsonValue& value, Limits& limits);
  [[nodiscard]] std::optional<double> property_value(const JsonValue& value,
                                                     const std::string& unit);
  void read_operations(const JsonValue* value, Part& part);

  /// What the catalogue has, for names in limits. Views into the job's catalogue.
  struct CatalogueWords {
    Words materials, classes, processes, forms, media, routes, finishes, operations, stock;
  };

  const JsonDocument& document_;
  Checker& checker_;
  Job& job_;
  CatalogueWords words_;
  bool tables_read_ =
      true;  ///< Otherwise a name that is not found may stand in the table that failed.
};

}  // namespace bismar::detail
