#include <catch2/catch.hpp>
#include <string>

#include "files/scratch.hpp"
#include "palier/base/error.hpp"
#include "palier/files/case_file.hpp"

// The text of an error is part of the interface: each is compared whole. An edit of a valid case, and what it brings.
namespace {

struct Row {
  std::string fixture, from, to, message;
};

void check(const Row& row) {
  CAPTURE(row.from, row.to);
  const palier::test::Scratch scratch;
  const std::string valid = palier::test::slurp(palier::test::fixtures() + "/cases/" + row.fixture);
  const std::string path = scratch.write("case.yaml", palier::test::edited(valid, row.from, row.to));
  scratch.write("die.yaml", palier::test::slurp(palier::test::fixtures() + "/cases/die.yaml"));
  std::string message = "accepted";
  try {
    palier::files::read_case(path, palier::test::library());
  } catch (const palier::base::InputError& error) {
    message = scratch.without_folders(error.what());
  }
  CHECK(message == row.message);
}

}  // namespace

TEST_CASE("errors of the section and the top level", "[files][case][errors]") {
  check(GENERATE(values<Row>({
      {"plate.yaml", "palier: 1", "palier: 2", "case.yaml:2:9: palier: found '2'; expected 1"},
      {"plate.yaml", "palier: 1\n", "",
       "case.yaml:2:1: palier: found no version of the format; begin the file with 'palier: 1'"},
      {"plate.yaml", "palier: 1", "palierr: 1", "case.yaml:2:1: palierr: found an unknown key; did you mean 'palier'?"},
      {"plate.yaml", "palier: 1", "palier: \"1\"",
       "case.yaml:2:9: palier: found '1'; expected a whole number such as 1; write it without quotes"},
      {"plate.yaml", "palier: 1", "palier-alloy: 1", "case.yaml:2:1: found an alloy file; expected a case file"},
      {"plate.yaml", "title: Plate of an invented alloy in dry sand",
       "title:", "case.yaml:3:1: title: found no value; expected what this case is, for reports"},
      {"plate.yaml", "title: ", "titel: ", "case.yaml:3:1: titel: found an unknown key; did you mean 'title'?"},
      {"plate.yaml", "thickness: 40 mm", "thicknes: 40 mm",
       "case.yaml:6:3: section.thicknes: found an unknown key; did you mean 'thickness'?"},
      {"plate.yaml", "thickness: 40 mm", "diameter: 40 mm",
       "case.yaml:6:13: section.diameter: found a diameter of a plate; expected its thickness; write thickness: "
       "instead of diameter:"},
      {"plate.yaml", "  thickness: 40 mm\n", "",
       "case.yaml:5:3: section.thickness: found no key 'thickness'; expected a length such as 40 mm or 1.5 in"},
      {"plate.yaml", "section:", "thickness: 40 mm\nsection:",
       "case.yaml:4:1: thickness: found an unknown key; 'thickness' belongs under section or wall entry: layer"},
      {"plate.yaml", "section:", "thicknes: 40 mm\nsection:",
       "case.yaml:4:1: thicknes: found an unknown key; did you mean 'thickness'? But 'thickness' belongs under section "
       "or wall entry: layer"},
      {"plate.yaml", "section:", "foo: 40 mm\nsection:",
       "case.yaml:4:1: foo: found an unknown key; known keys: palier, title, section, walls, stop, probes, record, "
       "accuracy"},
      {"plate.yaml", "thickness: 40 mm", "thickness: 40",
       "case.yaml:6:14: section.thickness: found the bare number '40'; expected a length with its unit, such as 40 mm "
       "or 1.5 in"},
      {"plate.yaml", "thickness: 40 mm", "thickness: 40 km",
       "case.yaml:6:14: section.thickness: found '40 km'; expected between 0.1 mm and 10 m"},
      {"plate.yaml", "thickness: 40 mm", "thickness: -40 mm",
       "case.yaml:6:14: section.thickness: found '-40 mm'; expected between 0.1 mm and 10 m"},
      {"plate.yaml", "thickness: 40 mm", "thickness: ~",
       "case.yaml:6:3: section.thickness: found no value; expected a length such as 40 mm or 1.5 in"},
      {"plate.yaml", "thickness: 40 mm", "thickness: [40 mm]",
       "case.yaml:6:14: section.thickness: found a list; expected a length such as 40 mm or 1.5 in"},
      {"plate.yaml", "shape: plate", "shape: plat",
       "case.yaml:5:10: section.shape: found 'plat'; expected plate, cylinder or sphere; did you mean 'plate'?"},
      {"plate.yaml", "shape: plate", "shape: sphere",
       "case.yaml:6:14: section.thickness: found a thickness of a sphere; expected its diameter; write diameter: "
       "instead of thickness:"},
      {"plate.yaml", "shape: plate", "shape: plate\n  bore: 3 mm",
       "case.yaml:6:9: section.bore: found a bore of a plate; expected one of a cylinder only"},
      {"plate.yaml", "pour: 720 degC", "pour: 720",
       "case.yaml:8:9: section.pour: found the bare number '720'; expected a temperature with its unit, such as 700 "
       "degC, 973 K or 1292 degF"},
      {"plate.yaml", "pour: 720 degC", "pour: 600 degC",
       "case.yaml:8:9: section.pour: found 600 degC, below the liquidus of 645.00 degC; expected at or above it; write "
       "superheat: instead to state it above the liquidus"},
      {"plate.yaml", "pour: 720 degC", "pour: 5000 degC",
       "case.yaml:8:9: section.pour: found '5000 degC'; expected between 0 K and 4000 K"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  superheat: 3 K",
       "case.yaml:8:9: section.pour: found both of 'pour' and 'superheat'; expected one of them"},
      {"plate.yaml", "  pour: 720 degC\n", "",
       "case.yaml:5:3: section.pour: found none of 'pour' and 'superheat'; expected one of them"},
      {"plate.yaml", "pour: 720 degC", "superheat: 20",
       "case.yaml:8:14: section.superheat: found the bare number '20'; expected a temperature difference with its "
       "unit, such as 60 K or 60 degC"},
      {"plate.yaml", "pour: 720 degC", "superheat: 2000 K",
       "case.yaml:8:14: section.superheat: found '2000 K'; expected between 0 K and 1500 K"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  path: pure",
       "case.yaml:9:9: section.path: found 'pure', but test-binary has no data for it; expected lever, scheil or "
       "measured"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  path: measured\n  composition: 4 wt%",
       "case.yaml:10:16: section.composition: found a composition beside the measured path, which holds for the "
       "alloy's own composition only; remove it, or choose lever or scheil"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  composition: 50 wt%",
       "case.yaml:9:16: section.composition: composition 50.000000 mass % is outside the diagram; expected 0 to "
       "40.000000 mass %"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  composition: 70 wt%",
       "case.yaml:9:16: section.composition: found '70 wt%'; expected between 0.001 wt% and 60 wt%"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  composition: 200 at%",
       "case.yaml:9:16: section.composition: found '200 at%'; expected between 0 at% and 100 at%"},
      {"plate.yaml", "alloy: test-binary", "alloy: test-pure\n  composition: 4 wt%",
       "case.yaml:8:16: section.composition: found a composition, but test-pure has no binary lines; remove it, or "
       "take an alloy with binary lines"},
      {"plate.yaml", "alloy: test-binary", "alloy: test-dilute\n  composition: 4 wt%",
       "case.yaml:8:16: section.composition: found a composition, but test-dilute has no binary lines; remove it, or "
       "take an alloy with binary lines"},
      {"plate.yaml", "alloy: test-binary", "alloy: test-steel\n  path: measured",
       "case.yaml:8:9: section.path: found 'measured', but test-steel has no data for it; expected lever, scheil or "
       "partial"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  path: partial",
       "case.yaml:9:9: section.path: found 'partial', but test-binary has no data for it; expected lever, scheil or "
       "measured"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  cells: 2",
       "case.yaml:9:10: section.cells: found '2'; expected between 4 and 20000"},
      {"plate.yaml", "pour: 720 degC", "pour: 720 degC\n  cells: 40.5",
       "case.yaml:9:10: section.cells: found '40.5'; expected a whole number such as 4"},
      {"plate.yaml", "alloy: test-binary", "alloy: test-binry",
       "case.yaml:7:10: section.alloy: found 'test-binry', but there is no file test-binry.yaml beside the case or in "
       "library/alloys; did you mean 'test-binary'?"},
      {"plate.yaml", "alloy: test-binary", "alloy: Al-7Si",
       "case.yaml:7:10: section.alloy: found 'Al-7Si', but there is no file Al-7Si.yaml beside the case or in "
       "library/alloys; known: test-binary, test-dilute, test-pure, test-steel"},
      {"plate.yaml", "alloy: test-binary", "alloy: die.yaml",
       "die.yaml:2:1: found a mold file; expected an alloy file"},
      {"plate.yaml", "below: 400 degC", "below: 800 degC",
       "case.yaml:17:15: stop.below: found '800 degC'; expected less than the pouring temperature, 720.00 degC"},
      {"plate.yaml", "after: 2 h", "after: 0 s",
       "case.yaml:17:32: stop.after: found '0 s'; expected between 1e-3 s and 1e7 s"},
      {"plate.yaml", "20 mm]", "21 mm]",
       "case.yaml:18:23: probes[2]: found '21 mm'; expected at most the depth of the section, 20 mm; depths count from "
       "the surface to the center"},
      {"plate.yaml", "20 mm]", "10 mm]", "case.yaml:18:23: probes[2]: found '10 mm' again; expected each depth once"},
      {"plate.yaml", "[0 mm, 10 mm, 20 mm]", "[]", "case.yaml:18:9: probes: found 0 depths; expected 1 to 1000"},
      {"plate.yaml", "[0 mm, 10 mm, 20 mm]", "10 mm",
       "case.yaml:18:9: probes: found '10 mm'; expected a list such as [0 mm, 10 m]"},
      {"plate.yaml", "0.2 %", "0.2",
       "case.yaml:20:11: accuracy: found the bare number '0.2'; expected a percentage with its unit, such as 0.1 %"},
      {"plate.yaml", "0.2 %", "20 %", "case.yaml:20:11: accuracy: found '20 %'; expected between 0.001 % and 5 %"},
      {"plate.yaml", "{every: 1 s}", "1 s",
       "case.yaml:19:9: record: found '1 s'; expected a mapping with keys such as every"},
      {"plate.yaml", "{every: 1 s}", "{}",
       "case.yaml:19:9: record.every: found no key 'every'; expected a time such as 90 s, 2 min or 1.5 h"},
  })));
}

