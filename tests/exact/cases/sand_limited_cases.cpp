#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"

namespace palier::exact {
namespace {

double exact_time(const SandLimited& data, heat::Shape shape, double modulus, double conductance) {
  switch (shape) {
    case heat::Shape::plate:
      return conductance > 0 ? data.plate_time(modulus, conductance) : data.plate_time(modulus);
    case heat::Shape::cylinder:
      return data.cylinder_time(modulus);
    case heat::Shape::sphere:
      return data.sphere_time(modulus);
  }
  return 0;
}

}  // namespace

ExactCase sand_casting(const std::string& name, const SandLimited& data, heat::Shape shape, double modulus,
                       double conductance) {
  // Superheat counts as latent heat; the casting is so conductive that it stays at its melting point: the largest
  // difference within it is flux times depth over conductivity, 1e-6 of that to the sand.
  const double conductivity = 1e6 * data.sand.conductivity;
  const Phase metal{data.density, conductivity, 1000};
  ExactCase exact{name, section_of(PureMetal{metal, metal, data.latent_heat + data.superheat, data.melting_point}), {}};
  freeze::Section& s = exact.section;
  const double time = exact_time(data, shape, modulus, conductance);
  s.shape = shape;
  s.thickness = 2 * modulus * (1 + static_cast<int>(shape));
  s.pouring_temperature = kelvin(data.melting_point);
  s.outside = mold_wall(data.sand, reach(data.sand, time), data.sand_start);
  if (conductance > 0) s.outside.layers.front().contact = {heat::Contact::Over::constant, base::Table(conductance)};
  exact.times.push_back({KnownTime::What::whole, 0, time, 1e-5 * time});
  return exact;
}

std::vector<ExactCase> sand_limited_cases() {
  std::vector<ExactCase> cases;
  for (const auto& [which, data] :
       {std::pair("aluminum-like", aluminum_in_sand()), std::pair("steel-like", steel_in_sand())}) {
    const std::string name = std::string("Sand-limited, ") + which;
    cases.push_back(sand_casting(name + " plate", data, heat::Shape::plate, 0.01, 0));
    cases.push_back(sand_casting(name + " cylinder", data, heat::Shape::cylinder, 0.01, 0));
    cases.push_back(sand_casting(name + " sphere", data, heat::Shape::sphere, 0.01, 0));
    for (const double conductance : {100.0, 500.0, 1000.0, 5000.0})
      cases.push_back(sand_casting(name + " plate, contact " + std::to_string(static_cast<int>(conductance)), data,
                                   heat::Shape::plate, 0.01, conductance));
  }
  return cases;
}

}  // namespace palier::exact
