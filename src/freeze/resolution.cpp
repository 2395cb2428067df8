#include <algorithm>
#include <cmath>

#include "palier/freeze/setup.hpp"

namespace palier::freeze {

Resolution resolution_for(const Section& section) {
  const double finer = std::sqrt(1e-3 / section.accuracy);
  Resolution r;
  r.metal_cells = std::max(8, static_cast<int>(std::lround(24 * finer)));
  r.wall_cells = std::max(12, static_cast<int>(std::lround(72 * finer)));
  r.tolerance = 1e-4 * std::pow(section.accuracy / 1e-3, 1.5);
  return r;
}

Resolution companion_of(const Resolution& fine) {
  return {std::max(4, fine.metal_cells / 2), std::max(6, fine.wall_cells / 2), 4 * fine.tolerance};
}

}  // namespace palier::freeze
