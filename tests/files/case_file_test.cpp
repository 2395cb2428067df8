#include "palier/files/case_file.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <string>

#include "files/scratch.hpp"
#include "palier/files/material_file.hpp"

using palier::files::CaseFile;
using palier::files::read_case;
using palier::files::ResolvedValue;
using palier::heat::Boundary;
using palier::heat::Contact;
using palier::heat::Shape;

namespace {

CaseFile fixture(const std::string& name) {
  return read_case(palier::test::fixtures() + "/cases/" + name, palier::test::library());
}

std::string resolved(const std::vector<ResolvedValue>& values, const std::string& key) {
  const auto found = std::find_if(values.begin(), values.end(), [&](const auto& value) { return value.key == key; });
  return found == values.end() ? "absent" : found->value + " [" + found->from + "]";
}

}  // namespace

TEST_CASE("a plate between equal walls", "[files][case]") {
  const CaseFile read = fixture("plate.yaml");
  const auto& section = read.section;
  CHECK(section.title == "Plate of an invented alloy in dry sand");
  CHECK(section.shape == Shape::plate);
  CHECK(section.thickness == Approx(0.04));
  CHECK(section.alloy == "test-binary");
  CHECK(section.metal.density == Approx(2600));
  CHECK(section.metal.latent_heat == Approx(390e3));
  CHECK(section.metal.solid.heat_capacity(533.15) == Approx(1000));  // midway between 20 and 500 degC
  CHECK(section.metal.liquid.conductivity(1000) == Approx(90));
  REQUIRE(section.path);
  CHECK(section.path->rule() == "scheil");
  CHECK(section.path->liquidus() == Approx(660 - 3 * 5 + 273.15));
  CHECK(section.pouring_temperature == Approx(993.15));
  CHECK_FALSE(section.inside);
  REQUIRE(section.outside.layers.size() == 1);
  const auto& sand = section.outside.layers[0];
  CHECK(sand.contact.over == Contact::Over::constant);
  CHECK(sand.contact.conductance(0) == Approx(800));
  CHECK(sand.material == "test sand, dry");
  CHECK(sand.properties.body.conductivity(533.15) == Approx(0.7));
  CHECK(sand.thickness == Approx(0.12));
  CHECK(sand.start_temperature == Approx(298.15));
  CHECK_FALSE(sand.cells);
  CHECK(section.outside.outer.kind == Boundary::Kind::film);
  CHECK(section.outside.outer.film_coefficient == Approx(10));
  CHECK(section.outside.outer.temperature == Approx(298.15));
  CHECK(*section.stop.below == Approx(673.15));
  CHECK(*section.stop.after == Approx(7200));
  REQUIRE(section.probes.size() == 3);
  CHECK(section.probes[1] == Approx(0.01));
  CHECK(*section.record_every == Approx(1));
  CHECK(section.accuracy == Approx(0.002));
}

TEST_CASE("a hollow cylinder with a die outside and a core inside", "[files][case]") {
  const CaseFile read = fixture("hollow-cylinder.yaml");
  const auto& section = read.section;
  CHECK(section.shape == Shape::cylinder);
  CHECK(section.thickness == Approx(0.06));
  CHECK(section.bore == Approx(0.02));
  CHECK(*section.cells == 40);
  CHECK(section.path->rule() == "lever");
  // 2 at% Cu in Al: 2 * 63.546 / (2 * 63.546 + 98 * 26.982) = 4.58596 mass %.
  CHECK(section.path->liquidus() == Approx(933.15 - 3 * 4.58596).epsilon(1e-7));
  CHECK(section.pouring_temperature == Approx(section.path->liquidus() + 60));
  REQUIRE(section.outside.layers.size() == 2);
  CHECK(section.outside.layers[0].contact.over == Contact::Over::time);
  CHECK(section.outside.layers[0].contact.conductance(5) == Approx(2400));
  CHECK(*section.outside.layers[0].cells == 60);
  CHECK(section.outside.layers[1].contact.over == Contact::Over::perfect);
  CHECK(section.outside.layers[1].properties.moisture == Approx(0.04));
  CHECK(section.outside.outer.kind == Boundary::Kind::fixed_temperature);
  CHECK(section.outside.outer.temperature == Approx(300));
  REQUIRE(section.inside);
  CHECK(section.inside->layers.size() == 1);
  CHECK(section.inside->outer.kind == Boundary::Kind::adiabatic);
  CHECK(section.probes.empty());
  CHECK_FALSE(section.record_every);
  CHECK(section.accuracy == Approx(0.001));
  // Each material once, in the order of first use.
  REQUIRE(read.materials.size() == 4);
  CHECK(read.materials[0].name == "test-binary");
  CHECK(read.materials[1].name == "test die");
  CHECK(read.materials[3].name == "test sand, dry");
}

TEST_CASE("a sphere that only radiates and a plate with two different sides", "[files][case]") {
  const auto sphere = fixture("sphere.yaml").section;
  CHECK(sphere.shape == Shape::sphere);
  CHECK(sphere.pouring_temperature == Approx(933.15));
  CHECK(sphere.outside.layers.empty());
  CHECK(sphere.outside.outer.emissivity == Approx(0.4));
  const auto plate = fixture("two-sides.yaml").section;
  REQUIRE(plate.inside);
  CHECK(plate.path->rule() == "measured");
  CHECK(plate.pouring_temperature == Approx((1300 - 32) / 1.8 + 273.15));
  CHECK(plate.inside->layers[0].contact.over == Contact::Over::surface_fraction_solid);
  CHECK(plate.inside->layers[0].contact.conductance(0.25) == Approx(2000));
  CHECK(plate.inside->outer.emissivity == Approx(0.8));
  CHECK(plate.outside.outer.kind == Boundary::Kind::adiabatic);
}

