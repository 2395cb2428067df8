#include "freeze/sections.hpp"

#include <algorithm>

namespace palier::freeze {
namespace {

Section plate_of(alloy::SolidificationPath path) {
  Section s;
  s.alloy = "test metal";
  s.metal = {2500, {base::Table(1100), base::Table(200)}, {base::Table(1080), base::Table(90)}, 390e3};
  s.path = std::move(path);
  s.thickness = 0.020;
  s.pouring_temperature = 960;
  s.outside = {{sand_layer(0.1, constant_contact(1000))}, film(10, 300)};
  return s;
}

}  // namespace

Section pure_in_sand() { return plate_of(alloy::pure_path(933)); }

Section range_in_sand() { return plate_of(alloy::measured_path({918, 880, 821}, {0, 0.65, 0.9})); }

Section steady_range() {
  Section s = plate_of(alloy::measured_path({918, 880, 821}, {0, 0.6, 1}));
  s.metal.liquid.heat_capacity = base::Table(1100);
  return s;
}

heat::Boundary held_at(double temperature) {
  heat::Boundary b;
  b.kind = heat::Boundary::Kind::fixed_temperature;
  b.temperature = temperature;
  return b;
}

heat::Boundary film(double coefficient, double surroundings) {
  heat::Boundary b;
  b.kind = heat::Boundary::Kind::film;
  b.film_coefficient = coefficient;
  b.temperature = surroundings;
  return b;
}

WallLayer sand_layer(double thickness, const heat::Contact& contact) {
  WallLayer layer;
  layer.contact = contact;
  layer.material = "sand";
  layer.properties = {1500, {base::Table(1130), base::Table(0.6)}, 0.0};
  layer.thickness = thickness;
  layer.start_temperature = 300;
  return layer;
}

heat::Contact constant_contact(double conductance) { return {heat::Contact::Over::constant, base::Table(conductance)}; }

double hottest_at_end(const Result& result) {
  const History& h = result.history;
  const auto row = h.temperature.end() - static_cast<std::ptrdiff_t>(h.radius.size());
  return *std::max_element(row + h.metal_begin, row + h.metal_end);
}

}  // namespace palier::freeze
