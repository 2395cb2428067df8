// Reading the walls of a case: lists of contacts and layers that end in a film, a face or no heat at all.
#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <utility>

#include "palier/files/case_reader.hpp"
#include "palier/files/nearest.hpp"

namespace palier::files {
namespace {

/// The keys of which each entry of a wall has one.
const std::vector<std::string>& entry_kinds() {
  static const std::vector<std::string> kinds{"contact", "layer", "film", "face", "adiabatic"};
  return kinds;
}

KeySpec contact_column(const std::string& over) {
  if (over == "time") return {"points", ValueForm::quantity, QuantityKind::time, "0 s", "1e7 s", {}, "", ""};
  if (over == "surface temperature")
    return {"points", ValueForm::quantity, QuantityKind::temperature, "0 K", "4000 K", {}, "", ""};
  return {"points", ValueForm::quantity, QuantityKind::fraction, "0", "1", {}, "", ""};
}

heat::Contact::Over contact_over(const std::string& over) {
  if (over == "time") return heat::Contact::Over::time;
  if (over == "surface temperature") return heat::Contact::Over::surface_temperature;
  return heat::Contact::Over::surface_fraction_solid;
}

heat::Contact read_contact(const MapReader& entry) {
  const SourceNode& node = entry.required("contact");
  if (node.kind == SourceNode::Kind::map) {
    const MapReader table = entry.map("contact", "contact table");
    const std::string over = table.choice("over");
    Points points = read_points(entry.reading(), table.required("points"), table.path("points"),
                                {contact_column(over), entry.spec("contact"), false});
    table.note("points", points.written);
    return {contact_over(over), base::Table(std::move(points.x), std::move(points.y))};
  }
  if (node.kind == SourceNode::Kind::text && node.text == "perfect") {
    entry.note("contact", "perfect");
    return {heat::Contact::Over::perfect, base::Table()};
  }
  const bool word = node.kind == SourceNode::Kind::text && !node.text.empty() && node.text[0] >= 'a';
  if (word)
    entry.fail("contact", found(node) + "; expected perfect, a conductance such as 800 W/m2/K, or a table",
               did_you_mean(node.text, {"perfect"}));
  return {heat::Contact::Over::constant, base::Table(entry.quantity("contact"))};
}

heat::Boundary read_film(const MapReader& entry) {
  heat::Boundary boundary;
  boundary.kind = heat::Boundary::Kind::film;
  boundary.film_coefficient = entry.quantity("film");
  boundary.temperature = entry.quantity("surroundings");
  if (entry.has("emissivity"))
    boundary.emissivity = entry.quantity("emissivity");
  else
    entry.note("emissivity", "0", "default");
  if (boundary.film_coefficient == 0 && boundary.emissivity == 0)
    entry.fail("film", "found a film that passes no heat", "write adiabatic: true instead");
  return boundary;
}

/// One wall, entry by entry.
class WallReader {
 public:
  WallReader(const MapReader& walls, std::string path, Materials& materials)
      : walls_(walls), path_(std::move(path)), materials_(materials) {}

  freeze::Wall read(const SourceNode& list) {
    for (std::size_t i = 0; i < list.items.size(); ++i) {
      const SourceNode& node = list.items[i];
      const std::string here = fmt::format("{}[{}]", path_, i);
      const std::string kind = kind_of(node, here);
      if (ended_)
        refuse(walls_.reading(), node, here, fmt::format("found '{}' after the outer end of the wall", kind),
               "film, face and adiabatic come last");
      read_entry(MapReader(walls_.reading(), node, here, walls_.reading().keys.table("wall entry: " + kind)), kind);
    }
    if (!ended_) refuse_open_end(list);
    return std::move(wall_);
  }

 private:
  std::string kind_of(const SourceNode& node, const std::string& here) const {
    const Reading& reading = walls_.reading();
    if (node.kind != SourceNode::Kind::map)
      refuse(reading, node, here, fmt::format("{}; expected a key: {}", found(node), one_of(entry_kinds())),
             node.text == "adiabatic" ? "write adiabatic: true"
             : node.text == "perfect" ? "write contact: perfect"
                                      : "");
    std::vector<std::string> kinds;
    for (const std::string& kind : entry_kinds())
      if (node.find(kind) != nullptr) kinds.push_back(kind);
    if (kinds.size() > 1)
      refuse(reading, node, here, fmt::format("found {} in one entry; expected one of them", fmt::join(kinds, " and ")),
             "begin each with a '-' of its own");
    if (kinds.empty()) refuse_nameless(node, here);
    return kinds.front();
  }

  [[noreturn]] void refuse_nameless(const SourceNode& node, const std::string& here) const {
    for (const SourceKey& key : node.keys) {
      const std::string near = did_you_mean(key.text, entry_kinds());
      if (near.empty()) continue;
      throw base::InputError({walls_.reading().file, key.line, key.column}, here + "." + key.text,
                             "found an unknown key", near);
    }
    const bool layer = node.find("thickness") != nullptr || node.find("start") != nullptr;
    const bool film = node.find("surroundings") != nullptr || node.find("emissivity") != nullptr;
    refuse(walls_.reading(), node, here, "found none of the keys " + one_of(entry_kinds()),
           layer  ? "a layer names its material: layer: NAME"
           : film ? "surroundings belong to a film: film: 10 W/m2/K"
                  : "");
  }

