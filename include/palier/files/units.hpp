// Conversion of units by UDUNITS-2, the only place that calls it.
//
// Every function throws base::FileTrouble where the library's definitions cannot be loaded. They are loaded once a
// process, at first use (about 4 ms); calls from several threads wait for one another.
#pragma once

#include <optional>
#include <string>

namespace palier::files {

/// SI value = factor * value + offset.
struct UnitScale {
  double factor = 1;
  double offset = 0;
};

/// Whether UDUNITS-2 knows this unit (in its own spelling).
bool is_unit(const std::string& unit);

/// Whether it is a pure number, such as percent, ppm or radian.
bool is_dimensionless(const std::string& unit);

/// Its dimension in SI base units, e.g. "kg s-3"; "1" for a pure number; empty where the unit is unknown.
std::string base_units(const std::string& unit);

/// From one unit to another, with the offset of temperature scales. Nothing where one is unknown or they do not
/// convert.
std::optional<UnitScale> unit_scale(const std::string& from, const std::string& to);

/// The factor alone, without offsets: for differences, 1 degF is 5/9 K.
std::optional<double> unit_slope(const std::string& from, const std::string& to);

}  // namespace palier::files
