#include "palier/alloy/enthalpy_curve.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>

#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

constexpr int kPieces = 128;                // of a curved zone: cubic, so the error is of order 1e-8 of its range
constexpr std::size_t kNodes = 256;         // of the integration over temperature
constexpr double kBoilingPoint = 373.15;    // [K] water at 1 atm; CRC Handbook of Chemistry and Physics
constexpr double kHeatOfBoiling = 2.257e6;  // [J/kg] water at 100 degC; CRC Handbook of Chemistry and Physics

using Function = std::function<double(double)>;

/// Three-point Gauss-Legendre quadrature.
double integrate(const Function& f, double a, double b) {
  const double mid = 0.5 * (a + b), half = 0.5 * (b - a), x = half * std::sqrt(0.6);
  return half * (5 * f(mid - x) + 8 * f(mid) + 5 * f(mid + x)) / 9;
}

/// One stretch of temperature without arrests, with what is known of it as functions of temperature.
struct Region {
  double low, high;   ///< [K]
  bool linear;        ///< constant heat capacity and conductivity, one phase
  Function capacity;  ///< rho * cp of the mixture, without latent heat [J/m3/K]
  Function latent;    ///< rho * L * fraction liquid [J/m3]
  Function conductivity;
  Function fraction;  ///< solid
};

/// Slope of f at x within [low, high], second order, never looking outside.
double slope(const Function& f, double x, double low, double high) {
  const double d = 1e-5 * (high - low);
  if (x - d < low) return (-3 * f(x) + 4 * f(x + d) - f(x + 2 * d)) / (2 * d);
  if (x + d > high) return (3 * f(x) - 4 * f(x - d) + f(x - 2 * d)) / (2 * d);
  return (f(x + d) - f(x - d)) / (2 * d);
}

/// Enthalpy over a region by cumulative integration, and its inverse.
class RegionEnthalpy {
 public:
  explicit RegionEnthalpy(const Region& r) : region_(r), sensible_(kNodes + 1, 0.0), total_(kNodes + 1) {
    for (std::size_t i = 0; i <= kNodes; ++i) {
      if (i > 0) sensible_[i] = sensible_[i - 1] + integrate(r.capacity, node(i - 1), node(i));
      total_[i] = sensible_[i] + r.latent(node(i)) - r.latent(r.low);
      if (i > 0 && !(total_[i] > total_[i - 1]))
        throw base::InputError(
            "the enthalpy does not rise with temperature: heat capacity, latent heat and path disagree");
    }
  }
  double rise() const { return total_.back(); }
  /// Temperature at which the enthalpy has risen by h since the low end.
  double temperature(double h) const {
    if (h <= 0) return region_.low;
    if (h >= total_.back()) return region_.high;
    const auto i = static_cast<std::size_t>(std::upper_bound(total_.begin(), total_.end(), h) - total_.begin()) - 1;
    double a = node(i), b = node(i + 1), fa = total_[i] - h, fb = total_[i + 1] - h;
    double T = a;
    for (int iteration = 0; iteration < 60; ++iteration) {  // regula falsi, Illinois
      const double next = b - fb * (b - a) / (fb - fa);
      const double f = at(i, next) - h;
      if (std::abs(next - T) <= 1e-14 * next || f == 0) return next;
      T = next;
      if ((f > 0) == (fb > 0)) {
        fa *= 0.5;
      } else {
        a = b;
        fa = fb;
      }
      b = next;
      fb = f;
    }
    return T;
  }

 private:
  double node(std::size_t i) const {
    return region_.low + (region_.high - region_.low) * static_cast<double>(i) / static_cast<double>(kNodes);
  }
  double at(std::size_t i, double T) const {
    return sensible_[i] + integrate(region_.capacity, node(i), T) + region_.latent(T) - region_.latent(region_.low);
  }
  const Region& region_;
  std::vector<double> sensible_, total_;
};

/// Cubic through values and slopes at u = 0 and 1; slopes limited so that it stays monotone (Fritsch & Carlson, SIAM J.
/// Numer. Anal. 17 (1980) 238).
std::array<double, 4> monotone_cubic(double y0, double y1, double s0, double s1) {
  const double rise = y1 - y0;
  s0 = std::clamp(s0, 0.0, 3 * rise);
  s1 = std::clamp(s1, 0.0, 3 * rise);
  return {y0, s0, 3 * rise - 2 * s0 - s1, -2 * rise + s0 + s1};
}

}  // namespace

/// Appends zones from cold to hot.
class EnthalpyCurve::Builder {
 public:
  explicit Builder(EnthalpyCurve& curve) : c_(curve) {}

