#include <catch2/catch.hpp>
#include <string>

#include "files/scratch.hpp"
#include "palier/base/error.hpp"
#include "palier/files/material_file.hpp"

// The text of an error is part of the interface: each is compared whole. An edit of a valid material, and what it
// brings.
namespace {

struct Row {
  std::string fixture, from, to, message;
};

std::string refusal(const Row& row) {
  const palier::test::Scratch scratch;
  const std::string valid = palier::test::slurp(palier::test::library() + "/" + row.fixture + ".yaml");
  const std::string path = scratch.write("material.yaml", palier::test::edited(valid, row.from, row.to));
  try {
    if (row.fixture.rfind("alloys", 0) == 0)
      palier::files::read_alloy(path);
    else
      palier::files::read_mold(path);
  } catch (const palier::base::InputError& error) {
    return scratch.without_folders(error.what());
  }
  return "accepted";
}

}  // namespace

TEST_CASE("errors of alloy files", "[files][material][errors]") {
  const auto row = GENERATE(values<Row>({
      {"alloys/test-binary", "palier-alloy: 1", "palier-mold: 1",
       "material.yaml:2:1: found a mold file; expected an alloy file"},
      {"alloys/test-binary", "palier-alloy: 1", "palier: 1",
       "material.yaml:2:1: found a case file; expected an alloy file"},
      {"alloys/test-binary", "density: {value: 2600 kg/m3, source: invented for the tests}", "density: 2600 kg/m3",
       "material.yaml:6:10: density: found '2600 kg/m3'; expected a value with its source; write {value: 2600 kg/m3, "
       "source: \"...\"}"},
      {"alloys/test-binary", "2600 kg/m3, source: invented for the tests", "2600 kg/m3",
       "material.yaml:6:10: density.source: found no key 'source'; expected author, year and table or equation; not "
       "empty"},
      {"alloys/test-binary", "2600 kg/m3, source: invented for the tests", "2600 kg/m3, source: \"\"",
       "material.yaml:6:38: density.source: found ''; expected a text: author, year and table or equation; not empty"},
      {"alloys/test-binary", "2600 kg/m3, source: invented for the tests",
       "2600 kg/m3, source: invented for the tests, points: [[20 degC, 1 kg/m3], [30 degC, 2 kg/m3]]",
       "material.yaml:6:10: density: found both of 'value' and 'points'; expected one of them"},
      {"alloys/test-binary", "density: {value: 2600 kg/m3",
       "density: {points: [[20 degC, 2600 kg/m3], [30 degC, 2500 kg/m3]]",
       "material.yaml:6:10: density: found points; expected one value; write value: instead of points:"},
      {"alloys/test-binary", "2600 kg/m3", "2600",
       "material.yaml:6:18: density.value: found the bare number '2600'; expected a density with its unit, such as "
       "2600 kg/m3 or 2.6 g/cm3"},
      {"alloys/test-binary", "2600 kg/m3", "2.6 kg/m3",
       "material.yaml:6:18: density.value: found '2.6 kg/m3'; expected between 10 kg/m3 and 25000 kg/m3"},
      {"alloys/test-binary", "value: 2600", "valeu: 2600",
       "material.yaml:6:11: density.valeu: found an unknown key; did you mean 'value'?"},
      {"alloys/test-binary", "390 kJ/kg", "390 J/kg/K",
       "material.yaml:7:22: latent heat.value: found the unit 'J/kg/K', which measures a heat capacity; expected a "
       "latent heat such as 389 kJ/kg"},
      {"alloys/test-binary", "latent heat", "latent_heat",
       "material.yaml:7:1: latent_heat: found an unknown key; did you mean 'latent heat'?"},
      {"alloys/test-binary", "[500 degC, 1100 J/kg/K]", "[20 degC, 1100 J/kg/K]",
       "material.yaml:9:52: solid.heat capacity.points[1][0]: found '20 degC' after '20 degC'; expected rising values"},
      {"alloys/test-binary", "[500 degC, 1100 J/kg/K]", "[500 degC, 1100 W/m/K]",
       "material.yaml:9:62: solid.heat capacity.points[1][1]: found the unit 'W/m/K', which measures a thermal "
       "conductivity; expected a heat capacity such as 900 J/kg/K or 0.9 kJ/kg/K"},
      {"alloys/test-binary", "[500 degC, 1100 J/kg/K]", "[500, 1100 J/kg/K]",
       "material.yaml:9:52: solid.heat capacity.points[1][0]: found the bare number '500'; expected a temperature with "
       "its unit, such as 700 degC, 973 K or 1292 degF"},
      {"alloys/test-binary", "[T-1, T-2]", "T-1",
       "material.yaml:5:14: designation: found 'T-1'; expected a list of texts"},
      {"alloys/test-binary", "[T-1, T-2]", "[T-1, [a]]",
       "material.yaml:5:20: designation[1]: found a list; expected a text"},
      {"alloys/test-binary", "default path: scheil", "default path: pure",
       "material.yaml:15:17: freezing.default path: found 'pure', but the file has no data for it; pure needs 'pure', "
       "lever and scheil need 'binary lines', 'dilute' or 'steel', partial needs 'dilute' or 'steel', measured needs "
       "'measured'"},
      {"alloys/test-binary", "default path: scheil", "default path: schiel",
       "material.yaml:15:17: freezing.default path: found 'schiel'; expected lever, scheil, partial, pure or measured; "
       "did you mean 'scheil'?"},
      {"alloys/test-binary", "  default path: scheil\n", "",
       "material.yaml:15:3: freezing.default path: found no key 'default path'; expected lever, scheil, partial, "
       "pure or measured"},
      {"alloys/test-binary", "  binary lines:",
       "  pure:\n    melting point: {value: 660 degC, source: invented for the tests}\n  binary lines:",
       "material.yaml:19:5: freezing.binary lines: found 'pure' and 'binary lines'; expected at most one of them"},
      {"alloys/test-binary", "-3 K/wt%", "3 K/wt%",
       "material.yaml:21:29: freezing.binary lines.liquidus slope.value: found '3 K/wt%'; expected between -1000 K/wt% "
       "and -0.001 K/wt%"},
      {"alloys/test-binary", "-3 K/wt%", "-3 K",
       "material.yaml:21:29: freezing.binary lines.liquidus slope.value: found the unit 'K'; expected a slope of "
       "temperature over composition such as -6.5 K/wt%; state the slope per wt%"},
      {"alloys/test-binary", "    liquidus slope: {value: -3 K/wt%, source: invented for the tests}\n", "",
       "material.yaml:17:5: freezing.binary lines.liquidus: found none of 'liquidus' and 'liquidus slope'; expected "
       "one of them"},
      {"alloys/test-binary", "value: 0.2,", "value: 1.2,",
       "material.yaml:22:36: freezing.binary lines.partition coefficient.value: found '1.2'; expected between 0.0001 "
       "and 0.9999"},
      {"alloys/test-binary", "540 degC, source: invented for the tests", "700 degC, source: invented for the tests",
       "material.yaml:17:5: freezing.binary lines: the eutectic temperature must lie below the melting point"},
      {"alloys/test-binary", "    liquidus slope: {value: -3 K/wt%, source: invented for the tests}",
       "    liquidus: {points: [[0 wt%, 660 degC], [10 wt%, 670 degC]], source: invented for the tests}",
       "material.yaml:17:5: freezing.binary lines: the liquidus must fall with composition"},
      {"alloys/test-binary", "    liquidus slope: {value: -3 K/wt%, source: invented for the tests}",
       "    liquidus: {points: [[0 at%, 660 degC], [10 at%, 600 degC]], source: invented for the tests}",
       "material.yaml:21:26: freezing.binary lines.liquidus.points[0][0]: found '0 at%'; expected wt% in a table"},
      {"alloys/test-binary", "5 wt%, source: invented for the tests", "99 at%, source: invented for the tests",
       "material.yaml:19:26: freezing.binary lines.composition.value: found '99 at%'; expected between 0.001 wt% and "
       "60 wt%"},
      {"alloys/test-binary", "solute: Cu", "solute: Xx\n    foo: 1",
       "material.yaml:18:5: freezing.binary lines.foo: found an unknown key; known keys: solute, base, composition, "
       "melting point, liquidus slope, liquidus, partition coefficient, eutectic temperature"},
      {"alloys/test-binary", "[600 degC, 0.6]", "[646 degC, 0.6]",
       "material.yaml:25:30: freezing.measured.points[1][0]: found '646 degC' after '645 degC'; expected falling "
       "values"},
      {"alloys/test-binary", "[600 degC, 0.6]", "[600 degC, 1.6]",
       "material.yaml:25:40: freezing.measured.points[1][1]: found '1.6'; expected between 0 and 1"},
      {"alloys/test-binary", "[600 degC, 0.6]", "[600 degC, 0.95]",
       "material.yaml:25:13: freezing.measured.points: measured point 3: fraction solid must rise"},
      {"alloys/test-binary", "    source: invented for the tests\n", "",
       "material.yaml:25:5: freezing.measured.source: found no key 'source'; expected author, year and table or "
       "equation; not empty"},
      {"alloys/test-pure", "  pure:\n    melting point: {value: 660 degC, source: invented for the tests}\n", "",
       "material.yaml:14:17: freezing.default path: found 'pure', but the file has no data for it; pure needs 'pure', "
       "lever and scheil need 'binary lines', 'dilute' or 'steel', partial needs 'dilute' or 'steel', measured needs "
       "'measured'"},
  }));
  CAPTURE(row.from, row.to);
  CHECK(refusal(row) == row.message);
}

