#include <catch2/catch.hpp>
#include <string>
#include <vector>

#include "files/scratch.hpp"
#include "palier/base/error.hpp"
#include "palier/files/material_file.hpp"
#include "palier/files/named_composition.hpp"

using palier::files::AlloyFile;
using palier::files::read_alloy;
using palier::files::with_composition;

namespace {

AlloyFile fixture(const std::string& name) { return read_alloy(palier::test::library() + "/alloys/" + name + ".yaml"); }

std::string value(const AlloyFile& alloy, const std::string& key) {
  for (const auto& v : alloy.file.values)
    if (v.key == key) return v.value + " [" + v.from + "]";
  return "not there";
}

/// An edit of a valid file and what it brings.
struct Row {
  std::string fixture, from, to, message;
};

std::string refusal(const Row& row) {
  const palier::test::Scratch scratch;
  const std::string valid = palier::test::slurp(palier::test::library() + "/alloys/" + row.fixture + ".yaml");
  try {
    read_alloy(scratch.write("material.yaml", palier::test::edited(valid, row.from, row.to)));
  } catch (const palier::base::InputError& error) {
    return scratch.without_folders(error.what());
  }
  return "accepted";
}

std::string refusal_of(const std::string& text, const AlloyFile& alloy) {
  try {
    with_composition(alloy, text);
  } catch (const palier::base::InputError& error) {
    return error.what();
  }
  return "accepted";
}

}  // namespace

TEST_CASE("a dilute alloy is read with every element", "[files][material][dilute]") {
  const AlloyFile alloy = fixture("test-dilute");
  REQUIRE(alloy.dilute);
  const auto& d = *alloy.dilute;
  CHECK(d.base == "Al");
  CHECK(d.melting_point == Approx(933.15));
  REQUIRE(d.elements.size() == 3);
  CHECK(d.elements[0].name == "Si");
  CHECK(d.elements[0].composition == Approx(6));
  CHECK(d.elements[0].liquidus_slope == Approx(-6));
  CHECK(d.elements[0].partition_coefficient == Approx(0.1));
  CHECK_FALSE(d.elements[0].fast);
  CHECK(d.elements[1].fast);
  CHECK_FALSE(d.elements[2].fast);
  CHECK(d.elements[2].liquidus_slope == Approx(30));
  REQUIRE(d.end.temperature);
  CHECK(*d.end.temperature == Approx(833.15));
  REQUIRE(d.end.largest_fraction);
  CHECK(*d.end.largest_fraction == Approx(0.99));
  CHECK(value(alloy, "freezing.dilute.elements[1].liquidus slope") == "-5 K/wt% [invented for the tests]");
  CHECK(value(alloy, "freezing.dilute.elements[0].fast") == "false [default]");
  CHECK(value(alloy, "freezing.dilute.elements[1].fast") == "true [file]");
  // 660 - 6 * 6 - 5 * 2 + 30 * 0.1 = 617 degC by every rule.
  CHECK(rules_of(alloy) == std::vector<std::string>{"lever", "scheil", "partial"});
  for (const std::string& rule : rules_of(alloy)) {
    const auto path = path_of(rule, alloy, 0);
    CHECK(path.rule() == rule);
    CHECK(path.liquidus() == Approx(617 + 273.15).epsilon(1e-12));
  }
}

TEST_CASE("a steel is read with carbon wherever it stands", "[files][material][steel]") {
  const AlloyFile alloy = fixture("test-steel");
  REQUIRE(alloy.steel);
  CHECK(alloy.steel->carbon == Approx(0.3));
  REQUIRE(alloy.steel->elements.size() == 2);
  CHECK(alloy.steel->elements[0].name == "Si");
  CHECK(alloy.steel->elements[1].composition == Approx(1));
  CHECK_FALSE(alloy.steel->end.temperature);
  CHECK(*alloy.steel->end.largest_fraction == Approx(0.95));
  CHECK(elements_of(alloy).front().element == "C");
  CHECK(rules_of(alloy) == std::vector<std::string>{"lever", "scheil", "partial"});
  // Iron-carbon 1538 - 43/0.53 * 0.3 (textbook diagram); -7.6 of Si and -4.9 of Mn, Won & Thomas (2001).
  CHECK(path_of("partial", alloy, 0).liquidus() ==
        Approx(1811.15 - 43 / 0.53 * 0.3 - 7.6 * 0.5 - 4.9 * 1).epsilon(1e-12));
}