  void region(const Region& r) {
    const RegionEnthalpy enthalpy(r);
    const int n = r.linear ? 1 : kPieces;
    const double spacing = enthalpy.rise() / n;
    if (c_.zones_.empty()) extension(r.low, r);
    c_.zones_.push_back({H_, 1 / spacing, c_.theta_.size(), n});
    double T0 = r.low;
    double slope0 = temperature_slope(r, T0);
    for (int i = 0; i < n; ++i) {
      const double T1 = i + 1 == n ? r.high : enthalpy.temperature(spacing * (i + 1));
      const double slope1 = temperature_slope(r, T1);
      const double k0 = r.conductivity(T0), k1 = r.conductivity(T1);
      const double theta1 = theta_at_ + integrate(r.conductivity, T0, T1);
      c_.theta_.push_back(monotone_cubic(theta_at_, theta1, spacing * k0 * slope0, spacing * k1 * slope1));
      c_.ends_.push_back(
          {monotone_cubic(T0, T1, spacing * slope0, spacing * slope1), k0, k1, r.fraction(T0), r.fraction(T1)});
      theta_at_ = theta1;
      T0 = T1;
      slope0 = slope1;
    }
    H_ += enthalpy.rise();
  }

  void arrest(double T, double heat, double k_cold, double k_hot, double f_cold, double f_hot) {
    c_.zones_.push_back({H_, 1 / heat, c_.theta_.size(), 1});
    c_.theta_.push_back({theta_at_, 0, 0, 0});
    c_.ends_.push_back({{T, 0, 0, 0}, k_cold, k_hot, f_cold, f_hot});
    c_.arrests_.push_back({T, H_, H_ + heat, f_hot, f_cold});
    c_.kinks_.push_back(H_);
    c_.kinks_.push_back(H_ + heat);
    H_ += heat;
  }

  /// The straight line beyond one end of the range.
  void extension(double T, const Region& r) {
    const double s = temperature_slope(r, T), k = r.conductivity(T), f = r.fraction(T);
    // One piece a kelvin wide; evaluated outside [0, 1] as well, which a straight line allows.
    c_.zones_.push_back({H_, s, c_.theta_.size(), 1});
    c_.theta_.push_back({theta_at_, k, 0, 0});
    c_.ends_.push_back({{T, 1, 0, 0}, k, k, f, f});
  }

  double enthalpy() const { return H_; }

 private:
  static double temperature_slope(const Region& r, double T) {
    return 1 / (r.capacity(T) + slope(r.latent, T, r.low, r.high));
  }
  EnthalpyCurve& c_;
  double H_ = 0;
  double theta_at_ = 0;
};

EnthalpyCurve::EnthalpyCurve(const MetalProperties& metal, const SolidificationPath& path, double low, double high) {
  const double end = path.end_of_freezing(), liquidus = path.liquidus();
  // The range always reaches past both ends of freezing, so that every zone exists.
  low = std::min(low, end - 10);
  high = std::max(high, liquidus + 10);
  const double rho = metal.density, L = metal.latent_heat;
  const PhaseProperties &s = metal.solid, &l = metal.liquid;
  const Region solid{low,
                     end,
                     s.heat_capacity.is_constant() && s.conductivity.is_constant(),
                     [&](double T) { return rho * s.heat_capacity(T); },
                     [](double) { return 0.0; },
                     [&](double T) { return s.conductivity(T); },
                     [](double) { return 1.0; }};
  const Region liquid{liquidus,
                      high,
                      l.heat_capacity.is_constant() && l.conductivity.is_constant(),
                      [&](double T) { return rho * l.heat_capacity(T); },
                      [&](double) { return rho * L; },
                      [&](double T) { return l.conductivity(T); },
                      [](double) { return 0.0; }};
  const auto mix = [&](double T, double f, const base::Table& of_solid, const base::Table& of_liquid) {
    return f * of_solid(T) + (1 - f) * of_liquid(T);
  };

  Builder build(*this);
  build.region(solid);
  end_of_freezing_enthalpy_ = build.enthalpy();
  double T = end;
  const auto arrest_here = [&](double at) {
    for (const Arrest& a : path.arrests())
      if (a.temperature == at) {
        const double before = path.fraction_above(at), after = path.fraction_below(at);
        build.arrest(at, rho * L * a.fraction, mix(at, after, s.conductivity, l.conductivity),
                     mix(at, before, s.conductivity, l.conductivity), after, before);
      }
  };
  arrest_here(end);
  if (kinks_.empty()) kinks_.push_back(build.enthalpy());
  while (T < liquidus) {
    // Up to the next arrest above T, or to the liquidus.
    double next = liquidus;
    for (const Arrest& a : path.arrests())
      if (a.temperature > T && a.temperature < next) next = a.temperature;
    const double bottom = T;
    const auto fraction = [&path, bottom](double t) {
      return t > bottom ? path.fraction_below(t) : path.fraction_above(bottom);
    };
    build.region({T, next, false, [&](double t) { return rho * mix(t, fraction(t), s.heat_capacity, l.heat_capacity); },
                  [&](double t) { return rho * L * (1 - fraction(t)); },
                  [&](double t) { return mix(t, fraction(t), s.conductivity, l.conductivity); }, fraction});
    arrest_here(next);
    T = next;
  }
  liquidus_enthalpy_ = build.enthalpy();
  if (kinks_.back() != liquidus_enthalpy_) kinks_.push_back(liquidus_enthalpy_);
  build.region(liquid);
  build.extension(high, liquid);
}

