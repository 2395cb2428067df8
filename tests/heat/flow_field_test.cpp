// The flow field's derivatives against finite differences, with and without fronts, for every shape and boundary.
#include "palier/heat/flow_field.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <random>

#include "heat/bodies.hpp"

using namespace palier;
using namespace palier::heat;

namespace {

constexpr double kTime = 7;  // [s]

Boundary boundary(Boundary::Kind kind) {
  Boundary b;
  b.kind = kind;
  b.temperature = 400;
  b.film_coefficient = 60;
  b.emissivity = 0.7;
  b.heat_flux = base::Table({0.0, 10}, {1e5, 3e5});
  return b;
}

const std::vector<Boundary::Kind> boundary_kinds{Boundary::Kind::adiabatic, Boundary::Kind::film,
                                                 Boundary::Kind::fixed_temperature, Boundary::Kind::heat_flux};

std::vector<Contact> contacts() {
  return {{},
          {Contact::Over::constant, base::Table(800)},
          {Contact::Over::time, base::Table({0.0, 20}, {2000, 500})},
          {Contact::Over::surface_temperature, base::Table({300.0, 1200}, {200, 3000})},
          {Contact::Over::surface_fraction_solid, base::Table({0.0, 1}, {3000, 300})}};
}

/// Enthalpies between the ends of the metal's and the sand's curves, away from kinks; solid toward the fronts' walls.
std::vector<double> some_state(const Body& body, const Fronts& fronts) {
  std::mt19937_64 random(7);
  std::uniform_real_distribution<double> share(0.1, 0.9);
  std::vector<double> unknown;
  for (int i = 0; i < body.cells(); ++i) {
    const alloy::EnthalpyCurve& curve = body.curve(body.layer_of(i));
    if (body.layer_of(i) != body.metal()) {
      unknown.push_back(curve.enthalpy(350 + 300 * share(random)));
      continue;
    }
    bool solid = false;
    for (int k = 0; k < fronts.count; ++k) {
      const Front& f = fronts.front[static_cast<std::size_t>(k)];
      solid = solid || f.solid_side * (i - f.cell) > 0;
    }
    unknown.push_back(curve.enthalpy(solid ? 700 + 100 * share(random) : 955 + 80 * share(random)));
  }
  return unknown;
}

/// Largest |claimed - difference| over all faces and cells, relative to the largest derivative at the face.
double worst_flow_slope(const Body& body, const std::vector<double>& unknown, const Fronts& fronts) {
  FlowField<double> field({&body});
  field.evaluate(kTime, unknown, {fronts});
  const std::vector<double> by_inner = field.by_inner(), by_outer = field.by_outer();
  double worst = 0;
  const std::size_t cells = unknown.size();
  const double step = 2e3;
  std::vector<std::vector<double>> difference(cells + 1, std::vector<double>(cells));
  for (std::size_t i = 0; i < cells; ++i) {
    std::vector<double> moved = unknown;
    moved[i] = unknown[i] + step;
    field.evaluate(kTime, moved, {fronts});
    const std::vector<double> above = field.flow();
    moved[i] = unknown[i] - step;
    field.evaluate(kTime, moved, {fronts});
    for (std::size_t f = 0; f <= cells; ++f) difference[f][i] = (above[f] - field.flow()[f]) / (2 * step);
  }
  for (std::size_t f = 0; f <= cells; ++f) {
    double largest = 0, error = 0;
    for (std::size_t i = 0; i < cells; ++i) {
      const double claimed = i + 1 == f ? by_inner[f] : (i == f ? by_outer[f] : 0.0);
      largest = std::max(largest, std::abs(difference[f][i]));
      error = std::max(error, std::abs(claimed - difference[f][i]));
    }
    if (error > 0) worst = std::max(worst, error / std::max(largest, 1e-300));
  }
  return worst;
}

/// The same for the excess of the fronts.
double worst_excess_slope(const Body& body, const std::vector<double>& unknown, const Fronts& fronts) {
  FlowField<double> field({&body});
  double worst = 0;
  for (int k = 0; k < fronts.count; ++k) {
    const int cell = fronts.front[static_cast<std::size_t>(k)].cell;
    field.evaluate(kTime, unknown, {fronts});
    const FrontExcess e = field.excess(0, k);
    double largest = 0, error = 0;
    for (int i = 0; i < body.cells(); ++i) {
      const double claimed = i == cell ? e.by_self : (i == cell - 1 ? e.by_left : (i == cell + 1 ? e.by_right : 0.0));
      const double step = 2e3;
      std::vector<double> moved = unknown;
      moved[static_cast<std::size_t>(i)] += step;
      field.evaluate(kTime, moved, {fronts});
      const double above = field.excess(0, k).excess;
      moved[static_cast<std::size_t>(i)] -= 2 * step;
      field.evaluate(kTime, moved, {fronts});
      const double difference = (above - field.excess(0, k).excess) / (2 * step);
      largest = std::max(largest, std::abs(difference));
      error = std::max(error, std::abs(claimed - difference));
    }
    if (error > 0) worst = std::max(worst, error / std::max(largest, 1e-300));
  }
  return worst;
}

void check_slopes(const Body& body, const Fronts& fronts, double solid_share) {
  std::vector<double> unknown = some_state(body, fronts);
  const LastArrest arrest(body.metal_curve());
  for (int k = 0; k < fronts.count; ++k)
    unknown[static_cast<std::size_t>(fronts.front[static_cast<std::size_t>(k)].cell)] =
        arrest.hot - solid_share * (arrest.hot - arrest.cold);
  CHECK(worst_flow_slope(body, unknown, fronts) <= 2e-6);
  CHECK(worst_excess_slope(body, unknown, fronts) <= 2e-6);
}

Fronts one_front(int cell, int solid_side) {
  Fronts fronts;
  fronts.add({cell, solid_side});
  return fronts;
}

const std::vector<Shape> shapes{Shape::plate, Shape::cylinder, Shape::sphere};

}  // namespace

