// SPDX-License-Identifier: MIT
// The certified front: levers whose shapes have free sizes, what each reduction buys, tables of
// many variants, two threads, and the memory beyond the table.
#include "inputs.hpp"

#include <benchmark/benchmark.h>

#include <bismar/sizing/front.hpp>

#include <algorithm>
#include <atomic>
#include <chrono>
#include <cstdlib>
#include <limits>
#include <map>
#include <new>
#include <random>
#include <span>
#include <string>
#include <thread>
#include <utility>
#include <vector>

// Memory is counted where the C library tells the size of a block; sanitizers have a heap of their
// own.
#if defined(__GLIBC__) && !defined(__SANITIZE_ADDRESS__) && !defined(__SANITIZE_THREAD__)
#define BISMAR_COUNTED_MEMORY
#include <malloc.h>

namespace bismar::benchmarks {

namespace {

/// Bytes of what operator new gave and delete has not taken back, while a MemoryCount counts.
struct LiveBytes {
  std::atomic<bool> counts = false;
  std::atomic<std::ptrdiff_t> now = 0;
  std::atomic<std::ptrdiff_t> peak = 0;

  void add(void* block) {
    const auto bytes = static_cast<std::ptrdiff_t>(malloc_usable_size(block));
    const auto reached = now.fetch_add(bytes, std::memory_order_relaxed) + bytes;
    auto seen = peak.load(std::memory_order_relaxed);
    while (reached > seen && !peak.compare_exchange_weak(seen, reached)) {
    }
  }
  void remove(void* block) {
    now.fetch_sub(static_cast<std::ptrdiff_t>(malloc_usable_size(block)),
                  std::memory_order_relaxed);
  }
};

LiveBytes live_bytes;

/// Counts from its construction on: what lived before is left out. One at a time.
class MemoryCount {
 public:
  MemoryCount() {
    live_bytes.now = 0;
    live_bytes.peak = 0;
    live_bytes.counts = true;
  }
  ~MemoryCount() { live_bytes.counts = false; }
  MemoryCount(const MemoryCount&) = delete;
  MemoryCount& operator=(const MemoryCount&) = delete;
  [[nodiscard]] std::ptrdiff_t peak() const { return live_bytes.peak; }
};

}  // namespace

}  // namespace bismar::benchmarks

// Those of arrays and of sizes call these; those of larger alignment are not counted.
void* operator new(std::size_t bytes) {
  void* block = std::malloc(bytes == 0 ? 1 : bytes);  // NOLINT(cppcoreguidelines-no-malloc)
  if (block == nullptr) {
    throw std::bad_alloc();
  }
  if (bismar::benchmarks::live_bytes.counts.load(std::memory_order_relaxed)) {
    bismar::benchmarks::live_bytes.add(block);
  }
  return block;
}
void operator delete(void* block) noexcept {
  if (block != nullptr && bismar::benchmarks::live_bytes.counts.load(std::memory_order_relaxed)) {
    bismar::benchmarks::live_bytes.remove(block);
  }
  std::free(block);  // NOLINT(cppcoreguidelines-no-malloc)
}
void operator delete(void* block, std::size_t /*bytes*/) noexcept { operator delete(block); }
#endif

