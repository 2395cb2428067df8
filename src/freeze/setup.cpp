#include "palier/freeze/setup.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::freeze {
namespace {

using heat::Boundary;
using heat::Contact;

/// Temperatures a run can meet: those it starts from and those around it.
struct TemperatureRange {
  double low, high;
};

TemperatureRange temperatures(const Section& s) {
  TemperatureRange r{s.pouring_temperature, s.pouring_temperature};
  const auto take = [&r](double T) {
    r.low = std::min(r.low, T);
    r.high = std::max(r.high, T);
  };
  take(s.path->end_of_freezing());
  take(s.path->liquidus());
  for (const Wall* wall : {&s.outside, s.inside ? &*s.inside : nullptr}) {
    if (!wall) continue;
    for (const WallLayer& l : wall->layers) take(l.start_temperature);
    if (wall->outer.kind == Boundary::Kind::film || wall->outer.kind == Boundary::Kind::fixed_temperature)
      take(wall->outer.temperature);
  }
  // A prescribed heat flux or a start profile can lead outside; curves go on straight there.
  const double margin = 0.05 * (r.high - r.low) + 1;
  return {r.low - margin, r.high + margin};
}

/// Heat that must leave the metal until it is solid [J/m3].
double heat_to_solid(const alloy::EnthalpyCurve& metal, double pouring_temperature) {
  return metal.enthalpy(pouring_temperature, alloy::ArrestEnd::hot) - metal.end_of_freezing_enthalpy();
}

/// Spacing of wall cells: the width of the first cell at the metal and the growth from cell to cell.
struct Spacing {
  double first;
  double growth;
};

/// A single layer of thickness W is cut as x = W (e^(bs) - 1)/(e^b - 1), s = i/n. The heat reaches as far as sqrt(a t),
/// a the diffusivity and t the time to freeze; b grows with what of the layer lies beyond that.
Spacing spacing(const Wall& wall, double freezing_time, int cells) {
  double total = 0;
  for (const WallLayer& l : wall.layers) total += l.thickness;
  const alloy::MoldProperties& p = wall.layers.front().properties;
  const double T = wall.layers.front().start_temperature;
  const double reach = std::sqrt(p.body.conductivity(T) / (p.density * p.body.heat_capacity(T)) * freezing_time);
  const double b = std::log(1 + 15 * total / reach);
  return {total * b / (cells * std::expm1(b)), std::exp(b / cells)};
}

constexpr int kFewestCells = 4;  // of a layer, however thin

/// Cells of all layers of a wall, from the metal outward.
std::vector<std::vector<double>> wall_widths(const Wall& wall, double freezing_time, int cells) {
  std::vector<std::vector<double>> widths;
  if (wall.layers.empty()) return widths;
  const Spacing s = spacing(wall, freezing_time, cells);
  double width = s.first;
  for (const WallLayer& l : wall.layers) {
    // n cells growing from `width`: width (g^n - 1)/(g - 1) = thickness
    const double wanted = std::log1p(l.thickness / width * (s.growth - 1)) / std::log(s.growth);
    const int n = l.cells ? *l.cells : std::max(kFewestCells, static_cast<int>(std::lround(wanted)));
    widths.push_back(
        heat::graded_widths(l.thickness, n, l.cells ? std::exp(std::log(s.growth) * wanted / n) : s.growth));
    width = std::max(width, widths.back().back() * s.growth);
  }
  return widths;
}

/// How much wider the metal's last cell is than its first at a wall: the harder the wall takes heat, the steeper the
/// metal near it early on, up to a face held at one temperature. Judged by the Biot number of contact and mold in
/// series.
constexpr double kSteepest = 24;

double grading(const Section& s, const Wall& wall, double freezing_time) {
  double resistance = 0;
  if (wall.outer.kind == Boundary::Kind::adiabatic && wall.layers.empty()) return 1;
  if (!wall.layers.empty()) {
    const WallLayer& l = wall.layers.front();
    const double T = l.start_temperature;
    const double effusivity =
        std::sqrt(l.properties.body.conductivity(T) * l.properties.density * l.properties.body.heat_capacity(T));
    resistance = std::sqrt(freezing_time) / effusivity;
    if (l.contact.over != Contact::Over::perfect) resistance += 1 / l.contact.conductance.largest();
    // The gap opens with the fraction solid of the metal's first cell, so that cell has to be thin.
    if (l.contact.over == Contact::Over::surface_fraction_solid) return kSteepest;
  } else if (wall.outer.kind == Boundary::Kind::film) {
    resistance = 1 / (wall.outer.film_coefficient + 1e-300);
  }
  const double biot = s.depth() / (s.metal.solid.conductivity(s.path->end_of_freezing()) * (resistance + 1e-12));
  return std::clamp(1 + 2 * biot, 1.0, kSteepest);
}

/// Cells over `length`, narrowest first.
std::vector<double> from_wall(double length, int cells, double last_to_first) {
  return heat::graded_widths(length, cells, std::pow(last_to_first, 1.0 / std::max(1, cells - 1)));
}

/// Cells of the metal from one wall to the center of symmetry. Where the run is to stop long before the heat has come
/// from the far end, four fifths of them lie in the part it comes from, and the rest grow beyond.
std::vector<double> one_sided_widths(const Section& s, int cells, double last_to_first) {
  constexpr double kReach = 1.5;
  const auto diffusivity = [&](const alloy::PhaseProperties& p) {
    return p.conductivity(s.path->liquidus()) / (s.metal.density * p.heat_capacity(s.path->liquidus()));
  };
  const double depth = s.depth();
  const double reach = kReach * std::sqrt(std::max(diffusivity(s.metal.solid), diffusivity(s.metal.liquid)) *
                                          s.stop.after.value_or(std::numeric_limits<double>::infinity()));
  if (!(reach < 0.6 * depth)) return from_wall(depth, cells, last_to_first);
  const int near = std::max(2, cells * 4 / 5), far = std::max(2, cells - near);
  std::vector<double> widths = from_wall(reach, near, last_to_first);
  // Growth with which `far` cells, starting from the last width, fill the rest; by bisection.
  double low = 1, high = 1e3;
  for (int i = 0; i < 100; ++i) {
    const double g = 0.5 * (low + high), sum = g * (std::pow(g, far) - 1) / (g - 1);
    (sum * widths.back() > depth - reach ? high : low) = g;
  }
  const std::vector<double> rest = heat::graded_widths(depth - reach, far, 0.5 * (low + high));
  widths.insert(widths.end(), rest.begin(), rest.end());
  return widths;
}

/// Cells of the metal by rising radius.
std::vector<double> metal_widths(const Section& s, int cells, double freezing_time) {
  const double outer = grading(s, s.outside, freezing_time);
  if (!s.inside) {
    std::vector<double> widths = one_sided_widths(s, cells, outer);
    std::reverse(widths.begin(), widths.end());
    return widths;
  }
  const int half = cells / 2;
  std::vector<double> widths = from_wall(s.depth() / 2, half, grading(s, *s.inside, freezing_time));
  const std::vector<double> rest = from_wall(s.depth() / 2, cells - half, outer);
  widths.insert(widths.end(), rest.rbegin(), rest.rend());
  return widths;
}

/// A wall as layers of the body by rising radius, metal on the left; reversed by the caller for an inside wall.
struct WallCells {
  std::vector<heat::BodyLayer> layers;
  std::vector<double> start;
  std::vector<std::string> names;
};

WallCells cut(const Wall& wall, double freezing_time, int cells, const TemperatureRange& range) {
  WallCells out;
  const std::vector<std::vector<double>> widths = wall_widths(wall, freezing_time, cells);
  for (std::size_t i = 0; i < wall.layers.size(); ++i) {
    const WallLayer& l = wall.layers[i];
    out.layers.push_back(
        {std::make_shared<const alloy::EnthalpyCurve>(l.properties, range.low, range.high), widths[i], {}});
    out.start.push_back(l.start_temperature);
    out.names.push_back(l.material);
  }
  return out;
}

void refuse_contact(const Wall& wall) {
  for (std::size_t i = 1; i < wall.layers.size(); ++i)
    if (wall.layers[i].contact.over == Contact::Over::surface_fraction_solid)
      throw base::InputError("a contact over the surface fraction solid must touch the casting");
}

}  // namespace