TEST_CASE("Flow field: derivatives without a front, every boundary and contact", "[heat][flow]") {
  for (const Shape shape : shapes)
    for (const Boundary::Kind kind : boundary_kinds)
      for (const Contact& contact : contacts()) {
        CAPTURE(static_cast<int>(shape), static_cast<int>(kind), static_cast<int>(contact.over));
        check_slopes(body_of({shape, 0.04, 0.02, 6, 4, 3}, range_metal(), contact, boundary(kind), boundary(kind)), {},
                     0);
        check_slopes(body_of({shape, 0, 0.02, 6, 4, 0}, pure_metal(), contact, {}, boundary(kind)), {}, 0);
      }
}

TEST_CASE("Flow field: derivatives with a front in any cell beside sand", "[heat][flow]") {
  for (const Shape shape : shapes)
    for (const Contact& contact : contacts()) {
      const Body body =
          body_of({shape, 0.04, 0.02, 6, 4, 3}, range_metal(), contact, {}, boundary(Boundary::Kind::film));
      for (int cell = body.metal_cells().begin; cell < body.metal_cells().end; ++cell)
        for (const int side : {-1, +1})
          for (const double share : {0.03, 0.4, 0.97}) {
            CAPTURE(static_cast<int>(shape), static_cast<int>(contact.over), cell, side, share);
            check_slopes(body, one_front(cell, side), share);
          }
    }
}

TEST_CASE("Flow field: derivatives with a front near a bare wall, every boundary", "[heat][flow]") {
  for (const Shape shape : shapes)
    for (const Boundary::Kind kind : boundary_kinds) {
      const Body body = body_of({shape, 0.01, 0.02, 6, 0, 0}, pure_metal(), {}, boundary(kind), boundary(kind));
      for (const int cell : {0, 1, 4, 5})
        for (const int side : {-1, +1})
          for (const double share : {0.01, 0.2, 0.8, 0.99}) {
            CAPTURE(static_cast<int>(shape), static_cast<int>(kind), cell, side, share);
            check_slopes(body, one_front(cell, side), share);
          }
    }
}

TEST_CASE("Flow field: derivatives with a front at the center of symmetry", "[heat][flow]") {
  for (const Shape shape : shapes) {
    const Body body = body_of({shape, 0, 0.02, 6, 4, 0}, pure_metal(), {}, {}, boundary(Boundary::Kind::film));
    for (const int cell : {0, 1})
      for (const double share : {0.05, 0.5, 0.9}) {
        CAPTURE(static_cast<int>(shape), cell, share);
        check_slopes(body, one_front(cell, +1), share);
      }
  }
}

TEST_CASE("Flow field: derivatives with two fronts, also side by side", "[heat][flow]") {
  for (const Shape shape : shapes)
    for (const int apart : {1, 2, 3}) {
      const Body body = body_of({shape, 0.04, 0.02, 8, 4, 3}, range_metal(), {}, {}, boundary(Boundary::Kind::film));
      Fronts fronts = one_front(5, -1);
      fronts.add({5 + apart, +1});
      CAPTURE(static_cast<int>(shape), apart);
      check_slopes(body, fronts, 0.3);
    }
}

TEST_CASE("Flow field: nothing flows in a level body, and contacts conserve", "[heat][flow]") {
  for (const Shape shape : shapes) {
    const Body body = body_of({shape, 0.04, 0.02, 6, 4, 3}, range_metal(), {}, {}, {});
    std::vector<double> level;
    level.reserve(body.volume().size());
    for (int i = 0; i < body.cells(); ++i) level.push_back(body.curve(body.layer_of(i)).enthalpy(700));
    FlowField<double> field({&body});
    field.evaluate(kTime, level, {});
    for (const double flow : field.flow()) CHECK(std::abs(flow) < 1e-6);
    CHECK(field.inner_surface(0) == Approx(700));
    CHECK(field.outer_surface(0) == Approx(700));
  }
}
