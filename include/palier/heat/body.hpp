// A body of layers cut into cells: geometry, enthalpy curves, contacts between layers, boundaries at both ends.
#pragma once

#include <memory>
#include <vector>

#include "palier/alloy/enthalpy_curve.hpp"
#include "palier/heat/boundary.hpp"

namespace palier::heat {

/// One layer, given by rising radius.
struct BodyLayer {
  std::shared_ptr<const alloy::EnthalpyCurve> curve;
  std::vector<double> widths;  ///< of its cells, by rising radius [m]
  Contact outer_contact;       ///< to the next layer; unused for the last
};

/// Cells of a layer: [begin, end).
struct LayerCells {
  int begin = 0;
  int end = 0;
};

/// Geometry and materials of a body; fixed during a march.
///
/// Lengths, areas and volumes are per m2 of plate, per radian and meter of cylinder, per steradian of sphere: the area
/// at radius r is r^m.
class Body {
 public:
  /// @param inner_radius where the first layer begins; 0: center of symmetry
  /// @param metal        index of the layer that freezes
  Body(Shape shape, double inner_radius, std::vector<BodyLayer> layers, int metal, Boundary inner, Boundary outer);

  int exponent() const { return m_; }
  int cells() const { return static_cast<int>(center_.size()); }
  int layers() const { return static_cast<int>(layers_.size()); }
  int metal() const { return metal_; }
  LayerCells layer_cells(int layer) const { return ranges_[static_cast<std::size_t>(layer)]; }
  LayerCells metal_cells() const { return layer_cells(metal_); }
  const alloy::EnthalpyCurve& curve(int layer) const { return *layers_[static_cast<std::size_t>(layer)].curve; }
  const alloy::EnthalpyCurve& metal_curve() const { return curve(metal_); }
  int layer_of(int cell) const { return layer_of_[static_cast<std::size_t>(cell)]; }
  /// Contact at the outer end of a layer.
  const Contact& contact(int layer) const { return layers_[static_cast<std::size_t>(layer)].outer_contact; }
  const Boundary& inner() const { return inner_; }
  const Boundary& outer() const { return outer_; }
  /// Conduction potential of a boundary of fixed temperature, in the material it touches [W/m].
  double inner_potential() const { return inner_potential_; }
  double outer_potential() const { return outer_potential_; }

  const std::vector<double>& face() const { return face_; }      ///< cells + 1 radii [m]
  const std::vector<double>& center() const { return center_; }  ///< middle of each cell [m]
  const std::vector<double>& volume() const { return volume_; }
  const std::vector<double>& area() const { return area_; }  ///< of each face
  /// Area over distance of centers at faces inside a layer; 0 at contacts and ends.
  const std::vector<double>& conductance() const { return conductance_; }
  double half_width(int cell) const;

  /// Conductance of a shell between two radii, r1 < r2: plate 1/(r2-r1), cylinder 1/ln(r2/r1), sphere 1/(1/r1-1/r2).
  double shell_conductance(double r1, double r2) const;
  /// r^(m+1)/(m+1), the volume inside a radius, and its inverse.
  double volume_inside(double r) const;
  double radius_of_volume(double volume) const;

 private:
  int m_;
  std::vector<BodyLayer> layers_;
  int metal_;
  Boundary inner_, outer_;
  double inner_potential_ = 0, outer_potential_ = 0;
  std::vector<LayerCells> ranges_;
  std::vector<int> layer_of_;
  std::vector<double> face_, center_, volume_, area_, conductance_;
};

/// Widths of `cells` cells that fill `width`; each is `ratio` times as wide as the one before, by rising radius.
std::vector<double> graded_widths(double width, int cells, double ratio);

}  // namespace palier::heat
