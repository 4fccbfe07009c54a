// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <compare>

namespace bismar {

/// alpha: the worth of one kilogram in the currency of the job [currency/kg], finite and >= 0.
/// Named ways in and out, so that a price per gram or per pound, or a mass, cannot be taken for it.
class BISMAR_API ExchangeConstant {
 public:
  /// @throws bismar::Error  not_finite or out_of_range: the value is not finite, or below zero, or
  ///         (per_gram, per_pound) beyond the range of double per kilogram ("exchange constant").
  [[nodiscard]] static ExchangeConstant per_kilogram(double value);
  [[nodiscard]] static ExchangeConstant per_gram(double value);
  /// The avoirdupois pound, 0.45359237 kg exactly (NIST Special Publication 811, 2008, appendix
  /// B.8; from memory).
  [[nodiscard]] static ExchangeConstant per_pound(double value);

  [[nodiscard]] double value_per_kilogram() const noexcept { return per_kilogram_; }
  [[nodiscard]] double value_per_gram() const noexcept { return per_kilogram_ / 1000.0; }
  [[nodiscard]] double value_per_pound() const noexcept { return per_kilogram_ * 0.45359237; }

  friend auto operator<=>(const ExchangeConstant&, const ExchangeConstant&) = default;

 private:
  explicit ExchangeConstant(double value) noexcept : per_kilogram_(value) {}

  double per_kilogram_;
};

/// What a linear penalty weighs.
struct CostAndMass {
  double cost = 0.0;  ///< C [currency]
  double mass = 0.0;  ///< m [kg]
};

/// The linear penalty function [currency]; the least is the best.
///
///     Z = C + alpha m
///
/// Two roundings. Source of the form: checks/ SEL-052, linear penalty with a switch at
/// alpha = (C_B - C_A) / (m_A - m_B).
[[nodiscard]] BISMAR_API double linear_penalty(ExchangeConstant alpha,
                                               const CostAndMass& design) noexcept;

}  // namespace bismar
