// SPDX-License-Identifier: MIT
#include <bismar/sizing/study.hpp>

#include "sizing/front_search.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/floating_point_guard.hpp>

#include <algorithm>
#include <chrono>
#include <cstdint>
#include <optional>
#include <set>
#include <utility>

namespace bismar {

struct Study::Implementation {
  std::shared_ptr<const Catalogue> catalogue;
  Part part;  ///< Stays at its address, where what is remembered looks at it.
  Settings settings;
  FrontMemory memory;
  std::optional<Result> result;  ///< The last one of this part.
  bool is_whole = false;         ///< Whether it was not stopped.

  void solve(const RunOptions& run) {
    const auto start = std::chrono::steady_clock::now();
    const FloatingPointGuard guard;
    is_whole = false;
    result = make_front(part, *catalogue, settings, run, &memory);
    is_whole = !run.stop.stop_requested();
    look_first_at_designs();
    result->telemetry.seconds =
        std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
  }

  /// A small change of the part leaves most of its front what it was.
  void look_first_at_designs() {
    std::set<std::uint32_t> used;
    for (const auto& design : result->designs) {
      used.insert(design.candidate.material);
    }
    std::stable_partition(memory.order.begin(), memory.order.end(), [&](std::uint32_t material) {
      return used.contains(material);
    });
  }
};

Study::Study(Part part, std::shared_ptr<const Catalogue> catalogue, Settings settings)
    : implementation_(std::make_unique<Implementation>()) {
  const FloatingPointGuard guard;
  if (catalogue == nullptr) {
    throw Error({Code::invalid_argument,
                 "catalogue",
                 "null",
                 "a catalogue",
                 "A study needs the catalogue that its part is made from."});
  }
  validate(part, *catalogue, settings);
  implementation_->catalogue = std::move(catalogue);
  implementation_->part = std::move(part);
  implementation_->settings = std::move(settings);
}

Study::~Study() = default;
Study::Study(Study&& other) noexcept = default;
Study& Study::operator=(Study&& other) noexcept = default;

const Part& Study::part() const noexcept { return implementation_->part; }
const Settings& Study::settings() const noexcept { return implementation_->settings; }
const Catalogue& Study::catalogue() const noexcept { return *implementation_->catalogue; }

void Study::change(const std::function<void(Part&)>& edit) {
  auto& mine = *implementation_;
  Part edited = mine.part;
  edit(edited);
  const FloatingPointGuard guard;
  validate(edited, *mine.catalogue, mine.settings);
  if (!Kinds::are_same(mine.part, edited)) {
    mine.memory.kinds.reset();
  }
  mine.result.reset();
  mine.part = std::move(edited);
}

void Study::change_settings(const std::function<void(Settings&)>& edit) {
  auto& mine = *implementation_;
  Settings edited = mine.settings;
  edit(edited);
  const FloatingPointGuard guard;
  validate(mine.part, *mine.catalogue, edited);
  mine.result.reset();
  mine.settings = std::move(edited);
}

const Result& Study::solve(const RunOptions& run) {
  auto& mine = *implementation_;
  if (!mine.result || !mine.is_whole) {
    mine.solve(run);
  }
  return *mine.result;
}

const Design* Study::choice(ExchangeConstant alpha) {
  const Result& result = solve();
  const FloatingPointGuard guard;
  return bismar::choice(result, alpha);
}

ExchangeRuler Study::ruler(Per per) {
  const Result& result = solve();
  const auto& mine = *implementation_;
  return exchange_ruler(result, mine.part, *mine.catalogue, per, mine.settings);
}

Answer Study::why(const std::string& material) const {
  const auto& mine = *implementation_;
  return bismar::why(material, mine.part, *mine.catalogue, mine.settings);
}

}  // namespace bismar
