// Which phases of a binary are stable at a temperature, in the order of composition.
#pragma once

#include <cstddef>
#include <vector>

#include "common_tangent.hpp"

namespace palier::alloy {

/// A range of composition in which one phase is stable.
struct StableRegion {
  std::size_t phase;
  double low_z, high_z;  ///< close to both of its ends
};

/// Stable phases at a temperature by rising mole fraction, from the lower convex hull of sampled Gibbs energies. Where
/// a phase dips below a common tangent between its samples, the lowest point is added to them.
std::vector<StableRegion> stable_regions(const Phases& phases, double T);

}  // namespace palier::alloy
