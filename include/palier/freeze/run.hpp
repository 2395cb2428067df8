// Runs a section: companion coarse march for the numerical error, then the march proper with its readings.
#pragma once

#include <functional>

#include "palier/freeze/result.hpp"
#include "palier/freeze/section.hpp"

namespace palier::freeze {

/// Called now and then with the share of the work done, 0..1. May throw to abandon the run.
using Progress = std::function<void(double)>;

/// Deterministic: the same section gives the same bytes.
/// Throws base::InputError where the section contradicts itself, base::NoSolution where a step cannot be made.
Result run(const Section& section, const Progress& progress = {});

}  // namespace palier::freeze