TEST_CASE("a case names the rule of an alloy of several elements", "[files][case][dilute]") {
  const palier::test::Scratch scratch;
  const std::string plate = palier::test::slurp(palier::test::fixtures() + "/cases/plate.yaml");
  const auto section = [&](const std::string& alloy) {
    const std::string text = palier::test::edited(plate, "alloy: test-binary", alloy);
    return read_case(scratch.write("case.yaml", text), palier::test::library()).section;
  };
  CHECK(section("alloy: test-dilute").path->rule() == "partial");
  const auto scheil = section("alloy: test-dilute\n  path: scheil");
  CHECK(scheil.path->rule() == "scheil");
  CHECK(scheil.path->liquidus() == Approx(617 + 273.15));
  CHECK(scheil.path->end_of_freezing() == Approx(560 + 273.15));
}

TEST_CASE("every value is noted with where it came from", "[files][case][check]") {
  const CaseFile read = fixture("hollow-cylinder.yaml");
  CHECK(read.text == palier::test::slurp(read.path));
  CHECK(resolved(read.resolved, "section.diameter") == "60 mm [case]");
  CHECK(resolved(read.resolved, "section.composition") == "4.58596 wt% [case]");
  CHECK(resolved(read.resolved, "section.pour") == "706.24 degC [liquidus + superheat]");
  CHECK(resolved(read.resolved, "walls.outside[1].start") == "200 degC [case]");
  CHECK(resolved(read.resolved, "walls.outside[2].contact") == "perfect [default]");
  CHECK(resolved(read.resolved, "accuracy") == "0.1 % [default]");
  CHECK(resolved(read.resolved, "stop") == "end of freezing [default]");
  const auto& alloy = read.materials[0];
  CHECK(alloy.text == palier::test::slurp(alloy.path));
  CHECK(resolved(alloy.values, "density") == "2600 kg/m3 [invented for the tests]");
  CHECK(resolved(alloy.values, "solid.heat capacity") ==
        "[20 degC, 900 J/kg/K], [500 degC, 1100 J/kg/K] [invented for the tests]");
  CHECK(resolved(alloy.values, "freezing.binary lines.liquidus slope") == "-3 K/wt% [invented for the tests]");
  CHECK(resolved(alloy.values, "name") == "test-binary [file]");
  const CaseFile plate = fixture("plate.yaml");
  CHECK(resolved(plate.resolved, "section.composition") == "5 wt% [default]");
  CHECK(resolved(plate.resolved, "section.path") == "scheil [default]");
}

TEST_CASE("a material beside the case wins over the library", "[files][material]") {
  const palier::test::Scratch scratch;
  const std::string text = palier::test::slurp(palier::test::fixtures() + "/cases/plate.yaml");
  // A case may carry the name of its alloy: it is not taken for the alloy's file.
  const std::string path = scratch.write("test-binary.yaml", text);
  CHECK(read_case(path, palier::test::library()).materials[1].path ==
        palier::test::library() + "/molds/test-sand-dry.yaml");
  std::string sand = palier::test::slurp(palier::test::library() + "/molds/test-sand-dry.yaml");
  const std::string own = scratch.write("test-sand-dry.yaml", palier::test::edited(sand, "1500 kg/m3", "1700 kg/m3"));
  const CaseFile read = read_case(path, palier::test::library());
  CHECK(read.materials[1].path == own);
  CHECK(read.section.outside.layers[0].properties.density == Approx(1700));
}

TEST_CASE("the name of a material makes the name of its file", "[files][material]") {
  using palier::files::material_file_name;
  CHECK(material_file_name("silica sand, dry") == "silica-sand-dry.yaml");
  CHECK(material_file_name("Al-7Si-0.3Mg") == "Al-7Si-0.3Mg.yaml");
  CHECK(material_file_name("A+B  (c)") == "A+B-c-.yaml");
  CHECK(material_file_name("../../etc/passwd") == "..-..-etc-passwd.yaml");
}

TEST_CASE("all shipped cases and materials are read", "[files][shipped]") {
  const std::string cases = std::string(PALIER_SOURCE_DIR) + "/cases";
  int count = 0;
  for (const auto& entry : std::filesystem::recursive_directory_iterator(cases)) {
    const std::string path = entry.path().string();
    if (entry.path().extension() != ".yaml") continue;
    const std::string text = palier::test::slurp(path);
    CAPTURE(path);
    if (text.find("palier-alloy:") != std::string::npos) {
      CHECK_NOTHROW(palier::files::read_alloy(path));
    } else if (text.find("palier-mold:") != std::string::npos) {
      CHECK_NOTHROW(palier::files::read_mold(path));
    } else if (text.find("palier:") != std::string::npos) {
      CHECK_NOTHROW(read_case(path, cases));
    }
    ++count;
  }
  CHECK(count > 0);
}

TEST_CASE("the reference page in docs is the one the reader makes", "[files][docs]") {
  CHECK(palier::test::slurp(std::string(PALIER_SOURCE_DIR) + "/docs/case-file.md") == palier::files::key_reference());
}