TEST_CASE("errors of dilute alloys and steels", "[files][material][errors][dilute][steel]") {
  const auto row = GENERATE(values<Row>({
      {"test-dilute", "element: Mg", "element: Si",
       "material.yaml:23:18: freezing.dilute.elements[1].element: found 'Si' again; expected every element once"},
      {"test-dilute", "element: Mg", "element: Al",
       "material.yaml:23:18: freezing.dilute.elements[1].element: found 'Al' again; expected every element once"},
      {"test-dilute", "fast: true", "fast: yes",
       "material.yaml:27:15: freezing.dilute.elements[1].fast: found 'yes'; expected true or false"},
      {"test-dilute", "value: 6 wt%", "value: 6 at%",
       "material.yaml:20:30: freezing.dilute.elements[0].composition.value: found the unit 'at%'; expected a mass "
       "share such as 3 wt%; did you mean 'wt%'?"},
      {"test-dilute", "value: 6 wt%", "value: 61 wt%",
       "material.yaml:20:30: freezing.dilute.elements[0].composition.value: found '61 wt%'; expected between 0 wt% and "
       "60 wt%"},
      {"test-dilute", "-6 K/wt%", "-6 K",
       "material.yaml:21:33: freezing.dilute.elements[0].liquidus slope.value: found the unit 'K'; expected a slope of "
       "temperature over composition such as -6.5 K/wt%; state the slope per wt%"},
      {"test-dilute", "-6 K/wt%", "-2000 K/wt%",
       "material.yaml:21:33: freezing.dilute.elements[0].liquidus slope.value: found '-2000 K/wt%'; expected between "
       "-1000 K/wt% and 1000 K/wt%"},
      {"test-dilute", "value: 0.1, source", "value: 0, source",
       "material.yaml:22:40: freezing.dilute.elements[0].partition coefficient.value: found '0'; expected between "
       "0.0001 and 20"},
      {"test-dilute", "    base: Al\n", "",
       "material.yaml:16:5: freezing.dilute.base: found no key 'base'; expected symbol of the base metal, e.g. Al"},
      {"test-dilute", "liquidus slope: {value: -5", "slope: {value: -5",
       "material.yaml:25:9: freezing.dilute.elements[1].slope: found an unknown key; known keys: element, composition, "
       "liquidus slope, partition coefficient, fast"},
      {"test-dilute", "560 degC", "618 degC",
       "material.yaml:16:5: freezing.dilute: the last liquid must freeze above 0 K and below the liquidus, 890.150000 "
       "K; found 891.150000 K"},
      {"test-dilute", "99 %", "100 %",
       "material.yaml:34:31: freezing.dilute.largest fraction.value: found '100 %'; expected between 0.01 and 0.9999"},
      {"test-dilute", "-6 K/wt%", "6 K/wt%",
       "material.yaml:16:5: freezing.dilute: the freezing temperature does not fall strictly as the fraction solid "
       "rises, near 0.062500: the elements' slopes and partition coefficients disagree"},
      {"test-dilute", "default path: partial", "default path: pure",
       "material.yaml:14:17: freezing.default path: found 'pure', but the file has no data for it; pure needs 'pure', "
       "lever and scheil need 'binary lines', 'dilute' or 'steel', partial needs 'dilute' or 'steel', measured needs "
       "'measured'"},
      {"test-dilute", "  dilute:\n", "  pure:\n    melting point: {value: 660 degC, source: invented}\n  dilute:\n",
       "material.yaml:18:5: freezing.dilute: found 'pure' and 'dilute'; expected at most one of them"},
      {"test-steel", "element: Mn", "element: Cr",
       "material.yaml:19:19: freezing.steel.elements[2].element: no lines are known of Cr in steel; expected Si, Mn, P "
       "or S"},
      {"test-steel", "element: Mn", "element: C",
       "material.yaml:19:19: freezing.steel.elements[2].element: found 'C' again; expected every element once"},
      {"test-steel", "element: C,", "element: P,",
       "material.yaml:17:7: freezing.steel.elements: found no carbon; expected an entry with the element C"},
      {"test-steel", "value: 0.3 wt%", "value: 3 wt%",
       "material.yaml:16:5: freezing.steel: carbon: found 3.000000 mass %; expected 0 to 2.140000 for a steel"},
      {"test-steel", "value: 0.5 wt%, source: invented for the tests", "value: 0.5 wt%",
       "material.yaml:17:36: freezing.steel.elements[0].composition.source: found no key 'source'; expected author, "
       "year and table or equation; not empty"},
  }));
  CAPTURE(row.fixture, row.from, row.to);
  CHECK(refusal(row) == row.message);
}

