// The cases that are shipped with the program, read by its own reader.
#pragma once

#include <string>
#include <vector>

#include "palier/freeze/section.hpp"

namespace palier::published {

/// A case by the name of its folder and file without ending, e.g. `castings/ball-sand`.
struct ShippedCase {
  std::string name;
  freeze::Section section;
};

/// All of cases/castings and the check cases cases/checks/p?.yaml, by name.
std::vector<ShippedCase> shipped_cases();

/// One of them by its name.
freeze::Section shipped_section(const std::string& name);

}  // namespace palier::published
