// Pictures through the Python tools.
#pragma once

#include <string>

namespace palier::app {

/// Hands an answer of `palier alloy` to tools/plot_diagram.py, which draws it to a file (.png or .svg).
/// @param library folder of the shipped cases; the tools lie beside it
/// Throws base::FileTrouble where the tool is not there or fails; it has told why on standard error.
void draw_diagram(const std::string& answer, const std::string& file, const std::string& library);

}  // namespace palier::app
