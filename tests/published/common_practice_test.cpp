// What every foundry knows of cooling curves. Common practice, no published source.
#include <catch2/catch.hpp>
#include <cmath>

#include "palier/freeze/run.hpp"
#include "published/shipped_cases.hpp"

using namespace palier;

namespace {

/// Time the last probe's curve spends within `band` of a temperature, as a share of the run.
double share_near(const freeze::Result& result, double temperature, double band) {
  const freeze::History& h = result.history;
  const std::size_t probes = result.probes.size();
  double near = 0;
  for (std::size_t row = 1; row < h.time.size(); ++row)
    if (std::abs(h.probe_temperature[row * probes + probes - 1] - temperature) <= band)
      near += h.time[row] - h.time[row - 1];
  return near / h.time.back();
}

}  // namespace

TEST_CASE("A pure metal's cooling curve shows a flat arrest at its melting point", "[published][practice]") {
  const freeze::Section s = published::shipped_section("checks/p1");
  const freeze::Result result = freeze::run(s);
  // At the center, where the arrest lasts until the front arrives.
  const double arrest = result.probes.back().value.local_solidification_time / result.end_time;
  CHECK(arrest > 0.9);
  CHECK(share_near(result, s.path->liquidus(), 0.1) > 0.9 * arrest);
  // ... and nothing like it 20 K above.
  CHECK(share_near(result, s.path->liquidus() + 20, 0.1) < 0.01);
}

TEST_CASE("An alloy freezes over a range that starts below the pure metal's melting point", "[published][practice]") {
  const double pure = published::shipped_section("checks/p1").path->liquidus();
  const freeze::Section s = published::shipped_section("checks/p4");
  const freeze::Section aluminum = published::shipped_section("checks/p2");
  CHECK(aluminum.path->liquidus() < pure);
  CHECK(s.path->freezing_range() > 10);
  const freeze::Result result = freeze::run(s);
  // The center goes through the range without stopping: it is near no temperature of it for long.
  for (double T = s.path->end_of_freezing() + 5; T < s.path->liquidus() - 5; T += 5)
    CHECK(share_near(result, T, 0.1) < 0.05);
}
