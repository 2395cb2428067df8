#include <fmt/format.h>

#include <algorithm>
#include <cstdio>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "answer.hpp"
#include "drawing.hpp"
#include "palier/app/commands.hpp"
#include "palier/base/error.hpp"
#include "palier/files/material_file.hpp"
#include "palier/files/named_composition.hpp"
#include "palier/files/quantity.hpp"

namespace palier::app {
namespace {

using Json = nlohmann::ordered_json;

constexpr double kCelsius = 273.15;
constexpr int kTableRows = 20;     // a person reads
constexpr int kCurvePoints = 100;  // a program draws

/// A path by one rule, or why there is none.
struct Outlook {
  std::string rule;
  std::optional<alloy::SolidificationPath> path;
  std::string refused;
};

/// A path, or the reason why the rule gives none.
template <class Make>
Outlook outlook(const std::string& rule, const Make& make) {
  try {
    return {rule, make(), {}};
  } catch (const base::InputError& error) {
    return {rule, std::nullopt, error.what()};
  }
}

/// How the solute diffuses back at a cooling rate.
struct BackDiffusionAt {
  double time;     ///< local solidification time [s]
  double spacing;  ///< of the arms [m]
  double number;   ///< 4 D t / spacing^2
};

/// The time in the freezing range of Scheil's rule, which is the longest.
std::optional<BackDiffusionAt> back_diffusion_at(const std::string& cooling_rate, const files::AlloyFile& alloy,
                                                 double composition) {
  if (cooling_rate.empty()) return std::nullopt;
  if (!alloy.back_diffusion)
    throw base::InputError("--cooling-rate: " + alloy.file.name + " has no data on back-diffusion");
  double rate = 0;
  try {
    rate = files::parse_quantity(cooling_rate, files::QuantityKind::cooling_rate).value;
  } catch (const files::QuantityFault& fault) {
    throw base::InputError(std::string("--cooling-rate: ") + fault.what() +
                           (fault.hint().empty() ? "" : "; " + fault.hint()));
  }
  const double range = files::path_of("scheil", alloy, composition).freezing_range();
  BackDiffusionAt at{};
  at.time = alloy::local_solidification_time(range, rate);
  at.spacing = alloy::arm_spacing(alloy.back_diffusion->ripening, at.time);
  at.number = alloy::diffusion_number(alloy.back_diffusion->diffusivity, at.time, at.spacing);
  return at;
}

std::vector<Outlook> outlooks(const files::AlloyFile& alloy, double composition,
                              const std::optional<BackDiffusionAt>& back) {
  std::vector<Outlook> all;
  for (const std::string& rule : files::rules_of(alloy))
    all.push_back(outlook(rule, [&] { return files::path_of(rule, alloy, composition); }));
  if (!back) return all;
  for (const std::string& rule : files::timed_rules_of(alloy))
    all.push_back(outlook(rule, [&] { return files::timed_path_of(rule, alloy, composition, back->time); }));
  return all;
}

/// Short, medium or long. Common practice, no published source: limits of 50 and 110 K, as used for copper alloys.
std::string range_class(double range) { return range < 50 ? "short" : range <= 110 ? "medium" : "long"; }

/// Temperatures from the liquidus to the end of freezing with the fraction solid, arrests as two points.
std::vector<std::pair<double, double>> points_of(const alloy::SolidificationPath& path, int steps) {
  std::vector<std::pair<double, double>> points;
  for (int i = 0; i <= steps; ++i) {
    const double T = path.liquidus() + (path.end_of_freezing() - path.liquidus()) * i / steps;
    if (i == 0 || path.freezing_range() > 0) points.emplace_back(T, path.fraction_above(T));
  }
  for (const alloy::Arrest& a : path.arrests()) {
    points.emplace_back(a.temperature, path.fraction_above(a.temperature));
    points.emplace_back(a.temperature, path.fraction_below(a.temperature));
  }
  std::sort(points.begin(), points.end(),
            [](const auto& a, const auto& b) { return a.first != b.first ? a.first > b.first : a.second < b.second; });
  points.erase(std::unique(points.begin(), points.end()), points.end());
  return points;
}

/// Liquidus and solidus of the base metal's side, from the melting point to the last invariant or the lines' end.
Json diagram_of(const files::BinaryAlloy& binary) {
  constexpr int kPoints = 60;
  const alloy::PhaseDiagram& diagram = *binary.diagram;
  const std::optional<alloy::Invariant> last = diagram.invariant();
  const double top = diagram.melting_point();
  const double bottom = last ? last->temperature : diagram.liquidus(diagram.largest_composition());
  Json out = {{"base", binary.base}, {"solute", binary.solute}};
  for (const char* key : {"temperature_C", "liquid_mass_percent", "solid_mass_percent"}) out[key] = Json::array();
  for (int i = 0; i <= kPoints; ++i) {
    const double T = top + (bottom - top) * i / kPoints;
    const alloy::TieLine tie = diagram.tie_line(T);
    out["temperature_C"].push_back(T - kCelsius);
    out["liquid_mass_percent"].push_back(tie.liquid);
    out["solid_mass_percent"].push_back(tie.solid);
  }
  if (last)
    out["invariant"] = {{"reaction", last->reaction},
                        {"temperature_C", last->temperature - kCelsius},
                        {"liquid_mass_percent", last->liquid}};
  return out;
}

/// Contents of the elements of a dilute alloy or a steel where freezing begins and ends [mass %].
struct EndContents {
  std::vector<double> first_solid, last_liquid;
};

/// None for other alloys, and for the measured path.
std::optional<EndContents> ends_of(const files::AlloyFile& alloy, const alloy::SolidificationPath& told) {
  if (told.rule() == "measured" || files::elements_of(alloy).empty()) return std::nullopt;
  const alloy::DiluteFreezing freezing = files::freezing_of(told.rule(), alloy);
  return EndContents{freezing.first_solid().solid, freezing.last_liquid().liquid};
}

Json json_of(const files::AlloyFile& alloy, double composition, const std::vector<Outlook>& all,
             const alloy::SolidificationPath& told, const std::optional<BackDiffusionAt>& back) {
  Json out;
  out["alloy"] = alloy.file.name;
  if (alloy.binary) {
    out["solute"] = alloy.binary->solute;
    out["composition_mass_percent"] = composition;
  }
  const std::vector<files::ElementContent> elements = files::elements_of(alloy);
  for (const files::ElementContent& e : elements) out["elements_mass_percent"][e.element] = e.composition;
  out["rule"] = told.rule();
  out["liquidus_C"] = told.liquidus() - kCelsius;
  out["end_of_freezing_C"] = Json::object();
  for (const Outlook& o : all)
    out["end_of_freezing_C"][o.rule] = o.path ? Json(o.path->end_of_freezing() - kCelsius) : Json(nullptr);
  out["freezing_range_K"] = told.freezing_range();
  out["freezing_range_class"] = range_class(told.freezing_range());
  if (back)
    out["back_diffusion"] = {{"local_solidification_time_s", back->time},
                             {"arm_spacing_m", back->spacing},
                             {"diffusion_number", back->number}};
  out["arrests"] = Json::array();
  for (const alloy::Arrest& a : told.arrests())
    out["arrests"].push_back(
        {{"temperature_C", a.temperature - kCelsius}, {"reaction", a.reaction}, {"fraction", a.fraction}});
  if (const auto ends = ends_of(alloy, told)) {
    for (std::size_t i = 0; i < elements.size(); ++i) {
      out["first_solid_elements_mass_percent"][elements[i].element] = ends->first_solid[i];
      out["last_liquid_elements_mass_percent"][elements[i].element] = ends->last_liquid[i];
    }
  } else if (const auto first = told.solute(told.liquidus()), last = told.solute(told.end_of_freezing());
             first && last) {
    out["first_solid_mass_percent"] = first->solid;
    out["last_liquid_mass_percent"] = last->liquid;
  }
  out["path"] = Json::array();
  for (const auto& [T, fraction] : points_of(told, kCurvePoints)) out["path"].push_back({T - kCelsius, fraction});
  if (alloy.binary) out["diagram"] = diagram_of(*alloy.binary);
  out["caution"] = caution();
  return out;
}

void print(const files::AlloyFile& alloy, double composition, const std::vector<Outlook>& all,
           const alloy::SolidificationPath& told, const std::optional<BackDiffusionAt>& back, bool table) {
  fmt::print("{}", alloy.file.name);
  if (alloy.binary) fmt::print(": {:.4g} wt% {} in {}", composition, alloy.binary->solute, alloy.binary->base);
  fmt::print(
      "\nLiquidus {:.1f} degC; by the {} path freezing ends at {:.1f} degC, a {} freezing range of {:.1f} K.\n\n",
      told.liquidus() - kCelsius, told.rule(), told.end_of_freezing() - kCelsius, range_class(told.freezing_range()),
      told.freezing_range());
  fmt::print("{:>16}{:>14}{:>12}  {}\n", "rule", "ends, degC", "range, K", "arrests");
  for (const Outlook& o : all) {
    if (!o.path) {
      fmt::print("{:>16}{:>14}{:>12}  {}\n", o.rule, "-", "-", o.refused);
      continue;
    }
    std::string arrests;
    for (const alloy::Arrest& a : o.path->arrests())
      arrests += fmt::format("{}{:.1f} % at {:.1f} degC ({})", arrests.empty() ? "" : ", ", 100 * a.fraction,
                             a.temperature - kCelsius, a.reaction);
    fmt::print("{:>16}{:>14.1f}{:>12.1f}  {}\n", o.rule, o.path->end_of_freezing() - kCelsius, o.path->freezing_range(),
               arrests.empty() ? "none" : arrests);
  }
  if (const auto ends = ends_of(alloy, told)) {
    const std::vector<files::ElementContent> elements = files::elements_of(alloy);
    fmt::print("\n{:>16}{:>14}{:>14}{:>14}  ({} path)\n", "element, wt%", "alloy", "first solid", "last liquid",
               told.rule());
    for (std::size_t i = 0; i < elements.size(); ++i)
      fmt::print("{:>16}{:>14.4g}{:>14.4g}{:>14.4g}\n", elements[i].element, elements[i].composition,
                 ends->first_solid[i], ends->last_liquid[i]);
  } else if (const auto first = told.solute(told.liquidus()), last = told.solute(told.end_of_freezing()); first && last)
    fmt::print("\nFirst solid {:.3g} wt%, last liquid {:.3g} wt% {} ({} path).\n", first->solid, last->liquid,
               alloy.binary->solute, told.rule());
  if (back)
    fmt::print("\nBack-diffusion with {:.4g} s of local solidification, arms of {:.3g} um: diffusion number {:.3g}.\n",
               back->time, 1e6 * back->spacing, back->number);
  if (table) {
    fmt::print("\n{:>12}{:>18}  ({} path)\n", "T, degC", "fraction solid", told.rule());
    for (const auto& [T, fraction] : points_of(told, kTableRows))
      fmt::print("{:>12.2f}{:>18.5f}\n", T - kCelsius, fraction);
  }
  fmt::print("\n{}\n", caution());
}

}  // namespace

void show_alloy(const AlloyOptions& options) {
  files::AlloyFile alloy = files::read_alloy(files::find_alloy(options.name, {".", options.library}));
  if (!options.composition.empty()) alloy = files::with_composition(std::move(alloy), options.composition);
  const double composition = alloy.binary ? alloy.binary->composition : 0;
  const std::optional<BackDiffusionAt> back = back_diffusion_at(options.cooling_rate, alloy, composition);
  const std::vector<Outlook> all = outlooks(alloy, composition, back);
  const std::string rule = options.rule.empty() ? alloy.default_path : options.rule;
  const auto told = std::find_if(all.begin(), all.end(), [&](const Outlook& o) { return o.rule == rule; });
  if (told == all.end()) {
    std::vector<std::string> known;
    known.reserve(all.size());
    for (const Outlook& o : all) known.push_back(o.rule);
    throw base::InputError(fmt::format("--path: found '{}'; {} has data for: {}{}", rule, alloy.file.name,
                                       fmt::join(known, ", "),
                                       alloy.back_diffusion && !back ? "; more with --cooling-rate" : ""));
  }
  if (!told->path) throw base::InputError(told->refused);
  if (!options.diagram.empty())
    draw_diagram(json_of(alloy, composition, all, *told->path, back).dump(), options.diagram, options.library);
  if (options.json)
    fmt::print("{}\n", json_of(alloy, composition, all, *told->path, back).dump(2));
  else
    print(alloy, composition, all, *told->path, back, options.table);
}

}  // namespace palier::app
