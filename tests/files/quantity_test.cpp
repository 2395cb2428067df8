#include "palier/files/quantity.hpp"

#include <catch2/catch.hpp>
#include <string>

#include "palier/files/atomic_weight.hpp"
#include "palier/files/units.hpp"

using palier::files::parse_quantity;
using palier::files::QuantityFault;
using Kind = palier::files::QuantityKind;

namespace {

std::string refusal(const std::string& text, Kind kind) {
  try {
    parse_quantity(text, kind);
  } catch (const QuantityFault& fault) {
    return std::string(fault.what()) + (fault.hint().empty() ? "" : " | " + fault.hint());
  }
  return "accepted";
}

}  // namespace

TEST_CASE("quantities are read into SI units", "[files][units]") {
  struct Row {
    std::string text;
    Kind kind;
    double value;  ///< from the definitions of the units
  };
  const auto row = GENERATE(values<Row>({
      {"40 mm", Kind::length, 0.04},
      {"40mm", Kind::length, 0.04},
      {"  1.5 in ", Kind::length, 0.0381},
      {"12 µm", Kind::length, 12e-6},
      {"+2 cm", Kind::length, 0.02},
      {"2 h", Kind::time, 7200},
      {"1.5 min", Kind::time, 90},
      {"700 degC", Kind::temperature, 973.15},
      {"-40 degF", Kind::temperature, 233.15},
      {"1292 °F", Kind::temperature, 973.15},
      {"25 °C", Kind::temperature, 298.15},
      {"300 K", Kind::temperature, 300},
      {"3e2 K", Kind::temperature, 300},
      // A difference takes the slope of the scale alone.
      {"20 degC", Kind::temperature_difference, 20},
      {"20 °C", Kind::temperature_difference, 20},
      {"20 K", Kind::temperature_difference, 20},
      {"36 degF", Kind::temperature_difference, 20},
      {"800 W/m2/K", Kind::conductance, 800},
      {"800 W/(m2 K)", Kind::conductance, 800},
      {"800 W/(m^2*K)", Kind::conductance, 800},
      {"800 W/m**2/K", Kind::conductance, 800},
      {"800 W m-2 K-1", Kind::conductance, 800},
      {"800 W.m-2.K-1", Kind::conductance, 800},
      {"800 W·m⁻²·K⁻¹", Kind::conductance, 800},
      {"800 W / m² / K", Kind::conductance, 800},
      {"0.8 kW/m2/degC", Kind::conductance, 800},
      {"1 BTU/(h ft2 degF)", Kind::conductance, 5.678263341113488},
      {"0.6 W/m/K", Kind::conductivity, 0.6},
      {"1.1 kJ/kg/K", Kind::heat_capacity, 1100},
      {"2.6 g/cm3", Kind::density, 2600},
      {"389 kJ/kg", Kind::latent_heat, 389e3},
      {"-6.5 K/wt%", Kind::slope, -6.5},
      {"-6.5 degC/mass%", Kind::slope, -6.5},
      {"-18 degF/wt%", Kind::slope, -10},
      {"4.5 wt%", Kind::composition, 4.5},
      {"4.5 mass%", Kind::composition, 4.5},
      {"4.5 wt %", Kind::composition, 4.5},
      {"0.2", Kind::fraction, 0.2},
      {"20 %", Kind::fraction, 0.2},
      {"0.1 %", Kind::percentage, 0.001},
      {"3 wt%", Kind::mass_share, 0.03},
      {"0.17", Kind::ratio, 0.17},
      {"0", Kind::ratio, 0},
  }));
  CAPTURE(row.text);
  const auto quantity = parse_quantity(row.text, row.kind);
  CHECK(quantity.value == Approx(row.value).epsilon(1e-14).margin(0));
  CHECK_FALSE(quantity.atomic_percent);
}

