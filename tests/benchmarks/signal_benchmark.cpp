#include <benchmark/benchmark.h>

#include <string>
#include <vector>

#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/measure_peak.hpp"
#include "support/simulator.hpp"

// How many traces a core measures in a second once they are decoded.

namespace loqsmith {
namespace {

constexpr int kTraces = 16;
constexpr double kTimes[] = {4.0, 7.5, 11.0};
constexpr double kSigma = 0.025;  ///< minutes; 35 points at half height
constexpr double kAway = 0.1;     ///< minutes; a neighbour at resolution 1.0

using Overlap = IntegrationSettings::Overlap;

// 9,000 points over 15 minutes: ten a second. Each analyte may have a neighbour
// behind it.
test::SimulatedTrace detector(double height, double neighbour = 0.0) {
  test::SimulatedTrace wanted;
  wanted.step_minutes = 1.0 / 600.0;
  wanted.end_minutes = 8999.0 / 600.0;
  wanted.offset = 30.0;
  wanted.drift_per_minute = 0.5;
  wanted.white_noise = 1.0;
  for (const double minutes : kTimes) {
    if (!(height > 0.0)) break;
    const double area = kSigma * 2.5066;
    wanted.peaks.push_back({minutes, kSigma, height * area, 0.01});
    if (!(neighbour > 0.0)) continue;
    wanted.peaks.push_back({minutes + kAway, kSigma, neighbour * area, 0.01});
  }
  return wanted;
}

// What the learning pass leaves, and traces to measure.
struct Night {
  std::vector<TargetSettings> targets;
  std::vector<WindowTemplate> windows;
  std::vector<Outcome<NoiseEstimate>> noises;
  std::vector<Trace> traces;
};

Night prepare(double height, double neighbour = 0.0,
              Overlap overlap = Overlap::Drop) {
  Night night;
  RandomStream stream("benchmark");
  const Trace standard = simulate_trace(detector(500.0), stream);
  const Trace blank = simulate_trace(detector(0.0), stream);
  for (const double minutes : kTimes) {
    TargetSettings target;
    target.id = "analyte " + std::to_string(night.targets.size() + 1);
    target.retention_minutes = minutes;
    target.integration.overlap = overlap;
    const auto seen = observe_teacher(standard, target, 1, Role::Standard);
    const auto window = learn_template({*seen});
    night.noises.push_back(measure_noise(
        blank, minutes, window->width_half_minutes, target.noise));
    night.windows.push_back(*window);
    night.targets.push_back(std::move(target));
  }
  for (int i = 0; i < kTraces; ++i) {
    night.traces.push_back(simulate_trace(detector(height, neighbour), stream));
  }
  return night;
}

void measure_all(const Night& night, benchmark::State& state) {
  std::size_t next = 0;
  for (auto _ : state) {
    const Trace& trace = night.traces[next++ % kTraces];
    for (std::size_t k = 0; k < night.targets.size(); ++k) {
      benchmark::DoNotOptimize(measure_peak(trace, night.targets[k],
                                            night.windows[k], kTimes[k] + 0.008,
                                            night.noises[k], "blank 1"));
    }
  }
  state.SetItemsProcessed(state.iterations());
}

void measure_traces(benchmark::State& state) {
  measure_all(prepare(static_cast<double>(state.range(0))), state);
}
BENCHMARK(measure_traces)->Arg(0)->Arg(10)->Arg(200);

// The smaller of each pair at 100 times the noise. Counts the pairs of the
// first trace whose model is fitted.
void measure_pairs_by_model(benchmark::State& state) {
  const Night night = prepare(100.0, 500.0, Overlap::Model);
  measure_all(night, state);
  for (std::size_t k = 0; k < night.targets.size(); ++k) {
    const auto peak =
        measure_peak(night.traces[0], night.targets[k], night.windows[k],
                     kTimes[k] + 0.008, night.noises[k], "blank 1");
    if (peak && peak->overlap == "model") state.counters["fitted"] += 1;
  }
}
BENCHMARK(measure_pairs_by_model);

void learn_from_a_trace(benchmark::State& state) {
  const Night night = prepare(200.0);
  std::size_t next = 0;
  for (auto _ : state) {
    const Trace& trace = night.traces[next++ % kTraces];
    for (const TargetSettings& target : night.targets) {
      benchmark::DoNotOptimize(
          observe_teacher(trace, target, 1, Role::Standard));
    }
  }
  state.SetItemsProcessed(state.iterations());
}
BENCHMARK(learn_from_a_trace);

void noise_of_a_blank(benchmark::State& state) {
  const Night night = prepare(0.0);
  std::size_t next = 0;
  for (auto _ : state) {
    const Trace& trace = night.traces[next++ % kTraces];
    for (std::size_t k = 0; k < night.targets.size(); ++k) {
      benchmark::DoNotOptimize(measure_noise(
          trace, kTimes[k], night.windows[k].width_half_minutes, {}));
    }
  }
  state.SetItemsProcessed(state.iterations());
}
BENCHMARK(noise_of_a_blank);

}  // namespace
}  // namespace loqsmith

BENCHMARK_MAIN();
