// Four cases in the lanes of one step against four steps of one case each.
#include <algorithm>
#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <memory>

#include "heat/bodies.hpp"
#include "palier/heat/implicit_step.hpp"

using namespace palier;
using namespace palier::heat;

namespace {

using Four = base::Lanes<4>;

Boundary film() {
  Boundary b;
  b.kind = Boundary::Kind::film;
  b.film_coefficient = 4000;
  b.temperature = 300;
  return b;
}

/// Four bodies of the same cell counts that differ in all else.
std::array<Body, 4> four_bodies() {
  return {body_of({Shape::plate, 0, 0.020, 10, 6, 0}, pure_metal(), {}, {}, film()),
          body_of({Shape::cylinder, 0, 0.030, 10, 6, 0}, range_metal(), {Contact::Over::constant, base::Table(5000)},
                  {}, film()),
          body_of({Shape::sphere, 0, 0.025, 10, 6, 0}, pure_metal(),
                  {Contact::Over::surface_temperature, base::Table({300.0, 1200}, {1000, 9000})}, {}, film()),
          body_of({Shape::plate, 0, 0.004, 10, 6, 0}, range_metal(),
                  {Contact::Over::surface_fraction_solid, base::Table({0.0, 1}, {9000, 2000})}, {}, film())};
}

constexpr std::array<double, 4> pouring{960, 853, 940, 853};

std::vector<double> start_of(const Body& body, double poured) {
  std::vector<double> enthalpy;
  enthalpy.reserve(body.volume().size());
  for (int i = 0; i < body.cells(); ++i)
    enthalpy.push_back(body.curve(body.layer_of(i)).enthalpy(body.layer_of(i) == body.metal() ? poured : 320));
  return enthalpy;
}

std::vector<double> scale_of(const Body& body) {
  std::vector<double> scale;
  scale.reserve(body.volume().size());
  for (int i = 0; i < body.cells(); ++i) scale.push_back(body.layer_of(i) == body.metal() ? 1.2e9 : 1.0e9);
  return scale;
}

std::vector<Four> joined(const std::array<std::vector<double>, 4>& lanes) {
  std::vector<Four> out(lanes[0].size());
  for (int l = 0; l < 4; ++l)
    for (std::size_t i = 0; i < out.size(); ++i) out[i][l] = lanes[static_cast<std::size_t>(l)][i];
  return out;
}

}  // namespace

TEST_CASE("Lanes: four cases at once give what each gives alone, fronts moving", "[heat][lanes]") {
  const std::array<Body, 4> bodies = four_bodies();
  std::array<std::vector<double>, 4> starts, scales;
  std::array<std::unique_ptr<ImplicitStep<double>>, 4> alone;
  std::array<State<double>, 4> from, to;
  for (std::size_t l = 0; l < 4; ++l) {
    starts[l] = start_of(bodies[l], pouring[l]);
    scales[l] = scale_of(bodies[l]);
    alone[l] = std::make_unique<ImplicitStep<double>>(Bodies<double>{&bodies[l]}, scales[l]);
    to[l] = from[l] = alone[l]->start(starts[l], 0.0);
  }
  ImplicitStep<Four> together({&bodies[0], &bodies[1], &bodies[2], &bodies[3]}, joined(scales));
  State<Four> all_from = together.start(joined(starts), Four::Zero()), all_to = all_from;

  // Each lane has its own time and its own length of steps, so long that its front crosses cells.
  const Four lengths{2.5, 4.0, 1.0, 0.5};
  Four time = Four::Zero(), error;
  constexpr double newton = 1e-13;
  std::array<int, 4> crossed{};
  for (int step = 0; step < 20; ++step) {
    const StepReport report = together.advance(all_from, time, lengths, newton, all_to, error);
    CAPTURE(step, report.iterations, report.residual, report.worst_cell);
    REQUIRE(report.status == StepReport::Status::made);
    for (int l = 0; l < 4; ++l) {
      const auto s = static_cast<std::size_t>(l);
      double error_alone = 0;
      CAPTURE(l);
      const StepReport report_alone = alone[s]->advance(from[s], time[l], lengths[l], newton, to[s], error_alone);
      REQUIRE(report_alone.status == StepReport::Status::made);
      double worst = 0;
      for (std::size_t i = 0; i < scales[s].size(); ++i) {
        worst = std::max(worst, std::abs(all_to.enthalpy[i][l] - to[s].enthalpy[i]) / scales[s][i]);
        worst = std::max(worst, std::abs(all_to.unknown[i][l] - to[s].unknown[i]) / scales[s][i]);
      }
      CHECK(worst <= 1e-12);
      CHECK(error[l] == Approx(error_alone).epsilon(1e-6).margin(1e-12));
      alone[s]->adopt_fronts(to[s], time[l] + lengths[l]);
      const Fronts &before = from[s].fronts[0], &now = to[s].fronts[0];
      if (before.count > 0 && now.count > 0 && before.front[0].cell != now.front[0].cell) ++crossed[s];
      from[s] = to[s];
    }
    time += lengths;
    together.adopt_fronts(all_to, time);
    for (std::size_t l = 0; l < 4; ++l) {
      const Fronts &a = all_to.fronts[l], &b = to[l].fronts[0];
      REQUIRE(a.count == b.count);
      for (std::size_t k = 0; k < static_cast<std::size_t>(a.count); ++k) {
        CHECK(a.front[k].cell == b.front[k].cell);
        CHECK(a.front[k].solid_side == b.front[k].solid_side);
      }
    }
    all_from = all_to;
  }
  CAPTURE(crossed[0], crossed[1], crossed[2], crossed[3]);
  for (const int n : crossed) CHECK(n >= 1);
}
