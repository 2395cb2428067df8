// From a section to a body of cells: enthalpy curves, grid, state at the start, heat scales.
#pragma once

#include <memory>
#include <string>
#include <vector>

#include "palier/freeze/section.hpp"
#include "palier/heat/body.hpp"

namespace palier::freeze {

/// How finely a section is cut and marched.
struct Resolution {
  int metal_cells = 0;
  /// Cells of a wall of one layer. Other walls get as many as the same spacing at the metal and the same growth need.
  int wall_cells = 0;
  double tolerance = 0;  ///< of a step, see heat::March
};

/// The resolution that meets the section's accuracy, and that of its companion run, which is coarser by two.
Resolution resolution_for(const Section& section);
Resolution companion_of(const Resolution& fine);
/// Twice as many cells, with the tolerance that goes with them.
Resolution refined(const Resolution& coarse);

struct Setup {
  std::unique_ptr<const heat::Body> body;
  std::vector<double> enthalpy;  ///< at the start [J/m3]
  std::vector<double> scale;     ///< heat scale [J/m3]
  std::vector<std::string> layer_names;
  /// +1: depth counts from the metal's face at the larger radius inward; -1: from the one at the smaller radius outward
  int surface_side = +1;
  double surface_radius = 0;  ///< [m]

  double depth_of(double radius) const { return surface_side > 0 ? surface_radius - radius : radius - surface_radius; }
  double radius_at(double depth) const { return surface_side > 0 ? surface_radius - depth : surface_radius + depth; }
};

/// Enthalpy curve of the section's metal over all temperatures the run can meet.
std::shared_ptr<const alloy::EnthalpyCurve> metal_curve(const Section& section);

/// @param metal the section's metal_curve, made once for all runs of a section
/// Throws base::InputError where the section contradicts itself.
Setup set_up(const Section& section, const Resolution& resolution, std::shared_ptr<const alloy::EnthalpyCurve> metal);

/// How hard the walls take heat: 0 hardly, so that the metal stays level; 1 as a face held at one temperature.
double wall_hardness(const Section& section);

/// Rough time to freeze [s], good to a factor of a few: places the cells of the walls, nothing else.
double rough_freezing_time(const Section& section);

}  // namespace palier::freeze
