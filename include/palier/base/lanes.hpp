// A number type for the step: a double, or a fixed-width array that holds several cases of a sweep, one a lane.
#pragma once

#include <Eigen/Core>

namespace palier::base {

template <int Width>
using Lanes = Eigen::Array<double, Width, 1>;

/// Number of lanes of a number type.
template <class Real>
inline constexpr int lane_count = Real::SizeAtCompileTime;
template <>
inline constexpr int lane_count<double> = 1;

inline double& lane(double& x, int) { return x; }
inline double lane(const double& x, int) { return x; }
template <int Width>
double& lane(Lanes<Width>& x, int l) {
  return x[l];
}
template <int Width>
double lane(const Lanes<Width>& x, int l) {
  return x[l];
}

/// The same value in every lane.
template <class Real>
Real all_lanes(double x) {
  if constexpr (lane_count<Real> == 1)
    return x;
  else
    return Real::Constant(x);
}

}  // namespace palier::base
