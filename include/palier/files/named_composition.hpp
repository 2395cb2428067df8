// A composition given in words on the command line, such as "Cu 4.5 %".
#pragma once

#include <string>

#include "palier/files/material_file.hpp"

namespace palier::files {

/// Solute of a binary alloy [mass %] from a text of element and amount; % alone means mass %, at% is converted.
/// Throws base::InputError where the text names another element than the alloy's solute, or more than one.
double named_composition(const std::string& text, const AlloyFile& alloy);

}  // namespace palier::files