TEST_CASE("errors of mold files", "[files][material][errors]") {
  const auto row = GENERATE(values<Row>({
      {"molds/test-sand-dry", "palier-mold: 1\n", "",
       "material.yaml:2:1: palier-mold: found no version of the format; begin the file with 'palier-mold: 1'"},
      {"molds/test-sand-dry", "name: test sand, dry\n", "",
       "material.yaml:2:1: name: found no key 'name'; expected the name under which cases find the material"},
      {"molds/test-sand-dry", "1500 kg/m3", "1500 kg/m2",
       "material.yaml:5:18: density.value: found the unit 'kg/m2', which measures something in m-2 kg; expected a "
       "density such as 2600 kg/m3 or 2.6 g/cm3"},
      {"molds/test-sand-dry", "heat capacity", "specific heat",
       "material.yaml:6:1: specific heat: found an unknown key; known keys: palier-mold, name, title, density, heat "
       "capacity, conductivity, moisture, notes"},
      {"molds/test-sand-dry", "  source: invented for the tests\n", "",
       "material.yaml:8:3: conductivity.source: found no key 'source'; expected author, year and table or equation; "
       "not empty"},
      {"molds/test-sand-wet", "4 wt%", "4",
       "material.yaml:8:19: moisture.value: found the bare number '4'; expected a mass share with its unit, such as 3 "
       "wt%"},
      {"molds/test-sand-wet", "4 wt%", "40 wt%",
       "material.yaml:8:19: moisture.value: found '40 wt%'; expected between 0 wt% and 30 wt%"},
      {"molds/test-sand-wet", "4 wt%", "4 at%",
       "material.yaml:8:19: moisture.value: found the unit 'at%'; expected a mass share such as 3 wt%; did you mean "
       "'wt%'?"},
      {"molds/test-sand-dry", "title:", "latent heat: {value: 3 kJ/kg, source: invented for the tests}\ntitle:",
       "material.yaml:4:1: latent heat: found an unknown key; known keys: palier-mold, name, title, density, heat "
       "capacity, conductivity, moisture, notes"},
  }));
  CAPTURE(row.from, row.to);
  CHECK(refusal(row) == row.message);
}

TEST_CASE("a straight liquidus and the same line by points are the same diagram", "[files][material]") {
  const palier::test::Scratch scratch;
  const std::string straight = palier::test::slurp(palier::test::library() + "/alloys/test-binary.yaml");
  const std::string points =
      palier::test::edited(straight, "liquidus slope: {value: -3 K/wt%, source: invented for the tests}",
                           "liquidus: {points: [[0 wt%, 660 degC], [40 wt%, 540 degC]], source: invented}");
  const auto a = palier::files::read_alloy(scratch.write("a.yaml", straight));
  const auto b = palier::files::read_alloy(scratch.write("b.yaml", points));
  for (const double composition : {0.5, 5.0, 39.0})
    CHECK(a.binary->diagram->liquidus(composition) == Approx(b.binary->diagram->liquidus(composition)).epsilon(1e-12));
  CHECK(a.binary->diagram->invariant()->liquid == Approx(40));
}
