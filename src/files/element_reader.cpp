// Alloys of several elements: reading the maps `dilute` and `steel`, and their freezing.
#include <fmt/format.h>

#include <algorithm>
#include <utility>

#include "palier/files/material_file.hpp"

namespace palier::files {
namespace {

alloy::LastLiquid read_last_liquid(const MapReader& map) {
  alloy::LastLiquid end;
  if (map.has("end temperature")) end.temperature = read_sourced_value(map, "end temperature");
  if (map.has("largest fraction")) end.largest_fraction = read_sourced_value(map, "largest fraction");
  return end;
}

/// The element of an entry and its content; refused where an earlier entry has it already.
ElementContent read_content(const MapReader& entry, std::vector<std::string>& known) {
  const std::string element = entry.text("element");
  if (std::find(known.begin(), known.end(), element) != known.end())
    entry.fail("element", fmt::format("found '{}' again; expected every element once", element));
  known.push_back(element);
  return {element, 100 * read_sourced_value(entry, "composition")};
}

bool read_fast(const MapReader& entry) {
  if (entry.has("fast")) return entry.choice("fast") == "true";
  entry.note("fast", "false", "default");
  return false;
}

}  // namespace

alloy::DiluteAlloy read_dilute(const MapReader& map) {
  alloy::DiluteAlloy dilute;
  dilute.base = map.text("base");
  dilute.melting_point = read_sourced_value(map, "melting point");
  std::vector<std::string> known{dilute.base};
  for (const MapReader& entry : map.maps("elements", "freezing: dilute: element")) {
    alloy::DiluteElement element;
    const ElementContent content = read_content(entry, known);
    element.name = content.element;
    element.composition = content.composition;
    element.liquidus_slope = read_sourced_value(entry, "liquidus slope");
    element.partition_coefficient = read_sourced_value(entry, "partition coefficient");
    element.fast = read_fast(entry);
    dilute.elements.push_back(std::move(element));
  }
  dilute.end = read_last_liquid(map);
  // The lever rule ends by itself: what it refuses is wrong with the lines.
  at_place(map.reading(), map.node(), map.path(), [&] { return alloy::freeze_dilute(dilute, alloy::Mixing::lever); });
  return dilute;
}

alloy::Steel read_steel(const MapReader& map) {
  alloy::Steel steel;
  std::vector<std::string> known{"Fe"};
  for (const MapReader& entry : map.maps("elements", "freezing: steel: element")) {
    const ElementContent content = read_content(entry, known);
    if (content.element == "C")
      steel.carbon = content.composition;
    else
      steel.elements.push_back(at_place(entry.reading(), entry.required("element"), entry.path("element"),
                                        [&] { return alloy::steel_element(content.element, content.composition); }));
  }
  if (std::find(known.begin(), known.end(), "C") == known.end())
    map.fail("elements", "found no carbon; expected an entry with the element C");
  steel.end = read_last_liquid(map);
  at_place(map.reading(), map.node(), map.path(), [&] { return alloy::freeze_steel(steel, alloy::Mixing::lever); });
  return steel;
}

std::vector<ElementContent> elements_of(const AlloyFile& alloy) {
  std::vector<ElementContent> contents;
  if (alloy.dilute)
    for (const alloy::DiluteElement& e : alloy.dilute->elements) contents.push_back({e.name, e.composition});
  if (!alloy.steel) return contents;
  contents.push_back({"C", alloy.steel->carbon});
  for (const alloy::SteelElement& e : alloy.steel->elements) contents.push_back({e.name, e.composition});
  return contents;
}

alloy::DiluteFreezing freezing_of(const std::string& rule, const AlloyFile& alloy) {
  const alloy::Mixing mixing = rule == "lever"    ? alloy::Mixing::lever
                               : rule == "scheil" ? alloy::Mixing::scheil
                                                  : alloy::Mixing::partial;
  return alloy.dilute ? alloy::freeze_dilute(*alloy.dilute, mixing) : alloy::freeze_steel(*alloy.steel, mixing);
}

}  // namespace palier::files
