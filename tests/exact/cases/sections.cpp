#include "exact/cases/sections.hpp"

#include <cmath>
#include <stdexcept>
#include <utility>

#include "palier/alloy/diagram.hpp"
#include "palier/freeze/setup.hpp"

namespace palier::exact {
namespace {

alloy::PhaseProperties properties(const Phase& phase) {
  return {base::Table(phase.heat_capacity), base::Table(phase.conductivity)};
}

}  // namespace

freeze::Section section_of(const Phase& solid, const Phase& liquid, double latent_heat,
                           alloy::SolidificationPath path) {
  if (solid.density != liquid.density) throw std::domain_error("the phases must have one density");
  freeze::Section section;
  section.metal = {solid.density, properties(solid), properties(liquid), latent_heat};
  section.path = std::move(path);
  return section;
}

freeze::Section section_of(const PureMetal& metal) {
  return section_of(metal.solid, metal.liquid, metal.latent_heat, alloy::pure_path(kelvin(metal.melting_point)));
}

freeze::Section section_of(const LinearAlloy& alloy) {
  if (alloy.pure())
    return section_of(alloy.solid, alloy.liquid, alloy.latent_heat, alloy::pure_path(kelvin(alloy.liquidus)));
  if (alloy.solid.heat_capacity != alloy.mush.heat_capacity || alloy.liquid.heat_capacity != alloy.mush.heat_capacity ||
      alloy.solid.conductivity != alloy.mush.conductivity || alloy.liquid.conductivity != alloy.mush.conductivity)
    throw std::domain_error("solid, mush and liquid must have the same properties");
  return section_of(alloy.solid, alloy.liquid, alloy.latent_heat,
                    alloy::measured_path({kelvin(alloy.liquidus), kelvin(alloy.solidus)}, {0.0, 1 - alloy.eutectic}));
}

freeze::Section section_of(const BinaryAlloy& alloy) {
  if (alloy.latent_heat_rule != BinaryAlloy::LatentHeat::constant &&
      alloy.solid.heat_capacity != alloy.liquid.heat_capacity)
    throw std::domain_error("the latent heat must be constant");
  const auto diagram = alloy::make_diagram(alloy::BinaryLines::straight(
      kelvin(alloy.melting_point), alloy.slope, alloy.partition_coefficient, kelvin(alloy.eutectic)));
  return section_of(alloy.solid, alloy.liquid, alloy.latent_heat,
                    alloy.rule == BinaryAlloy::Rule::lever ? alloy::lever_path(diagram, alloy.composition)
                                                           : alloy::scheil_path(diagram, alloy.composition));
}

freeze::Section section_without_freezing(const Phase& body) {
  return section_of(body, body, 1.0, alloy::pure_path(kelvin(-220)));
}

heat::Boundary held_at(double celsius) {
  heat::Boundary boundary;
  boundary.kind = heat::Boundary::Kind::fixed_temperature;
  boundary.temperature = kelvin(celsius);
  return boundary;
}

heat::Boundary film_to(double film, double celsius) {
  heat::Boundary boundary;
  boundary.kind = heat::Boundary::Kind::film;
  boundary.film_coefficient = film;
  boundary.temperature = kelvin(celsius);
  return boundary;
}

freeze::Wall mold_wall(const Phase& mold, double thickness, double start) {
  freeze::WallLayer layer;
  layer.material = "mold";
  layer.properties = {mold.density, properties(mold), 0.0};
  layer.thickness = thickness;
  layer.start_temperature = kelvin(start);
  return {{layer}, heat::Boundary{}};
}

double reach(const Phase& phase, double t) { return 6 * std::sqrt(phase.diffusivity() * t); }

void resolve_frozen_part(freeze::Section& section, double frozen_depth, double frozen_share) {
  const int frozen_cells = freeze::resolution_for(section).metal_cells;
  section.cells = static_cast<int>(std::lround(frozen_cells * section.depth() / frozen_depth));
  section.accuracy *= frozen_share;
}

void resolve_half_space(freeze::Section& section, double frozen_depth) {
  resolve_frozen_part(section, frozen_depth, frozen_depth / section.depth());
}

}  // namespace palier::exact
