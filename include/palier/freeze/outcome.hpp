// One march of a section at one resolution, with what was watched and recorded.
#pragma once

#include <functional>
#include <limits>
#include <memory>
#include <optional>
#include <vector>

#include "palier/freeze/result.hpp"
#include "palier/freeze/section.hpp"
#include "palier/freeze/setup.hpp"
#include "palier/heat/march.hpp"

namespace palier::freeze {

/// What one march tells; times [s], depths [m], NaN: not reached.
struct Outcome {
  double frozen = std::numeric_limits<double>::quiet_NaN();      ///< last liquid of the section gone
  double last_depth = std::numeric_limits<double>::quiet_NaN();  ///< where that was
  double end_time = 0, imbalance = 0;
  std::vector<Reading> probes, by_depth;
  heat::MarchCounts counts;
  History history;
};

/// @param metal        the section's metal_curve
/// @param record_every interval of rows [s]; nothing: no history and no readings by depth
/// @param at_time      told the time reached after each step
/// Throws base::NoSolution where a step cannot be made or the section never gets solid.
Outcome march(const Section& section, const Resolution& resolution,
              const std::shared_ptr<const alloy::EnthalpyCurve>& metal, std::optional<double> record_every,
              const std::function<void(double)>& at_time);

}  // namespace palier::freeze
