// SPDX-License-Identifier: MIT
#pragma once

#include <string>

namespace bismar {

class CurrencyRates;

/// How to read an engineer's own CSV.
///
/// `delimiter` and `decimal` must differ. With the delimiter ';' the items of a list stand between
/// '|', otherwise between ';'.
struct TableFormat {
  char delimiter = ',';          ///< ';' for spreadsheets of many European offices.
  char decimal = '.';            ///< ',' together with ';'.
  std::string currency = "EUR";  ///< Currency of price columns that name none ("price [1/kg]").
  /// Turns every price into the job's currency; a currency without a rate is then a fault. Without
  /// rates a table keeps the currency of its price columns. Must live while the table is read.
  const CurrencyRates* rates = nullptr;
};

}  // namespace bismar