EnthalpyCurve::EnthalpyCurve(const MoldProperties& mold, double low, double high)
    : liquidus_enthalpy_(-std::numeric_limits<double>::infinity()),
      end_of_freezing_enthalpy_(-std::numeric_limits<double>::infinity()) {
  const PhaseProperties& p = mold.body;
  Region r{low,
           high,
           p.heat_capacity.is_constant() && p.conductivity.is_constant(),
           [&](double T) { return mold.density * p.heat_capacity(T); },
           [](double) { return 0.0; },
           [&](double T) { return p.conductivity(T); },
           [](double) { return 1.0; }};
  Builder build(*this);
  if (mold.moisture > 0 && low < kBoilingPoint && kBoilingPoint < high) {
    r.high = kBoilingPoint;
    build.region(r);
    const double k = p.conductivity(kBoilingPoint);
    build.arrest(kBoilingPoint, mold.density * mold.moisture * kHeatOfBoiling, k, k, 1, 1);
    r.low = kBoilingPoint;
    r.high = high;
  }
  build.region(r);
  build.extension(high, r);
  straight_ = r.linear && arrests_.empty();
}

const EnthalpyCurve::Ends& EnthalpyCurve::ends(double H, double& u, double& per_spacing) const {
  const Zone& z = zone(H);
  const double x = (H - z.begin) * z.per_spacing;
  const int i = std::clamp(static_cast<int>(x), 0, z.pieces - 1);
  u = x - i;
  per_spacing = z.per_spacing;
  return ends_[z.first + static_cast<std::size_t>(i)];
}

double EnthalpyCurve::temperature(double H) const {
  double u = 0, per = 0;
  const std::array<double, 4>& c = ends(H, u, per).T;
  return c[0] + u * (c[1] + u * (c[2] + u * c[3]));
}

double EnthalpyCurve::temperature_slope(double H) const {
  double u = 0, per = 0;
  const std::array<double, 4>& c = ends(H, u, per).T;
  return (c[1] + u * (2 * c[2] + 3 * u * c[3])) * per;
}

double EnthalpyCurve::conductivity(double H) const {
  double u = 0, per = 0;
  const Ends& e = ends(H, u, per);
  return e.k0 + u * (e.k1 - e.k0);
}

double EnthalpyCurve::conductivity_slope(double H) const {
  double u = 0, per = 0;
  const Ends& e = ends(H, u, per);
  return (e.k1 - e.k0) * per;
}

double EnthalpyCurve::fraction_solid(double H) const {
  double u = 0, per = 0;
  const Ends& e = ends(H, u, per);
  return e.f0 + u * (e.f1 - e.f0);
}

double EnthalpyCurve::fraction_slope(double H) const {
  double u = 0, per = 0;
  const Ends& e = ends(H, u, per);
  return (e.f1 - e.f0) * per;
}

double EnthalpyCurve::enthalpy(double T, ArrestEnd end) const {
  // Smallest H with T(H) >= T (cold end) or largest with T(H) <= T (hot end), by bisection from a bracket.
  const auto above = [&](double H) { return end == ArrestEnd::cold ? temperature(H) >= T : temperature(H) > T; };
  double reach = std::max(1.0, std::abs(zones_.back().begin));
  double low = 0, high = 0;
  while (above(low)) {
    low -= reach;
    reach *= 2;
  }
  while (!above(high)) {
    high += reach;
    reach *= 2;
  }
  while (true) {
    const double mid = 0.5 * (low + high);
    if (mid <= low || mid >= high) break;
    (above(mid) ? high : low) = mid;
  }
  return end == ArrestEnd::cold ? high : low;
}

double EnthalpyCurve::potential_at(double T) const {
  double theta = 0, slope = 0;
  potential(enthalpy(T), theta, slope);
  return theta;
}

}  // namespace palier::alloy
