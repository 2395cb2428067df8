// One implicit step of the heat equation: TR-BDF2 with Newton on the enthalpy, written once over a number type.
#pragma once

#include <vector>

#include "palier/heat/flow_field.hpp"
#include "palier/heat/front_passage.hpp"
#include "palier/heat/state.hpp"
#include "palier/heat/tridiagonal.hpp"

namespace palier::heat {

/// How a step went. A stalled step must be tried again with a shorter length.
struct StepReport {
  enum class Status { made, stalled };
  Status status = Status::made;
  int iterations = 0;   ///< of Newton, both stages
  double residual = 0;  ///< largest, relative to the cell's heat scale; of a stalled step
  int worst_cell = -1;  ///< where
};

/// Makes steps of a fixed set of lanes; owns all its work space and allocates nothing in a step.
///
/// Time: TR-BDF2 (R. E. Bank et al., IEEE Trans. Electron Devices 32 (1985) 1992) in the one-step form with embedded
/// error estimate of M. E. Hosea & L. F. Shampine, Appl. Numer. Math. 20 (1996) 21.
/// Newton iterates until the residual is below its tolerance; then the new enthalpy is set from the flows themselves,
/// so that what one cell loses its neighbor gains exactly.
template <class Real>
class ImplicitStep {
 public:
  /// @param scale heat scale of each cell [J/m3]: errors are measured against it
  ImplicitStep(const Bodies<Real>& bodies, std::vector<Real> scale);

  ImplicitStep(const ImplicitStep&) = delete;  // its parts refer to each other
  ImplicitStep& operator=(const ImplicitStep&) = delete;

  /// A state from enthalpies; no fronts yet.
  State<Real> start(const std::vector<Real>& enthalpy, const Real& time);

  /// From `from` at `time` over `length` [s] to `to` (its vectors must have their sizes). On success `error` is the
  /// norm of the local error relative to the metal's heat scale, per lane.
  StepReport advance(const State<Real>& from, const Real& time, const Real& length, double newton_tolerance,
                     State<Real>& to, Real& error);

  /// Of the middle stage of the last step, at time + gamma * length.
  const Marks& middle_marks(int lane) const { return middle_marks_[static_cast<std::size_t>(lane)]; }
  /// What a boundary at an end has taken out over the last step [J].
  double heat_out(int lane, const State<Real>& from, const State<Real>& to, double length) const;
  static double gamma();

  /// Looks for fronts to follow from now on.
  void adopt_fronts(State<Real>& state, const Real& time) { passage_.adopt(state, time); }

 private:
  bool solve_stage(const Real& time, double tolerance, StepReport& report);
  double residual(int& worst);
  void assemble();
  void move(const Real& time);
  void predict(const Real& time, const Real& length);
  void set_rate(const std::vector<Real>& before, const LaneFronts<Real>& fronts_before, const Real& length);
  Marks marks(int lane) const;
  int last_swept(int lane, const Front& before) const;
  void share_error(int lane, int first, int last);
  double error_norm(int lane) const;
  /// Divergence of flow: what a cell gains per time and volume.
  Real gain(const std::vector<Real>& flow, std::size_t cell) const {
    return (flow[cell] - flow[cell + 1]) * inverse_volume_[cell];
  }

  FlowField<Real> field_;
  FrontPassage<Real> passage_;
  std::vector<Real> scale_, inverse_scale_, inverse_volume_;
  std::vector<double> metal_heat_;  ///< sum of volume times scale over the metal, per lane
  // Of the step under way:
  Stage<Real> stage_;
  std::vector<Real> change_, middle_flow_, middle_unknown_, rate_;
  std::array<Marks, base::lane_count<Real>> middle_marks_;
  Tridiagonal<Real> matrix_;
};

}  // namespace palier::heat
