// What must hold of every run, whatever its case: all shipped cases, found when the tests run.
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <cstring>
#include <iostream>

#include "palier/freeze/run.hpp"
#include "published/shipped_cases.hpp"

using namespace palier;
using namespace palier::published;
using freeze::History;
using freeze::Reading;
using freeze::Result;
using freeze::Section;

namespace {

std::size_t metal_cells(const History& h) { return static_cast<std::size_t>(h.metal_end - h.metal_begin); }

/// Temperature of a cell of the metal in a row.
double metal_temperature(const History& h, std::size_t row, std::size_t cell) {
  return h.temperature[row * h.radius.size() + static_cast<std::size_t>(h.metal_begin) + cell];
}

/// Coldest and hottest of what the section starts from and what surrounds it [K].
std::pair<double, double> extremes(const Section& section) {
  std::vector<double> all{section.pouring_temperature};
  for (const freeze::Wall* wall : {&section.outside, section.inside ? &*section.inside : nullptr}) {
    if (!wall) continue;
    for (const freeze::WallLayer& layer : wall->layers) all.push_back(layer.start_temperature);
    if (wall->outer.kind == heat::Boundary::Kind::film || wall->outer.kind == heat::Boundary::Kind::fixed_temperature)
      all.push_back(wall->outer.temperature);
  }
  const auto [low, high] = std::minmax_element(all.begin(), all.end());
  return {*low, *high};
}

bool cooled_from_one_side(const Section& section) { return !section.inside; }

std::vector<Reading> all_readings(const Result& result) {
  std::vector<Reading> readings = result.by_depth;
  for (const freeze::ProbeReading& probe : result.probes) readings.push_back(probe.value);
  std::sort(readings.begin(), readings.end(), [](const Reading& a, const Reading& b) { return a.depth < b.depth; });
  return readings;
}

/// All times and errors that a run gives, in a fixed order.
std::vector<double> reading_numbers(const Result& result) {
  std::vector<double> numbers{result.solidification_time, result.solidification_time_error, result.last_to_freeze,
                              result.end_time};
  const auto add = [&](const Reading& r) {
    for (const double x : {r.depth, r.start, r.end, r.local_solidification_time}) numbers.push_back(x);
  };
  for (const freeze::ProbeReading& probe : result.probes) {
    add(probe.value);
    add(probe.error);
  }
  for (const Reading& r : result.by_depth) add(r);
  return numbers;
}

std::vector<std::vector<double>> history_numbers(const History& h) {
  return {h.time,           h.radius,        h.face,           h.temperature, h.fraction_solid, h.probe_temperature,
          h.probe_fraction, h.solidus_depth, h.liquidus_depth, h.mushy_width, h.surface_flux};
}

bool same_bytes(const std::vector<double>& a, const std::vector<double>& b) {
  return a.size() == b.size() && std::memcmp(a.data(), b.data(), a.size() * sizeof(double)) == 0;
}

bool same_number(double a, double b) {
  return (std::isnan(a) && std::isnan(b)) || std::abs(a - b) <= 1e-12 * std::max(std::abs(a), std::abs(b));
}

/// Fraction solid lost by a cell from one row to the next while it did not get hotter.
struct Fall {
  double by = 0, time = 0, temperature = 0;  // [1], [s], [K]
  std::size_t cell = 0;
};

Fall worst_fall(const History& h) {
  const std::size_t cells = metal_cells(h);
  Fall worst;
  for (std::size_t row = 1; row < h.time.size(); ++row)
    for (std::size_t cell = 0; cell < cells; ++cell) {
      const double by = h.fraction_solid[(row - 1) * cells + cell] - h.fraction_solid[row * cells + cell];
      const double temperature = metal_temperature(h, row, cell);
      if (by > worst.by && temperature <= metal_temperature(h, row - 1, cell))
        worst = {by, h.time[row], temperature, cell};
    }
  return worst;
}

/// Counts times of a coarse and a fine run that agree within the numerical errors they claim.
struct Agreement {
  int within = 0, all = 0;
  void count(const std::string& where, double coarse, double fine, double claimed) {
    if (std::isnan(coarse) && std::isnan(fine)) return;  // not reached in either
    ++all;
    if (std::abs(coarse - fine) <= claimed)
      ++within;
    else
      outside += "  " + where + ": " + std::to_string(coarse) + " s against " + std::to_string(fine) + " s, claimed " +
                 std::to_string(claimed) + " s\n";
  }
  std::string outside;
};

}  // namespace