TEST_CASE("a text that is no such quantity is refused with what would do", "[files][units][errors]") {
  struct Row {
    std::string text;
    Kind kind;
    std::string message;
  };
  const std::string length = "; expected a length such as 40 mm or 1.5 in";
  const std::string bare = "; expected a length with its unit, such as 40 mm or 1.5 in";
  const std::string temperature = "; expected a temperature such as 700 degC, 973 K or 1292 degF";
  const auto row = GENERATE_COPY(values<Row>({
      {"40", Kind::length, "found the bare number '40'" + bare},
      {"", Kind::length, "found nothing" + length},
      {"mm", Kind::length, "found 'mm', which does not begin with a number" + length},
      {"inf m", Kind::length, "found 'inf m', which does not begin with a number" + length},
      {".nan", Kind::length, "found '.nan', which does not begin with a number" + length},
      {".5 mm", Kind::length,
       "found '.5 mm', which does not begin with a number" + length + " | write a zero before the point"},
      {"5. mm", Kind::length, "found '5. mm' with no digit after the point" + length + " | write a digit or no point"},
      {"010 mm", Kind::length,
       "found the number '010 mm' with a leading zero" + length + " | write it without the leading zero"},
      {"0x10 mm", Kind::length, "found the number '0x10 mm' in hexadecimal" + length + " | write a decimal number"},
      {"1_000 mm", Kind::length,
       "found the number '1_000 mm' with an underscore" + length + " | write the digits without separators"},
      {"40,5 mm", Kind::length,
       "found the number '40,5 mm' with a comma" + length + " | write a decimal point and no separators of thousands"},
      {"1.000.000 mm", Kind::length,
       "found '1.000.000 mm' with two points" + length + " | write no separators of thousands"},
      {"− 4 mm", Kind::length,
       "found '− 4 mm', which does not begin with a number" + length + " | write the minus sign as -"},
      {"1e400 mm", Kind::length, "found the number '1e400', which is too large or too small" + length},
      {"40 kg", Kind::length, "found the unit 'kg', which measures something in kg" + length},
      {"40 s", Kind::length, "found the unit 's', which measures a time" + length},
      {"40 mm mm", Kind::length, "found the unit 'mm mm', which measures something in m2" + length},
      {"40 MM", Kind::length, "found the unknown unit 'MM'" + length + " | did you mean 'mm'?"},
      {"40 M", Kind::length, "found the unknown unit 'M'" + length + " | did you mean 'm'?"},
      {"40 %", Kind::length, "found '%' in the unit '%'" + length},
      {"40 m/rad", Kind::length, "found 'rad' in the unit 'm/rad'" + length},
      {"5 m/s^0.5", Kind::length, "found the unit 'm/s^0.5', which cannot be read | exponents must be whole numbers"},
      {"5 m s-0.5", Kind::length, "found the unit 'm s-0.5', which cannot be read | exponents must be whole numbers"},
      {"5 m^1/2", Kind::length, "found the unit 'm^1/2', which cannot be read | exponents must be whole numbers"},
      {"40 10 mm", Kind::length,
       "found the unit '10 mm', which cannot be read | a unit holds no numbers but whole exponents"},
      {"40 m @ 3", Kind::length, "found the unit 'm @ 3', which cannot be read | write units as in W/m2/K or kJ/kg"},
      {"40 mm;", Kind::length, "found the unit 'mm;', which cannot be read | write units as in W/m2/K or kJ/kg"},
      {"40 (mm", Kind::length, "found the unit '(mm', which cannot be read | close the parenthesis"},
      {"40 ((((((m))))))", Kind::length,
       "found the unit '((((((m))))))', which cannot be read | use fewer parentheses"},
      {"40 mm/", Kind::length, "found the unit 'mm/', which cannot be read | write units as in W/m2/K or kJ/kg"},
      {"40 m12", Kind::length,
       "found the unit 'm12', which cannot be read | an exponent has one digit, as in m2 or K-1"},
      {"700 C", Kind::temperature,
       "found the unit 'C', which measures something in s A" + temperature + " | did you mean 'degC'?"},
      {"700 F", Kind::temperature,
       "found the unit 'F', which measures something in m-2 kg-1 s4 A2" + temperature + " | did you mean 'degF'?"},
      {"700 deg C", Kind::temperature, "found the unknown unit 'deg'" + temperature + " | did you mean 'degC'?"},
      {"800 W/m2 K", Kind::conductance,
       "found the unit 'W/m2 K', which measures something in kg s-3 K; expected a conductance or film coefficient such "
       "as 800 W/m2/K | a factor after '/' and a space multiplies; divide again, as in W/m2/K, or use parentheses, as "
       "in W/(m2 K)"},
      {"-6.5 K", Kind::slope,
       "found the unit 'K'; expected a slope of temperature over composition such as -6.5 K/wt% | state the slope per "
       "wt%"},
      {"-6.5 K/at%", Kind::slope,
       "found 'at%' in the unit 'K/at%'; expected a slope of temperature over composition such as -6.5 K/wt% | state "
       "the slope per wt%"},
      {"4.5 %", Kind::composition,
       "found the unit '%'; expected a composition such as 4.5 wt% or 2 at% | say wt% (by mass) or at% (by atoms)"},
      {"4.5 ppm", Kind::composition, "found the unit 'ppm'; expected a composition such as 4.5 wt% or 2 at%"},
      {"0.1", Kind::percentage, "found the bare number '0.1'; expected a percentage with its unit, such as 0.1 %"},
      {"0.17 %", Kind::ratio, "found the unit '%'; expected a bare number such as 0.17 | remove the unit"},
  }));
  CAPTURE(row.text);
  CHECK(refusal(row.text, row.kind) == row.message);
}