TEST_CASE("the elements are a list of at least one entry", "[files][material][errors][steel]") {
  const palier::test::Scratch scratch;
  std::string text = palier::test::slurp(palier::test::library() + "/alloys/test-steel.yaml");
  const std::size_t begin = text.find("\n      - {element: Si"), end = text.find("\n    largest fraction");
  REQUIRE(begin < end);
  REQUIRE(end != std::string::npos);
  const std::string bare = text.erase(begin, end - begin);
  const auto refused = [&](const std::string& elements) {
    try {
      read_alloy(scratch.write("material.yaml", palier::test::edited(bare, "elements:", "elements: " + elements)));
    } catch (const palier::base::InputError& error) {
      return scratch.without_folders(error.what());
    }
    return std::string("accepted");
  };
  CHECK(refused("[]") ==
        "material.yaml:16:15: freezing.steel.elements: found an empty list; expected a list of entries, each with a "
        "'-'");
  CHECK(refused("C") ==
        "material.yaml:16:15: freezing.steel.elements: found 'C'; expected a list of entries, each with a '-'");
  CHECK(refused("[C]") ==
        "material.yaml:16:16: freezing.steel.elements[0]: found 'C'; expected a mapping with keys such as "
        "element");
}

TEST_CASE("a rule whose liquid is never used up is refused without an end", "[files][material][dilute]") {
  const palier::test::Scratch scratch;
  std::string text = palier::test::slurp(palier::test::library() + "/alloys/test-dilute.yaml");
  text.erase(text.find("    end temperature"));
  const AlloyFile alloy = read_alloy(scratch.write("material.yaml", text));
  CHECK_NOTHROW(path_of("lever", alloy, 0));
  CHECK_THROWS_WITH(path_of("scheil", alloy, 0), Catch::Contains("the last liquid never freezes"));
  CHECK_THROWS_WITH(path_of("partial", alloy, 0), Catch::Contains("the last liquid never freezes"));
}

TEST_CASE("a composition may name some elements and leave the others", "[files][material][composition]") {
  const AlloyFile dilute = with_composition(fixture("test-dilute"), "Ti 0.2 %, Si 4 wt%");
  const std::vector<double> expected{4, 2, 0.2};
  for (std::size_t i = 0; i < expected.size(); ++i)
    CHECK(elements_of(dilute)[i].composition == Approx(expected[i]).epsilon(1e-12));
  CHECK(path_of("scheil", dilute, 0).liquidus() == Approx(660 - 24 - 10 + 6 + 273.15).epsilon(1e-12));
  const AlloyFile steel = with_composition(fixture("test-steel"), "Mn 0.4 %,C 0.2 %");
  CHECK(steel.steel->carbon == Approx(0.2));
  CHECK(steel.steel->elements[0].composition == Approx(0.5));
  CHECK(steel.steel->elements[1].composition == Approx(0.4));
  CHECK(with_composition(fixture("test-binary"), "Cu 3 %").binary->composition == Approx(3));
}

TEST_CASE("errors of a composition in words", "[files][material][composition][errors]") {
  const AlloyFile steel = fixture("test-steel");
  CHECK(refusal_of("Cr 1 %", steel) ==
        "composition 'Cr 1 %': found the element 'Cr'; the elements of test-steel are C, Si, Mn; expected such as 'C "
        "0.5 %'");
  CHECK(refusal_of("C 0.2 %, C 0.3 %", steel) == "composition 'C 0.2 %, C 0.3 %': found 'C' twice");
  CHECK(refusal_of("C 1 at%", steel) ==
        "composition 'C 1 at%': found at%; test-steel has several elements: state each in wt%");
  CHECK(refusal_of("C 0.2", steel) ==
        "composition 'C 0.2': found the bare number '0.2'; expected a composition with its unit, such as 4.5 wt% or 2 "
        "at%; expected such as 'C 0.5 %'");
  CHECK(refusal_of("C 0.2 %,", steel).find("found the element ''; the elements of test-steel are") !=
        std::string::npos);
  CHECK(refusal_of("Cu 1 %, Si 1 %", fixture("test-binary")) ==
        "composition 'Cu 1 %, Si 1 %': found several elements; test-binary is a binary; expected such as 'Cu 4.5 %'");
  CHECK(refusal_of("Cu 1 %", fixture("test-pure")) ==
        "composition 'Cu 1 %': test-pure has no binary lines; it holds for its own composition only");
}
