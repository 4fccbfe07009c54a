// SPDX-License-Identifier: MIT
#include <bismar/solver/separable.hpp>

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <bit>
#include <cmath>
#include <string>

// The same loop is compiled once more for wider registers where compiler and processor have them.
#if defined(__x86_64__) && (defined(__GNUC__) || defined(__clang__))
#define BISMAR_WIDER_PATHS 1
#define BISMAR_ALWAYS_INLINE __attribute__((always_inline)) inline
#else
#define BISMAR_WIDER_PATHS 0
#define BISMAR_ALWAYS_INLINE inline
#endif

namespace bismar {

namespace {

constexpr std::size_t block = DemandTable::block;

constexpr std::array<std::uint64_t, block> bits_of_sizes() {
  std::array<std::uint64_t, block> bits{};
  for (std::size_t s = 0; s < block; ++s) {
    bits[s] = std::uint64_t{1} << s;
  }
  return bits;
}
alignas(64) constexpr std::array<std::uint64_t, block> bit_of = bits_of_sizes();

/// Comparing lane by lane and collecting each lane's own bit needs neither a shift nor a branch, so
/// that every vector unit does it in three instructions for a register of demands.
BISMAR_ALWAYS_INLINE std::uint64_t exceeding_bits(const double* demands,
                                                  const double* capacities,
                                                  std::size_t conditions) {
  std::uint64_t exceeding = 0;
  for (std::size_t k = 0; k < conditions; ++k) {
    const double capacity = capacities[k];
    const double* demand = demands + k * block;
    std::uint64_t here = 0;
    for (std::size_t s = 0; s < block; ++s) {
      here |= demand[s] > capacity ? bit_of[s] : std::uint64_t{0};
    }
    exceeding |= here;
  }
  return exceeding;
}

/// All materials on one block: its demands stay in the nearest cache.
/// @param exceeding  Of the first material; the next one's is `stride` words on.
BISMAR_ALWAYS_INLINE void mark_block(const double* demands,
                                     const double* capacities,
                                     std::size_t conditions,
                                     std::size_t materials,
                                     std::uint64_t sizes,
                                     std::uint64_t* exceeding,
                                     std::size_t stride) {
  for (std::size_t m = 0; m < materials; ++m) {
    exceeding[m * stride] =
        exceeding_bits(demands, capacities + m * conditions, conditions) & sizes;
  }
}

using MarkBlock = void (*)(const double*,
                           const double*,
                           std::size_t,
                           std::size_t,
                           std::uint64_t,
                           std::uint64_t*,
                           std::size_t);

void mark_block_generic(const double* demands,
                        const double* capacities,
                        std::size_t conditions,
                        std::size_t materials,
                        std::uint64_t sizes,
                        std::uint64_t* exceeding,
                        std::size_t stride) {
  mark_block(demands, capacities, conditions, materials, sizes, exceeding, stride);
}

#if BISMAR_WIDER_PATHS
__attribute__((target("avx2"))) void mark_block_avx2(const double* demands,
                                                     const double* capacities,
                                                     std::size_t conditions,
                                                     std::size_t materials,
                                                     std::uint64_t sizes,
                                                     std::uint64_t* exceeding,
                                                     std::size_t stride) {
  mark_block(demands, capacities, conditions, materials, sizes, exceeding, stride);
}

__attribute__((target("avx512f,avx512dq,avx512vl,prefer-vector-width=512"))) void mark_block_avx512(
    const double* demands,
    const double* capacities,
    std::size_t conditions,
    std::size_t materials,
    std::uint64_t sizes,
    std::uint64_t* exceeding,
    std::size_t stride) {
  mark_block(demands, capacities, conditions, materials, sizes, exceeding, stride);
}
#endif

struct Paths {
  std::array<SimdPath, 3> list = {SimdPath::generic};
  std::size_t count = 1;
};

Paths find_paths() {
  Paths found;
#if BISMAR_WIDER_PATHS
  if (__builtin_cpu_supports("avx2") != 0) {
    found.list[found.count++] = SimdPath::avx2;
  }
  if (__builtin_cpu_supports("avx512f") != 0 && __builtin_cpu_supports("avx512dq") != 0 &&
      __builtin_cpu_supports("avx512vl") != 0) {
    found.list[found.count++] = SimdPath::avx512;
  }
#endif
  return found;
}

MarkBlock function_of(SimdPath path) {
#if BISMAR_WIDER_PATHS
  if (path == SimdPath::avx2) {
    return mark_block_avx2;
  }
  if (path == SimdPath::avx512) {
    return mark_block_avx512;
  }
#endif
  return path == SimdPath::generic ? mark_block_generic : nullptr;
}

MarkBlock chosen(std::optional<SimdPath> path) {
  const auto paths = simd_paths();
  if (!path) {
    static const MarkBlock fastest = function_of(paths.back());
    return fastest;
  }
  if (std::find(paths.begin(), paths.end(), *path) == paths.end()) {
    throw Error({Code::unsupported,
                 "path",
                 {},
                 "one of simd_paths()",
                 "This processor or this build does not have these instructions."});
  }
  return function_of(*path);
}

/// Number of materials that the capacities are of.
/// @param each  How many words or places of `out` belong to a material.
std::size_t count_materials(const DemandTable& table,
                            std::span<const double> capacities,
                            std::size_t out,
                            std::size_t each,
                            const char* name_of_out) {
  FaultList faults;
  const std::size_t conditions = table.conditions();
  // Without conditions nothing is exceeded; the output alone then says how many materials there
  // are.
  const std::size_t materials = conditions > 0 ? capacities.size() / conditions
                                : each > 0     ? out / each
                                               : 0;
  if (materials * conditions != capacities.size()) {
    faults.add({Code::invalid_argument,
                "capacities",
                std::to_string(capacities.size()),
                "a multiple of the number of conditions",
                "Give one capacity for each material and condition."});
  } else if (materials * each != out) {
    faults.add({Code::invalid_argument,
                name_of_out,
                std::to_string(out),
                std::to_string(materials * each),
                "Its length does not belong to the number of materials."});
  }
  if (std::any_of(capacities.begin(), capacities.end(), [](double c) { return std::isnan(c); })) {
    faults.add({Code::not_finite, "capacities", "NaN", "numbers", "A capacity is not a number."});
  }
  faults.throw_if_any();
  return materials;
}

}  // namespace

DemandTable::DemandTable(std::size_t conditions, std::size_t sizes)
    : conditions_(conditions), sizes_(sizes), demands_(blocks() * conditions * block, 0.0) {}

std::size_t DemandTable::place(std::size_t condition, std::size_t size) const {
  if (condition < conditions_ && size < sizes_) {
    return ((size / block) * conditions_ + condition) * block + size % block;
  }
  FaultList faults;
  if (condition >= conditions_) {
    faults.add({Code::out_of_range,
                "condition",
                std::to_string(condition),
                "below " + std::to_string(conditions_),
                "The table has no such condition."});
  }
  if (size >= sizes_) {
    faults.add({Code::out_of_range,
                "size",
                std::to_string(size),
                "below " + std::to_string(sizes_),
                "The table has no such size."});
  }
  throw Error({faults.faults().begin(), faults.faults().end()});
}

void DemandTable::set(std::size_t condition, std::size_t size, double demand) {
  if (std::isnan(demand)) {
    throw Error({Code::not_finite, "demand", "NaN", "a number", "A demand is not a number."});
  }
  demands_[place(condition, size)] = demand;
}

double DemandTable::demand(std::size_t condition, std::size_t size) const {
  return demands_[place(condition, size)];
}

std::uint64_t DemandTable::sizes_of_block(std::size_t b) const {
  const std::size_t here = std::min(block, sizes_ - std::min(sizes_, b * block));
  return here == block ? ~std::uint64_t{0} : (std::uint64_t{1} << here) - 1;
}

std::span<const SimdPath> simd_paths() {
  static const Paths found = find_paths();
  return std::span(found.list).first(found.count);
}

void mark_exceeding(const DemandTable& table,
                    std::span<const double> capacities,
                    std::span<std::uint64_t> exceeding,
                    std::optional<SimdPath> path) {
  const std::size_t blocks = table.blocks();
  const std::size_t materials =
      count_materials(table, capacities, exceeding.size(), blocks, "exceeding");
  const MarkBlock mark = chosen(path);
  for (std::size_t b = 0; b < blocks && materials > 0; ++b) {
    mark(table.demands_of_block(b).data(),
         capacities.data(),
         table.conditions(),
         materials,
         table.sizes_of_block(b),
         exceeding.data() + b,
         blocks);
  }
}

void first_within(const DemandTable& table,
                  std::span<const double> capacities,
                  std::span<std::optional<std::size_t>> first,
                  std::optional<SimdPath> path) {
  const std::size_t materials = count_materials(table, capacities, first.size(), 1, "first");
  const MarkBlock mark = chosen(path);
  // A chunk of materials at a time, so that their words stay on the stack.
  constexpr std::size_t chunk = 64;
  std::array<std::uint64_t, chunk> words{};
  std::fill(first.begin(), first.end(), std::nullopt);
  for (std::size_t from = 0; from < materials; from += chunk) {
    const std::size_t count = std::min(chunk, materials - from);
    std::size_t open = count;
    for (std::size_t b = 0; b < table.blocks() && open > 0; ++b) {
      const std::uint64_t sizes = table.sizes_of_block(b);
      mark(table.demands_of_block(b).data(),
           capacities.data() + from * table.conditions(),
           table.conditions(),
           count,
           sizes,
           words.data(),
           1);
      for (std::size_t m = 0; m < count; ++m) {
        const std::uint64_t within = sizes & ~words[m];
        if (within != 0 && !first[from + m]) {
          first[from + m] = b * block + static_cast<std::size_t>(std::countr_zero(within));
          --open;
        }
      }
    }
  }
}

std::uint64_t exceeding_in_block(const DemandTable& table,
                                 std::size_t b,
                                 std::span<const double> capacities) {
  std::uint64_t exceeding = 0;
  chosen(std::nullopt)(table.demands_of_block(b).data(),
                       capacities.data(),
                       table.conditions(),
                       1,
                       table.sizes_of_block(b),
                       &exceeding,
                       1);
  return exceeding;
}

}  // namespace bismar
