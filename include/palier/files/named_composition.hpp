// A composition given in words on the command line, such as "Cu 4.5 %" or "Si 7.4 %, Mg 0.35 %".
#pragma once

#include <string>

#include "palier/files/material_file.hpp"

namespace palier::files {

/// The alloy with the composition that a text of elements and amounts names; % alone means mass %.
///
/// A binary takes its solute only, at% is converted. A dilute alloy or a steel takes any of its elements, in mass %;
/// those not named keep what the file has. Measured freezing stays that of the file. Throws base::InputError where the
/// text names an element the alloy does not have, or one twice, or where the alloy holds for its own composition only.
AlloyFile with_composition(AlloyFile alloy, const std::string& text);

}  // namespace palier::files
