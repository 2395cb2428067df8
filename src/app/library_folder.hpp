// Where the shipped alloys and molds lie.
#pragma once

#include <string>

namespace palier::app {

/// `cases` beside the build folder the program runs from, or `../share/palier/cases` where it is installed.
/// Throws base::FileTrouble where neither is there.
std::string library_folder();

}  // namespace palier::app