TEST_CASE("errors of the walls", "[files][case][errors]") {
  check(GENERATE(values<Row>({
      {"plate.yaml", "800 W/m2/K", "800 W/m2 K",
       "case.yaml:11:16: walls.both[0].contact: found the unit 'W/m2 K', which measures something in kg s-3 K; "
       "expected a conductance or film coefficient such as 800 W/m2/K; a factor after '/' and a space multiplies; "
       "divide again, as in W/m2/K, or use parentheses, as in W/(m2 K)"},
      {"plate.yaml", "800 W/m2/K", "perfekt",
       "case.yaml:11:16: walls.both[0].contact: found 'perfekt'; expected perfect, a conductance such as 800 W/m2/K, "
       "or a table; did you mean 'perfect'?"},
      {"plate.yaml", "800 W/m2/K", "0 W/m2/K",
       "case.yaml:11:16: walls.both[0].contact: found '0 W/m2/K'; expected between 0.1 W/m2/K and 1e7 W/m2/K"},
      {"plate.yaml", "800 W/m2/K", "{over: tim, points: []}",
       "case.yaml:11:23: walls.both[0].contact.over: found 'tim'; expected time, surface temperature or surface "
       "fraction solid; did you mean 'time'?"},
      {"plate.yaml", "800 W/m2/K", "{over: time, points: [[0 s, 1 W/m2/K], [0 s, 2 W/m2/K]]}",
       "case.yaml:11:56: walls.both[0].contact.points[1][0]: found '0 s' after '0 s'; expected rising values"},
      {"plate.yaml", "800 W/m2/K", "{over: time, points: [[0 s, 1 W/m2/K]]}",
       "case.yaml:11:37: walls.both[0].contact.points: found fewer than two points; expected at least two pairs such "
       "as [[90 s, 800 W/m2/K], ...]"},
      {"plate.yaml", "800 W/m2/K", "{over: time, points: [[0 s, 1 W/m2/K], [3 s]]}",
       "case.yaml:11:55: walls.both[0].contact.points[1]: found 1 values; expected a pair such as [90 s, 800 W/m2/K]"},
      {"plate.yaml", "800 W/m2/K", "{over: surface temperature, points: [[0 s, 1 W/m2/K], [3 s, 1 W/m2/K]]}",
       "case.yaml:11:54: walls.both[0].contact.points[0][0]: found the unit 's', which measures a time; expected a "
       "temperature such as 700 degC, 973 K or 1292 degF"},
      {"plate.yaml", "test sand, dry", "test sand, dri",
       "case.yaml:12:14: walls.both[1].layer: found 'test sand, dri', but there is no file test-sand-dri.yaml beside "
       "the case or in library/molds; did you mean 'test-sand-dry' or 'test-sand-wet'?"},
      {"plate.yaml", "test sand, dry", "none.yaml",
       "case.yaml:12:14: walls.both[1].layer: found 'none.yaml', but there is no file none.yaml; a file is looked up "
       "relative to the case"},
      {"plate.yaml", "test sand, dry", "test-binary",
       "case.yaml:12:14: walls.both[1].layer: found 'test-binary', but there is no file test-binary.yaml beside the "
       "case or in library/molds; known: die, test-sand-dry, test-sand-wet"},
      {"plate.yaml", "    - layer", "    - contact: perfect\n    - layer",
       "case.yaml:12:16: walls.both[1].contact: found two contacts in a row; expected a layer between them"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings: 25 degC\n",
       "    - contact: perfect\n    - film: 10 W/m2/K\n      surroundings: 25 degC\n",
       "case.yaml:15:7: walls.both[2]: found a contact before film; expected a layer after it; remove the contact"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings: 25 degC\n",
       "    - contact: 5 W/m2/K\n    - face: 300 K\n",
       "case.yaml:15:7: walls.both[2]: found a contact before face; expected a layer after it; write the contact as a "
       "film: film: 800 W/m2/K, surroundings: 600 K"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings: 25 degC\n", "",
       "case.yaml:12:7: walls.both: found no outer end of the wall; expected film, face or adiabatic as its last "
       "entry; for example: - {film: 10 W/m2/K, surroundings: 25 degC}"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings: 25 degC\n", "    - adiabatic\n",
       "case.yaml:15:7: walls.both[2]: found 'adiabatic'; expected a key: contact, layer, film, face or adiabatic; "
       "write adiabatic: true"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings: 25 degC\n", "    - adiabatic: false\n",
       "case.yaml:15:18: walls.both[2].adiabatic: found 'false'; expected true; leave the key out where it does not "
       "apply"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings", "    - film: 10 W/m2/K\n      surrounding",
       "case.yaml:16:7: walls.both[2].surrounding: found an unknown key; did you mean 'surroundings'?"},
      {"plate.yaml", "      surroundings: 25 degC\n", "",
       "case.yaml:15:7: walls.both[2].surroundings: found no key 'surroundings'; expected a temperature such as 700 "
       "degC, 973 K or 1292 degF"},
      {"plate.yaml", "    - film: 10 W/m2/K\n      surroundings: 25 degC\n",
       "    - film: 10 W/m2/K\n      surroundings: 25 degC\n    - adiabatic: true\n",
       "case.yaml:17:7: walls.both[3]: found 'adiabatic' after the outer end of the wall; film, face and adiabatic "
       "come last"},
      {"plate.yaml", "film: 10", "film: 0",
       "case.yaml:15:13: walls.both[2].film: found a film that passes no heat; write adiabatic: true instead"},
      {"plate.yaml", "  both:", "  outside:",
       "case.yaml:10:3: walls.outside: found 'outside'; expected the walls of a plate, if they differ: left and right; "
       "write both: where they are equal"},
      {"plate.yaml", "  both:", "  left:",
       "case.yaml:10:3: walls.right: found one wall of a plate; expected left and right; write both: where they are "
       "equal"},
      {"plate.yaml", "  both:", "  bothh:", "case.yaml:10:3: walls.bothh: found an unknown key; did you mean 'both'?"},
      {"plate.yaml", "    - contact: 800 W/m2/K\n    - layer: test sand, dry\n      thickness", "    - thickness",
       "case.yaml:11:7: walls.both[0]: found none of the keys contact, layer, film, face or adiabatic; a layer names "
       "its material: layer: NAME"},
      {"plate.yaml", "    - contact: 800 W/m2/K\n    - layer", "    - contact: 800 W/m2/K\n      layer",
       "case.yaml:11:7: walls.both[0]: found contact and layer in one entry; expected one of them; begin each with a "
       "'-' of its own"},
      {"plate.yaml", "- contact", "- kontact",
       "case.yaml:11:7: walls.both[0].kontact: found an unknown key; did you mean 'contact'?"},
      {"plate.yaml", "      start: 25 degC\n", "",
       "case.yaml:12:7: walls.both[1].start: found no key 'start'; expected a temperature such as 700 degC, 973 K or "
       "1292 degF"},
  })));
}