TEST_CASE("a long unit is refused before it is parsed", "[files][units][limits]") {
  CHECK_THAT(refusal("1 " + std::string(100'000, '('), Kind::length),
             Catch::Contains("found a unit of 100000 characters"));
  CHECK_THAT(refusal(std::string(400, '9') + " m", Kind::length), Catch::Contains("too large or too small"));
}

TEST_CASE("units convert by their definitions", "[files][units]") {
  using palier::files::unit_scale;
  using palier::files::unit_slope;
  CHECK(*unit_slope("degF", "K") == Approx(5.0 / 9.0).epsilon(1e-15));
  CHECK(unit_scale("degC", "K")->offset == Approx(273.15).epsilon(1e-15));
  CHECK(unit_scale("degC", "K")->factor == 1.0);
  CHECK_FALSE(unit_slope("mm", "K"));
  CHECK_FALSE(unit_slope("no such unit", "K"));
  CHECK_FALSE(palier::files::is_unit("0 m"));
  CHECK(palier::files::is_dimensionless("ppm"));
  CHECK_FALSE(palier::files::is_dimensionless("mm"));
  CHECK(palier::files::base_units("kW") == "m2 kg s-3");
  CHECK(palier::files::base_units("percent") == "1");
}

TEST_CASE("at% turns into mass % by the atomic weights", "[files][units]") {
  using palier::files::atomic_weight;
  using palier::files::mass_percent;
  // Steel: 1 at% C in Fe, worked by hand: 12.011 / (12.011 + 99 * 55.845) = 0.2167790 %.
  CHECK(mass_percent(1.0, *atomic_weight("C"), *atomic_weight("Fe")) == Approx(0.2167790).epsilon(1e-6));
  CHECK(mass_percent(0.0, 12.011, 55.845) == 0.0);
  CHECK(mass_percent(100.0, 12.011, 55.845) == 100.0);
  CHECK(mass_percent(37.5, 20.0, 20.0) == Approx(37.5));
  CHECK_FALSE(atomic_weight("Xx"));
  CHECK(parse_quantity("2 at%", Kind::composition).atomic_percent);
}