double rough_freezing_time(const Section& s) {
  const double liquidus = s.path->liquidus();
  const double stored =
      s.metal.density * (s.metal.latent_heat +
                         s.metal.liquid.heat_capacity(liquidus) * (s.pouring_temperature - s.path->end_of_freezing()));
  const int m = static_cast<int>(s.shape);
  const double modulus = s.depth() / (s.inside ? 2 : 1) / (m + 1);
  const double heat = stored * modulus;  // per area of wall
  double rate = 0;
  for (const Wall* wall : {&s.outside, s.inside ? &*s.inside : nullptr}) {
    if (!wall) continue;
    // Resistances in series turned into times that add up: conduction in the metal, contact, film, soaking of the mold.
    const double T = s.path->end_of_freezing();
    double colder = wall->outer.temperature, resistance = s.depth() / (2 * s.metal.solid.conductivity(T)), soak = 0;
    if (!wall->layers.empty()) {
      const WallLayer& l = wall->layers.front();
      const double effusivity = std::sqrt(l.properties.body.conductivity(l.start_temperature) * l.properties.density *
                                          l.properties.body.heat_capacity(l.start_temperature));
      colder = l.start_temperature;
      soak = 0.785 * std::pow(heat / (effusivity * std::max(1.0, T - colder)), 2);
      if (l.contact.over != Contact::Over::perfect) resistance += 1 / l.contact.conductance.largest();
    } else if (wall->outer.kind == Boundary::Kind::film) {
      resistance += 1 / (wall->outer.film_coefficient + 4 * wall->outer.emissivity * 5.67e-8 * T * T * T);
    }
    rate += 1 / (soak + heat * resistance / std::max(1.0, T - colder));
  }
  return std::clamp(1 / rate, 1e-6, 1e9);
}

