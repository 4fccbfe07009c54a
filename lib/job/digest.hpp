// SPDX-License-Identifier: MIT
#pragma once

#include <cstdint>
#include <string>
#include <string_view>

namespace bismar::detail {

/// FNV-1a, 64 bits: notices accidents, not forgery.
/// Source: Fowler, Noll, Vo, Eastlake, The FNV Non-Cryptographic Hash Algorithm, IETF draft
/// draft-eastlake-fnv; offset basis and prime from memory, checked against its test vectors
/// (tests/job/test_digest.cpp).
class Digest {
 public:
  void add(std::string_view bytes) {
    for (const char c : bytes) {
      state_ = (state_ ^ static_cast<unsigned char>(c)) * 0x100000001b3ULL;
    }
  }

  /// "fnv1a64:" and 16 hexadecimal digits.
  [[nodiscard]] std::string text() const {
    std::string digits = "fnv1a64:";
    for (int shift = 60; shift >= 0; shift -= 4) {
      digits += "0123456789abcdef"[(state_ >> static_cast<unsigned>(shift)) & 0xFU];
    }
    return digits;
  }

 private:
  std::uint64_t state_ = 0xcbf29ce484222325ULL;
};

}  // namespace bismar::detail
