// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <array>
#include <cstddef>
#include <cstdint>
#include <string>

namespace bismar {

/// The independent kinds of quantity. Angle and count are kept apart from plain numbers, so that
/// a frequency is never taken for a speed of rotation, nor "per hour" for "parts per hour".
enum class Base : std::uint8_t { length, mass, time, temperature, currency, angle, count };

inline constexpr std::size_t base_count = 7;

namespace detail {
[[noreturn]] BISMAR_API void throw_dimension_power(int numerator, int denominator);
[[noreturn]] BISMAR_API void throw_dimension_range();
}  // namespace detail

/// A product of powers of the bases. The exponents are exact: whole numbers of sixths, so that
/// square and cube roots of whole powers (fracture toughness: stress length^(1/2)) lose nothing.
class Dimension {
 public:
  /// The dimension of a plain number.
  constexpr Dimension() = default;

  /// The first power of one base.
  constexpr Dimension(Base base) {  // NOLINT(google-explicit-constructor): a base is a dimension
    sixths_[static_cast<std::size_t>(base)] = 6;
  }

  /// Six times the exponent of `base`.
  [[nodiscard]] constexpr int sixths(Base base) const {
    return sixths_[static_cast<std::size_t>(base)];
  }

  /// Whether this is the dimension of a plain number.
  [[nodiscard]] constexpr bool is_one() const { return *this == Dimension(); }

  /// This dimension to the power numerator / denominator.
  ///
  /// @throws bismar::Error  invalid_argument: the denominator is zero, or an exponent of the result
  ///                        is no whole number of sixths; out_of_range: an exponent beyond +-5000.
  [[nodiscard]] constexpr Dimension to_power(int numerator, int denominator = 1) const {
    Dimension result;
    for (std::size_t i = 0; i < base_count; ++i) {
      const std::int64_t product = std::int64_t{sixths_[i]} * numerator;
      if (denominator == 0 || product % denominator != 0) {
        detail::throw_dimension_power(numerator, denominator);
      }
      result.set(i, product / denominator);
    }
    return result;
  }

  /// Product and quotient. @throws bismar::Error  out_of_range: an exponent beyond +-5000.
  friend constexpr Dimension operator*(const Dimension& a, const Dimension& b) {
    Dimension result;
    for (std::size_t i = 0; i < base_count; ++i) {
      result.set(i, std::int64_t{a.sixths_[i]} + b.sixths_[i]);
    }
    return result;
  }
  friend constexpr Dimension operator/(const Dimension& a, const Dimension& b) {
    Dimension result;
    for (std::size_t i = 0; i < base_count; ++i) {
      result.set(i, std::int64_t{a.sixths_[i]} - b.sixths_[i]);
    }
    return result;
  }
  friend constexpr bool operator==(const Dimension&, const Dimension&) = default;

  /// Formula text in the order of Base, such as "length^-1 mass time^-2", "length^0.5",
  /// "mass^(1/3)"; "1" for a plain number.
  [[nodiscard]] BISMAR_API std::string text() const;

  /// What the trade calls it, such as "stress, pressure or modulus" or "fracture toughness"; the
  /// formula text when it has no name.
  [[nodiscard]] BISMAR_API std::string trade_name() const;

 private:
  constexpr void set(std::size_t index, std::int64_t sixths) {
    if (sixths < -30000 || sixths > 30000) {
      detail::throw_dimension_range();
    }
    sixths_[index] = static_cast<std::int16_t>(sixths);
  }

  std::array<std::int16_t, base_count> sixths_{};
};

/// The dimensions that the library names.
namespace dimension {
inline constexpr Dimension one{};
inline constexpr Dimension length{Base::length};
inline constexpr Dimension mass{Base::mass};
inline constexpr Dimension time{Base::time};
inline constexpr Dimension temperature{Base::temperature};
inline constexpr Dimension currency{Base::currency};
inline constexpr Dimension angle{Base::angle};
inline constexpr Dimension count{Base::count};

inline constexpr Dimension area = length.to_power(2);
inline constexpr Dimension volume = length.to_power(3);
inline constexpr Dimension second_moment = length.to_power(4);
inline constexpr Dimension density = mass / volume;
inline constexpr Dimension linear_mass = mass / length;
inline constexpr Dimension areal_mass = mass / area;
inline constexpr Dimension frequency = one / time;
inline constexpr Dimension rotational_speed = angle / time;
inline constexpr Dimension acceleration = length / time.to_power(2);
inline constexpr Dimension force = mass * acceleration;
inline constexpr Dimension moment = force * length;
inline constexpr Dimension line_load = force / length;
inline constexpr Dimension stress = force / area;
inline constexpr Dimension fracture_toughness = stress * length.to_power(1, 2);
inline constexpr Dimension power = moment / time;
inline constexpr Dimension thermal_expansion = one / temperature;
inline constexpr Dimension thermal_conductivity = power / length / temperature;
inline constexpr Dimension specific_energy = moment / mass;
inline constexpr Dimension price_per_mass = currency / mass;
inline constexpr Dimension price_per_length = currency / length;
inline constexpr Dimension price_per_area = currency / area;
inline constexpr Dimension price_per_volume = currency / volume;
inline constexpr Dimension price_per_part = currency / count;
inline constexpr Dimension cost_rate = currency / time;
inline constexpr Dimension production_rate = count / time;
inline constexpr Dimension length_rate = length / time;
inline constexpr Dimension mass_rate = mass / time;
}  // namespace dimension

}  // namespace bismar
