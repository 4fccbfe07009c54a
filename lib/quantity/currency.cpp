// SPDX-License-Identifier: MIT
#include <bismar/quantity/currency.hpp>

#include "text.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <iterator>

namespace bismar {

namespace {

using quantity_text::fail;
using quantity_text::quoted;

// ISO 4217 as published in Debian's package iso-codes 4.15.0, without metals, funds, accounting
// units and test codes. Sorted; every code is followed by one blank.
constexpr std::string_view codes =
    "AED AFN ALL AMD ANG AOA ARS AUD AWG AZN BAM BBD BDT BGN BHD BIF BMD BND BOB BRL BSD BTN "
    "BWP BYN BZD CAD CDF CHF CLP CNY COP CRC CUC CUP CVE CZK DJF DKK DOP DZD EGP ERN ETB EUR "
    "FJD FKP GBP GEL GHS GIP GMD GNF GTQ GYD HKD HNL HRK HTG HUF IDR ILS INR IQD IRR ISK JMD "
    "JOD JPY KES KGS KHR KMF KPW KRW KWD KYD KZT LAK LBP LKR LRD LSL LYD MAD MDL MGA MKD MMK "
    "MNT MOP MRU MUR MVR MWK MXN MYR MZN NAD NGN NIO NOK NPR NZD OMR PAB PEN PGK PHP PKR PLN "
    "PYG QAR RON RSD RUB RWF SAR SBD SCR SDG SEK SGD SHP SLE SLL SOS SRD SSP STN SVC SYP SZL "
    "THB TJS TMT TND TOP TRY TTD TWD TZS UAH UGX USD UYU UZS VED VES VND VUV WST XAF XCD XOF "
    "XPF YER ZAR ZMW ZWL ";
constexpr std::size_t stride = 4;
constexpr std::size_t code_count = codes.size() / stride;

constexpr std::string_view code_at(std::size_t index) { return codes.substr(index * stride, 3); }

constexpr bool codes_are_sorted() {
  for (std::size_t i = 1; i < code_count; ++i) {
    if (!(code_at(i - 1) < code_at(i))) {
      return false;
    }
  }
  return codes.size() % stride == 0;
}
static_assert(codes_are_sorted());

void require_code(std::string_view code) {
  if (!is_currency_code(code)) {
    fail(Code::unknown_name,
         code,
         "a currency code of ISO 4217 such as EUR, USD, GBP",
         quoted(code) +
             " is no currency code; write the three capital letters of ISO 4217, such as "
             "EUR, USD or GBP.");
  }
}

}  // namespace

bool is_currency_code(std::string_view text) noexcept {
  if (text.size() != 3) {
    return false;
  }
  std::size_t low = 0;
  std::size_t high = code_count;
  while (low < high) {
    const std::size_t middle = low + (high - low) / 2;
    if (code_at(middle) < text) {
      low = middle + 1;
    } else {
      high = middle;
    }
  }
  return low < code_count && code_at(low) == text;
}

CurrencyRates::CurrencyRates(std::string_view job_currency) : job_currency_(job_currency) {
  require_code(job_currency);
}

void CurrencyRates::set(std::string_view code, double job_units) {
  require_code(code);
  if (code == job_currency_) {
    fail(Code::conflict,
         code,
         "a currency other than the job's",
         quoted(code) + " is the currency of the job itself and takes no rate; leave it out.");
  }
  if (rate(code)) {
    fail(Code::duplicate,
         code,
         "one rate for each currency",
         "The currency " + quoted(code) + " has two rates; keep one.");
  }
  if (!std::isfinite(job_units)) {
    fail(Code::not_finite,
         code,
         "a finite number above zero",
         "The rate of " + quoted(code) + " is not a finite number.");
  }
  if (!(job_units > 0.0)) {
    fail(Code::out_of_range,
         code,
         "a number above zero",
         "The rate of " + quoted(code) + " must be above zero: it says how many " + job_currency_ +
             " one " + std::string(code) + " is worth.");
  }
  rates_.emplace_back(code, job_units);
}

std::optional<double> CurrencyRates::rate(std::string_view code) const noexcept {
  if (code == job_currency_) {
    return 1.0;
  }
  for (const auto& [other, job_units] : rates_) {
    if (other == code) {
      return job_units;
    }
  }
  return std::nullopt;
}

}  // namespace bismar
