// The keys of a case file.
#include "palier/files/key_table.hpp"

namespace palier::files {
namespace {

using Form = ValueForm;
using Kind = QuantityKind;

KeyTable top_level() {
  return {"",
          "The casting section, what surrounds it, and what to record.",
          {{"palier", Form::integer, Kind::ratio, "1", "1", {}, "required", "version of the format of case files"},
           {"title", Form::text, {}, "", "", {}, "required", "what this case is, for reports"},
           {"section", Form::map, {}, "", "", {}, "required", "the metal: shape, size, alloy, pouring"},
           {"walls", Form::map, {}, "", "", {}, "required", "what the heat crosses, from the metal outward"},
           {"stop", Form::map, {}, "", "", {}, "default: end of freezing", "when the run ends"},
           {"probes",
            Form::quantities,
            Kind::length,
            "0 mm",
            "10 m",
            {},
            "default: surface, 25, 50, 75 % of the depth, center",
            "depths below the surface at which curves are recorded; where two sides differ, from the left side"},
           {"record", Form::map, {}, "", "", {}, "default: about 200 rows", "how often fields are recorded"},
           {"accuracy",
            Form::quantity,
            Kind::percentage,
            "0.001 %",
            "5 %",
            {},
            "default: 0.1 %",
            "relative error asked of the end of freezing"}}};
}

KeyTable section() {
  return {"section",
          "The metal. Plates are given by their thickness, cylinders and spheres by their diameter.",
          {{"shape", Form::choice, {}, "", "", {"plate", "cylinder", "sphere"}, "required", "shape of the section"},
           {"thickness",
            Form::quantity,
            Kind::length,
            "0.1 mm",
            "10 m",
            {},
            "required for a plate",
            "of the plate, from side to side"},
           {"diameter",
            Form::quantity,
            Kind::length,
            "0.1 mm",
            "10 m",
            {},
            "required for cylinder and sphere",
            "outer diameter of the metal"},
           {"bore",
            Form::quantity,
            Kind::length,
            "0.1 mm",
            "10 m",
            {},
            "optional",
            "diameter of the bore of a hollow cylinder"},
           {"alloy",
            Form::material,
            {},
            "",
            "",
            {},
            "required",
            "name of an alloy, or a file ending in .yaml beside the case"},
           {"composition",
            Form::quantity,
            Kind::composition,
            "0.001 wt%",
            "60 wt%",
            {},
            "default: the alloy's",
            "solute content, for alloys with binary lines"},
           {"path",
            Form::choice,
            {},
            "",
            "",
            {"lever", "scheil", "partial", "brody-flemings", "clyne-kurz", "ohnaka", "pure", "measured"},
            "default: the alloy's",
            "rule of the solidification path"},
           {"superheat",
            Form::quantity,
            Kind::temperature_difference,
            "0 K",
            "1500 K",
            {},
            "this or pour",
            "pouring temperature above the liquidus"},
           {"pour",
            Form::quantity,
            Kind::temperature,
            "0 K",
            "4000 K",
            {},
            "this or superheat",
            "pouring temperature, at or above the liquidus"},
           {"cells",
            Form::integer,
            Kind::ratio,
            "4",
            "20000",
            {},
            "default: from the accuracy",
            "number of cells in the metal, by hand"}}};
}

KeyTable walls() {
  const std::string list = "a list of wall entries, see below";
  return {"walls",
          "Plate: `both`, or `left` and `right`. Cylinder: `outside`, and `bore` when it is hollow. Sphere: `outside`.",
          {{"both", Form::walls, {}, "", "", {}, "plate", list},
           {"left", Form::walls, {}, "", "", {}, "plate with two different sides", list},
           {"right", Form::walls, {}, "", "", {}, "plate with two different sides", list},
           {"outside", Form::walls, {}, "", "", {}, "cylinder, sphere", list},
           {"bore", Form::walls, {}, "", "", {}, "hollow cylinder", list + "; it goes inward"}}};
}

KeyTable wall_layer() {
  return {"wall entry: layer",
          "Mold, core, chill, die or sleeve. Without a contact before it, it touches its neighbor perfectly.",
          {{"layer",
            Form::material,
            {},
            "",
            "",
            {},
            "required",
            "name of a mold material, or a file ending in .yaml beside the case"},
           {"thickness", Form::quantity, Kind::length, "0.1 mm", "10 m", {}, "required", "of the layer"},
           {"start",
            Form::quantity,
            Kind::temperature,
            "0 K",
            "4000 K",
            {},
            "required",
            "temperature of the layer at pouring"},
           {"cells",
            Form::integer,
            Kind::ratio,
            "2",
            "20000",
            {},
            "default: from the accuracy",
            "number of cells in the layer, by hand"}}};
}

std::vector<KeyTable> wall_entries() {
  return {
      {"wall entry: contact",
       "Conductance between two layers, before the layer it leads to. At most one between two layers.",
       {{"contact",
         Form::contact,
         Kind::conductance,
         "0.1 W/m2/K",
         "1e7 W/m2/K",
         {},
         "required",
         "`perfect`, a conductance, or a table of it"}}},
      {"contact table",
       "Conductance over time from pouring, over the temperature of the casting's face, or over its fraction solid.",
       {{"over",
         Form::choice,
         {},
         "",
         "",
         {"time", "surface temperature", "surface fraction solid"},
         "required",
         "what the conductance depends on"},
        {"points",
         Form::points,
         {},
         "",
         "",
         {},
         "required",
         "at least two pairs, the first column rising: `[[0 s, 4000 W/m2/K], [10 s, 800 W/m2/K]]`"}}},
      wall_layer(),
      {"wall entry: film",
       "Last entry: film to the surroundings, with radiation as an option.",
       {{"film", Form::quantity, Kind::conductance, "0 W/m2/K", "1e7 W/m2/K", {}, "required", "film coefficient"},
        {"surroundings",
         Form::quantity,
         Kind::temperature,
         "0 K",
         "4000 K",
         {},
         "required",
         "temperature of the surroundings"},
        {"emissivity",
         Form::quantity,
         Kind::fraction,
         "0",
         "1",
         {},
         "default: 0 (no radiation)",
         "of the outer face, which radiates as a gray body"}}},
      {"wall entry: face",
       "Last entry: a face held at a fixed temperature.",
       {{"face", Form::quantity, Kind::temperature, "0 K", "4000 K", {}, "required", "temperature of the face"}}},
      {"wall entry: adiabatic",
       "Last entry: no heat passes.",
       {{"adiabatic", Form::flag, {}, "", "", {}, "required", "`true`"}}},
  };
}

FileKeys make() {
  FileKeys keys{"case file", "palier", {top_level(), section(), walls()}};
  for (KeyTable& table : wall_entries()) keys.tables.push_back(std::move(table));
  keys.tables.push_back(
      {"stop",
       "The run ends when the first of these is reached.",
       {{"below",
         Form::quantity,
         Kind::temperature,
         "0 K",
         "4000 K",
         {},
         "default: end of freezing",
         "the hottest point of the metal falls below this temperature"},
        {"after", Form::quantity, Kind::time, "1e-3 s", "1e7 s", {}, "optional", "time from pouring"}}});
  keys.tables.push_back(
      {"record",
       "Recording never shortens a step.",
       {{"every", Form::quantity, Kind::time, "1e-3 s", "1e7 s", {}, "required", "time between two recorded rows"}}});
  return keys;
}

}  // namespace

const FileKeys& case_keys() {
  static const FileKeys keys = make();
  return keys;
}

}  // namespace palier::files
