// Geometry of a body: areas, volumes, conductances of its cells in plate, cylinder and sphere.
#include <catch2/catch.hpp>
#include <cmath>
#include <numeric>

#include "heat/bodies.hpp"

using namespace palier::heat;

namespace {

Boundary held_at(double temperature) {
  Boundary b;
  b.kind = Boundary::Kind::fixed_temperature;
  b.temperature = temperature;
  return b;
}

}  // namespace

TEST_CASE("Body: volumes, areas and radii of the cells", "[heat][body]") {
  const auto shape = GENERATE(Shape::plate, Shape::cylinder, Shape::sphere);
  const double inner_radius = GENERATE(0.0, 0.05);
  const int m = static_cast<int>(shape);
  const Body body = body_of({shape, inner_radius, 0.02, 8, 5, 3}, pure_metal(), {}, {}, {});
  CAPTURE(m, inner_radius);
  REQUIRE(body.cells() == 16);
  REQUIRE(body.metal() == 1);
  CHECK(body.metal_cells().begin == 3);
  CHECK(body.metal_cells().end == 11);
  CHECK(body.face().front() == inner_radius);
  CHECK(body.face().back() == Approx(inner_radius + 0.08).epsilon(1e-14));
  const double outer = body.face().back();
  const double total = std::accumulate(body.volume().begin(), body.volume().end(), 0.0);
  CHECK(total == Approx((std::pow(outer, m + 1) - std::pow(inner_radius, m + 1)) / (m + 1)).epsilon(1e-13));
  for (std::size_t f = 0; f < body.face().size(); ++f) CHECK(body.area()[f] == std::pow(body.face()[f], m));
  for (int i = 0; i < body.cells(); ++i) {
    const auto c = static_cast<std::size_t>(i);
    CHECK(body.layer_of(i) == (i < 3 ? 0 : (i < 11 ? 1 : 2)));
    CHECK(body.volume()[c] > 0);
    CHECK(body.center()[c] == Approx(0.5 * (body.face()[c] + body.face()[c + 1])).epsilon(1e-14));
    CHECK(body.half_width(i) == Approx(body.face()[c + 1] - body.center()[c]).epsilon(1e-9));
  }
}

TEST_CASE("Body: conductances inside layers, none at contacts and ends", "[heat][body]") {
  const auto shape = GENERATE(Shape::plate, Shape::cylinder, Shape::sphere);
  const Body body = body_of({shape, 0.05, 0.02, 8, 5, 3}, pure_metal(), {}, {}, {});
  for (std::size_t f = 0; f < body.face().size(); ++f) {
    const bool between_layers = f == 0 || f == 3 || f == 11 || f == 16;
    const double known = between_layers ? 0.0 : body.area()[f] / (body.center()[f] - body.center()[f - 1]);
    CHECK(body.conductance()[f] == Approx(known).epsilon(1e-14));
  }
}

TEST_CASE("Body: conductance of a shell and radius of a volume", "[heat][body]") {
  const auto shape = GENERATE(Shape::plate, Shape::cylinder, Shape::sphere);
  const Body body = body_of({shape, 0.05}, pure_metal(), {}, {}, {});
  const int m = static_cast<int>(shape);
  CAPTURE(m);
  // Resistance of a shell: the sum of those of many thin ones, dr / r^m each.
  double resistance = 0;
  const int thin = 4000;
  for (int k = 0; k < thin; ++k) resistance += 0.03 / thin * std::pow(0.05 + 0.03 * (k + 0.5) / thin, -m);
  CHECK(body.shell_conductance(0.05, 0.08) == Approx(1 / resistance).epsilon(1e-7));
  for (const double r : {0.0, 1e-4, 0.05, 1.3}) {
    CHECK(body.volume_inside(r) == Approx(std::pow(r, m + 1) / (m + 1)).epsilon(1e-14));
    CHECK(body.radius_of_volume(body.volume_inside(r)) == Approx(r).epsilon(1e-14));
  }
}

TEST_CASE("Body: graded cells fill their width, each a ratio wider than the last", "[heat][body]") {
  const double ratio = GENERATE(0.8, 1.0, 1.25);
  const std::vector<double> widths = graded_widths(0.12, 17, ratio);
  REQUIRE(widths.size() == 17);
  CHECK(std::accumulate(widths.begin(), widths.end(), 0.0) == Approx(0.12).epsilon(1e-14));
  for (std::size_t i = 1; i < widths.size(); ++i) CHECK(widths[i] / widths[i - 1] == Approx(ratio).epsilon(1e-13));
}

TEST_CASE("Body: ends held at a temperature know their conduction potential", "[heat][body]") {
  const Body body = body_of({Shape::plate, 0, 0.02, 8, 5, 0}, pure_metal(), {}, held_at(600), held_at(400));
  CHECK(body.inner_potential() == Approx(pure_metal()->potential_at(600)).epsilon(1e-14));
  CHECK(body.outer_potential() == Approx(sand()->potential_at(400)).epsilon(1e-14));
  // A difference of potentials is the conductivity times the difference of temperatures.
  CHECK(pure_metal()->potential_at(700) - pure_metal()->potential_at(600) == Approx(215 * 100).epsilon(1e-9));
}
