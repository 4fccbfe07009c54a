// SPDX-License-Identifier: MIT
// One utilisation of every limit state that a bent and twisted steel tube in compression can meet.
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
  LoadEffects effects = reduce(cantilever({force(400.0, length),
                                           force(200.0, length, Along::y),
                                           torque(150.0, length),
                                           axial(-2000.0)}),
                               length);
  std::vector<const LimitState*> states;

  Tube() {
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

void utilisations(benchmark::State& state) {
  const Tube tube;
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

BENCHMARK(utilisations)->Name("limit_states/bent_twisted_tube");
BENCHMARK(utilisations_and_section)->Name("limit_states/with_section");

/// Each limit state on its own.
void one_utilisation(benchmark::State& state, const LimitState* limit) {
  const Tube tube;
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
  for (const LimitState* limit : Tube().states) {
    const std::string name = "limit_state/" + std::string(limit->id());
    benchmark::RegisterBenchmark(name.c_str(), one_utilisation, limit);
  }
  return true;
}();

}  // namespace

}  // namespace bismar::benchmarks