TEST_CASE("errors of round sections", "[files][case][errors]") {
  check(GENERATE(values<Row>({
      {"hollow-cylinder.yaml", "bore: 20 mm", "bore: 60 mm",
       "case.yaml:7:9: section.bore: found a bore of 60 mm; expected less than the diameter of 60 mm"},
      {"hollow-cylinder.yaml", "thickness: 10 mm", "thickness: 11 mm",
       "case.yaml:27:5: walls.bore: found layers of 11 mm in all; expected at most the radius of the bore, 10 mm"},
      {"hollow-cylinder.yaml", "    - adiabatic: true", "    - face: 300 K",
       "case.yaml:27:5: walls.bore: found layers that fill the bore; expected adiabatic: true as the last entry; no "
       "heat crosses the center line"},
      {"hollow-cylinder.yaml", "  bore: 20 mm\n", "",
       "case.yaml:26:5: walls.bore: found a wall in the bore, but the section has none; give the bore's diameter: "
       "section.bore"},
      {"hollow-cylinder.yaml", "shape: cylinder", "shape: sphere",
       "case.yaml:7:9: section.bore: found a bore of a sphere; expected one of a cylinder only"},
      {"hollow-cylinder.yaml", "diameter: 60 mm", "thickness: 60 mm",
       "case.yaml:6:14: section.thickness: found a thickness of a cylinder; expected its diameter; write diameter: "
       "instead of thickness:"},
      {"hollow-cylinder.yaml", "  outside:", "  both:",
       "case.yaml:14:3: walls.both: found 'both'; expected the walls of a hollow cylinder: outside and bore"},
      {"hollow-cylinder.yaml", "2 at%", "4.5 %",
       "case.yaml:9:16: section.composition: found the unit '%'; expected a composition such as 4.5 wt% or 2 at%; say "
       "wt% (by mass) or at% (by atoms)"},
  })));
}
