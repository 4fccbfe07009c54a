// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/part.hpp>
#include <bismar/sizing/result.hpp>

#include <cstddef>
#include <cstdint>
#include <map>
#include <set>
#include <span>
#include <string>
#include <vector>

namespace bismar {

/// Indices of the part's stock lists and finishes in the catalogue ("all" expanded; "none" is
/// Candidate::none).
[[nodiscard]] std::vector<std::uint32_t> stock_lists(const Part& part, const Catalogue& catalogue);
[[nodiscard]] std::vector<std::uint32_t> finish_choices(const Part& part,
                                                        const Catalogue& catalogue);
[[nodiscard]] std::vector<std::uint32_t> route_choices(const Part& part,
                                                       const Catalogue& catalogue);

/// Stock sizes of the part's lists that are not offered because they are marked doubtful.
[[nodiscard]] std::size_t doubtful_sizes(const Part& part,
                                         const Catalogue& catalogue,
                                         const Settings& settings);

/// Materials of one kind have the same candidates: what the rules of existence read of them is
/// equal.
class KindOrder {
 public:
  explicit KindOrder(const Catalogue& catalogue);
  [[nodiscard]] bool operator()(const MaterialInfo* a, const MaterialInfo* b) const;
  /// Whether a stock list names the material, which makes it a kind of its own.
  [[nodiscard]] bool is_named(const MaterialInfo& info) const { return named_.contains(info.id); }

 private:
  std::set<std::string, std::less<>> named_;
};

/// What can exist, kind of material by kind.
class Enumeration {
 public:
  /// Keeps views of both.
  Enumeration(const Part& part, const Catalogue& catalogue);

  /// All combinations that one material is asked for in.
  struct Kind {
    std::vector<Candidate> candidates;  ///< Their material is not set.
    std::size_t considered = 0;
    std::map<Rule, std::size_t> cannot_exist;
  };
  /// Valid as long as this.
  [[nodiscard]] const Kind& of(std::uint32_t material);

 private:
  void make(const MaterialInfo& info, Kind& kind) const;
  void add_route(const MaterialInfo& info, std::size_t r, Kind& kind) const;
  void add_finishes(Candidate candidate, const MaterialInfo& info, Kind& kind) const;

  const Part& part_;
  const Catalogue& catalogue_;
  std::vector<std::uint32_t> lists_;
  std::vector<std::uint32_t> finishes_;
  std::vector<std::uint32_t> routes_;
  std::vector<std::vector<bool>> can_leave_;  ///< [route][shape, then list]
  std::size_t per_route_ = 0;
  std::map<const MaterialInfo*, Kind, KindOrder> kinds_;
  std::map<Rule, Kind> not_asked_for_;
};

}  // namespace bismar
