// palier against an independent solution of the check cases, and against Neumann's (data/*.csv tell the origin).
#include <catch2/catch.hpp>
#include <cmath>

#include "palier/freeze/run.hpp"
#include "published/reference_table.hpp"
#include "published/shipped_cases.hpp"

using namespace palier;
using namespace palier::published;

namespace {

struct EndOfFreezing {
  double depth, time, uncertainty;  // [m], [s], [s]
};

std::vector<EndOfFreezing> known_ends(const std::string& check) {
  const ReferenceTable table = reference_table("end_of_freezing.csv");
  const auto depth = table.column("depth_mm", check), time = table.column("end_s", check),
             uncertainty = table.column("uncertainty_s", check);
  std::vector<EndOfFreezing> out;
  for (std::size_t k = 0; k < depth.size(); ++k) out.push_back({1e-3 * depth[k], time[k], uncertainty[k]});
  return out;
}

freeze::Section check_section(const std::string& check, const std::vector<EndOfFreezing>& known) {
  freeze::Section section = shipped_section("checks/" + check);
  section.probes.clear();
  for (const EndOfFreezing& k : known) section.probes.push_back(k.depth);
  return section;
}

void compare_ends(double accuracy) {
  const auto check = GENERATE(as<std::string>{}, "p1", "p2", "p3", "p4", "p5");
  const std::vector<EndOfFreezing> known = known_ends(check);
  freeze::Section section = check_section(check, known);
  section.accuracy = accuracy;
  const freeze::Result result = freeze::run(section);
  for (std::size_t k = 0; k < known.size(); ++k) {
    const double found = result.probes[k].value.end, error = found / known[k].time - 1;
    CAPTURE(check, known[k].depth, known[k].time, found, error, result.probes[k].error.end);
    CHECK(std::abs(found - known[k].time) <= accuracy * known[k].time + known[k].uncertainty);
  }
}

/// A cooling curve and how far palier may lie from it [K].
struct Curve {
  std::string check, column;
  double depth;  // [m]
  double tolerance;
};

}  // namespace

TEST_CASE("Check cases: end of freezing at all depths within 0.1 % at default accuracy", "[published][check]") {
  REQUIRE(shipped_section("checks/p1").accuracy == 1e-3);
  compare_ends(1e-3);
}

TEST_CASE("Check cases: end of freezing at all depths within 0.01 % where that is asked for", "[published][check]") {
  compare_ends(1e-4);
}

TEST_CASE("Check cases: cooling curves at surface and center", "[published][check]") {
  const auto curve = GENERATE(values<Curve>({{"p1", "center_K", 0.020, 1},
                                             {"p1", "surface_K", 0, 1},
                                             {"p2", "center_K", 0.025, 1},
                                             {"p2", "surface_K", 0, 1},
                                             {"p3", "center_K", 0.030, 2},
                                             {"p3", "surface_K", 0, 2},
                                             {"p4", "center_K", 0.050, 1},
                                             {"p4", "surface_K", 0, 1},
                                             {"p5", "at_100mm_K", 0.100, 2},
                                             {"p5", "at_25mm_K", 0.025, 2}}));
  const ReferenceTable table = reference_table(curve.check + "_cooling.csv");
  const std::vector<double> time = table.column("time_s"), known = table.column(curve.column);
  freeze::Section section = shipped_section("checks/" + curve.check);
  section.probes = {curve.depth};
  // On past the end of freezing, to the end of the known curve; a row is recorded at each of its times.
  section.stop.below = 1.0;
  section.stop.after = time.back();
  section.record_every = time.front();
  const freeze::Result result = freeze::run(section);
  REQUIRE(result.history.time.size() == time.size() + 1);  // the first row is at time 0
  double worst = 0, worst_time = 0;
  for (std::size_t k = 0; k < time.size(); ++k) {
    REQUIRE(result.history.time[k + 1] == Approx(time[k]).epsilon(1e-12));
    const double error = std::abs(result.history.probe_temperature[k + 1] - known[k]);
    if (!(error <= worst)) {
      worst = error;
      worst_time = time[k];
    }
  }
  CAPTURE(curve.check, curve.column, worst, worst_time);
  CHECK(worst <= curve.tolerance);
}

TEST_CASE("Check case P5: depth of the solid follows Neumann's front", "[published][check]") {
  const std::vector<EndOfFreezing> known = known_ends("p5");
  freeze::Section section = check_section("p5", known);
  section.record_every = 0.5;
  const freeze::History h = freeze::run(section).history;
  // The front goes with the root of time, so that one of its exact times gives all its places.
  const double per_root = known.front().depth / std::sqrt(known.front().time);
  double worst = 0, worst_time = 0;
  for (std::size_t row = 1; row < h.time.size(); ++row) {
    const double error = std::abs(h.solidus_depth[row] - per_root * std::sqrt(h.time[row]));
    if (error <= worst) continue;
    worst = error;
    worst_time = h.time[row];
  }
  CAPTURE(worst_time);
  CHECK(worst <= 1e-3 * known.front().depth);
}
