// Where the equilibria of a binary change on cooling.
#pragma once

#include <string>
#include <vector>

#include "common_tangent.hpp"

namespace palier::alloy {

/// A temperature at which lines with liquid may begin or end.
struct Stop {
  BranchEnd kind;
  double temperature;
  std::string reaction;         ///< of an invariant or a congruent point
  std::vector<Contact> phases;  ///< that take part
};

/// Temperature at which the liquid of a pure element and its most stable solid are in equilibrium, between low and
/// high [K]. Throws InputError where there is none.
double element_melting_point(const Phases& phases, BaseElement element, double low, double high);

/// Melting points, congruent points and invariants with liquid, by falling temperature; high and low as its ends.
std::vector<Stop> find_stops(const Phases& phases, double low, double high);

}  // namespace palier::alloy
