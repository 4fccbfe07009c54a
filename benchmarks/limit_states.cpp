// SPDX-License-Identifier: MIT
// One utilisation of every limit state that a bent and twisted steel tube in compression can meet:
// the ones that a plain job causes, and all that a job can name.
#include <benchmark/benchmark.h>

#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section.hpp>

#include <vector>

namespace bismar::benchmarks {

namespace {

constexpr double length = 1.2;

struct Tube {
  SectionProperties section = bismar::round_tube(60.3e-3, 4e-3, Forming::hot_finished);
  MemberMaterial material;
  MemberLimits limits;
  LoadEffects effects;
  std::vector<const LimitState*> states;

  static LoadCase loads() {
    return cantilever({force(400.0, length),
                       force(200.0, length, Along::y),
                       torque(150.0, length),
                       axial(-2000.0)});
  }

  void name_everything() {
    LoadCase load_case = loads();
    load_case.fatigue = FatigueLoading{.cycles = 2e5, .stress_ratio = 0.0};
    load_case.eccentricity = 2e-3;
    load_case.acceleration_z = 9.80665;
    load_case.temperature_change = 20.0;
    effects = reduce(load_case, length);
    material.alpha = 12e-6;
    material.K_Ic = 80e6;
    material.steel = true;
    material.weld_yield_factor = material.weld_tensile_factor = 1.0;
    limits.rotation = 0.05;
    limits.frequency = 5.0;
    limits.elongation = 2e-3;
    limits.details.net_area = 0.9;
    limits.details.net_modulus = 0.85;
    limits.details.k_t_bending = 2.0;
    limits.details.notch_radius = 3e-3;
    limits.details.welded = true;
    limits.details.crack = Crack{.kind = Crack::Kind::surface, .depth = 5e-4, .half_length = 1e-3};
    limits.details.masses = {{2.0, length}};
  }

  explicit Tube(bool everything = false) : effects(reduce(loads(), length)) {
    material.rho = 7850.0;
    material.E = 210e9;
    material.G = 81e9;
    material.sigma_y = 355e6;
    material.tensile = 490e6;
    limits.deflection = 20e-3;
    limits.twist = 0.05;
    limits.height = 0.1;
    limits.width = 0.1;
    limits.wall = 3e-3;
    if (everything) {
      name_everything();
    }
    for (const LimitState* state : limit_states()) {
      if (state->applies(effects, limits, material, section)) {
        states.push_back(state);
      }
    }
  }
};

double all_utilisations(const Tube& tube, const SectionProperties& section) {
  double sum = 0.0;
  for (const LimitState* state : tube.states) {
    const CheckInput input{section, tube.material, tube.effects, tube.limits, length, 1.5};
    sum += state->utilisation(input);
  }
  return sum;
}

void report(benchmark::State& state, const Tube& tube, double sum) {
  state.counters["n"] = static_cast<double>(tube.states.size());
  state.counters["size"] = static_cast<double>(tube.effects.stations.size());
  state.counters["checksum"] = sum;
  state.SetItemsProcessed(state.iterations() * static_cast<std::int64_t>(tube.states.size()));
}

void utilisations(benchmark::State& state, bool everything) {
  const Tube tube(everything);
  double sum = 0.0;
  for (auto _ : state) {
    sum = all_utilisations(tube, tube.section);
    benchmark::DoNotOptimize(sum);
  }
  report(state, tube, sum);
}

void utilisations_and_section(benchmark::State& state) {
  const Tube tube;
  double sum = 0.0;
  for (auto _ : state) {
    sum = all_utilisations(tube, bismar::round_tube(60.3e-3, 4e-3, Forming::hot_finished));
    benchmark::DoNotOptimize(sum);
  }
  report(state, tube, sum);
}

BENCHMARK_CAPTURE(utilisations, plain, false)->Name("limit_states/bent_twisted_tube");
BENCHMARK_CAPTURE(utilisations, everything, true)->Name("limit_states/everything_named");
BENCHMARK(utilisations_and_section)->Name("limit_states/with_section");

/// Each limit state on its own.
void one_utilisation(benchmark::State& state, const LimitState* limit) {
  const Tube tube(true);
  double u = 0.0;
  for (auto _ : state) {
    const CheckInput input{tube.section, tube.material, tube.effects, tube.limits, length, 1.5};
    u = limit->utilisation(input);
    benchmark::DoNotOptimize(u);
  }
  state.counters["n"] = 1.0;
  state.counters["size"] = static_cast<double>(tube.effects.stations.size());
  state.counters["checksum"] = u;
}

const bool each_registered = [] {
  for (const LimitState* limit : Tube(true).states) {
    const std::string name = "limit_state/" + std::string(limit->id());
    benchmark::RegisterBenchmark(name.c_str(), one_utilisation, limit);
  }
  return true;
}();

}  // namespace

}  // namespace bismar::benchmarks