double wall_hardness(const Section& s) {
  const double time = rough_freezing_time(s);
  const double outer = grading(s, s.outside, time), inner = s.inside ? grading(s, *s.inside, time) : 1;
  return std::log(std::max(outer, inner)) / std::log(kSteepest);
}

std::shared_ptr<const alloy::EnthalpyCurve> metal_curve(const Section& s) {
  if (!s.path) throw base::InputError("a section needs a solidification path");
  const TemperatureRange range = temperatures(s);
  return std::make_shared<const alloy::EnthalpyCurve>(s.metal, *s.path, range.low, range.high);
}

Setup set_up(const Section& s, const Resolution& resolution, std::shared_ptr<const alloy::EnthalpyCurve> curve) {
  if (!s.path) throw base::InputError("a section needs a solidification path");
  if (!(s.depth() > 0)) throw base::InputError("a section needs a positive thickness");
  if (s.pouring_temperature < s.path->end_of_freezing())
    throw base::InputError("the pouring temperature lies below the end of freezing");
  const TemperatureRange range = temperatures(s);
  const double time = rough_freezing_time(s);

  Setup out;
  std::vector<heat::BodyLayer> layers;
  std::vector<double> start;
  double inner_radius = s.shape == heat::Shape::plate ? 0.0 : s.bore / 2;
  Boundary inner;
  if (s.inside) {
    refuse_contact(*s.inside);
    WallCells wall = cut(*s.inside, time, resolution.wall_cells, range);
    for (std::size_t i = wall.layers.size(); i-- > 0;) {
      heat::BodyLayer& l = wall.layers[i];
      std::reverse(l.widths.begin(), l.widths.end());
      // What lies on a layer's side of the metal is at its larger radius here.
      l.outer_contact = s.inside->layers[i].contact;
      inner_radius -= s.inside->layers[i].thickness;
      layers.push_back(std::move(l));
      start.push_back(wall.start[i]);
      out.layer_names.push_back(wall.names[i]);
    }
    inner = s.inside->outer;
    if (s.shape != heat::Shape::plate && inner_radius < -1e-12 * s.thickness)
      throw base::InputError("the layers in the bore are thicker than its radius");
    inner_radius = s.shape == heat::Shape::plate ? inner_radius : std::max(0.0, inner_radius);
  }
  const int metal = static_cast<int>(layers.size());
  const int metal_cells = s.cells.value_or(resolution.metal_cells);
  layers.push_back({std::move(curve), metal_widths(s, metal_cells, time), {}});
  start.push_back(s.pouring_temperature);
  out.layer_names.push_back(s.alloy);

  refuse_contact(s.outside);
  WallCells wall = cut(s.outside, time, resolution.wall_cells, range);
  for (std::size_t i = 0; i < wall.layers.size(); ++i) {
    layers.back().outer_contact = s.outside.layers[i].contact;
    layers.push_back(std::move(wall.layers[i]));
    start.push_back(wall.start[i]);
    out.layer_names.push_back(wall.names[i]);
  }
  out.body =
      std::make_unique<const heat::Body>(s.shape, inner_radius, std::move(layers), metal, inner, s.outside.outer);

  const heat::Body& body = *out.body;
  const heat::LayerCells cells = body.metal_cells();
  out.surface_side = s.inside && s.shape == heat::Shape::plate ? -1 : +1;
  out.surface_radius = body.face()[static_cast<std::size_t>(out.surface_side > 0 ? cells.end : cells.begin)];
  const double liquidus = s.path->liquidus();
  for (int layer = 0; layer < body.layers(); ++layer) {
    const alloy::EnthalpyCurve& c = body.curve(layer);
    const double T = start[static_cast<std::size_t>(layer)];
    // A mold is measured by what it takes to reach the liquidus, at least by a tenth of the way from its cold range.
    const double reach = std::max(std::abs(liquidus - T), 0.1 * (range.high - range.low));
    const double scale =
        layer == metal ? heat_to_solid(c, s.pouring_temperature) : c.enthalpy(T + reach) - c.enthalpy(T);
    for (int i = body.layer_cells(layer).begin; i < body.layer_cells(layer).end; ++i) {
      const bool profile = layer == metal && s.start_profile;
      const double at = profile ? s.start_profile(body.center()[static_cast<std::size_t>(i)]) : T;
      const bool solid = profile && at <= s.path->end_of_freezing();
      out.enthalpy.push_back(c.enthalpy(at, solid ? alloy::ArrestEnd::cold : alloy::ArrestEnd::hot));
      out.scale.push_back(scale);
    }
  }
  return out;
}

}  // namespace palier::freeze
