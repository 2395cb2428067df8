// The parts of a step over the number of cells, for one lane and for four.
#include <benchmark/benchmark.h>

#include <memory>
#include <vector>

#include "palier/heat/implicit_step.hpp"
#include "palier/heat/tridiagonal.hpp"

namespace {

using namespace palier;

/// A pure metal against a fixed wall, invented round numbers.
std::unique_ptr<const heat::Body> slab(int cells) {
  alloy::MetalProperties metal;
  metal.density = 2500;
  metal.latent_heat = 4e5;
  metal.solid = {base::Table(1100), base::Table(200)};
  metal.liquid = {base::Table(1100), base::Table(90)};
  heat::Boundary wall;
  wall.kind = heat::Boundary::Kind::fixed_temperature;
  wall.temperature = 600;
  std::vector<heat::BodyLayer> layers;
  layers.push_back({std::make_shared<const alloy::EnthalpyCurve>(metal, alloy::pure_path(933), 500, 1000),
                    heat::graded_widths(0.1, cells, 1.0),
                    {}});
  return std::make_unique<const heat::Body>(heat::Shape::plate, 0.0, std::move(layers), 0, heat::Boundary{}, wall);
}

template <class Real>
void step(benchmark::State& state) {
  const auto body = slab(static_cast<int>(state.range(0)));
  heat::Bodies<Real> bodies;
  bodies.fill(body.get());
  const auto n = static_cast<std::size_t>(state.range(0));
  heat::ImplicitStep<Real> stepper(bodies, std::vector<Real>(n, base::all_lanes<Real>(1e9)));
  heat::State<Real> from = stepper.start(std::vector<Real>(n, base::all_lanes<Real>(body->metal_curve().enthalpy(960))),
                                         base::all_lanes<Real>(0));
  heat::State<Real> to = from;
  Real error = base::all_lanes<Real>(0);
  for (auto _ : state)
    benchmark::DoNotOptimize(
        stepper.advance(from, base::all_lanes<Real>(0), base::all_lanes<Real>(1e-3), 1e-7, to, error).iterations);
  state.SetItemsProcessed(state.iterations() * state.range(0) * base::lane_count<Real>);
}
BENCHMARK_TEMPLATE(step, double)->RangeMultiplier(4)->Range(64, 4096);
BENCHMARK_TEMPLATE(step, base::Lanes<4>)->RangeMultiplier(4)->Range(64, 4096);

void tridiagonal(benchmark::State& state) {
  const auto n = static_cast<std::size_t>(state.range(0));
  heat::Tridiagonal<double> matrix(n);
  matrix.lower.assign(n, -1);
  matrix.upper.assign(n, -1);
  matrix.diagonal.assign(n, 3);
  std::vector<double> right(n, 1);
  for (auto _ : state) {
    matrix.solve(right);
    benchmark::DoNotOptimize(right.data());
    benchmark::ClobberMemory();
  }
  state.SetItemsProcessed(state.iterations() * state.range(0));
}
BENCHMARK(tridiagonal)->RangeMultiplier(4)->Range(64, 4096);

}  // namespace
