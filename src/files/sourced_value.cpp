// A datum of a material with its source.
#include <fmt/format.h>

#include "palier/files/atomic_weight.hpp"
#include "palier/files/material_file.hpp"

namespace palier::files {
namespace {

/// The mapping {value or points, source} under a key, with its source.
struct Datum {
  const SourceNode& node;
  std::string path, source;
};

Datum read_datum(const MapReader& map, const std::string& key) {
  const SourceNode& node = map.required(key);
  if (node.kind != SourceNode::Kind::map)
    map.fail(key, found(node) + "; expected a value with its source",
             fmt::format("write {{value: {}, source: \"...\"}}",
                         node.kind == SourceNode::Kind::text ? node.text : words_of(map.spec(key).kind).examples));
  // The reader checks the keys; its values are noted by the caller, with the source, so its own notes go nowhere.
  std::vector<ResolvedValue> nowhere;
  Reading aside{map.reading().file, map.reading().keys, nowhere, ""};
  const MapReader datum(aside, node, map.path(key), aside.keys.table("value with its source"));
  std::string source = datum.text("source");
  if (datum.has("value") == datum.has("points"))
    map.fail(key, fmt::format("found {} of 'value' and 'points'; expected one of them",
                              datum.has("value") ? "both" : "none"));
  return {node, map.path(key), std::move(source)};
}

const SourceNode& value_of(const MapReader& map, const std::string& key, const Datum& datum) {
  const SourceNode* value = datum.node.find("value");
  if (value == nullptr) map.fail(key, "found points; expected one value", "write value: instead of points:");
  return *value;
}

}  // namespace

double read_sourced_value(const MapReader& map, const std::string& key) {
  const Datum datum = read_datum(map, key);
  const SourceNode& value = value_of(map, key, datum);
  const double result = read_quantity(map.reading(), value, datum.path + ".value", map.spec(key)).value;
  map.note(key, value.text, datum.source);
  return result;
}

double read_sourced_composition(const MapReader& map, const std::string& key, const std::string& base,
                                const std::string& solute) {
  const Datum datum = read_datum(map, key);
  const SourceNode& value = value_of(map, key, datum);
  const double result = read_composition(map.reading(), value, datum.path + ".value", map.spec(key), base, solute);
  map.note(key, value.text, datum.source);
  return result;
}

base::Table read_sourced_table(const MapReader& map, const std::string& key, const KeySpec& x) {
  const Datum datum = read_datum(map, key);
  const SourceNode* points = datum.node.find("points");
  if (points == nullptr) return base::Table(read_sourced_value(map, key));
  Points table = read_points(map.reading(), *points, datum.path + ".points", {x, map.spec(key), false});
  map.note(key, table.written, datum.source);
  return base::Table(std::move(table.x), std::move(table.y));
}

double read_composition(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec,
                        const std::string& base, const std::string& solute) {
  Quantity quantity = read_quantity(reading, node, path, spec);
  if (quantity.atomic_percent) {
    if (quantity.value < 0 || quantity.value > 100)
      refuse(reading, node, path, found(node) + "; expected between 0 at% and 100 at%");
    for (const std::string& element : {base, solute})
      if (!atomic_weight(element))
        refuse(reading, node, path, fmt::format("found at%, but no atomic weight is known for '{}'", element),
               "write the composition in wt%");
    quantity.value = mass_percent(quantity.value, *atomic_weight(solute), *atomic_weight(base));
    check_limits(reading, node, path, spec, quantity.value);
  }
  return quantity.value;
}

}  // namespace palier::files
