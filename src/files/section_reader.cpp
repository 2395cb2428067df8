// Reading the section of a case: shape, size, alloy, path, pouring.
#include <fmt/format.h>

#include <algorithm>
#include <utility>

#include "palier/files/case_reader.hpp"
#include "palier/files/nearest.hpp"

namespace palier::files {
namespace {

constexpr double ice_point = 273.15;  // [K], 0 degC by definition

std::string celsius(double kelvin) { return fmt::format("{:.2f} degC", kelvin - ice_point); }

void read_plate(const MapReader& map, freeze::Section& section) {
  section.shape = heat::Shape::plate;
  if (map.has("diameter"))
    map.fail("diameter", "found a diameter of a plate; expected its thickness",
             "write thickness: instead of diameter:");
  if (map.has("bore")) map.fail("bore", "found a bore of a plate; expected one of a cylinder only");
  section.thickness = map.quantity("thickness");
}

void read_round(const MapReader& map, const std::string& shape, freeze::Section& section) {
  section.shape = shape == "cylinder" ? heat::Shape::cylinder : heat::Shape::sphere;
  if (map.has("thickness"))
    map.fail("thickness", fmt::format("found a thickness of a {}; expected its diameter", shape),
             "write diameter: instead of thickness:");
  section.thickness = map.quantity("diameter");
  if (!map.has("bore")) return;
  if (section.shape == heat::Shape::sphere)
    map.fail("bore", "found a bore of a sphere; expected one of a cylinder only");
  section.bore = map.quantity("bore");
  if (!(section.bore < section.thickness))
    map.fail("bore", fmt::format("found a bore of {}; expected less than the diameter of {}", map.required("bore").text,
                                 map.required("diameter").text));
}

void read_shape(const MapReader& map, freeze::Section& section) {
  const std::string shape = map.choice("shape");
  if (shape == "plate")
    read_plate(map, section);
  else
    read_round(map, shape, section);
}

double read_case_composition(const MapReader& map, const AlloyFile& alloy) {
  if (!map.has("composition")) {
    if (!alloy.binary) return 0.0;
    map.note("composition", fmt::format("{:.6g} wt%", alloy.binary->composition), "default");
    return alloy.binary->composition;
  }
  const SourceNode& node = map.required("composition");
  if (!alloy.binary)
    map.fail("composition", fmt::format("found a composition, but {} has no binary lines", alloy.file.name),
             "remove it, or take an alloy with binary lines");
  const double composition = read_composition(map.reading(), node, map.path("composition"), map.spec("composition"),
                                              alloy.binary->base, alloy.binary->solute);
  map.note("composition", fmt::format("{:.6g} wt%", composition));
  return composition;
}

std::string read_rule(const MapReader& map, const AlloyFile& alloy) {
  std::vector<std::string> rules = rules_of(alloy);
  for (const std::string& timed : timed_rules_of(alloy)) rules.push_back(timed);
  std::string rule = alloy.default_path;
  if (map.has("path"))
    rule = map.choice("path");
  else
    map.note("path", rule, "default");
  if (std::find(rules.begin(), rules.end(), rule) == rules.end())
    map.fail("path",
             fmt::format("found '{}', but {} has no data for it; expected {}", rule, alloy.file.name, one_of(rules)));
  if (rule == "measured" && map.has("composition"))
    map.fail("composition",
             "found a composition beside the measured path, which holds for the alloy's own composition only",
             "remove it, or choose lever or scheil");
  return rule;
}

double read_pouring(const MapReader& map, double liquidus) {
  if (map.has("pour") == map.has("superheat"))
    map.fail("pour", fmt::format("found {} of 'pour' and 'superheat'; expected one of them",
                                 map.has("pour") ? "both" : "none"));
  if (map.has("superheat")) {
    const double superheat = map.quantity("superheat");
    map.note("pour", celsius(liquidus + superheat), "liquidus + superheat");
    return liquidus + superheat;
  }
  const double pour = map.quantity("pour");
  if (pour < liquidus)
    map.fail("pour",
             fmt::format("found {}, below the liquidus of {}; expected at or above it", map.required("pour").text,
                         celsius(liquidus)),
             "write superheat: instead to state it above the liquidus");
  return pour;
}

}  // namespace

AlloyFile Materials::alloy(const MapReader& map, const std::string& key) {
  const SourceNode& name = map.required(key);
  AlloyFile alloy = read_alloy(find_material(map.reading(), name, map.path(key), MaterialKind::alloy, folders_));
  note(alloy.file);
  map.note(key, name.text);
  return alloy;
}

MoldFile Materials::mold(const MapReader& map, const std::string& key) {
  const SourceNode& name = map.required(key);
  MoldFile mold = read_mold(find_material(map.reading(), name, map.path(key), MaterialKind::mold, folders_));
  note(mold.file);
  map.note(key, name.text);
  return mold;
}

void Materials::note(const MaterialFile& file) {
  const bool known =
      std::any_of(used_.begin(), used_.end(), [&](const MaterialFile& other) { return other.path == file.path; });
  if (!known) used_.push_back(file);
}

void read_section(const MapReader& map, Materials& materials, freeze::Section& section) {
  read_shape(map, section);
  const AlloyFile alloy = materials.alloy(map, "alloy");
  section.alloy = alloy.file.name;
  section.metal = alloy.metal;
  const double composition = read_case_composition(map, alloy);
  const std::string rule = read_rule(map, alloy);
  const std::string blamed = map.has("composition") ? "composition" : map.has("path") ? "path" : "alloy";
  const std::vector<std::string> timed = timed_rules_of(alloy);
  const bool takes_time = std::find(timed.begin(), timed.end(), rule) != timed.end();
  section.path = at_place(map.reading(), map.required(blamed), map.path(blamed),
                          [&] { return path_of(takes_time ? "scheil" : rule, alloy, composition); });
  if (takes_time) section.path_after = [=](double time) { return timed_path_of(rule, alloy, composition, time); };
  section.pouring_temperature = read_pouring(map, section.path->liquidus());
  section.cells = map.integer_if("cells");
  if (!section.cells) map.note("cells", "from the accuracy", "default");
}

}  // namespace palier::files
