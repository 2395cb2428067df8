#include "stable_regions.hpp"

#include <algorithm>
#include <cmath>

namespace palier::alloy {
namespace {

/// A sampled composition.
struct Sample {
  double y, mixing, z;  ///< mixing: y ln y + (1 - y) ln(1 - y)
};

/// Even in y, and closer together by decades toward both end members.
std::vector<Sample> make_samples() {
  constexpr int kEven = 100;
  std::vector<double> y;
  for (const double small : {1e-6, 1e-5, 1e-4, 1e-3, 3e-3}) y.insert(y.end(), {small, 1 - small});
  for (int i = 1; i < kEven; ++i) y.push_back(static_cast<double>(i) / kEven);
  std::sort(y.begin(), y.end());
  constexpr double kEndZ = 16;  // a share of 1e-7
  std::vector<Sample> samples{{0, 0, -kEndZ}};
  for (const double v : y) samples.push_back({v, v * std::log(v) + (1 - v) * std::log(1 - v), std::log(v / (1 - v))});
  samples.push_back({1, 0, kEndZ});
  return samples;
}

const std::vector<Sample>& all_samples() {
  static const std::vector<Sample> samples = make_samples();
  return samples;
}

struct HullPoint {
  double x, G, z;
  std::size_t phase;
  double number;  ///< of the sample, with halves between samples
};

/// Below or on the line from a to c, the point b is not needed by the hull.
bool above_line(const HullPoint& a, const HullPoint& b, const HullPoint& c) {
  return (b.G - a.G) * (c.x - a.x) >= (c.G - a.G) * (b.x - a.x);
}

/// The same phase without a gap from a to b?
bool continuous(const HullPoint& a, const HullPoint& b) { return a.phase == b.phase && b.number - a.number <= 1; }

std::vector<HullPoint> lower_hull(std::vector<HullPoint>& points) {
  std::sort(points.begin(), points.end(),
            [](const HullPoint& a, const HullPoint& b) { return a.x < b.x || (a.x == b.x && a.G < b.G); });
  std::vector<HullPoint> hull;
  for (const HullPoint& p : points) {
    if (!hull.empty() && p.x - hull.back().x < 1e-14) {  // one composition in two phases
      if (p.G >= hull.back().G) continue;
      hull.pop_back();
    }
    while (hull.size() > 1 && above_line(hull[hull.size() - 2], hull.back(), p)) hull.pop_back();
    hull.push_back(p);
  }
  return hull;
}

/// A line over the mole fraction.
struct Line {
  double x, G, slope;
  double operator()(double at) const { return G + slope * (at - x); }
};

class Sampling {
 public:
  Sampling(const Phases& phases, double T) : phases_(phases), T_(T) {
    const std::vector<Sample>& samples = all_samples();
    points_.reserve(phases.size() * samples.size() + phases.size());
    for (std::size_t p = 0; p < phases.size(); ++p) {
      energy_.push_back(energy_at(phases[p], T));
      sampled_.emplace_back();
      const IsothermalEnergy& G = energy_[p];
      if (G.fixed_composition()) {
        points_.push_back({G.first_x(), G.first(), 0, p, 0});
        continue;
      }
      for (std::size_t i = 0; i < samples.size(); ++i) {
        const Sample& s = samples[i];
        const double x = G.first_x() + s.y * (G.second_x() - G.first_x());
        points_.push_back({x, G.value(s.y, s.mixing), s.z, p, static_cast<double>(i)});
        sampled_[p].push_back(points_.back());
      }
    }
  }

  /// The hull, with points added until no phase dips below it between samples.
  std::vector<HullPoint> refined_hull() {
    constexpr int kRounds = 20;
    std::vector<HullPoint> hull = lower_hull(points_);
    for (int round = 0; round < kRounds && add_dips(hull); ++round) hull = lower_hull(points_);
    return hull;
  }

 private:
  bool add_dips(const std::vector<HullPoint>& hull) {
    const std::size_t before = points_.size();
    for (std::size_t i = 1; i < hull.size(); ++i)
      if (!continuous(hull[i - 1], hull[i]))
        if (const auto line = tangent(hull[i - 1], hull[i]))
          for (std::size_t p = 0; p < energy_.size(); ++p) add_dips_of(p, *line);
    return points_.size() > before;
  }

  std::optional<Line> tangent(const HullPoint& a, const HullPoint& b) const {
    const auto found = touch(phases_, {T_, {{a.phase, a.z}, {b.phase, b.z}}}, Condition::two_phases);
    if (!found) return std::nullopt;
    const Contact &c = found->contacts[0], &d = found->contacts[1];
    if (c.x == d.x) return std::nullopt;
    const double G = energy(c.phase, c.z);
    return Line{c.x, G, (energy(d.phase, d.z) - G) / (d.x - c.x)};
  }

  double energy(std::size_t phase, double z) const {
    const IsothermalEnergy& G = energy_[phase];
    if (G.fixed_composition()) return G.first();
    const Tangent t = G.tangent(z);
    return t.first / (1 + std::exp(z)) + t.second / (1 + std::exp(-z));
  }

  void add_dips_of(std::size_t phase, const Line& line) {
    constexpr double kNear = 20;     // [J/mol] that a phase may dip between samples
    constexpr double kBelow = 1e-7;  // [J/mol] far above rounding
    const std::vector<HullPoint>& s = sampled_[phase];
    const auto excess = [&](std::size_t i) { return s[i].G - line(s[i].x); };
    for (std::size_t i = 1; i + 1 < s.size(); ++i) {
      if (excess(i) > kNear || excess(i) > excess(i - 1) || excess(i) > excess(i + 1)) continue;
      const double z = parallel(phase, s[i].z, line), x = energy_[phase].x(z), G = energy(phase, z);
      if (x > s[i - 1].x && x < s[i + 1].x && x != s[i].x && G < line(x) - kBelow)
        points_.push_back({x, G, z, phase, s[i].number + (x > s[i].x ? 0.5 : -0.5)});
    }
  }

  /// Where the phase's tangent is parallel to the line, by Newton's method in z.
  double parallel(std::size_t phase, double z, const Line& line) const {
    const IsothermalEnergy& G = energy_[phase];
    constexpr int kIterations = 20;
    for (int i = 0; i < kIterations; ++i) {
      const Tangent t = G.tangent(z);
      const double miss = t.second - t.first - line.slope * (G.second_x() - G.first_x());
      const double step = std::clamp(-miss / (t.second_slope - t.first_slope), -1.0, 1.0);
      z += step;
      if (std::abs(step) < 1e-12) break;
    }
    return z;
  }

  const Phases& phases_;
  double T_;
  std::vector<IsothermalEnergy> energy_;
  std::vector<HullPoint> points_;
  std::vector<std::vector<HullPoint>> sampled_;  ///< of each phase, by rising mole fraction
};

}  // namespace

std::vector<StableRegion> stable_regions(const Phases& phases, double T) {
  const std::vector<HullPoint> hull = Sampling(phases, T).refined_hull();
  std::vector<StableRegion> regions;
  for (std::size_t i = 0; i < hull.size(); ++i) {
    if (i > 0 && continuous(hull[i - 1], hull[i]))
      regions.back().high_z = hull[i].z;
    else
      regions.push_back({hull[i].phase, hull[i].z, hull[i].z});
  }
  return regions;
}

}  // namespace palier::alloy
