// Reading an alloy file.
#include <fmt/format.h>

#include <utility>

#include "palier/alloy/back_diffusion.hpp"
#include "palier/files/material_file.hpp"

namespace palier::files {
namespace {

/// What the points of material properties are over.
KeySpec over_temperature() {
  return {"points", ValueForm::quantity, QuantityKind::temperature, "0 K", "4000 K", {}, "", ""};
}

alloy::PhaseProperties read_phase(const MapReader& phase) {
  return {read_sourced_table(phase, "heat capacity", over_temperature()),
          read_sourced_table(phase, "conductivity", over_temperature())};
}

alloy::BinaryLines read_lines(const MapReader& map) {
  if (map.has("liquidus") == map.has("liquidus slope"))
    map.fail("liquidus", fmt::format("found {} of 'liquidus' and 'liquidus slope'; expected one of them",
                                     map.has("liquidus") ? "both" : "none"));
  alloy::BinaryLines lines;
  lines.melting_point = read_sourced_value(map, "melting point");
  std::optional<double> slope;
  if (map.has("liquidus slope")) {
    slope = read_sourced_value(map, "liquidus slope");
  } else {
    const KeySpec over{"points", ValueForm::quantity, QuantityKind::composition, "0 wt%", "100 wt%", {}, "", ""};
    lines.liquidus = read_sourced_table(map, "liquidus", over);
  }
  lines.partition_coefficient = read_sourced_value(map, "partition coefficient");
  if (map.has("eutectic temperature")) lines.eutectic_temperature = read_sourced_value(map, "eutectic temperature");
  if (!slope) return lines;
  return at_place(map.reading(), map.node(), map.path(), [&] {
    return alloy::BinaryLines::straight(lines.melting_point, *slope, lines.partition_coefficient,
                                        lines.eutectic_temperature);
  });
}

BinaryAlloy read_binary(const MapReader& map) {
  BinaryAlloy binary;
  binary.solute = map.text("solute");
  binary.base = map.text("base");
  binary.composition = read_sourced_composition(map, "composition", binary.base, binary.solute);
  binary.diagram =
      at_place(map.reading(), map.node(), map.path(), [&] { return alloy::make_diagram(read_lines(map)); });
  return binary;
}

alloy::SolidificationPath read_measured(const MapReader& map) {
  const std::string source = map.text("source");
  map.reading().resolved.pop_back();  // the source is noted beside the points it belongs to
  const KeySpec fraction{"points", ValueForm::quantity, QuantityKind::fraction, "0", "1", {}, "", ""};
  const SourceNode& node = map.required("points");
  Points points = read_points(map.reading(), node, map.path("points"), {over_temperature(), fraction, true});
  map.note("points", points.written, source);
  return at_place(map.reading(), node, map.path("points"),
                  [&] { return alloy::measured_path(std::move(points.x), std::move(points.y)); });
}

bool has_path(const AlloyFile& alloy, const std::string& rule) {
  if (rule == "pure") return alloy.pure_melting_point.has_value();
  if (rule == "measured") return alloy.measured.has_value();
  if (rule == "partial") return alloy.dilute || alloy.steel;
  return alloy.binary || alloy.dilute || alloy.steel;
}

void refuse_two_kinds(const MapReader& map) {
  std::vector<std::string> kinds;
  for (const char* kind : {"pure", "binary lines", "dilute", "steel"})
    if (map.has(kind)) kinds.push_back(fmt::format("'{}'", kind));
  if (kinds.size() > 1)
    map.fail(kinds[1].substr(1, kinds[1].size() - 2),
             fmt::format("found {}; expected at most one of them", fmt::join(kinds, " and ")));
}

void read_freezing(const MapReader& map, AlloyFile& alloy) {
  alloy.default_path = map.choice("default path");
  refuse_two_kinds(map);
  if (map.has("pure"))
    alloy.pure_melting_point = read_sourced_value(map.map("pure", "freezing: pure"), "melting point");
  if (map.has("binary lines")) alloy.binary = read_binary(map.map("binary lines", "freezing: binary lines"));
  if (map.has("dilute")) alloy.dilute = read_dilute(map.map("dilute", "freezing: dilute"));
  if (map.has("steel")) alloy.steel = read_steel(map.map("steel", "freezing: steel"));
  if (map.has("measured")) alloy.measured = read_measured(map.map("measured", "freezing: measured"));
  if (map.has("back-diffusion")) {
    if (!alloy.binary) map.fail("back-diffusion", "found 'back-diffusion' without 'binary lines'; expected both");
    const MapReader data = map.map("back-diffusion", "freezing: back-diffusion");
    alloy.back_diffusion = BackDiffusionData{
        read_sourced_value(data, "diffusivity"),
        {read_sourced_value(data, "arm spacing at 1 s"), read_sourced_value(data, "ripening exponent")}};
  }
  if (!has_path(alloy, alloy.default_path))
    map.fail("default path", fmt::format("found '{}', but the file has no data for it", alloy.default_path),
             "pure needs 'pure', lever and scheil need 'binary lines', 'dilute' or 'steel', partial needs 'dilute' or "
             "'steel', measured needs 'measured'");
}

}  // namespace

std::vector<std::string> rules_of(const AlloyFile& alloy) {
  std::vector<std::string> rules;
  if (alloy.pure_melting_point) rules.emplace_back("pure");
  if (alloy.binary) rules.insert(rules.end(), {"lever", "scheil"});
  if (alloy.dilute || alloy.steel) rules.insert(rules.end(), {"lever", "scheil", "partial"});
  if (alloy.measured) rules.emplace_back("measured");
  return rules;
}

std::vector<std::string> timed_rules_of(const AlloyFile& alloy) {
  if (!alloy.back_diffusion) return {};
  return {"brody-flemings", "clyne-kurz", "ohnaka"};
}

alloy::SolidificationPath timed_path_of(const std::string& rule, const AlloyFile& alloy, double composition,
                                        double local_solidification_time) {
  const BackDiffusionData& data = *alloy.back_diffusion;
  const double spacing = alloy::arm_spacing(data.ripening, local_solidification_time);
  const alloy::BackDiffusion which = rule == "clyne-kurz"       ? alloy::BackDiffusion::clyne_kurz
                                     : rule == "brody-flemings" ? alloy::BackDiffusion::brody_flemings
                                                                : alloy::BackDiffusion::ohnaka;
  return alloy::back_diffusion_path(alloy.binary->diagram, composition, which,
                                    alloy::diffusion_number(data.diffusivity, local_solidification_time, spacing));
}

alloy::SolidificationPath path_of(const std::string& rule, const AlloyFile& alloy, double composition) {
  if (rule == "pure") return alloy::pure_path(*alloy.pure_melting_point);
  if (rule == "measured") return *alloy.measured;
  if (!alloy.binary) return freezing_of(rule, alloy).path();
  if (rule == "lever") return alloy::lever_path(alloy.binary->diagram, composition);
  return alloy::scheil_path(alloy.binary->diagram, composition);
}

AlloyFile read_alloy(const std::string& path) {
  SourceFile source = read_source_file(path, "alloy file");
  AlloyFile alloy;
  alloy.file.path = path;
  Reading reading{path, alloy_keys(), alloy.file.values, "file"};
  check_version(reading, source.root);
  const MapReader map(reading, source.root, "", reading.keys.table(""));
  map.integer("palier-alloy");
  alloy.file.name = map.text("name");
  map.text("title");
  if (map.has("designation")) map.texts("designation");
  alloy.metal.density = read_sourced_value(map, "density");
  alloy.metal.latent_heat = read_sourced_value(map, "latent heat");
  alloy.metal.solid = read_phase(map.map("solid", "solid or liquid"));
  alloy.metal.liquid = read_phase(map.map("liquid", "solid or liquid"));
  read_freezing(map.map("freezing", "freezing"), alloy);
  if (map.has("notes")) map.text("notes");
  alloy.file.text = std::move(source.text);
  return alloy;
}

MoldFile read_mold(const std::string& path) {
  SourceFile source = read_source_file(path, "mold file");
  MoldFile mold;
  mold.file.path = path;
  Reading reading{path, mold_keys(), mold.file.values, "file"};
  check_version(reading, source.root);
  const MapReader map(reading, source.root, "", reading.keys.table(""));
  map.integer("palier-mold");
  mold.file.name = map.text("name");
  map.text("title");
  mold.properties.density = read_sourced_value(map, "density");
  mold.properties.body = read_phase(map);
  if (map.has("moisture"))
    mold.properties.moisture = read_sourced_value(map, "moisture");
  else
    map.note("moisture", "0 wt%", "default");
  if (map.has("notes")) map.text("notes");
  mold.file.text = std::move(source.text);
  return mold;
}

}  // namespace palier::files
