// What a run of one section gives back, in SI units.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "palier/alloy/path.hpp"

namespace palier::freeze {

/// Times at one depth [s]; NaN: not reached in this run.
struct Reading {
  double depth = 0;                      ///< below the surface [m]
  double start = 0;                      ///< freezing starts: temperature falls through the liquidus
  double end = 0;                        ///< freezing ends: no liquid left at this depth
  double local_solidification_time = 0;  ///< end - start
};

/// A reading with the numerical error (half width of the ±) of each of its times [s].
struct ProbeReading {
  Reading value;
  Reading error;  ///< depth unused
};

/// Rows recorded over time. Fields are stored row by row: field[row * cells + cell].
struct History {
  std::vector<double> time;               ///< [s], rows
  std::vector<double> radius;             ///< cell centers from the center (left side) outward [m], metal first
  std::vector<double> face;               ///< cell faces, one more than cells of each layer joined [m]
  std::vector<int> layer;                 ///< of each cell: index into layer_name
  std::vector<std::string> layer_name;    ///< in order of the radius
  int metal_begin = 0, metal_end = 0;     ///< cells of the metal: [begin, end)
  std::vector<double> temperature;        ///< rows x cells [K]
  std::vector<double> fraction_solid;     ///< rows x metal cells [1]
  std::vector<double> probe_temperature;  ///< rows x probes [K]
  std::vector<double> probe_fraction;     ///< rows x probes [1]
  std::vector<double> solidus_depth;      ///< rows: depth to which the metal is solid, from the surface [m]
  std::vector<double> liquidus_depth;     ///< rows: depth to which freezing has started, from the surface [m]
  std::vector<double> mushy_width;        ///< rows: length of the section that is freezing [m]
  std::vector<double> surface_flux;       ///< rows: heat flux out of the metal at the surface [W/m2]
};

struct Result {
  std::optional<alloy::SolidificationPath> path;              ///< the one used; always set
  double solidification_time = 0;                             ///< last point of the metal [s]; NaN: stopped before
  double solidification_time_error = 0;                       ///< numerical [s]
  double last_to_freeze = 0;                                  ///< its depth [m]
  double end_time = 0;                                        ///< where the run stopped [s]
  double heat_imbalance = 0;                                  ///< worst over the run, relative to the heat content
  long steps = 0, rejected_steps = 0, newton_iterations = 0;  ///< of the fine run
  double cpu_seconds = 0;                                     ///< fine and companion run
  std::vector<ProbeReading> probes;
  std::vector<Reading> by_depth;  ///< at every cell center of the metal
  History history;
  std::vector<std::string> remarks;  ///< assumptions worth telling, e.g. a property held constant beyond its table
};

}  // namespace palier::freeze
