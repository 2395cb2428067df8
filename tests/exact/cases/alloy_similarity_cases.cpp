#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"

namespace palier::exact {

ExactCase alloy_half_space(const std::string& name, const BinaryAlloy& alloy, const HalfSpaceWall& wall, double start,
                           double until) {
  using What = KnownTime::What;
  const AlloySimilarity solution(alloy, wall, start);
  ExactCase exact{name, section_of(alloy), {}};
  freeze::Section& s = exact.section;
  s.thickness = 2 * (solution.start_front(until) + reach(alloy.liquid, until));
  s.pouring_temperature = kelvin(start);
  if (wall.mold)
    s.outside = mold_wall(*wall.mold, reach(*wall.mold, until), wall.temperature);
  else
    s.outside.outer = held_at(wall.temperature);
  s.stop.after = until;
  const double front = solution.has_skin() ? solution.end_front(until) : solution.start_front(until);
  resolve_half_space(s, front);
  s.probes = {0.31 * front, 0.53 * front, 0.77 * front, 0.93 * front};
  for (int i = 0; i < 4; ++i) {
    const double depth = s.probes[static_cast<std::size_t>(i)];
    exact.times.push_back({What::start_at_probe, i, solution.start_arrival(depth)});
    if (solution.has_skin()) exact.times.push_back({What::end_at_probe, i, solution.end_arrival(depth)});
  }
  return exact;
}

std::vector<ExactCase> alloy_similarity_cases() {
  std::vector<ExactCase> cases;
  for (const auto rule : {BinaryAlloy::Rule::lever, BinaryAlloy::Rule::scheil}) {
    const std::string which = rule == BinaryAlloy::Rule::lever ? "lever rule, " : "Scheil, ";
    const auto uniform = al_cu_like(rule, false), varied = al_cu_like(rule, true, BinaryAlloy::LatentHeat::constant);
    cases.push_back(alloy_half_space(which + "uniform, wall held", uniform, {std::nullopt, 100}, 700, 10));
    cases.push_back(alloy_half_space(which + "wall held", varied, {std::nullopt, 100}, 700, 10));
    cases.push_back(alloy_half_space(which + "copper", varied, {copper_mold(), 20}, 700, 10));
    cases.push_back(alloy_half_space(which + "sand", varied, {sand_for_aluminum(), 20}, 660, 100));
  }
  return cases;
}

}  // namespace palier::exact
