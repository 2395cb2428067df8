// Temperature and state of freezing at any point of the metal, at any time within a step.
#pragma once

#include "palier/freeze/section.hpp"
#include "palier/heat/front.hpp"
#include "palier/heat/march.hpp"

namespace palier::freeze {

/// A point of the metal, prepared for repeated look-ups.
struct Point {
  double radius = 0;  ///< [m]
  int left = 0;       ///< cell whose center is the last at or below the radius; metal.begin - 1 before the first
  int cell = 0;       ///< cell it lies in
};

class Profile {
 public:
  /// @param start_temperature freezing is taken to start when a point falls through it [K]
  Profile(const heat::Body& body, const alloy::SolidificationPath& path);

  Point point(double radius) const;
  /// Temperature at the center of a cell of the metal [K].
  double center_temperature(const heat::StepView& step, int cell, double time) const;
  /// Fraction solid of a cell of the metal, its mean.
  double cell_fraction(const heat::StepView& step, int cell, double time) const;
  /// [K]; straight between cell centers, fronts and faces.
  double temperature(const heat::StepView& step, const Point& p, double time) const;
  /// Positive before freezing starts at the point, negative after [K].
  double to_start(const heat::StepView& step, const Point& p, double time) const {
    return temperature(step, p, time) - start_temperature_;
  }
  /// Positive while there is liquid at the point, negative when it is solid; a smooth measure, its unit varies.
  double to_end(const heat::StepView& step, const Point& p, double time) const;
  /// Fraction solid at the point.
  double fraction_solid(const heat::StepView& step, const Point& p, double time) const;
  /// Whether no point of the metal has come down to the start, all have, or neither is sure; likewise whether none is
  /// solid yet. Cheap, from cells and faces alone, at the end of a step: lets others skip what cannot have happened.
  enum class Sure { none, all, unknown };
  Sure started(const heat::StepView& step) const;
  bool surely_none_solid(const heat::StepView& step) const;
  /// Positive while the cell holds liquid.
  double liquid_left(const heat::StepView& step, int cell, double time) const;

  /// Whether the metal reaches to a center of symmetry, at radius 0.
  bool has_center() const;
  double start_temperature() const { return start_temperature_; }
  const heat::LayerCells& cells() const { return metal_; }

 private:
  struct Node {
    double radius, temperature;
  };
  double beside_front(const heat::State<double>& state, const heat::Front& front, double radius, int cell) const;
  const heat::Front* swept_by(const heat::StepView& step, int cell) const;
  Node left_node(const heat::StepView& step, const Point& p, double time) const;
  Node right_node(const heat::StepView& step, const Point& p, double time) const;

  const heat::Body& body_;
  const alloy::SolidificationPath& path_;
  heat::LayerCells metal_;
  heat::LastArrest arrest_;
  double start_temperature_, start_enthalpy_;
};

}  // namespace palier::freeze
