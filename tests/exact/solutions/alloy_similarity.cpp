#include "exact/solutions/alloy_similarity.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <numbers>
#include <stdexcept>

#include "exact/solutions/root.hpp"

namespace palier::exact {
namespace {

const double sqrt_pi = std::sqrt(std::numbers::pi);
constexpr int march_steps = 2000;  // fourth order: the error of a march is below 1e-12 of the flux (tested)

double square(double x) { return x * x; }

double width(const Phase& phase) { return 2 * std::sqrt(phase.diffusivity()); }

}  // namespace

AlloySimilarity::AlloySimilarity(const BinaryAlloy& alloy, const HalfSpaceWall& wall, double start)
    : alloy_(alloy), wall_(wall), start_(start) {
  if (!(start > alloy.liquidus())) throw std::domain_error("the melt must start above the liquidus");
  // As the skin gets thinner the wall tends to the end of freezing and the flux through the skin to that of the mold.
  const double thinnest = 1e-6 * width(alloy.solid), thickest = 2 * width(alloy.solid);
  const auto with_skin = [&](double end) { return mismatch_at_liquidus(shoot_with_skin(end)); };
  if (with_skin(thinnest) > 0) {
    end_ = root(with_skin, thinnest, thickest);
    mush_ = shoot_with_skin(end_);
    wall_temperature_ = skin_wall_temperature(end_);
    wall_flux_ = 2 * alloy.solid.conductivity * (alloy.end_of_freezing() - wall_temperature_) /
                 (sqrt_pi * width(alloy.solid) * std::erf(end_ / width(alloy.solid)));
  } else {
    const auto without = [&](double face) { return mismatch_at_liquidus(shoot_without_skin(face)); };
    wall_temperature_ = root(without, alloy.end_of_freezing(), alloy.liquidus());
    mush_ = shoot_without_skin(wall_temperature_);
    wall_flux_ = mush_.front().flux;
  }
  start_front_ = mush_.back().sigma;
}

// d flux / dT = -(sigma / 2) rho dh/dT and d sigma / dT = k / flux, from T to the liquidus by Runge and Kutta's
// classic rule. Where the flux runs out on the way (a trial too far off) the march ends early.
std::vector<AlloySimilarity::Node> AlloySimilarity::march(double T, double sigma, double flux) const {
  std::vector<Node> nodes{{T, sigma, flux}};
  const double step = (alloy_.liquidus() - T) / march_steps;
  const auto slope = [&](double at, double s, double q) {
    // The liquidus itself belongs to the melt: take the mush's side of it.
    const double inside = std::min(at, std::nextafter(alloy_.liquidus(), 0.0));
    return std::array{alloy_.conductivity(inside) / q, -s / 2 * alloy_.solid.density * alloy_.enthalpy_slope(inside)};
  };
  for (int i = 0; i < march_steps; ++i) {
    const Node& n = nodes.back();
    const double middle = T + (i + 0.5) * step, end = T + (i + 1) * step;
    const auto k1 = slope(n.T, n.sigma, n.flux);
    if (!(n.flux + step * k1[1] > n.flux / 2)) break;
    const auto k2 = slope(middle, n.sigma + step / 2 * k1[0], n.flux + step / 2 * k1[1]);
    const auto k3 = slope(middle, n.sigma + step / 2 * k2[0], n.flux + step / 2 * k2[1]);
    const auto k4 = slope(end, n.sigma + step * k3[0], n.flux + step * k3[1]);
    const double flux_end = n.flux + step / 6 * (k1[1] + 2 * k2[1] + 2 * k3[1] + k4[1]);
    nodes.push_back({end, n.sigma + step / 6 * (k1[0] + 2 * k2[0] + 2 * k3[0] + k4[0]), flux_end});
  }
  return nodes;
}

// Flux out of the mush at the liquidus less flux into it from the melt, times sqrt(t); positive: the mush takes more
// heat at its outer edge than the melt gives.
double AlloySimilarity::mismatch_at_liquidus(const std::vector<Node>& nodes) const {
  const double melt_flux_at_wall = alloy_.liquid.effusivity() * (start_ - alloy_.liquidus()) / sqrt_pi;
  if (nodes.size() <= march_steps) return -melt_flux_at_wall;
  const double u = nodes.back().sigma / width(alloy_.liquid);
  return nodes.back().flux - melt_flux_at_wall * std::exp(-u * u) / std::erfc(u);
}

double AlloySimilarity::skin_wall_temperature(double end) const {
  if (!wall_.mold) return wall_.temperature;
  const double shape = std::erf(end / width(alloy_.solid));
  const double em = wall_.mold->effusivity(), es = alloy_.solid.effusivity();
  return (wall_.temperature * em * shape + es * alloy_.end_of_freezing()) / (em * shape + es);
}

std::vector<AlloySimilarity::Node> AlloySimilarity::shoot_with_skin(double end) const {
  const double u = end / width(alloy_.solid), T = alloy_.end_of_freezing();
  const double out = 2 * alloy_.solid.conductivity * (T - skin_wall_temperature(end)) * std::exp(-u * u) /
                     (sqrt_pi * width(alloy_.solid) * std::erf(u));
  const double flux = out - alloy_.solid.density * alloy_.arrest_heat() * end / 2;
  if (!(flux > 0)) return {{T, end, flux}};
  return march(T, end, flux);
}

std::vector<AlloySimilarity::Node> AlloySimilarity::shoot_without_skin(double wall_temperature) const {
  const double flux = wall_.mold.value().effusivity() * (wall_temperature - wall_.temperature) / sqrt_pi;
  return march(wall_temperature, 0, flux);
}

double AlloySimilarity::end_front(double t) const { return end_ * std::sqrt(t); }

double AlloySimilarity::start_front(double t) const { return start_front_ * std::sqrt(t); }

double AlloySimilarity::end_arrival(double x) const {
  return has_skin() ? square(x / end_) : std::numeric_limits<double>::infinity();
}

double AlloySimilarity::start_arrival(double x) const { return square(x / start_front_); }

// Cubic through values and slopes (k / flux) of T over sigma.
double AlloySimilarity::mush_temperature(double sigma) const {
  const auto after = std::upper_bound(mush_.begin() + 1, mush_.end() - 1, sigma,
                                      [](double s, const Node& node) { return s < node.sigma; });
  const Node &a = *(after - 1), &b = *after;
  const double length = b.sigma - a.sigma, s = (sigma - a.sigma) / length;
  const double at_liquidus = std::min(b.T, std::nextafter(alloy_.liquidus(), 0.0));
  const double slope_a = a.flux / alloy_.conductivity(a.T) * length;
  const double slope_b = b.flux / alloy_.conductivity(at_liquidus) * length;
  return a.T * square(1 - s) * (1 + 2 * s) + b.T * square(s) * (3 - 2 * s) + slope_a * s * square(1 - s) -
         slope_b * square(s) * (1 - s);
}

double AlloySimilarity::temperature(double x, double t) const {
  const double sigma = x / std::sqrt(t);
  if (sigma < 0)
    return wall_.temperature + (wall_temperature_ - wall_.temperature) * std::erfc(-sigma / width(wall_.mold.value()));
  if (sigma < end_)
    return wall_temperature_ + (alloy_.end_of_freezing() - wall_temperature_) * std::erf(sigma / width(alloy_.solid)) /
                                   std::erf(end_ / width(alloy_.solid));
  if (sigma < start_front_) return mush_temperature(sigma);
  return start_ - (start_ - alloy_.liquidus()) * std::erfc(sigma / width(alloy_.liquid)) /
                      std::erfc(start_front_ / width(alloy_.liquid));
}

double AlloySimilarity::fraction_solid(double x, double t) const {
  return x < end_front(t) ? 1.0 : alloy_.fraction_solid(temperature(x, t));
}

double AlloySimilarity::wall_flux(double t) const { return wall_flux_ / std::sqrt(t); }

double AlloySimilarity::heat_through_wall(double t) const { return 2 * wall_flux_ * std::sqrt(t); }

}  // namespace palier::exact
