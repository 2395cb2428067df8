#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"

namespace palier::exact {
namespace {

using What = KnownTime::What;

}  // namespace

ExactCase stefan_plate(const std::string& name, const PureMetal& metal, double wall, double half_thickness) {
  const StefanNeumann solution(metal, wall, metal.melting_point);
  ExactCase exact{name, section_of(metal), {}};
  freeze::Section& s = exact.section;
  s.thickness = 2 * half_thickness;
  s.pouring_temperature = kelvin(metal.melting_point);
  s.outside.outer = held_at(wall);
  s.probes = {0.25 * half_thickness, 0.5 * half_thickness, 0.75 * half_thickness};
  for (int i = 0; i < 3; ++i)
    exact.times.push_back({What::end_at_probe, i, solution.arrival(s.probes[static_cast<std::size_t>(i)])});
  exact.times.push_back({What::whole, 0, solution.arrival(half_thickness)});
  return exact;
}

ExactCase neumann_half_space(const std::string& name, const PureMetal& metal, double wall, double start, double until) {
  const StefanNeumann solution(metal, wall, start);
  ExactCase exact{name, section_of(metal), {}};
  freeze::Section& s = exact.section;
  const double front = solution.front(until);
  s.thickness = 2 * (front + reach(metal.liquid, until));
  s.pouring_temperature = kelvin(start);
  s.outside.outer = held_at(wall);
  s.stop.after = until;
  resolve_half_space(s, front);
  s.probes = {0.31 * front, 0.53 * front, 0.77 * front, 0.93 * front};
  for (int i = 0; i < 4; ++i)
    exact.times.push_back({What::end_at_probe, i, solution.arrival(s.probes[static_cast<std::size_t>(i)])});
  return exact;
}

std::vector<ExactCase> stefan_neumann_cases() {
  return {stefan_plate("Stefan, ice-like", ice_like(), -10, 0.02),
          stefan_plate("Stefan, aluminum-like", aluminum_like(), 200, 0.02),
          neumann_half_space("Neumann, ice-like", ice_like(), -10, 5, 3600),
          neumann_half_space("Neumann, aluminum-like", aluminum_like(), 200, 720, 10),
          neumann_half_space("Neumann, Voller & Cross", voller_cross(), -10, 2, 864000)};
}

}  // namespace palier::exact
