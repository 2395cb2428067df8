// The exact cases at palier's default accuracy, by family, and the sections they are made of. Each semi-infinite body
// is cut off where it no longer feels its face; each known time lies within the run.
#pragma once

#include <string>
#include <vector>

#include "exact/cases/exact_case.hpp"
#include "exact/solutions/alloy_similarity.hpp"
#include "exact/solutions/conduction.hpp"
#include "exact/solutions/freezing_range.hpp"
#include "exact/solutions/inward_freezing_times.hpp"
#include "exact/solutions/sand_limited.hpp"
#include "exact/solutions/stefan_neumann.hpp"

namespace palier::exact {

/// Plate with its surface held, without superheat: Stefan's solution holds to its very center.
ExactCase stefan_plate(const std::string& name, const PureMetal& metal, double wall, double half_thickness);
/// Half space with superheat, up to a time.
ExactCase neumann_half_space(const std::string& name, const PureMetal& metal, double wall, double start, double until);
std::vector<ExactCase> stefan_neumann_cases();

/// Half space of superheated metal against a half space of mold, up to a time.
ExactCase schwarz_half_spaces(const std::string& name, const PureMetal& metal, double start, const Phase& mold,
                              double mold_start, double until);
std::vector<ExactCase> schwarz_cases();

/// Half space with its wall held, fraction solid linear in temperature.
ExactCase linear_half_space(const std::string& name, const LinearAlloy& alloy, double wall, double start, double until);
/// Shell around the sink of a solution, from the exact profile at `begin` on: what the sink would take flows out
/// through the bore. @param shape cylinder (line sink) or sphere (point sink)
ExactCase shell_around_sink(const std::string& name, const LinearAlloy& alloy, const LinearFreezing& solution,
                            heat::Shape shape, double bore_radius, double about, double until);
std::vector<ExactCase> freezing_range_cases();

/// Half space of a binary alloy against its wall.
ExactCase alloy_half_space(const std::string& name, const BinaryAlloy& alloy, const HalfSpaceWall& wall, double start,
                           double until);
std::vector<ExactCase> alloy_similarity_cases();

/// Plate, cylinder or sphere so conductive that it has one temperature.
std::vector<ExactCase> lumped_cases();

/// Casting at its melting point throughout in endless sand. @param conductance of the contact [W/m2/K]; 0: perfect
ExactCase sand_casting(const std::string& name, const SandLimited& data, heat::Shape shape, double modulus,
                       double conductance);
std::vector<ExactCase> sand_limited_cases();

/// A row of the numerical benchmark as a section of 1 cm half thickness or radius.
ExactCase inward_freezing(const InwardFreezingTime& row);
std::vector<ExactCase> inward_freezing_cases();

/// All of the above.
std::vector<ExactCase> all_cases();

}  // namespace palier::exact
