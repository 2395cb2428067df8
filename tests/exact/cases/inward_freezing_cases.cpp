#include <array>
#include <cmath>

#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"

namespace palier::exact {

ExactCase inward_freezing(const InwardFreezingTime& row) {
  static constexpr std::array names{"plate", "cylinder", "sphere"};
  // Round data; only the Stefan and the Biot number and alpha / R^2 matter.
  const Phase metal{2500, 200, 1000};
  const double radius = 0.01, undercooling = 500, melting_point = 600;
  const double latent = metal.heat_capacity * undercooling / row.stefan;
  ExactCase exact{"Inward, " + std::string(names.at(static_cast<std::size_t>(row.shape))) + ", Ste " +
                      std::to_string(row.stefan).substr(0, 3) + ", Bi " + std::to_string(row.biot).substr(0, 4),
                  section_of(PureMetal{metal, metal, latent, melting_point}),
                  {}};
  freeze::Section& s = exact.section;
  s.shape = static_cast<heat::Shape>(row.shape);
  s.thickness = 2 * radius;
  s.pouring_temperature = kelvin(melting_point);
  s.outside.outer = std::isinf(row.biot)
                        ? held_at(melting_point - undercooling)
                        : film_to(row.biot * metal.conductivity / radius, melting_point - undercooling);
  const double time = row.fourier * radius * radius / metal.diffusivity();
  exact.times.push_back({KnownTime::What::whole, 0, time, inward_freezing_error * time});
  return exact;
}

std::vector<ExactCase> inward_freezing_cases() {
  std::vector<ExactCase> cases;
  for (const InwardFreezingTime& row : inward_freezing_times()) cases.push_back(inward_freezing(row));
  return cases;
}

}  // namespace palier::exact
