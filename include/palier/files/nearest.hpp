// The right name nearest to a misspelt one.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace palier::files {

/// Number of letters to insert, remove, replace or swap with the next to get from a to b (optimal string alignment).
std::size_t edit_distance(std::string_view a, std::string_view b);

/// Names near to a misspelt one, nearest first; capitals do not matter. Near is: at most a third of the letters differ.
std::vector<std::string> nearest_names(std::string_view name, const std::vector<std::string>& known,
                                       std::size_t at_most = 3);

/// "did you mean 'a'?", "did you mean 'a' or 'b'?"; empty where nothing is near.
std::string did_you_mean(std::string_view name, const std::vector<std::string>& known, std::size_t at_most = 1);

/// "a, b or c"
std::string one_of(const std::vector<std::string>& names, std::string_view quote = "");

}  // namespace palier::files
