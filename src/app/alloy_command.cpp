#include <fmt/format.h>

#include <algorithm>
#include <cstdio>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "answer.hpp"
#include "palier/app/commands.hpp"
#include "palier/base/error.hpp"
#include "palier/files/material_file.hpp"
#include "palier/files/named_composition.hpp"

namespace palier::app {
namespace {

using Json = nlohmann::ordered_json;

constexpr double kCelsius = 273.15;
constexpr int kTableRows = 20;

/// A path by one rule, or why there is none.
struct Outlook {
  std::string rule;
  std::optional<alloy::SolidificationPath> path;
  std::string refused;
};

std::vector<Outlook> outlooks(const files::AlloyFile& alloy, double composition) {
  std::vector<Outlook> all;
  for (const std::string& rule : files::rules_of(alloy)) {
    Outlook o{rule, std::nullopt, {}};
    try {
      o.path = files::path_of(rule, alloy, composition);
    } catch (const base::InputError& error) {
      o.refused = error.what();
    }
    all.push_back(std::move(o));
  }
  return all;
}

/// Short, medium or long. Common practice, no published source: limits of 50 and 110 K, as used for copper alloys.
std::string range_class(double range) { return range < 50 ? "short" : range <= 110 ? "medium" : "long"; }

/// Temperatures from the liquidus to the end of freezing with the fraction solid, arrests as two points.
std::vector<std::pair<double, double>> points_of(const alloy::SolidificationPath& path) {
  std::vector<std::pair<double, double>> points;
  for (int i = 0; i <= kTableRows; ++i) {
    const double T = path.liquidus() + (path.end_of_freezing() - path.liquidus()) * i / kTableRows;
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

Json json_of(const files::AlloyFile& alloy, double composition, const std::vector<Outlook>& all,
             const alloy::SolidificationPath& told) {
  Json out;
  out["alloy"] = alloy.file.name;
  if (alloy.binary) {
    out["solute"] = alloy.binary->solute;
    out["composition_mass_percent"] = composition;
  }
  out["rule"] = told.rule();
  out["liquidus_C"] = told.liquidus() - kCelsius;
  out["end_of_freezing_C"] = Json::object();
  for (const Outlook& o : all)
    out["end_of_freezing_C"][o.rule] = o.path ? Json(o.path->end_of_freezing() - kCelsius) : Json(nullptr);
  out["freezing_range_K"] = told.freezing_range();
  out["freezing_range_class"] = range_class(told.freezing_range());
  out["arrests"] = Json::array();
  for (const alloy::Arrest& a : told.arrests())
    out["arrests"].push_back(
        {{"temperature_C", a.temperature - kCelsius}, {"reaction", a.reaction}, {"fraction", a.fraction}});
  if (const auto first = told.solute(told.liquidus()), last = told.solute(told.end_of_freezing()); first && last) {
    out["first_solid_mass_percent"] = first->solid;
    out["last_liquid_mass_percent"] = last->liquid;
  }
  out["path"] = Json::array();
  for (const auto& [T, fraction] : points_of(told)) out["path"].push_back({T - kCelsius, fraction});
  if (alloy.binary) out["diagram"] = diagram_of(*alloy.binary);
  out["caution"] = caution();
  return out;
}

void print(const files::AlloyFile& alloy, double composition, const std::vector<Outlook>& all,
           const alloy::SolidificationPath& told, bool table) {
  fmt::print("{}", alloy.file.name);
  if (alloy.binary) fmt::print(": {:.4g} wt% {} in {}", composition, alloy.binary->solute, alloy.binary->base);
  fmt::print(
      "\nLiquidus {:.1f} degC; by the {} path freezing ends at {:.1f} degC, a {} freezing range of {:.1f} K.\n\n",
      told.liquidus() - kCelsius, told.rule(), told.end_of_freezing() - kCelsius, range_class(told.freezing_range()),
      told.freezing_range());
  fmt::print("{:>10}{:>16}{:>16}  {}\n", "rule", "ends, degC", "range, K", "arrests");
  for (const Outlook& o : all) {
    if (!o.path) {
      fmt::print("{:>10}{:>16}{:>16}  {}\n", o.rule, "-", "-", o.refused);
      continue;
    }
    std::string arrests;
    for (const alloy::Arrest& a : o.path->arrests())
      arrests += fmt::format("{}{:.1f} % at {:.1f} degC ({})", arrests.empty() ? "" : ", ", 100 * a.fraction,
                             a.temperature - kCelsius, a.reaction);
    fmt::print("{:>10}{:>16.1f}{:>16.1f}  {}\n", o.rule, o.path->end_of_freezing() - kCelsius, o.path->freezing_range(),
               arrests.empty() ? "none" : arrests);
  }
  if (const auto first = told.solute(told.liquidus()), last = told.solute(told.end_of_freezing()); first && last)
    fmt::print("\nFirst solid {:.3g} wt%, last liquid {:.3g} wt% {} ({} path).\n", first->solid, last->liquid,
               alloy.binary->solute, told.rule());
  if (table) {
    fmt::print("\n{:>12}{:>18}  ({} path)\n", "T, degC", "fraction solid", told.rule());
    for (const auto& [T, fraction] : points_of(told)) fmt::print("{:>12.2f}{:>18.5f}\n", T - kCelsius, fraction);
  }
  fmt::print("\n{}\n", caution());
}

}  // namespace

void show_alloy(const AlloyOptions& options) {
  const files::AlloyFile alloy = files::read_alloy(files::find_alloy(options.name, {".", options.library}));
  double composition = alloy.binary ? alloy.binary->composition : 0;
  if (!options.composition.empty()) composition = files::named_composition(options.composition, alloy);
  const std::vector<Outlook> all = outlooks(alloy, composition);
  const std::string rule = options.rule.empty() ? alloy.default_path : options.rule;
  const auto told = std::find_if(all.begin(), all.end(), [&](const Outlook& o) { return o.rule == rule; });
  if (told == all.end())
    throw base::InputError("--path: found '" + rule + "'; " + alloy.file.name +
                           " has data for: " + fmt::format("{}", fmt::join(files::rules_of(alloy), ", ")));
  if (!told->path) throw base::InputError(told->refused);
  if (options.json)
    fmt::print("{}\n", json_of(alloy, composition, all, *told->path).dump(2));
  else
    print(alloy, composition, all, *told->path, options.table);
}

}  // namespace palier::app
