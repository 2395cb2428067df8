// CPU time of whole runs of the check cases: reading apart, companion run and recording included.
#include <benchmark/benchmark.h>

#include <string>

#include "palier/files/case_file.hpp"
#include "palier/freeze/run.hpp"
#include "palier/freeze/setup.hpp"
#include "palier/heat/march.hpp"

namespace {

using namespace palier;

freeze::Section section(const std::string& name) {
  const std::string cases = std::string(PALIER_SOURCE_DIR) + "/cases";
  return files::read_case(cases + "/checks/" + name + ".yaml", cases).section;
}

/// @param accuracy in ppm as the argument
void whole_run(benchmark::State& state, const std::string& name) {
  freeze::Section s = section(name);
  s.accuracy = 1e-6 * static_cast<double>(state.range(0));
  long steps = 0;
  for (auto _ : state) steps = freeze::run(s).steps;
  state.counters["steps"] = static_cast<double>(steps);
}

/// The march alone, to the end of freezing of the check case (or its own end), at the default accuracy.
void march_alone(benchmark::State& state, const std::string& name) {
  const freeze::Section s = section(name);
  const auto metal = freeze::metal_curve(s);
  const double end = freeze::run(s).end_time;
  const freeze::Resolution resolution = freeze::resolution_for(s);
  long iterations = 0;
  double cells = 0;
  for (auto _ : state) {
    const freeze::Setup setup = freeze::set_up(s, resolution, metal);
    heat::March march(*setup.body, setup.enthalpy, setup.scale, resolution.tolerance);
    while (march.time() < end) march.step(end);
    iterations = march.counts().iterations;
    cells = setup.body->cells();
  }
  state.counters["iterations"] = static_cast<double>(iterations);
  state.counters["ns_per_cell_iteration"] =
      benchmark::Counter(1e-9 * static_cast<double>(iterations) * cells,
                         benchmark::Counter::kIsIterationInvariantRate | benchmark::Counter::kInvert);
}

BENCHMARK_CAPTURE(whole_run, P1, "p1")->Arg(1000)->Arg(100)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(whole_run, P2, "p2")->Arg(1000)->Arg(100)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(whole_run, P3, "p3")->Arg(1000)->Arg(100)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(whole_run, P4, "p4")->Arg(1000)->Arg(100)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(whole_run, P5, "p5")->Arg(1000)->Arg(100)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(march_alone, P1, "p1")->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(march_alone, P2, "p2")->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(march_alone, P3, "p3")->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(march_alone, P4, "p4")->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(march_alone, P5, "p5")->Unit(benchmark::kMillisecond);

}  // namespace
