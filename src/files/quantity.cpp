#include "palier/files/quantity.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <map>
#include <optional>

#include "palier/files/nearest.hpp"
#include "palier/files/units.hpp"

namespace palier::files {
namespace {

const std::map<QuantityKind, KindWords>& kind_words() {
  static const std::map<QuantityKind, KindWords> words{
      {QuantityKind::temperature, {"a temperature", "K", "700 degC, 973 K or 1292 degF"}},
      {QuantityKind::temperature_difference, {"a temperature difference", "K", "60 K or 60 degC"}},
      {QuantityKind::length, {"a length", "m", "40 mm or 1.5 in"}},
      {QuantityKind::time, {"a time", "s", "90 s, 2 min or 1.5 h"}},
      {QuantityKind::conductance, {"a conductance or film coefficient", "W/m^2/K", "800 W/m2/K"}},
      {QuantityKind::conductivity, {"a thermal conductivity", "W/m/K", "0.6 W/m/K"}},
      {QuantityKind::diffusivity, {"a diffusivity", "m^2/s", "5e-13 m2/s"}},
      {QuantityKind::cooling_rate, {"a cooling rate", "K/s", "1 K/s or 60 K/min"}},
      {QuantityKind::heat_capacity, {"a heat capacity", "J/kg/K", "900 J/kg/K or 0.9 kJ/kg/K"}},
      {QuantityKind::density, {"a density", "kg/m^3", "2600 kg/m3 or 2.6 g/cm3"}},
      {QuantityKind::latent_heat, {"a latent heat", "J/kg", "389 kJ/kg"}},
      {QuantityKind::composition, {"a composition", "", "4.5 wt% or 2 at%"}},
      {QuantityKind::slope, {"a slope of temperature over composition", "K/percent", "-6.5 K/wt%"}},
      {QuantityKind::fraction, {"a fraction", "", "0.2 or 20 %"}},
      {QuantityKind::percentage, {"a percentage", "", "0.1 %"}},
      {QuantityKind::mass_share, {"a mass share", "", "3 wt%"}},
      {QuantityKind::ratio, {"a bare number", "", "0.17"}},
  };
  return words;
}

std::string expected(QuantityKind kind) {
  const KindWords& words = words_of(kind);
  return fmt::format("expected {} such as {}", words.name, words.examples);
}

std::string_view trimmed(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t\n\r");
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(" \t\n\r") - first + 1);
}

bool is_percent_of_mass(const std::string& name) { return name == "wt%" || name == "mass%"; }
bool is_plain_percent(const std::string& name) { return name == "%" || name == "percent"; }

/// Units people mean when they write these.
std::string meant_unit(const std::string& name) {
  static const std::map<std::string, std::string> meant{
      {"C", "degC"}, {"c", "degC"}, {"F", "degF"}, {"R", "degR"}, {"deg", "degC"}, {"Celsius", "degC"},
      {"k", "K"},    {"Sec", "s"},  {"sec", "s"},  {"S", "s"},    {"M", "m"},      {"MIN", "min"}};
  const auto found = meant.find(name);
  return found == meant.end() ? std::string() : fmt::format("did you mean '{}'?", found->second);
}

std::string unknown_name_hint(const std::string& name) {
  static const std::vector<std::string> common{"mm", "cm", "um",   "in",   "ft",  "min", "degC", "degF", "kJ", "kg",
                                               "J",  "W",  "kcal", "hour", "wt%", "at%", "kW",   "K",    "m",  "s"};
  const std::string meant = meant_unit(name);
  return meant.empty() ? did_you_mean(name, common) : meant;
}

/// The kinds whose dimension a unit has, for the message on a wrong one.
std::string kinds_with(const UnitText& unit) {
  std::vector<std::string> fitting;
  for (const auto& [kind, words] : kind_words()) {
    const bool same = kind == QuantityKind::temperature_difference || words.si.empty();
    if (!same && unit_slope(unit.normal, words.si)) fitting.push_back(words.name);
  }
  return fitting.empty() ? "something in " + base_units(unit.normal) : one_of(fitting);
}

void check_names(const UnitText& unit, QuantityKind kind) {
  for (const std::string& name : unit.names) {
    const bool percent = !name.empty() && name.back() == '%';
    if (!percent && !is_unit(name))
      throw QuantityFault(fmt::format("found the unknown unit '{}'; {}", name, expected(kind)),
                          unknown_name_hint(name));
    if (!percent && !is_dimensionless(name)) continue;
    if (kind == QuantityKind::slope && is_percent_of_mass(name)) continue;
    throw QuantityFault(fmt::format("found '{}' in the unit '{}'; {}", name, unit.written, expected(kind)),
                        kind == QuantityKind::slope ? "state the slope per wt%" : "");
  }
  const auto shares = std::count_if(unit.names.begin(), unit.names.end(), is_percent_of_mass);
  if (kind == QuantityKind::slope && shares != 1)
    throw QuantityFault(fmt::format("found the unit '{}'; {}", unit.written, expected(kind)),
                        "state the slope per wt%");
}

double with_unit(double number, const UnitText& unit, QuantityKind kind) {
  check_names(unit, kind);
  const std::string& si = words_of(kind).si;
  std::optional<UnitScale> scale;
  if (kind == QuantityKind::temperature)
    scale = unit_scale(unit.normal, si);
  else if (const auto factor = unit_slope(unit.normal, si))
    scale = UnitScale{*factor, 0.0};
  if (!scale) {
    std::string hint = unit.names.size() == 1 ? meant_unit(unit.names.front()) : "";
    if (unit.product_after_quotient)
      hint =
          "a factor after '/' and a space multiplies; divide again, as in W/m2/K, or use parentheses, as in W/(m2 K)";
    throw QuantityFault(
        fmt::format("found the unit '{}', which measures {}; {}", unit.written, kinds_with(unit), expected(kind)),
        hint);
  }
  const double value = scale->factor * number + scale->offset;
  if (!std::isfinite(value)) throw QuantityFault("found a number that is too large in SI units", "");
  return value;
}

/// Kinds that are pure numbers: UDUNITS-2 is not asked, since to it a radian and a percent are alike.
Quantity pure_number(double number, const std::string& unit, QuantityKind kind) {
  const auto refuse = [&](const std::string& hint) -> Quantity {
    throw QuantityFault(fmt::format("found the unit '{}'; {}", unit, expected(kind)), hint);
  };
  switch (kind) {
    case QuantityKind::composition:
      if (is_percent_of_mass(unit)) return {number, false};
      if (unit == "at%") return {number, true};
      return refuse(is_plain_percent(unit) ? "say wt% (by mass) or at% (by atoms)"
                                           : did_you_mean(unit, {"wt%", "at%"}));
    case QuantityKind::mass_share:
      if (is_percent_of_mass(unit) || is_plain_percent(unit)) return {number / 100.0, false};
      return refuse(did_you_mean(unit, {"wt%"}));
    case QuantityKind::fraction:
    case QuantityKind::percentage:
      if (is_plain_percent(unit)) return {number / 100.0, false};
      return refuse("");
    default:
      return refuse("remove the unit");
  }
}

bool takes_bare_numbers(QuantityKind kind) { return kind == QuantityKind::fraction || kind == QuantityKind::ratio; }

}  // namespace

