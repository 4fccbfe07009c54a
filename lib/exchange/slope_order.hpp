// SPDX-License-Identifier: MIT
#pragma once

namespace bismar::detail {

/// A row of the ruler as a point.
struct TradePoint {
  double priced;  ///< m
  double cost;    ///< C
};

/// Compares the exchange constants at which u gives way to v and v gives way to w, without
/// rounding: the sign of (C_v - C_u) (m_v - m_w) - (C_w - C_v) (m_u - m_v). Negative: v lies
/// strictly below the line from u to w; zero: on it; positive: above.
///
/// For m_u > m_v > m_w and C_u < C_v < C_w, no difference overflowing. Exact as long as the data of
/// one column do not span more than 2^400 : 1; beyond that the smaller ones count as zero.
int compare_exchange(const TradePoint& u, const TradePoint& v, const TradePoint& w);

}  // namespace bismar::detail
