// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/enumeration.hpp"
#include "sizing/study.hpp"

#include <bismar/exchange/penalty.hpp>

#include <cstddef>
#include <cstdint>
#include <map>
#include <memory>
#include <vector>

namespace bismar {

/// What can exist of a part, material by material, looked up once.
class Kinds {
 public:
  /// Keeps views of both.
  Kinds(const Part& part, const Catalogue& catalogue);
  Kinds(const Kinds&) = delete;
  Kinds& operator=(const Kinds&) = delete;
  Kinds(Kinds&&) = delete;
  Kinds& operator=(Kinds&&) = delete;
  ~Kinds() = default;

  [[nodiscard]] const Enumeration::Kind& of(std::uint32_t material) const { return *of_[material]; }
  [[nodiscard]] std::size_t considered() const { return considered_; }
  [[nodiscard]] const std::map<Rule, std::size_t>& cannot_exist() const { return cannot_exist_; }

  /// Whether what can exist of two parts is the same: nothing that its rules read differs.
  [[nodiscard]] static bool are_same(const Part& a, const Part& b);

 private:
  Enumeration enumeration_;
  std::vector<const Enumeration::Kind*> of_;  ///< [material]
  std::size_t considered_ = 0;
  std::map<Rule, std::size_t> cannot_exist_;
};

/// What a search leaves for the next one over the same catalogue. Nothing of it changes a result.
struct FrontMemory {
  /// Of the part at the same address with what it reads unchanged (Kinds::are_same()), or null.
  std::unique_ptr<const Kinds> kinds;
  /// Materials in the order in which they are worth looking at; empty: not known. The first ones
  /// make a front at once, so that the bounds of the others need not be compared beforehand.
  std::vector<std::uint32_t> order;
};

/// Solves what can be on the front or near it, and no more.
///
/// Materials are screened first: what they fail by themselves, which of them another replaces, and
/// lower bounds of mass and cost of each. Then they are taken in the order of those bounds; what
/// the points found so far beat by more than max(epsilon, near) in both objectives is left out. So
/// the designs that are kept do not depend on the order, on threads, or on which reductions are on.
///
/// Outcomes kept are those that may be on or near the front; the others are counted.
///
/// @param memory  Used, filled and brought up to date, or null.
[[nodiscard]] Solved search_front(const Part& part,
                                  const Catalogue& catalogue,
                                  const Settings& settings,
                                  const RunOptions& run,
                                  FrontMemory* memory = nullptr);

/// front() of a part that is known to be valid, without its time; under a FloatingPointGuard.
[[nodiscard]] Result make_front(const Part& part,
                                const Catalogue& catalogue,
                                const Settings& settings,
                                const RunOptions& run,
                                FrontMemory* memory = nullptr);

/// The design of the front with the least Z, or null (see Study::choice()).
[[nodiscard]] const Design* choice(const Result& result, ExchangeConstant alpha);

}  // namespace bismar
