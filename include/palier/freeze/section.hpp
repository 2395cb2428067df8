// One section of a casting with its walls: everything a march needs, in SI units.
#pragma once

#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "palier/alloy/enthalpy_curve.hpp"
#include "palier/heat/boundary.hpp"

namespace palier::freeze {

/// A layer of mold, core, chill, die or sleeve around the metal.
struct WallLayer {
  heat::Contact contact;  ///< to what lies on its side of the metal
  std::string material;   ///< name, for messages and results
  alloy::MoldProperties properties;
  double thickness = 0;          ///< [m]
  double start_temperature = 0;  ///< [K]
  std::optional<int> cells;      ///< by hand; otherwise from the accuracy
};

/// All that lies on one side of the metal, from the metal outward.
struct Wall {
  std::vector<WallLayer> layers;
  heat::Boundary outer;
};

/// When the run stops.
struct Stop {
  std::optional<double> below;  ///< hottest point of the metal [K]; otherwise: end of freezing
  std::optional<double> after;  ///< [s], a bound on the time; otherwise none
};

struct Section {
  std::string title;
  heat::Shape shape = heat::Shape::plate;
  /// [m] plate: whole thickness; cylinder and sphere: outer diameter of the metal
  double thickness = 0;
  double bore = 0;  ///< [m] diameter of the bore of a hollow cylinder; 0: solid
  std::string alloy;
  alloy::MetalProperties metal;
  std::optional<alloy::SolidificationPath> path;  ///< always set in a valid section
  /// Where the path depends on the time freezing takes, as under back-diffusion: the path after a local solidification
  /// time [s]; `path` is then a first guess. Empty: `path` it is.
  std::function<alloy::SolidificationPath(double)> path_after;
  double pouring_temperature = 0;  ///< [K]
  /// Temperature of the metal at the start over the radius [m] -> [K]; empty: pouring_temperature everywhere.
  std::function<double(double)> start_profile;
  /// plate: the right side; cylinder and sphere: outside
  Wall outside;
  /// plate with two different sides: the left one; hollow cylinder: the bore. Nothing: symmetric about the center.
  std::optional<Wall> inside;
  Stop stop;
  /// Depths below the surface [m]; empty: surface, 25, 50, 75 % and center. The surface is the outer one; a plate with
  /// two different sides counts from its left side.
  std::vector<double> probes;
  std::optional<double> record_every;  ///< [s]; otherwise chosen so that about 200 rows come out
  double accuracy = 1e-3;              ///< relative error asked of the end-of-freezing times
  std::optional<int> cells;            ///< of the metal, by hand; otherwise from the accuracy

  /// Distance from surface to center, or from one side to the other where two walls differ [m].
  double depth() const;
};

}  // namespace palier::freeze
