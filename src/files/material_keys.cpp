// The keys of alloy and mold files.
#include "palier/files/key_table.hpp"

namespace palier::files {
namespace {

using Form = ValueForm;
using Kind = QuantityKind;

KeySpec name() {
  return {"name", Form::text, {}, "", "", {}, "required", "the name under which cases find the material"};
}
KeySpec title() { return {"title", Form::text, {}, "", "", {}, "required", "what the material is, for reports"}; }
KeySpec notes() { return {"notes", Form::text, {}, "", "", {}, "optional", "free text"}; }
KeySpec density() {
  return {"density",     Form::sourced,
          Kind::density, "10 kg/m3",
          "25000 kg/m3", {},
          "required",    "one value: the mass of a cell is fixed"};
}
KeySpec heat_capacity() {
  return {"heat capacity",     Form::sourced,
          Kind::heat_capacity, "10 J/kg/K",
          "20000 J/kg/K",      {},
          "required",          "a value, or points over temperature"};
}
KeySpec conductivity() {
  return {"conductivity",     Form::sourced,
          Kind::conductivity, "0.001 W/m/K",
          "5000 W/m/K",       {},
          "required",         "a value, or points over temperature"};
}

KeyTable sourced() {
  return {"value with its source",
          "Every datum of a material states its source. `value` for one value, `points` for a table that is linear "
          "between its points and constant beyond them.",
          {{"value", Form::quantity, {}, "", "", {}, "this or points", "`2600 kg/m3`"},
           {"points",
            Form::points,
            {},
            "",
            "",
            {},
            "this or value",
            "at least two pairs, the first column rising: `[[20 degC, 0.8 W/m/K], [500 degC, 0.6 W/m/K]]`"},
           {"source", Form::text, {}, "", "", {}, "required", "author, year and table or equation; not empty"}}};
}

KeyTable back_diffusion() {
  return {"freezing: back-diffusion",
          "Diffusion of the solute in the solid while it freezes, over arms that ripen as `arm spacing at 1 s` times "
          "(time / 1 s)^`ripening exponent`.",
          {{"diffusivity",
            Form::sourced,
            Kind::diffusivity,
            "1e-9 mm2/s",
            "1 mm2/s",
            {},
            "required",
            "of the solute in the solid, at a temperature midway through freezing"},
           {"arm spacing at 1 s", Form::sourced, Kind::length, "0.1 um", "1 mm", {}, "required", "secondary arms"},
           {"ripening exponent", Form::sourced, Kind::ratio, "0.1", "0.6", {}, "required", "usually near 1/3"}}};
}

KeyTable binary_lines() {
  return {"freezing: binary lines",
          "Liquidus and solidus of the base metal's side of a binary diagram.",
          {{"solute", Form::text, {}, "", "", {}, "required", "symbol of the solute, e.g. Cu"},
           {"base", Form::text, {}, "", "", {}, "required", "symbol of the base metal, e.g. Al"},
           {"composition", Form::sourced, Kind::composition, "0.001 wt%", "60 wt%", {}, "required", "solute content"},
           {"melting point", Form::sourced, Kind::temperature, "0 K", "4000 K", {}, "required", "of the base metal"},
           {"liquidus slope",
            Form::sourced,
            Kind::slope,
            "-1000 K/wt%",
            "-0.001 K/wt%",
            {},
            "this or liquidus",
            "of a straight liquidus; negative"},
           {"liquidus",
            Form::sourced,
            Kind::temperature,
            "0 K",
            "4000 K",
            {},
            "this or liquidus slope",
            "points of temperature over composition: `[[0 wt%, 660 degC], [10 wt%, 620 degC]]`"},
           {"partition coefficient",
            Form::sourced,
            Kind::ratio,
            "0.0001",
            "0.9999",
            {},
            "required",
            "solute in the solid over solute in the liquid"},
           {"eutectic temperature",
            Form::sourced,
            Kind::temperature,
            "0 K",
            "4000 K",
            {},
            "optional",
            "Scheil's rule needs it"}}};
}

KeySpec element_name() { return {"element", Form::text, {}, "", "", {}, "required", "its symbol, e.g. Si"}; }
KeySpec element_content() {
  return {"composition", Form::sourced, Kind::mass_share, "0 wt%", "60 wt%", {}, "required", "content of the alloy"};
}
KeySpec elements(const std::string& meaning) { return {"elements", Form::maps, {}, "", "", {}, "required", meaning}; }
KeySpec end_temperature() {
  return {"end temperature", Form::sourced,
          Kind::temperature, "0 K",
          "4000 K",          {},
          "optional",        "at which the last liquid freezes, such as a eutectic"};
}
KeySpec largest_fraction() {
  return {"largest fraction",
          Form::sourced,
          Kind::fraction,
          "0.01",
          "0.9999",
          {},
          "optional",
          "fraction solid at which the last liquid freezes, where the rule does not use it up by itself"};
}

KeyTable dilute() {
  return {"freezing: dilute",
          "Elements in a base metal that do not feel each other: the liquidus is the melting point plus slope times "
          "content of each. `scheil` and `partial` need `end temperature` or `largest fraction`; where both are "
          "given, whichever comes first ends freezing.",
          {{"base", Form::text, {}, "", "", {}, "required", "symbol of the base metal, e.g. Al"},
           {"melting point", Form::sourced, Kind::temperature, "0 K", "4000 K", {}, "required", "of the base metal"},
           elements("one entry for each element"),
           end_temperature(),
           largest_fraction()}};
}

KeyTable dilute_element() {
  return {"freezing: dilute: element",
          "One element.",
          {element_name(),
           element_content(),
           {"liquidus slope",
            Form::sourced,
            Kind::slope,
            "-1000 K/wt%",
            "1000 K/wt%",
            {},
            "required",
            "negative where the element lowers the liquidus"},
           {"partition coefficient",
            Form::sourced,
            Kind::ratio,
            "0.0001",
            "20",
            {},
            "required",
            "element in the solid over element in the liquid"},
           {"fast",
            Form::choice,
            {},
            "",
            "",
            {"true", "false"},
            "default: false",
            "whether it evens out in the solid by the rule `partial`"}}};
}

KeyTable steel() {
  return {"freezing: steel",
          "A low-alloy steel by straight lines of iron-carbon with its peritectic; the other elements with slopes and "
          "partition coefficients of Won and Thomas (2001), those of P from memory. `scheil` needs `end temperature` "
          "or `largest fraction`, `partial` as well where there are elements beside carbon; where both are given, "
          "whichever comes first ends freezing.",
          {elements("one entry for each element, C among them; besides it Si, Mn, P and S are known"),
           end_temperature(), largest_fraction()}};
}

KeyTable steel_element() { return {"freezing: steel: element", "One element.", {element_name(), element_content()}}; }

FileKeys make_alloy() {
  return {
      "alloy file",
      "palier-alloy",
      {{"",
        "An alloy.",
        {{"palier-alloy", Form::integer, Kind::ratio, "1", "1", {}, "required", "version of the format of alloy files"},
         name(),
         title(),
         {"designation", Form::texts, {}, "", "", {}, "optional", "designations in open standards"},
         density(),
         {"latent heat",
          Form::sourced,
          Kind::latent_heat,
          "1 kJ/kg",
          "3000 kJ/kg",
          {},
          "required",
          "of the whole freezing range"},
         {"solid", Form::map, {}, "", "", {}, "required", "properties of the solid"},
         {"liquid", Form::map, {}, "", "", {}, "required", "properties of the liquid"},
         {"freezing", Form::map, {}, "", "", {}, "required", "how the alloy freezes"},
         notes()}},
       {"solid or liquid", "Properties of one phase.", {heat_capacity(), conductivity()}},
       {"freezing",
        "At most one of `pure`, `binary lines`, `dilute` and `steel`; `measured` may stand beside it or alone.",
        {{"default path",
          Form::choice,
          {},
          "",
          "",
          {"lever", "scheil", "partial", "pure", "measured"},
          "required",
          "rule of the solidification path where the case names none"},
         {"pure", Form::map, {}, "", "", {}, "optional", "a metal that freezes at one temperature"},
         {"binary lines", Form::map, {}, "", "", {}, "optional", "lines of a binary phase diagram"},
         {"dilute", Form::map, {}, "", "", {}, "optional", "elements that do not feel each other"},
         {"steel", Form::map, {}, "", "", {}, "optional", "a low-alloy steel, by its carbon and other elements"},
         {"measured", Form::map, {}, "", "", {}, "optional", "fraction solid from a thermal-analysis record"},
         {"back-diffusion", Form::map, {}, "", "", {}, "optional", "beside binary lines: what its rules need"}}},
       {"freezing: pure",
        "A pure metal.",
        {{"melting point", Form::sourced, Kind::temperature, "0 K", "4000 K", {}, "required", "of the metal"}}},
       binary_lines(),
       dilute(),
       dilute_element(),
       steel(),
       steel_element(),
       back_diffusion(),
       {"freezing: measured",
        "Fraction solid against falling temperature. What is left at the last point freezes there.",
        {{"points",
          Form::points,
          {},
          "",
          "",
          {},
          "required",
          "at least two pairs, temperature falling and fraction solid rising from 0: `[[645 degC, 0], [640 degC, "
          "0.2]]`"},
         {"source", Form::text, {}, "", "", {}, "required", "author, year and table or equation; not empty"}}},
       sourced()}};
}

FileKeys make_mold() {
  return {
      "mold file",
      "palier-mold",
      {{"",
        "A material of molds, cores, chills, dies or sleeves.",
        {{"palier-mold", Form::integer, Kind::ratio, "1", "1", {}, "required", "version of the format of mold files"},
         name(),
         title(),
         density(),
         heat_capacity(),
         conductivity(),
         {"moisture",
          Form::sourced,
          Kind::mass_share,
          "0 wt%",
          "30 wt%",
          {},
          "default: 0 wt% (dry)",
          "water in the material, which boils off in an arrest at 100 degC"},
         notes()}},
       sourced()}};
}

}  // namespace

const FileKeys& alloy_keys() {
  static const FileKeys keys = make_alloy();
  return keys;
}

const FileKeys& mold_keys() {
  static const FileKeys keys = make_mold();
  return keys;
}

}  // namespace palier::files
