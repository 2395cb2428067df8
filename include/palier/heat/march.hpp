// Marches one body in time: step length from the error estimate, dense output within a step, heat balance audited.
#pragma once

#include <vector>

#include "palier/heat/implicit_step.hpp"

namespace palier::heat {

/// Everything known within one step: enthalpies as cubics through values and rates at both ends, marks as parabolas
/// through both ends and the middle stage.
class StepView {
 public:
  StepView(const Body& body, const State<double>& before, const State<double>& after)
      : body_(body), before_(&before), after_(&after) {}

  double begin() const { return begin_; }  ///< [s]
  double end() const { return end_; }      ///< [s]
  const Body& body() const { return body_; }
  const State<double>& before() const { return *before_; }
  const State<double>& after() const { return *after_; }

  double enthalpy(int cell, double time) const;
  double temperature(int cell, double time) const {
    return body_.curve(body_.layer_of(cell)).temperature(enthalpy(cell, time));
  }
  double inner_surface(double time) const;
  double outer_surface(double time) const;
  /// Radius of the front whose solid side is at the larger (+1) or smaller (-1) radius; NaN unless it is there
  /// throughout the step, or ends in it with the last liquid.
  double front_radius(int solid_side, double time) const;
  /// Time at which the last front's liquid is gone in this step; NaN if it does not end here.
  double last_liquid() const { return last_liquid_; }
  /// Heat flux out of the metal through its outer (+1) or inner (-1) face [W/m2], straight between both ends.
  double surface_flux(int side, double time) const;

 private:
  friend class March;
  double parabola(double at_begin, double at_middle, double at_end, double time) const;
  const Body& body_;
  const State<double>* before_;
  const State<double>* after_;
  Marks middle_;
  double begin_ = 0, end_ = 0;
  double last_liquid_ = std::numeric_limits<double>::quiet_NaN();
};

struct MarchCounts {
  long steps = 0;
  long rejected = 0;
  long iterations = 0;
};

class March {
 public:
  /// @param enthalpy  of each cell at time 0 [J/m3]
  /// @param scale     heat scale of each cell [J/m3]
  /// @param tolerance local error allowed in a step, as a share of the metal's heat
  March(const Body& body, const std::vector<double>& enthalpy, std::vector<double> scale, double tolerance);

  /// Makes one step that does not go beyond `limit` [s] and shows it; valid until the next call.
  /// Throws base::NoSolution where even the shortest step fails, with time, cell and temperature.
  const StepView& step(double limit);

  double time() const { return view_.end(); }
  const State<double>& state() const { return *view_.after_; }
  const MarchCounts& counts() const { return counts_; }
  /// Largest |heat at start - heat now - heat out| so far, relative to the heat that must leave the metal.
  double imbalance() const { return imbalance_; }

 private:
  double heat() const;
  bool all_solid(const State<double>& state) const;
  /// Time the front now in the metal needs for the liquid left at its present rate [s]; infinite if there is none or
  /// two.
  double time_to_last_liquid() const;

  const Body& body_;
  LastArrest arrest_;
  std::vector<double> scale_;
  double tolerance_;
  ImplicitStep<double> step_;
  State<double> states_[2];
  int current_ = 0;
  StepView view_;
  double length_ = 0;
  bool after_rejection_ = false;
  double heat_at_start_ = 0, heat_out_ = 0, heat_scale_ = 0, imbalance_ = 0;
  MarchCounts counts_;
};

}  // namespace palier::heat
