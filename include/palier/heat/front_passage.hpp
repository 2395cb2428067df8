// How fronts are born, pass from cell to cell within a step, melt back and end.
#pragma once

#include <array>

#include "palier/heat/flow_field.hpp"
#include "palier/heat/state.hpp"

namespace palier::heat {

template <class Real>
class FrontPassage {
 public:
  /// @param field is asked for what a front would hold; its last evaluation is spoiled around that front
  explicit FrontPassage(FlowField<Real>& field) : field_(field) {}

  /// Notes what the solid just behind a lane's front gains per volume and time as the step begins.
  void note_solid_gain(int lane, int side, const State<Real>& from);

  /// Applies Newton's change to the unknown of a front's cell. A front that leaves its cell is handed over to the next.
  void move(Stage<Real>& stage, int lane, const Front& front, double change, double time);

  /// For all cells a front swept before the stage now under way begins, see pass_on_debt in the source.
  void pass_on_debts(Stage<Real>& stage, int lane, int side, const Fronts& before) const;

  /// Looks for fronts to follow from now on: a cell half frozen between a solid side and a liquid side, or a wall's
  /// cell whose face has come down to the arrest.
  void adopt(State<Real>& state, const Real& time);

 private:
  void hand_over(Stage<Real>& stage, int lane, const Front& front, double time);
  void hand_back(Stage<Real>& stage, int lane, const Front& front, double time);
  void pass_on_debt(Stage<Real>& stage, int lane, int cell, int next, int side) const;

  FlowField<Real>& field_;
  std::array<std::array<double, 2>, base::lane_count<Real>> solid_gain_{};
};

}  // namespace palier::heat