TEST_CASE("Every case: the heat balance closes", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    CAPTURE(shipped.name);
    CHECK(freeze::run(shipped.section).heat_imbalance <= 1e-9);
  }
}

TEST_CASE("Every case: fraction solid stays within 0 and 1 and falls only where it gets hotter", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    const History h = freeze::run(shipped.section).history;
    CAPTURE(shipped.name);
    for (const std::vector<double>* fractions : {&h.fraction_solid, &h.probe_fraction}) {
      CHECK(*std::min_element(fractions->begin(), fractions->end()) >= 0);
      CHECK(*std::max_element(fractions->begin(), fractions->end()) <= 1);
    }
    const Fall worst = worst_fall(h);
    CAPTURE(worst.time, worst.cell, worst.temperature);
    // A step is solved to 1e-6 of the metal's heat (a tenth of its tolerance); what a cell ahead of a front loses and
    // regains within that is no melting.
    CHECK(worst.by <= 1e-6);
  }
}

TEST_CASE("Every case: no temperature beyond those at the start and around", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    const auto [low, high] = extremes(shipped.section);
    const History h = freeze::run(shipped.section).history;
    const auto [coldest, hottest] = std::minmax_element(h.temperature.begin(), h.temperature.end());
    const double allowed = 1e-6 * (high - low);  // round-off of the curves from enthalpy to temperature
    const std::size_t cells = h.radius.size();
    const auto cold_at = static_cast<std::size_t>(coldest - h.temperature.begin()),
               hot_at = static_cast<std::size_t>(hottest - h.temperature.begin());
    CAPTURE(shipped.name, low, high, h.time[cold_at / cells], h.radius[cold_at % cells], h.time[hot_at / cells],
            h.radius[hot_at % cells]);
    CHECK(*coldest >= low - allowed);
    CHECK(*hottest <= high + allowed);
    if (h.probe_temperature.empty()) continue;
    const auto [cold, hot] = std::minmax_element(h.probe_temperature.begin(), h.probe_temperature.end());
    CHECK(*cold >= low - allowed);
    CHECK(*hot <= high + allowed);
  }
}

TEST_CASE("Every case: freezing starts before it ends, from the surface inward", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    const Result result = freeze::run(shipped.section);
    const std::vector<Reading> readings = all_readings(result);
    CAPTURE(shipped.name);
    for (const Reading& r : readings) {
      CAPTURE(r.depth, r.start, r.end);
      CHECK((std::isfinite(r.end) || std::isnan(result.solidification_time)));  // all solid: each depth is
      CHECK((std::isnan(r.end) || r.start <= r.end));
      CHECK((std::isnan(r.end) || r.end <= result.end_time));
    }
    for (const freeze::ProbeReading& probe : result.probes) {
      CAPTURE(probe.value.depth, probe.value.end, probe.error.end);
      CHECK(std::isfinite(probe.value.end) == std::isfinite(probe.error.end));  // a time found has its error
    }
    if (!cooled_from_one_side(shipped.section)) continue;
    for (std::size_t k = 1; k < readings.size(); ++k) {
      CAPTURE(readings[k - 1].depth, readings[k - 1].end, readings[k].depth, readings[k].end);
      CHECK((std::isnan(readings[k].end) || readings[k].end >= readings[k - 1].end));
    }
    CHECK((std::isnan(result.solidification_time) ||
           result.last_to_freeze == Approx(shipped.section.depth()).epsilon(1e-9)));
  }
}

