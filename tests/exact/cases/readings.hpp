// Errors of a run against functions known exactly, taken from its readings by depth and its last recorded row.
#pragma once

#include <functional>

#include "palier/freeze/result.hpp"
#include "palier/freeze/section.hpp"

namespace palier::exact {

/// Root mean square over depths in [from, to] of found / known - 1, of the end of freezing. Throws std::runtime_error
/// where a depth has no reading or there is none at all.
double end_error(const freeze::Result& result, const std::function<double(double)>& known_end, double from, double to);
/// The same of the start of freezing.
double start_error(const freeze::Result& result, const std::function<double(double)>& known_start, double from,
                   double to);

/// Root mean square over all cells of the last row, of found less known temperature [K].
/// @param known temperature [K] over the radius [m] as in History::radius
double temperature_error(const freeze::Result& result, const std::function<double(double)>& known);
/// Largest difference instead.
double largest_temperature_error(const freeze::Result& result, const std::function<double(double)>& known);

}  // namespace palier::exact
