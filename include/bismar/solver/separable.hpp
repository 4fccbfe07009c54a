// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <vector>

namespace bismar {

/// Demands of many sizes under several conditions, laid out for deciding them fast.
///
/// A condition k is separable when its utilisation is a number of the size over a number of the
/// material, u_k = demand_k(size) / capacity_k(material). Then u_k <= 1 for every pair of the two
/// takes one comparison, demand <= capacity: no power, no division.
class BISMAR_API DemandTable {
 public:
  /// Sizes stand in blocks of this many; a block of all conditions stays in the nearest cache.
  static constexpr std::size_t block = 64;

  /// @param conditions  Number of conditions.  @param sizes  Number of sizes. Both may be 0. All
  ///   demands are 0 at first.
  DemandTable(std::size_t conditions, std::size_t sizes);

  [[nodiscard]] std::size_t conditions() const { return conditions_; }
  [[nodiscard]] std::size_t sizes() const { return sizes_; }
  [[nodiscard]] std::size_t blocks() const { return (sizes_ + block - 1) / block; }
  /// @throws bismar::Error  out_of_range: "condition" or "size"; not_finite, "demand": NaN.
  ///   Infinity is allowed: no capacity but infinity is enough.
  void set(std::size_t condition, std::size_t size, double demand);
  /// @throws bismar::Error  as set().
  [[nodiscard]] double demand(std::size_t condition, std::size_t size) const;
  /// Demands of one block, `block` of them a condition; those beyond the last size are 0.
  [[nodiscard]] std::span<const double> demands_of_block(std::size_t b) const {
    return std::span(demands_).subspan(b * conditions_ * block, conditions_ * block);
  }
  /// The bits of a block that stand for sizes.
  [[nodiscard]] std::uint64_t sizes_of_block(std::size_t b) const;

 private:
  [[nodiscard]] std::size_t place(std::size_t condition, std::size_t size) const;

  std::size_t conditions_;
  std::size_t sizes_;
  std::vector<double> demands_;  ///< [blocks][conditions][block]
};

/// Instructions that a decision is made with. All give the same bits: they only compare.
enum class SimdPath : std::uint8_t {
  generic,  ///< What the compiler was told to build for.
  avx2,
  avx512,
};
/// The paths of this build that this processor runs, generic first, the fastest last.
[[nodiscard]] BISMAR_API std::span<const SimdPath> simd_paths();

/// For every material, which sizes exceed its capacities.
///
/// A size exceeds them when demand_k > capacity_k in at least one condition; equality does not.
///
/// @param capacities  [materials][conditions]; infinity: the condition does not hold for the
///   material.
/// @param exceeding  [materials][table.blocks()] out: bit s of word b stands for size
///   b * block + s and is set when it exceeds; bits beyond the last size are 0.
/// @param path  One of simd_paths(); absent: the last of them.
/// @throws bismar::Error  invalid_argument, "capacities" or "exceeding": their lengths do not
/// belong
///   to one number of materials; not_finite, "capacities": NaN; unsupported, "path".
BISMAR_API void mark_exceeding(const DemandTable& table,
                               std::span<const double> capacities,
                               std::span<std::uint64_t> exceeding,
                               std::optional<SimdPath> path = std::nullopt);

/// For every material the first size, in the order of the table, that exceeds none of its
/// capacities; nothing where every size does. Stops at that size's block.
///
/// @param first  [materials] out.  The rest and the errors ("first" for "exceeding") as above.
BISMAR_API void first_within(const DemandTable& table,
                             std::span<const double> capacities,
                             std::span<std::optional<std::size_t>> first,
                             std::optional<SimdPath> path = std::nullopt);

/// One block for one material, without checks, for callers that choose blocks themselves: the bits
/// of the sizes that exceed.
/// @param capacities  [conditions], no NaN.
[[nodiscard]] BISMAR_API std::uint64_t exceeding_in_block(const DemandTable& table,
                                                          std::size_t b,
                                                          std::span<const double> capacities);

}  // namespace bismar