namespace bismar::benchmarks {

namespace {

using Clock = std::chrono::steady_clock;

double seconds_since(Clock::time_point start) {
  return std::chrono::duration<double>(Clock::now() - start).count();
}

/// The lever of the demo job without its choice of route and section: 300 mm, 655 N at its end,
/// 12 mm of deflection, 10,000 parts.
Part lever(std::vector<Shape> shapes) {
  Part part;
  part.name = "crank lever";
  part.quantity = 10'000.0;
  part.body.length = 0.3;
  part.body.shapes = std::move(shapes);
  part.body.load_cases = {cantilever({force(655.0, 0.3)}, "tightening")};
  part.limits.deflection = 12e-3;
  return part;
}

/// 8 to 80 mm high; every ratio is free.
const ShapeOptions& all_free() {
  static const ShapeOptions options = {.height_min = 8e-3, .height_max = 80e-3};
  return options;
}

/// The shapes with one to three free sizes.
std::vector<Shape> up_to_three_sizes() {
  const auto& free = all_free();
  return {round(free),
          square(free),
          hexagon(free),
          rectangle(free),
          ellipse(free),
          round_tube(free),
          rectangular_tube(free),
          elliptical_tube(free)};
}

std::vector<Shape> solid_shapes() {
  const auto& free = all_free();
  return {round(free), square(free), hexagon(free), rectangle(free), ellipse(free)};
}

std::vector<Shape> free_tubes() { return {round_tube(all_free()), rectangular_tube(all_free())}; }

void report(benchmark::State& state, const Result& result) {
  std::vector<double> costs;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    costs.push_back(result.designs[i].cost);
  }
  const auto& work = result.telemetry;
  state.counters["n"] = static_cast<double>(result.funnel.considered);
  state.counters["size"] = static_cast<double>(result.front_count);
  state.counters["checksum"] = checksum(costs);
  state.counters["boxes"] = static_cast<double>(work.boxes);
  state.counters["evaluations"] = static_cast<double>(work.evaluations);
  state.counters["skipped"] = static_cast<double>(work.skipped);
  state.counters["dominated"] = static_cast<double>(work.dominated);
  state.counters["epsilon"] = result.epsilon_reached;
}

void lever_of(benchmark::State& state, const std::vector<Shape>& shapes) {
  const auto& catalogue = starter();
  const auto part = lever(shapes);
  Result result;
  for (auto _ : state) {
    result = front(part, catalogue);
    benchmark::DoNotOptimize(&result);
  }
  report(state, result);
}

/// Whether both have the same designs, bit for bit.
bool are_same(const Result& a, const Result& b) {
  return a.front_count == b.front_count &&
         std::equal(a.designs.begin(),
                    a.designs.end(),
                    b.designs.begin(),
                    b.designs.end(),
                    [](const Design& one, const Design& other) {
                      return one.id == other.id && one.size == other.size &&
                             one.free_sizes == other.free_sizes && one.mass == other.mass &&
                             one.cost == other.cost;
                    });
}

/// Whether the front of `cover` keeps its promise for every design on the front of `covered`.
bool covers(const Result& cover, const Result& covered) {
  // A covered design may use up the last share delta of a limit. Making it that much stronger
  // takes about as much more mass and cost; ten times that is allowed for.
  const double within = 1.0 + Settings{}.epsilon + 10.0 * Settings{}.delta;
  const auto front_of = [](const Result& result) {
    return std::span(result.designs).first(result.front_count);
  };
  return std::ranges::all_of(front_of(covered), [&](const Design& one) {
    return std::ranges::any_of(front_of(cover), [&](const Design& other) {
      return other.mass <= within * one.mass && other.cost <= within * one.cost;
    });
  });
}

struct Switch {
  const char* name;
  bool Reductions::*reduction;
  /// The promise, not the designs, is what stays: another search finds other points within epsilon.
  bool changes_search;
};

constexpr Switch switches[] = {{"material_limits", &Reductions::material_limits, false},
                               {"dominance", &Reductions::dominance, false},
                               {"bounds", &Reductions::bounds, false},
                               {"skipping", &Reductions::skipping, false},
                               {"one_point", &Reductions::one_point, true},
                               {"directions", &Reductions::directions, true}};

/// The same front without one of the reductions, or (null) with all of them.
void without(benchmark::State& state, const std::vector<Shape>& shapes, const Switch* left_out) {
  const auto& catalogue = starter();
  const auto part = lever(shapes);
  RunOptions run;
  if (left_out != nullptr) {
    run.reductions.*left_out->reduction = false;
  }
  Result result;
  for (auto _ : state) {
    result = front(part, catalogue, {}, run);
    benchmark::DoNotOptimize(&result);
  }
  report(state, result);
  const auto whole = front(part, catalogue);
  const bool agree = left_out != nullptr && left_out->changes_search
                         ? covers(whole, result) && covers(result, whole)
                         : are_same(whole, result);
  if (!agree) {
    state.SkipWithError("the front is another one without this reduction");
  }
}

/// Kinds of values that a variant changes together, so that rows stay possible: a yield strength
/// below the tensile strength, a shear modulus that fits Young's.
enum class Changed { not_at_all, density, stiffness, strength, price };

Changed changed(Property property) {
  switch (property) {
    case Property::density:
    case Property::density_05:
      return Changed::density;
    case Property::youngs_modulus:
    case Property::youngs_modulus_transverse:
    case Property::youngs_modulus_axial:
    case Property::youngs_modulus_05:
    case Property::shear_modulus:
    case Property::shear_modulus_05:
    case Property::shear_modulus_planar:
      return Changed::stiffness;
    case Property::yield_strength:
    case Property::tensile_strength:
    case Property::compressive_strength:
    case Property::flexural_strength:
    case Property::shear_strength:
    case Property::shear_strength_planar:
    case Property::tensile_strength_transverse:
    case Property::compressive_strength_transverse:
    case Property::flexural_strength_transverse:
    case Property::endurance_limit:
      return Changed::strength;
    case Property::price:
      return Changed::price;
    default:
      return Changed::not_at_all;
  }
}

MaterialTableBuilder::Row row_of(const MaterialTable& table, const ThicknessStep& step) {
  MaterialTableBuilder::Row row;
  row.info = table.info(table.material_of(step.row));
  row.info.basis = table.basis(step.row);
  row.above = step.above;
  if (step.up_to < std::numeric_limits<double>::infinity()) {
    row.up_to = step.up_to;
  }
  for (const auto& property : properties()) {
    if (const auto value = table.value(property.property, step.row)) {
      row.values[property.property] = *value;
    }
  }
  for (const auto& name : table.text_names()) {
    if (const auto text = table.text(name, step.row); !text.empty()) {
      row.texts[name] = text;
    }
  }
  return row;
}

/// The starter catalogue with `n` materials: the starter ones as they are, then synthetic variants
/// of them, whose density, stiffness, strength and price are each up to 10 % off; fixed seed.
Catalogue enlarged(std::size_t n) {
  const auto& table = starter().materials;
  std::mt19937_64 random(3);
  std::uniform_real_distribution<double> factor(0.9, 1.1);
  MaterialTableBuilder builder("variants", table.currency());
  for (std::size_t i = 0; i < n; ++i) {
    const auto material = i % table.size();
    const auto copy = i / table.size();
    std::map<Changed, double> factors = {{Changed::not_at_all, 1.0}};
    for (const auto what :
         {Changed::density, Changed::stiffness, Changed::strength, Changed::price}) {
      const double drawn = factor(random);
      factors[what] = copy == 0 ? 1.0 : drawn;
    }
    for (const auto& step : table.steps(material)) {
      auto row = row_of(table, step);
      if (copy > 0) {
        row.info.id += "-variant-" + std::to_string(copy);
      }
      for (auto& [property, value] : row.values) {
        const double by = factors.at(changed(property));
        value = {by * value.low, by * value.high};
      }
      builder.add(std::move(row));
    }
  }
  Catalogue out = starter();
  out.materials = builder.build();
  return out;
}

const Catalogue& variants(std::size_t n) {
  // One at a time: the large ones take a lot of memory.
  static std::pair<std::size_t, Catalogue> kept;
  if (kept.first != n) {
    kept = {};
    kept = {n, enlarged(n)};
  }
  return kept.second;
}

void many_variants(benchmark::State& state, const std::vector<Shape>& shapes, double near) {
  const auto n = static_cast<std::size_t>(state.range(0));
  const auto& catalogue = variants(n);
  const auto part = lever(shapes);
  const Settings settings = {.near = near};
  Result result;
  for (auto _ : state) {
    result = front(part, catalogue, settings);
    benchmark::DoNotOptimize(&result);
  }
  report(state, result);
  state.counters["materials"] = static_cast<double>(n);
  state.counters["per_material"] = benchmark::Counter(
      static_cast<double>(n),
      benchmark::Counter::kIsIterationInvariantRate | benchmark::Counter::kInvert);
  if (n == starter().materials.size() && !are_same(result, front(part, starter(), settings))) {
    state.SkipWithError("the copied table gives another front than the starter table");
  }
#ifdef BISMAR_COUNTED_MEMORY
  // The run's own peak, its result included.
  const MemoryCount memory;
  const auto counted = front(part, catalogue, settings);
  state.counters["peak_bytes_per_material"] =
      static_cast<double>(memory.peak()) / static_cast<double>(n);
#endif
}

/// One front on two threads beside two whole fronts, each on a thread of its own: as fast as two
/// processors could be on this machine at this moment. The best of several rounds each.
void two_threads(benchmark::State& state, const std::vector<Shape>& shapes) {
  const auto& catalogue = starter();
  const auto part = lever(shapes);
  double alone = std::numeric_limits<double>::infinity();
  double shared = alone;
  double copies = alone;
  Result results[4];
  for (auto _ : state) {
    auto start = Clock::now();
    results[0] = front(part, catalogue);
    alone = std::min(alone, seconds_since(start));
    start = Clock::now();
    results[1] = front(part, catalogue, {}, {.threads = 2});
    const double took = seconds_since(start);
    shared = std::min(shared, took);
    state.SetIterationTime(took);
    start = Clock::now();
    {
      std::thread other([&] { results[2] = front(part, catalogue); });
      results[3] = front(part, catalogue);
      other.join();
    }
    copies = std::min(copies, seconds_since(start));
  }
  report(state, results[1]);
  state.counters["one_thread_s"] = alone;
  state.counters["two_threads_s"] = shared;
  state.counters["two_copies_s"] = copies;
  state.counters["speedup"] = alone / shared;
  // 1: two threads make a front in half the time in which two copies make two.
  state.counters["of_two_copies"] = 0.5 * copies / shared;
  if (!std::all_of(std::begin(results), std::end(results), [&](const Result& one) {
        return are_same(one, results[0]);
      })) {
    state.SkipWithError("threads change the front");
  }
}

template <class Function, class... Arguments>
benchmark::internal::Benchmark* add(const std::string& name,
                                    Function function,
                                    Arguments... arguments) {
  return benchmark::RegisterBenchmark(
             name.c_str(), [=](benchmark::State& state) { function(state, arguments...); })
      ->Unit(benchmark::kMillisecond);
}

const bool registered = [] {
  add("certified/lever_free_shapes", lever_of, up_to_three_sizes());
  const auto& free = all_free();
  const std::pair<const char*, Shape> families[] = {{"round", round(free)},
                                                    {"square", square(free)},
                                                    {"hexagon", hexagon(free)},
                                                    {"rectangle", rectangle(free)},
                                                    {"ellipse", ellipse(free)},
                                                    {"round_tube", round_tube(free)},
                                                    {"rectangular_tube", rectangular_tube(free)},
                                                    {"elliptical_tube", elliptical_tube(free)},
                                                    {"i_section", i_section(free)},
                                                    {"channel", channel(free)},
                                                    {"tee", tee(free)},
                                                    {"angle", angle(free)}};
  for (const auto& [name, shape] : families) {
    add(std::string("certified/lever/") + name, lever_of, std::vector<Shape>{shape});
  }
  const std::pair<const char*, std::vector<Shape>> sets[] = {
      {"solid", solid_shapes()}, {"tubes", free_tubes()}, {"six_fixed", wide_lever().body.shapes}};
  for (const auto& [name, shapes] : sets) {
    const std::string prefix = std::string("certified/reductions/") + name;
    add(prefix + "/all", without, shapes, static_cast<const Switch*>(nullptr));
    for (const auto& one : switches) {
      add(prefix + "/without_" + one.name, without, shapes, &one);
    }
  }
  for (const auto& [name, near] : {std::pair{"near_0.05", 0.05}, std::pair{"near_0", 0.0}}) {
    const std::string prefix = std::string("certified/variants/") + name;
    for (const auto n : {std::int64_t{498}, std::int64_t{88'000}}) {
      add(prefix + "/six_fixed", many_variants, wide_lever().body.shapes, near)->Arg(n);
      add(prefix + "/tubes", many_variants, free_tubes(), near)->Arg(n);
    }
  }
  add("certified/two_threads", two_threads, up_to_three_sizes())->UseManualTime()->Iterations(3);
  return true;
}();

}  // namespace

}  // namespace bismar::benchmarks
