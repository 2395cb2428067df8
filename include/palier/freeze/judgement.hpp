// The numerical error of readings, judged by a companion run on a coarser grid.
#pragma once

#include <vector>

#include "palier/freeze/outcome.hpp"

namespace palier::freeze {

/// Readings at the probes with what a coarser run says of their error [s].
struct Judgement {
  std::vector<ProbeReading> probes;
  double solidification_time_error = 0;
};

Judgement judge(const Outcome& fine, const Outcome& coarse, const alloy::SolidificationPath& path);

/// Largest error of an end of freezing, as a share of a duration [s].
double worst(const Judgement& judgement, double duration);

}  // namespace palier::freeze
