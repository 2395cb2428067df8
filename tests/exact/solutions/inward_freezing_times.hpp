// Times in which plate, cylinder and sphere freeze through, with sensible heat of the solid: a numerical benchmark.
// Computed with a method other than a grid of cells: the front fixed by a change of variable, Chebyshev collocation in
// the solid, a stiff integrator in time; relative error about 1e-5 for complete freezing (plates with their surface
// held agree with Stefan's closed form to the digits given).
#pragma once

#include <vector>

#include "exact/solutions/inward_freezing.hpp"

namespace palier::exact {

struct InwardFreezingTime {
  int shape;       ///< 0 plate, 1 cylinder, 2 sphere
  double stefan;   ///< c_s (T_m - surroundings) / L
  double biot;     ///< h R / k; infinite: surface held
  double fourier;  ///< alpha t / R^2 when the last metal freezes
  double ratio;    ///< of that time to Plank's
  /// A casting with these numbers, alpha and R being 1.
  InwardFreezing casting() const;
};

constexpr double inward_freezing_error = 1e-5;  ///< relative, of the times

const std::vector<InwardFreezingTime>& inward_freezing_times();

}  // namespace palier::exact
