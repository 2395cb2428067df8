// Which palier this is.
#pragma once

#include <string>

namespace palier::app {

/// Version as released, e.g. "0.1.0".
std::string version();

/// Commit it was built from, as `git describe --always --dirty --abbrev=12` says, e.g. "1a2b3c4d5e6f-dirty"; "unknown"
/// where there was no git repository.
std::string commit();

}  // namespace palier::app
