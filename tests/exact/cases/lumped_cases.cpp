#include <array>
#include <optional>

#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "exact/solutions/lumped.hpp"

namespace palier::exact {
namespace {

// Biot number h M / k = 1e-6: what is left of it in the times is of its order.
constexpr double conductivity = 5e5;
constexpr double film = 100, surroundings = 25, pouring = 700, modulus = 0.005;

const std::array shapes{heat::Shape::plate, heat::Shape::cylinder, heat::Shape::sphere};
const std::array shape_names{"plate", "cylinder", "sphere"};

/// The casting in all three shapes; the modulus is half the thickness, a quarter and a sixth of the diameter.
void in_all_shapes(std::vector<ExactCase>& cases, const std::string& name, const freeze::Section& casting,
                   std::optional<double> superheat_gone, double frozen) {
  for (std::size_t m = 0; m < shapes.size(); ++m) {
    ExactCase exact{"Lumped " + std::string(shape_names[m]) + ", " + name, casting, {}};
    freeze::Section& s = exact.section;
    s.shape = shapes[m];
    s.thickness = 2 * modulus * static_cast<double>(m + 1);
    s.pouring_temperature = kelvin(pouring);
    s.outside.outer = film_to(film, surroundings);
    const double uncertainty = 1e-6 * frozen;
    exact.times.push_back({KnownTime::What::whole, 0, frozen, uncertainty});
    if (superheat_gone) exact.times.push_back({KnownTime::What::start_at_probe, 2, *superheat_gone, uncertainty});
    cases.push_back(exact);
  }
}

}  // namespace

std::vector<ExactCase> lumped_cases() {
  std::vector<ExactCase> cases;
  const Phase body{2600, conductivity, 1100};
  const LumpedCasting casting{body.density, modulus, film, surroundings};
  for (const double eutectic : {0.0, 0.1, 0.3}) {
    const LinearAlloy alloy{body, body, body, 390e3, 645, 548, eutectic};
    const double superheat = casting.cooling_time(body.heat_capacity, pouring, alloy.liquidus);
    in_all_shapes(cases, "linear, " + std::to_string(static_cast<int>(100 * eutectic)) + " % eutectic",
                  section_of(alloy), superheat,
                  superheat + casting.cooling_time(alloy.mush_heat_capacity(), alloy.liquidus, alloy.solidus) +
                      casting.arrest_time(alloy.latent_heat * eutectic, alloy.solidus));
  }
  for (const auto rule : {BinaryAlloy::Rule::lever, BinaryAlloy::Rule::scheil}) {
    BinaryAlloy alloy = al_cu_like(rule, false);
    alloy.solid = alloy.liquid = body;
    const double superheat = casting.cooling_time(body.heat_capacity, pouring, alloy.liquidus());
    const auto heat_capacity = [&](double T) { return alloy.enthalpy_slope(T); };
    in_all_shapes(cases, rule == BinaryAlloy::Rule::lever ? "lever rule" : "Scheil", section_of(alloy), superheat,
                  superheat + casting.cooling_time(heat_capacity, alloy.liquidus(), alloy.end_of_freezing()) +
                      casting.arrest_time(alloy.arrest_heat(), alloy.end_of_freezing()));
  }
  PureMetal metal = aluminum_like();
  metal.solid.conductivity = metal.liquid.conductivity = conductivity;
  const LumpedCasting pure{metal.solid.density, modulus, film, surroundings};
  const double superheat = pure.cooling_time(metal.liquid.heat_capacity, pouring, metal.melting_point);
  in_all_shapes(cases, "pure metal", section_of(metal), std::nullopt,
                superheat + pure.arrest_time(metal.latent_heat, metal.melting_point));
  return cases;
}

}  // namespace palier::exact
