// The path where it depends on the time freezing takes: path and march in turn until both settle.
#pragma once

#include <string>

#include "palier/freeze/section.hpp"

namespace palier::freeze {

struct SettledPath {
  alloy::SolidificationPath path;
  double time = 0;  ///< local solidification time at half depth [s]
  int rounds = 0;
};

/// Of a section with path_after. The time moves less than 0.5 % in the last round; it is found on a companion's grid,
/// which is good enough for a number that enters through a slow function.
/// Throws base::InputError where the run stops before half depth is solid, base::NoSolution where nothing settles.
SettledPath settle_path(Section section);

/// One line for the remarks of a result.
std::string in_words(const SettledPath& settled);

}  // namespace palier::freeze
