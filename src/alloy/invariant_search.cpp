#include "invariant_search.hpp"

#include <algorithm>
#include <boost/math/tools/roots.hpp>
#include <cmath>
#include <limits>

#include "palier/base/error.hpp"
#include "stable_regions.hpp"

namespace palier::alloy {
namespace {

constexpr double kScanStep = 5;     // [K] of the scan for changes
constexpr double kNarrow = 0.01;    // [K] within which a change is one change
constexpr double kSampling = 1;     // [K] by which sampling may misplace a change, with room to spare
constexpr std::size_t kLiquid = 0;  // index of the liquid

using Regions = std::vector<StableRegion>;

bool same_phases(const Regions& a, const Regions& b) {
  return std::equal(a.begin(), a.end(), b.begin(), b.end(),
                    [](const StableRegion& p, const StableRegion& q) { return p.phase == q.phase; });
}

/// Is `shorter` what `longer` is without `count` regions from `first` on?
bool same_without(const Regions& longer, std::size_t first, std::size_t count, const Regions& shorter) {
  Regions rest = longer;
  const auto begin = rest.begin() + static_cast<std::ptrdiff_t>(first);
  rest.erase(begin, begin + static_cast<std::ptrdiff_t>(count));
  return same_phases(rest, shorter);
}

/// Two neighboring temperatures with different equilibria.
struct Change {
  double hot, cold;
  const Regions& hot_regions;
  const Regions& cold_regions;
  double middle() const { return 0.5 * (hot + cold); }
};

std::string name_of_reaction(std::size_t left, std::size_t middle, std::size_t right, bool appears) {
  const int liquids = (left == kLiquid ? 1 : 0) + (right == kLiquid ? 1 : 0);
  if (appears) return middle == kLiquid ? "" : (liquids == 2 ? "syntectic" : "peritectic");
  if (middle != kLiquid) return liquids == 1 ? "metatectic" : "";
  return liquids == 0 ? "eutectic" : (liquids == 1 ? "monotectic" : "");
}

class StopSearch {
 public:
  StopSearch(const Phases& phases, double low, double high) : phases_(phases) {
    stops.push_back({BranchEnd::end_of_range, high, "", {}});
    stops.push_back({BranchEnd::first_melts, element_melting_point(phases, BaseElement::first, low, high), "", {}});
    stops.push_back({BranchEnd::second_melts, element_melting_point(phases, BaseElement::second, low, high), "", {}});
    const int steps = static_cast<int>(std::ceil((high - low) / kScanStep));
    double T = high;
    Regions regions = stable_regions(phases, T);
    for (int i = 1; i <= steps; ++i) {
      const double next = high - (high - low) * i / steps;
      Regions next_regions = stable_regions(phases, next);
      halve({T, next, regions, next_regions});
      T = next;
      regions = std::move(next_regions);
    }
    stops.push_back({BranchEnd::end_of_range, low, "", {}});
    std::stable_sort(stops.begin(), stops.end(),
                     [](const Stop& a, const Stop& b) { return a.temperature > b.temperature; });
  }

  std::vector<Stop> stops;

 private:
  void halve(const Change& change) {
    if (same_phases(change.hot_regions, change.cold_regions)) return;
    if (change.hot - change.cold < kNarrow) {
      if (!understood(change))
        throw base::NoSolution("the equilibria change in an unknown way near " + std::to_string(change.middle()) +
                               " K");
      return;
    }
    const double middle = change.middle();
    const Regions regions = stable_regions(phases_, middle);
    halve({change.hot, middle, change.hot_regions, regions});
    halve({middle, change.cold, regions, change.cold_regions});
  }

  bool understood(const Change& change) {
    const bool appears = change.cold_regions.size() > change.hot_regions.size();
    const Regions& longer = appears ? change.cold_regions : change.hot_regions;
    const Regions& shorter = appears ? change.hot_regions : change.cold_regions;
    const std::size_t n = longer.size();
    for (std::size_t i = 1; n == shorter.size() + 1 && i + 1 < n; ++i)
      if (same_without(longer, i, 1, shorter) && three_phases(longer, i, change.middle(), appears)) return true;
    for (std::size_t i = 1; n == shorter.size() + 2 && i + 1 < n; ++i)
      if (longer[i - 1].phase == longer[i + 1].phase && same_without(longer, i, 2, shorter) &&
          congruent(longer, i, change.middle()))
        return true;
    return without_liquid(change) || at_melting_point(change) || gap_closes(longer, shorter);
  }

