#include "exact/cases/cases.hpp"

namespace palier::exact {

std::vector<ExactCase> all_cases() {
  std::vector<ExactCase> all;
  for (const auto& family : {stefan_neumann_cases(), schwarz_cases(), freezing_range_cases(), alloy_similarity_cases(),
                             lumped_cases(), sand_limited_cases(), inward_freezing_cases()})
    all.insert(all.end(), family.begin(), family.end());
  return all;
}

}  // namespace palier::exact
