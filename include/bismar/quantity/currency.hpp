// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bismar {

/// Whether `text` is a currency code of ISO 4217 in upper case ("EUR"). Metals, funds, bond-market
/// units and test codes of that list are left out.
[[nodiscard]] BISMAR_API bool is_currency_code(std::string_view text) noexcept;

/// The currency of a job, and what one unit of another currency is worth in it. Money inside the
/// library is always an amount in the job's currency; no rate is ever assumed.
class BISMAR_API CurrencyRates {
 public:
  /// @param job_currency  ISO 4217 code.
  /// @throws bismar::Error  unknown_name: no such code.
  explicit CurrencyRates(std::string_view job_currency);

  /// States that one unit of `code` is worth `job_units` units of the job's currency.
  ///
  /// @throws bismar::Error  unknown_name: no such code; conflict: the job's own currency;
  ///                        duplicate: the code has a rate already; not_finite; out_of_range: not
  ///                        above zero.
  void set(std::string_view code, double job_units);

  [[nodiscard]] const std::string& job_currency() const noexcept { return job_currency_; }

  /// What one unit of `code` is worth in the job's currency: 1 for the job's own currency, absent
  /// when no rate was given.
  [[nodiscard]] std::optional<double> rate(std::string_view code) const noexcept;

 private:
  std::string job_currency_;
  std::vector<std::pair<std::string, double>> rates_;
};

}  // namespace bismar