  bool three_phases(const Regions& regions, std::size_t i, double T, bool appears) {
    const StableRegion &left = regions[i - 1], &middle = regions[i], &right = regions[i + 1];
    const bool liquid = left.phase == kLiquid || middle.phase == kLiquid || right.phase == kLiquid;
    const std::string reaction = name_of_reaction(left.phase, middle.phase, right.phase, appears);
    if (liquid && reaction.empty()) return false;
    const auto found = touch(
        phases_,
        {T,
         {{left.phase, left.high_z}, {middle.phase, 0.5 * (middle.low_z + middle.high_z)}, {right.phase, right.low_z}}},
        Condition::three_phases);
    if (!found || std::abs(found->temperature - T) > kSampling) return false;
    const auto& c = found->contacts;
    if (!(c[0].x < c[1].x && c[1].x < c[2].x)) return false;
    if (liquid) stops.push_back({BranchEnd::invariant, found->temperature, reaction, c});
    return true;
  }

  bool congruent(const Regions& regions, std::size_t i, double T) {
    const std::size_t a = regions[i].phase, b = regions[i - 1].phase;
    const double z = 0.5 * (regions[i].low_z + regions[i].high_z);
    double other_z = 0.5 * (regions[i - 1].high_z + regions[i + 1].low_z);
    const auto found = touch(phases_, {T, {{a, z}, {b, other_z}}}, Condition::congruent);
    if (!found || std::abs(found->temperature - T) > kSampling) return false;
    if (a == kLiquid || b == kLiquid)
      stops.push_back({BranchEnd::congruent, found->temperature, "congruent", found->contacts});
    return true;
  }

  /// The liquid's neighbors are the same before and after.
  static bool without_liquid(const Change& change) {
    return around_liquid(change.hot_regions) == around_liquid(change.cold_regions);
  }

  static std::vector<std::size_t> around_liquid(const Regions& regions) {
    constexpr std::size_t kNone = std::numeric_limits<std::size_t>::max();
    std::vector<std::size_t> phases;
    for (std::size_t i = 0; i < regions.size(); ++i)
      if (regions[i].phase == kLiquid) {
        phases.push_back(i > 0 ? regions[i - 1].phase : kNone);
        phases.push_back(i + 1 < regions.size() ? regions[i + 1].phase : kNone);
      }
    return phases;
  }

  bool at_melting_point(const Change& change) const {
    return std::any_of(stops.begin(), stops.end(), [&](const Stop& s) {
      return (s.kind == BranchEnd::first_melts || s.kind == BranchEnd::second_melts) &&
             std::abs(s.temperature - change.middle()) < kSampling;
    });
  }

  /// One more region of the same phase: the top or bottom of a miscibility gap.
  static bool gap_closes(const Regions& longer, const Regions& shorter) {
    for (std::size_t i = 1; longer.size() == shorter.size() + 1 && i < longer.size(); ++i)
      if (longer[i].phase == longer[i - 1].phase && same_without(longer, i, 1, shorter)) return true;
    return false;
  }

  const Phases& phases_;
};

/// Gibbs energy of a pure element in a phase; infinite where the phase has no such end.
double pure_energy(const SolidPhase& phase, BaseElement element, double T) {
  const IsothermalEnergy G = energy_at(phase, T);
  if (element == BaseElement::first) return G.first_x() == 0 ? G.first() : std::numeric_limits<double>::infinity();
  return G.second_x() == 1 ? G.second() : std::numeric_limits<double>::infinity();
}

}  // namespace

double element_melting_point(const Phases& phases, BaseElement element, double low, double high) {
  const auto excess_of_liquid = [&](double T) {
    double solid = std::numeric_limits<double>::infinity();
    for (std::size_t i = 1; i < phases.size(); ++i) solid = std::min(solid, pure_energy(phases[i], element, T));
    return pure_energy(phases[kLiquid], element, T) - solid;
  };
  const int steps = static_cast<int>(std::ceil((high - low) / kScanStep));
  double hot = high;
  for (int i = 1; i <= steps && excess_of_liquid(high) < 0; ++i) {
    const double cold = high - (high - low) * i / steps;
    if (excess_of_liquid(cold) >= 0) {
      std::uintmax_t iterations = 200;
      const auto root = boost::math::tools::toms748_solve(excess_of_liquid, cold, hot,
                                                          boost::math::tools::eps_tolerance<double>(50), iterations);
      return 0.5 * (root.first + root.second);
    }
    hot = cold;
  }
  throw base::InputError(std::string("the ") + (element == BaseElement::first ? "first" : "second") +
                         " element has no melting point between " + std::to_string(low) + " and " +
                         std::to_string(high) + " K");
}

std::vector<Stop> find_stops(const Phases& phases, double low, double high) {
  return StopSearch(phases, low, high).stops;
}

}  // namespace palier::alloy
