// Sections to test runs on, of an aluminum-like metal in sand (round numbers, invented).
#pragma once

#include "palier/freeze/result.hpp"
#include "palier/freeze/section.hpp"

namespace palier::freeze {

/// Plate of 20 mm in 100 mm of sand behind a contact of 1000 W/m2/K, poured at 960 K; freezes at 933 K.
Section pure_in_sand();
/// The same with a freezing range of 918 to 821 K: one tenth freezes in the arrest at its end.
Section range_in_sand();
/// Plate of 20 mm that freezes from 918 to 821 K without an arrest; both phases have one heat capacity, 1100 J/kg/K.
Section steady_range();

heat::Boundary held_at(double temperature);
heat::Boundary film(double coefficient, double surroundings);
/// Layer of sand at 300 K.
WallLayer sand_layer(double thickness, const heat::Contact& contact);
heat::Contact constant_contact(double conductance);

/// Largest temperature of the metal in the last recorded row [K].
double hottest_at_end(const Result& result);

}  // namespace palier::freeze
