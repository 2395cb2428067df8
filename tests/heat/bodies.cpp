#include "heat/bodies.hpp"

#include <utility>

namespace palier::heat {
namespace {

const alloy::MetalProperties aluminum{
    2500, {base::Table(1100), base::Table(215)}, {base::Table(1080), base::Table(92)}, 397e3};

BodyLayer sand_layer(int cells, double growth) { return {sand(), graded_widths(0.03, cells, growth), {}}; }

}  // namespace

std::shared_ptr<const alloy::EnthalpyCurve> pure_metal() {
  return std::make_shared<const alloy::EnthalpyCurve>(aluminum, alloy::pure_path(933), 280, 1100);
}

std::shared_ptr<const alloy::EnthalpyCurve> range_metal() {
  return std::make_shared<const alloy::EnthalpyCurve>(aluminum, alloy::measured_path({888, 870, 850}, {0, 0.4, 0.6}),
                                                      280, 1100);
}

std::shared_ptr<const alloy::EnthalpyCurve> sand() {
  const alloy::MoldProperties mold{1500, {base::Table(1130), base::Table({250, 750, 1250}, {0.8, 0.6, 0.7})}, 0.0};
  return std::make_shared<const alloy::EnthalpyCurve>(mold, 280, 1100);
}

Body body_of(const BodyShape& s, std::shared_ptr<const alloy::EnthalpyCurve> metal, const Contact& contact,
             const Boundary& inner, const Boundary& outer) {
  std::vector<BodyLayer> layers;
  if (s.inner_cells > 0) {
    layers.push_back(sand_layer(s.inner_cells, 1 / 1.2));
    layers.back().outer_contact = contact;
  }
  const int metal_layer = static_cast<int>(layers.size());
  layers.push_back({std::move(metal), graded_widths(s.metal_width, s.metal_cells, 1 / 1.1), contact});
  if (s.outer_cells > 0) layers.push_back(sand_layer(s.outer_cells, 1.2));
  return {s.shape, s.inner_radius, std::move(layers), metal_layer, inner, outer};
}

}  // namespace palier::heat