const KindWords& words_of(QuantityKind kind) { return kind_words().at(kind); }

Quantity parse_quantity(std::string_view text, QuantityKind kind) {
  text = trimmed(text);
  if (text.empty()) throw QuantityFault("found nothing; " + expected(kind), "");
  std::size_t length = 0;
  double number = 0;
  try {
    number = parse_number(text, length);
  } catch (const QuantityFault& fault) {
    throw QuantityFault(fmt::format("{}; {}", fault.what(), expected(kind)), fault.hint());
  }
  const std::string_view unit_part = trimmed(text.substr(length));
  if (unit_part.empty()) {
    if (takes_bare_numbers(kind)) return {number, false};
    throw QuantityFault(fmt::format("found the bare number '{}'; expected {} with its unit, such as {}", text,
                                    words_of(kind).name, words_of(kind).examples),
                        "");
  }
  const UnitText unit = parse_unit_text(unit_part);
  if (!words_of(kind).si.empty()) return {with_unit(number, unit, kind), false};
  if (unit.names.size() == 1 && unit.normal.find_first_of("^/*(") == std::string::npos)
    return pure_number(number, unit.names.front(), kind);
  throw QuantityFault(fmt::format("found the unit '{}'; {}", unit.written, expected(kind)), "");
}

}  // namespace palier::files
