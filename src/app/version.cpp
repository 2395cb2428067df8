#include "version.hpp"

// The only place to include it: its text changes with every commit.
#include "palier_stamp.hpp"

namespace palier::app {

std::string version() { return PALIER_VERSION; }

std::string commit() { return PALIER_COMMIT; }

}  // namespace palier::app
