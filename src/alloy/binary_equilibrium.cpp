#include "palier/alloy/binary_equilibrium.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "common_tangent.hpp"
#include "invariant_search.hpp"
#include "palier/base/error.hpp"
#include "stable_regions.hpp"

namespace palier::alloy {
namespace {

constexpr std::size_t kLiquid = 0;  // index of the liquid

/// The tangent between neighboring regions i and i + 1.
CommonTangent tangent_between(const Phases& phases, const std::vector<StableRegion>& regions, std::size_t i, double T) {
  const StableRegion &a = regions[i], &b = regions[i + 1];
  const auto found = touch(phases, {T, {{a.phase, a.high_z}, {b.phase, b.low_z}}}, Condition::two_phases);
  if (!found)
    throw base::NoSolution("no equilibrium found between " + name_of(phases[a.phase]) + " and " +
                           name_of(phases[b.phase]) + " at " + std::to_string(T) + " K");
  return *found;
}

/// A branch with the indices by which it is traced.
struct Piece {
  std::size_t solid;
  BranchEnd hot_end, cold_end;
  std::vector<BranchPoint> points;
};

/// Traces lines between liquid and solid from stop to stop.
class BranchTracer {
 public:
  BranchTracer(const BinarySystem& system, const Phases& phases) : system_(system), phases_(phases) {}

  void stretch(const Stop& hot, const Stop& cold) {
    constexpr double kShortest = 1e-6;  // [K]
    if (hot.temperature - cold.temperature < kShortest) return;
    const double middle = 0.5 * (hot.temperature + cold.temperature);
    const auto regions = stable_regions(phases_, middle);
    for (std::size_t i = 0; i + 1 < regions.size(); ++i)
      if ((regions[i].phase == kLiquid) != (regions[i + 1].phase == kLiquid))
        append(trace(tangent_between(phases_, regions, i, middle), hot, cold));
  }

  std::vector<Piece> pieces;

 private:
  Piece trace(const CommonTangent& middle, const Stop& hot, const Stop& cold) const {
    constexpr double kSpacing = 0.5;  // [K], between points
    constexpr double kFewest = 32, kMost = 400;
    const int half =
        static_cast<int>(std::clamp(std::ceil((hot.temperature - cold.temperature) / kSpacing), kFewest, kMost) / 2);
    Piece piece{solid_of(middle), hot.kind, cold.kind, {}};
    piece.points = walk(middle, hot, half);
    std::reverse(piece.points.begin(), piece.points.end());
    piece.points.push_back(point(middle));
    const auto down = walk(middle, cold, half);
    piece.points.insert(piece.points.end(), down.begin(), down.end());
    return piece;
  }

  /// Points from the middle of a stretch, without it, to the stop at its end.
  std::vector<BranchPoint> walk(CommonTangent at, const Stop& stop, int steps) const {
    const double start = at.temperature, step = (stop.temperature - start) / steps;
    std::vector<BranchPoint> points;
    for (int i = 1; i <= steps; ++i) {
      if (i == steps)
        if (const auto end = special_end(at, stop, step)) {
          points.push_back(*end);
          break;
        }
      const double T = i == steps ? stop.temperature : start + i * step;
      const auto next = touch(phases_, {T, at.contacts}, Condition::two_phases);
      if (!next)
        throw base::NoSolution("the line of " + name_of(phases_[solid_of(at)]) + " and liquid is lost at " +
                               std::to_string(T) + " K");
      at = *next;
      points.push_back(point(at));
    }
    return points;
  }

  /// The end of a branch at a pure element or a congruent point, where it runs into one.
  std::optional<BranchPoint> special_end(const CommonTangent& at, const Stop& stop, double step) const {
    const std::size_t solid = solid_of(at);
    const double x = at.contacts[liquid_of(at)].x, ahead = x + step * at.contacts[liquid_of(at)].x_slope;
    if (stop.kind == BranchEnd::first_melts && ahead < 0.2 * x) return pure_end(solid, BaseElement::first, stop);
    if (stop.kind == BranchEnd::second_melts && 1 - ahead < 0.2 * (1 - x))
      return pure_end(solid, BaseElement::second, stop);
    if (stop.kind == BranchEnd::congruent) {
      const bool takes_part = stop.phases[0].phase == solid || stop.phases[1].phase == solid;
      constexpr double kNear = 0.15;  // the lines run into the point like a parabola
      const double end = stop.phases[0].x, infinite = std::numeric_limits<double>::infinity();
      if (takes_part && std::abs(x - end) < kNear)
        return with_percent({stop.temperature, end, end, infinite, infinite, 0, 0});
    }
    return std::nullopt;
  }