TEST_CASE("Every case: the last to freeze is the latest of all depths", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    const Result result = freeze::run(shipped.section);
    if (std::isnan(result.solidification_time)) continue;
    const std::vector<Reading> readings = all_readings(result);
    const auto latest = std::max_element(readings.begin(), readings.end(),
                                         [](const Reading& a, const Reading& b) { return a.end < b.end; });
    double widest = 0;  // cell of the metal
    for (int i = result.history.metal_begin; i < result.history.metal_end; ++i)
      widest = std::max(widest, result.history.face[static_cast<std::size_t>(i + 1)] -
                                    result.history.face[static_cast<std::size_t>(i)]);
    CAPTURE(shipped.name, latest->depth, latest->end, result.last_to_freeze, result.solidification_time, widest);
    CHECK(latest->end <= result.solidification_time * (1 + 1e-9));
    CHECK(std::abs(latest->depth - result.last_to_freeze) <= widest);
  }
}

TEST_CASE("Every case: the mush has a width and its ends lie within the section", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    const History h = freeze::run(shipped.section).history;
    const double depth = shipped.section.depth();
    CAPTURE(shipped.name, depth);
    CHECK(*std::min_element(h.mushy_width.begin(), h.mushy_width.end()) >= 0);
    CHECK(*std::max_element(h.mushy_width.begin(), h.mushy_width.end()) <= depth * (1 + 1e-12));
    double overlap = 0, overlap_time = 0;
    for (std::size_t row = 0; row < h.time.size(); ++row) {
      if (!(h.solidus_depth[row] - h.liquidus_depth[row] > overlap)) continue;
      overlap = h.solidus_depth[row] - h.liquidus_depth[row];
      overlap_time = h.time[row];
    }
    CAPTURE(overlap_time);
    CHECK(overlap <= 1e-9 * depth);  // it is solid no deeper than freezing has started
    CHECK(*std::min_element(h.solidus_depth.begin(), h.solidus_depth.end()) >= 0);
    CHECK(*std::max_element(h.liquidus_depth.begin(), h.liquidus_depth.end()) <= depth * (1 + 1e-12));
  }
}

TEST_CASE("Every case: run twice, the same bytes", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    const Result first = freeze::run(shipped.section), second = freeze::run(shipped.section);
    CAPTURE(shipped.name);
    CHECK(same_bytes(reading_numbers(first), reading_numbers(second)));
    const auto rows = history_numbers(first.history), again = history_numbers(second.history);
    for (std::size_t k = 0; k < rows.size(); ++k) {
      CAPTURE(k);
      CHECK(same_bytes(rows[k], again[k]));
    }
  }
}

TEST_CASE("Every case: how often it is recorded changes no reading", "[invariant]") {
  for (const ShippedCase& shipped : shipped_cases()) {
    Section often = shipped.section, seldom = shipped.section;
    often.record_every = 1;
    seldom.record_every = 17;
    const std::vector<double> a = reading_numbers(freeze::run(often)), b = reading_numbers(freeze::run(seldom));
    REQUIRE(a.size() == b.size());
    for (std::size_t k = 0; k < a.size(); ++k) {
      CAPTURE(shipped.name, k, a[k], b[k]);
      CHECK(same_number(a[k], b[k]));
    }
  }
}

TEST_CASE("Every case: coarse and fine runs agree within the numerical errors they claim", "[invariant]") {
  Agreement agreement;
  for (const ShippedCase& shipped : shipped_cases()) {
    Section coarse_section = shipped.section, fine_section = shipped.section;
    coarse_section.accuracy = 1e-3;
    fine_section.accuracy = 2e-4;
    const Result coarse = freeze::run(coarse_section), fine = freeze::run(fine_section);
    agreement.count(shipped.name + ", whole", coarse.solidification_time, fine.solidification_time,
                    coarse.solidification_time_error + fine.solidification_time_error);
    for (std::size_t k = 0; k < coarse.probes.size(); ++k) {
      const freeze::ProbeReading &a = coarse.probes[k], &b = fine.probes[k];
      const std::string where = shipped.name + ", probe " + std::to_string(k + 1);
      agreement.count(where + " start", a.value.start, b.value.start, a.error.start + b.error.start);
      agreement.count(where + " end", a.value.end, b.value.end, a.error.end + b.error.end);
    }
  }
  const double share = static_cast<double>(agreement.within) / agreement.all;
  std::cout << "numerical errors claimed at 0.1 % hold for " << agreement.within << " of " << agreement.all
            << " times (" << 100 * share << " %); outside:\n"
            << agreement.outside;
  REQUIRE(agreement.all > 100);
  CHECK(share >= 0.8);
}
