#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "exact/solutions/schwarz.hpp"

namespace palier::exact {

ExactCase schwarz_half_spaces(const std::string& name, const PureMetal& metal, double start, const Phase& mold,
                              double mold_start, double until) {
  const Schwarz solution(metal, start, mold, mold_start);
  ExactCase exact{name, section_of(metal), {}};
  freeze::Section& s = exact.section;
  const double front = solution.front(until);
  s.thickness = 2 * (front + reach(metal.liquid, until));
  s.pouring_temperature = kelvin(start);
  s.outside = mold_wall(mold, reach(mold, until), mold_start);
  s.stop.after = until;
  if (!solution.freezes()) return exact;
  resolve_half_space(s, front);
  s.probes = {0.31 * front, 0.53 * front, 0.77 * front, 0.93 * front};
  for (int i = 0; i < 4; ++i) {
    const double ratio = s.probes[static_cast<std::size_t>(i)] / front;
    exact.times.push_back({KnownTime::What::end_at_probe, i, ratio * ratio * until});
  }
  return exact;
}

std::vector<ExactCase> schwarz_cases() {
  return {
      schwarz_half_spaces("Schwarz, aluminum-like in sand", aluminum_like(), 680, sand_for_aluminum(), 20, 600),
      schwarz_half_spaces("Schwarz, aluminum-like on steel", aluminum_like(), 720, steel_mold(), 200, 10),
      schwarz_half_spaces("Schwarz, aluminum-like on copper", aluminum_like(), 720, copper_mold(), 20, 10),
      schwarz_half_spaces("Schwarz, iron-like in sand", iron_like(), 1600, sand_for_steel(), 20, 600),
      schwarz_half_spaces("Schwarz, copper-like on graphite", copper_like(), 1200, graphite_mold(), 20, 10),
  };
}

}  // namespace palier::exact
