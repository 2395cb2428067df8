#include <algorithm>
#include <cmath>

#include "palier/freeze/setup.hpp"

namespace palier::freeze {

Resolution resolution_for(const Section& section) {
  // Order two in space: the cells go with the root of the accuracy. A wall that takes heat hard leaves steep profiles
  // at the start and wants twice as many. The figures were set so that the check cases come out three times better than
  // asked; docs/validation.md shows what they give.
  const double finer = std::sqrt(1e-3 / section.accuracy);
  const double hard = 1 + wall_hardness(section);
  Resolution r;
  r.metal_cells = std::max(8, static_cast<int>(std::lround(28 * finer * hard)));
  r.wall_cells = std::max(12, static_cast<int>(std::lround(88 * finer)));
  r.tolerance = 1e-5 * std::pow(section.accuracy / 1e-3, 1.5);
  return r;
}

Resolution companion_of(const Resolution& fine) {
  return {std::max(4, fine.metal_cells / 2), std::max(6, fine.wall_cells / 2), 4 * fine.tolerance};
}

Resolution refined(const Resolution& r) { return {2 * r.metal_cells, 2 * r.wall_cells, r.tolerance / 8}; }

}  // namespace palier::freeze
