// Small bodies to test the heat layer on: a metal with its last arrest, with or without layers of mold.
#pragma once

#include <memory>

#include "palier/heat/body.hpp"

namespace palier::heat {

/// A pure metal, aluminum-like round numbers (invented). Freezes at 933 K.
std::shared_ptr<const alloy::EnthalpyCurve> pure_metal();
/// An alloy of a freezing range of 888 to 850 K, two fifths of which freeze in the arrest at 850 K (invented).
std::shared_ptr<const alloy::EnthalpyCurve> range_metal();
/// Mold whose conductivity changes with temperature (invented).
std::shared_ptr<const alloy::EnthalpyCurve> sand();

struct BodyShape {
  Shape shape = Shape::plate;
  double inner_radius = 0;
  double metal_width = 0.02;
  int metal_cells = 8;
  int outer_cells = 0;  ///< of sand outside the metal; 0: none
  int inner_cells = 0;  ///< of sand inside
};

/// Metal, and layers of sand 30 mm thick where they have cells.
Body body_of(const BodyShape& shape, std::shared_ptr<const alloy::EnthalpyCurve> metal, const Contact& contact,
             const Boundary& inner, const Boundary& outer);

}  // namespace palier::heat
