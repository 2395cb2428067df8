// Planted for tests/CMakeLists.txt: uses a vector without including one, so it must not compile alone.
#pragma once

inline std::vector<double> depths() { return {}; }