  void read_entry(const MapReader& entry, const std::string& kind) {
    if (kind == "contact") {
      if (contact_) entry.fail("contact", "found two contacts in a row; expected a layer between them");
      contact_ = read_contact(entry);
      contact_node_ = &entry.node();
      contact_path_ = entry.path();
    } else if (kind == "layer") {
      read_layer(entry);
    } else {
      refuse_contact_at_end(kind);
      ended_ = true;
      wall_.outer = read_end(entry, kind);
    }
  }

  void read_layer(const MapReader& entry) {
    freeze::WallLayer layer;
    if (contact_)
      layer.contact = *std::exchange(contact_, std::nullopt);
    else
      entry.note("contact", "perfect", "default");
    const MoldFile mold = materials_.mold(entry, "layer");
    layer.material = mold.file.name;
    layer.properties = mold.properties;
    layer.thickness = entry.quantity("thickness");
    layer.start_temperature = entry.quantity("start");
    layer.cells = entry.integer_if("cells");
    if (!layer.cells) entry.note("cells", "from the accuracy", "default");
    wall_.layers.push_back(std::move(layer));
  }

  static heat::Boundary read_end(const MapReader& entry, const std::string& kind) {
    if (kind == "film") return read_film(entry);
    heat::Boundary boundary;
    if (kind == "face") {
      boundary.kind = heat::Boundary::Kind::fixed_temperature;
      boundary.temperature = entry.quantity("face");
    } else {
      entry.flag("adiabatic");
    }
    return boundary;
  }

  void refuse_contact_at_end(const std::string& kind) const {
    if (!contact_) return;
    refuse(
        walls_.reading(), *contact_node_, contact_path_,
        fmt::format("found a contact before {}; expected a layer after it", kind),
        kind == "face" ? "write the contact as a film: film: 800 W/m2/K, surroundings: 600 K" : "remove the contact");
  }

  [[noreturn]] void refuse_open_end(const SourceNode& list) const {
    const std::string problem = list.items.empty() ? "found an empty wall" : "found no outer end of the wall";
    refuse(walls_.reading(), list.items.empty() ? list : list.items.back(), path_,
           problem + "; expected film, face or adiabatic as its last entry",
           "for example: - {film: 10 W/m2/K, surroundings: 25 degC}");
  }

  const MapReader& walls_;
  std::string path_;
  Materials& materials_;
  freeze::Wall wall_;
  std::optional<heat::Contact> contact_;  ///< before the next layer
  const SourceNode* contact_node_ = nullptr;
  std::string contact_path_;
  bool ended_ = false;
};

/// Refuses sides the shape does not have.
void check_sides(const MapReader& map, const std::vector<std::string>& sides, const std::string& whose,
                 const std::string& hint = {}) {
  for (const SourceKey& key : map.node().keys)
    if (std::find(sides.begin(), sides.end(), key.text) == sides.end())
      throw base::InputError(
          {map.reading().file, key.line, key.column}, map.path(key.text),
          fmt::format("found '{}'; expected the walls of {}: {}", key.text, whose, fmt::join(sides, " and ")), hint);
}

/// A bore's layers go inward and must leave room for what ends them.
void check_bore(const MapReader& map, const freeze::Section& section) {
  double total = 0;
  for (const freeze::WallLayer& layer : section.inside->layers) total += layer.thickness;
  const double radius = section.bore / 2;
  const double rounding = 1e-9 * radius;
  if (total > radius + rounding)
    map.fail("bore", fmt::format("found layers of {:.6g} mm in all; expected at most the radius of the bore, {:.6g} mm",
                                 total * 1e3, radius * 1e3));
  if (total > radius - rounding && section.inside->outer.kind != heat::Boundary::Kind::adiabatic)
    map.fail("bore", "found layers that fill the bore; expected adiabatic: true as the last entry",
             "no heat crosses the center line");
}

void read_plate_walls(const MapReader& map, Materials& materials, freeze::Section& section) {
  if (map.has("both")) {
    check_sides(map, {"both"}, "a plate with equal walls");
    section.outside = read_wall(map, "both", materials);
    return;
  }
  check_sides(map, {"left", "right"}, "a plate, if they differ", "write both: where they are equal");
  if (!map.has("left") || !map.has("right"))
    map.fail(map.has("left") ? "right" : "left", "found one wall of a plate; expected left and right",
             "write both: where they are equal");
  section.inside = read_wall(map, "left", materials);
  section.outside = read_wall(map, "right", materials);
}

}  // namespace

freeze::Wall read_wall(const MapReader& walls, const std::string& side, Materials& materials) {
  const SourceNode& list = walls.required(side);
  if (list.kind != SourceNode::Kind::list)
    walls.fail(side, found(list) + "; expected a list of entries, each with a '-'");
  return WallReader(walls, walls.path(side), materials).read(list);
}

void read_walls(const MapReader& map, Materials& materials, freeze::Section& section) {
  if (section.shape == heat::Shape::plate) {
    read_plate_walls(map, materials, section);
  } else if (section.bore > 0) {
    check_sides(map, {"outside", "bore"}, "a hollow cylinder");
    section.outside = read_wall(map, "outside", materials);
    section.inside = read_wall(map, "bore", materials);
    check_bore(map, section);
  } else {
    const bool cylinder = section.shape == heat::Shape::cylinder;
    if (cylinder && map.has("bore"))
      map.fail("bore", "found a wall in the bore, but the section has none", "give the bore's diameter: section.bore");
    check_sides(map, {"outside"}, cylinder ? "a solid cylinder" : "a sphere");
    section.outside = read_wall(map, "outside", materials);
  }
}

}  // namespace palier::files
