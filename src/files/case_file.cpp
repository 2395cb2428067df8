#include "palier/files/case_file.hpp"

#include <fmt/format.h>

#include <filesystem>
#include <utility>

#include "palier/files/case_reader.hpp"

namespace palier::files {
namespace {

constexpr std::size_t most_probes = 1000;

void read_stop(const MapReader& map, freeze::Section& section) {
  if (!map.has("stop")) {
    map.note("stop", "end of freezing", "default");
    return;
  }
  const MapReader stop = map.map("stop", "stop");
  section.stop.below = stop.quantity_if("below");
  section.stop.after = stop.quantity_if("after");
  if (!section.stop.below) stop.note("below", "end of freezing", "default");
  if (section.stop.below && *section.stop.below >= section.pouring_temperature)
    stop.fail("below", fmt::format("{}; expected less than the pouring temperature, {:.2f} degC",
                                   found(stop.required("below")), section.pouring_temperature - 273.15));
}

void read_probes(const MapReader& map, freeze::Section& section) {
  if (!map.has("probes")) {
    map.note("probes", "surface, 25, 50, 75 % of the depth, center", "default");
    return;
  }
  section.probes = map.quantities("probes");
  const SourceNode& list = map.required("probes");
  if (section.probes.empty() || section.probes.size() > most_probes)
    map.fail("probes", fmt::format("found {} depths; expected 1 to {}", section.probes.size(), most_probes));
  const double depth = section.depth();
  for (std::size_t i = 0; i < section.probes.size(); ++i) {
    const std::string here = fmt::format("probes[{}]", i);
    if (section.probes[i] > depth * (1 + 1e-12))
      refuse(map.reading(), list.items[i], here,
             fmt::format("{}; expected at most the depth of the section, {:.6g} mm", found(list.items[i]), depth * 1e3),
             section.inside ? "" : "depths count from the surface to the center");
    for (std::size_t j = 0; j < i; ++j)
      if (section.probes[i] == section.probes[j])
        refuse(map.reading(), list.items[i], here, found(list.items[i]) + " again; expected each depth once");
  }
}

void read_record(const MapReader& map, freeze::Section& section) {
  if (map.has("record"))
    section.record_every = map.map("record", "record").quantity("every");
  else
    map.note("record", "about 200 rows", "default");
}

void read_accuracy(const MapReader& map, freeze::Section& section) {
  if (const auto accuracy = map.quantity_if("accuracy")) {
    section.accuracy = *accuracy;
  } else {
    const std::string default_accuracy = "0.1 %";
    section.accuracy = parse_quantity(default_accuracy, QuantityKind::percentage).value;
    map.note("accuracy", default_accuracy, "default");
  }
}

}  // namespace

CaseFile read_case(const std::string& path, const std::string& library) {
  SourceFile source = read_source_file(path, "case file");
  CaseFile result;
  result.path = path;
  Reading reading{path, case_keys(), result.resolved, "case"};
  check_version(reading, source.root);
  const MapReader map(reading, source.root, "", reading.keys.table(""));
  Materials materials({std::filesystem::path(path).parent_path().string(), library}, result.materials);
  freeze::Section& section = result.section;
  map.integer("palier");
  section.title = map.text("title");
  read_section(map.map("section", "section"), materials, section);
  read_walls(map.map("walls", "walls"), materials, section);
  read_stop(map, section);
  read_probes(map, section);
  read_record(map, section);
  read_accuracy(map, section);
  result.text = std::move(source.text);
  return result;
}

}  // namespace palier::files