  /// Slopes where the liquid becomes a pure element: van 't Hoff's law with the partition coefficient of infinite
  /// dilution.
  BranchPoint pure_end(std::size_t solid, BaseElement element, const Stop& stop) const {
    constexpr double kDilute = 60;  // |z|; R T z falls out of the difference
    const bool first = element == BaseElement::first;
    const double T = stop.temperature, z = first ? -kDilute : kDilute, RT = kGasConstant * T;
    const IsothermalEnergy liquid = energy_at(phases_[kLiquid], T), other = energy_at(phases_[solid], T);
    double k = 0;
    if (!other.fixed_composition()) {
      const Tangent l = liquid.tangent(z), s = other.tangent(z);
      k = std::exp((first ? l.second - s.second : l.first - s.first) / RT);
    }
    const double h = 1e-3;  // [K]; the entropies of two pure phases hardly change within it
    const auto difference = [&](double t) {
      const IsothermalEnergy a = energy_at(phases_[kLiquid], t), b = energy_at(phases_[solid], t);
      return first ? a.first() - b.first() : a.second() - b.second();
    };
    const double dG = (difference(T + h) - difference(T - h)) / (2 * h);
    const double slope = dG / (RT * (1 - k)) * (first ? 1 : -1);
    const double x = first ? 0 : 1;
    return with_percent({T, x, x, slope, k * slope, 0, 0});
  }

  BranchPoint point(const CommonTangent& at) const {
    const Contact &l = at.contacts[liquid_of(at)], &s = at.contacts[1 - liquid_of(at)];
    return with_percent({at.temperature, l.x, s.x, l.x_slope, s.x_slope, 0, 0});
  }

  BranchPoint with_percent(BranchPoint p) const {
    p.liquid_percent = system_.mass_percent(p.liquid);
    p.solid_percent = system_.mass_percent(p.solid);
    return p;
  }

  /// Joins a piece to the one that it continues, if any.
  void append(Piece&& piece) {
    const BranchPoint& top = piece.points.front();
    constexpr double kSame = 1e-7;
    for (Piece& p : pieces) {
      const BranchPoint& end = p.points.back();
      if (p.solid != piece.solid || std::abs(end.temperature - top.temperature) > kSame ||
          std::abs(end.liquid - top.liquid) > kSame || std::abs(end.solid - top.solid) > kSame ||
          std::isinf(top.liquid_slope))
        continue;
      p.points.insert(p.points.end(), piece.points.begin() + 1, piece.points.end());
      p.cold_end = piece.cold_end;
      return;
    }
    pieces.push_back(std::move(piece));
  }

  static std::size_t liquid_of(const CommonTangent& at) { return at.contacts[0].phase == kLiquid ? 0 : 1; }
  static std::size_t solid_of(const CommonTangent& at) { return at.contacts[1 - liquid_of(at)].phase; }

  const BinarySystem& system_;
  const Phases& phases_;
};

PhaseAt phase_at(const BinarySystem& system, const Phases& phases, const Contact& c) {
  return {name_of(phases[c.phase]), c.x, system.mass_percent(c.x)};
}

BinaryInvariant invariant_of(const BinarySystem& system, const Phases& phases, const Stop& stop) {
  BinaryInvariant invariant{stop.reaction, stop.temperature, {}};
  for (const Contact& c : stop.phases) invariant.phases.push_back(phase_at(system, phases, c));
  return invariant;
}

}  // namespace

double BinarySystem::mass_percent(double x) const {
  const double first_mass = (1 - x) * first_weight, second_mass = x * second_weight;
  return 100 * second_mass / (first_mass + second_mass);
}

double BinarySystem::mass_percent_slope(double x) const {
  const double mass = (1 - x) * first_weight + x * second_weight;
  return 100 * first_weight * second_weight / (mass * mass);
}

std::vector<TwoPhases> equilibria_at(const BinarySystem& system, double T) {
  const Phases phases = phases_of(system);
  const auto regions = stable_regions(phases, T);
  std::vector<TwoPhases> all;
  for (std::size_t i = 0; i + 1 < regions.size(); ++i) {
    const CommonTangent t = tangent_between(phases, regions, i, T);
    all.push_back({phase_at(system, phases, t.contacts[0]), phase_at(system, phases, t.contacts[1])});
  }
  return all;
}

BinaryEquilibrium binary_equilibrium(const BinarySystem& system, double low, double high) {
  if (!(low > 0 && low < high)) throw base::InputError("the range of temperature must rise from above 0 K");
  if (!(system.first_weight > 0 && system.second_weight > 0)) throw base::InputError("atomic weights must be positive");
  const Phases phases = phases_of(system);
  const std::vector<Stop> stops = find_stops(phases, low, high);
  BinaryEquilibrium result{};
  BranchTracer tracer(system, phases);
  for (std::size_t i = 0; i < stops.size(); ++i) {
    if (i > 0) tracer.stretch(stops[i - 1], stops[i]);
    if (stops[i].kind == BranchEnd::first_melts) result.first_melting_point = stops[i].temperature;
    if (stops[i].kind == BranchEnd::second_melts) result.second_melting_point = stops[i].temperature;
    if (!stops[i].phases.empty()) result.invariants.push_back(invariant_of(system, phases, stops[i]));
  }
  for (Piece& p : tracer.pieces)
    result.branches.push_back({name_of(phases[p.solid]), p.hot_end, p.cold_end, std::move(p.points)});
  return result;
}

}  // namespace palier::alloy
