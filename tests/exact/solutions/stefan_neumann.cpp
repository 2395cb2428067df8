#include "exact/solutions/stefan_neumann.hpp"

#include <cmath>
#include <numbers>
#include <stdexcept>

#include "exact/solutions/root.hpp"

namespace palier::exact {
namespace {

const double sqrt_pi = std::sqrt(std::numbers::pi);

}  // namespace

double front_balance(const PureMetal& metal, double wall, double start, double lambda) {
  const double as = metal.solid.diffusivity(), al = metal.liquid.diffusivity();
  const double in_liquid = lambda * std::sqrt(as / al);
  const double out = metal.solid.conductivity * (metal.melting_point - wall) * std::exp(-lambda * lambda) /
                     (sqrt_pi * std::sqrt(as) * std::erf(lambda));
  const double in = metal.liquid.conductivity * (start - metal.melting_point) * std::exp(-in_liquid * in_liquid) /
                    (sqrt_pi * std::sqrt(al) * std::erfc(in_liquid));
  return (out - in) / metal.solid.density - metal.latent_heat * lambda * std::sqrt(as);
}

StefanNeumann::StefanNeumann(const PureMetal& metal, double wall, double start)
    : metal_(metal), wall_(wall), start_(start) {
  if (!(wall < metal.melting_point) || start < metal.melting_point)
    throw std::domain_error("the wall must be below the melting point, the melt not");
  lambda_ = root([&](double trial) { return front_balance(metal, wall, start, trial); }, 1e-8, 5.0);
}

double StefanNeumann::front(double t) const { return 2 * lambda_ * std::sqrt(metal_.solid.diffusivity() * t); }

double StefanNeumann::arrival(double x) const {
  const double ratio = x / (2 * lambda_);
  return ratio * ratio / metal_.solid.diffusivity();
}

double StefanNeumann::temperature(double x, double t) const {
  const double as = metal_.solid.diffusivity(), al = metal_.liquid.diffusivity();
  if (x < front(t))
    return wall_ + (metal_.melting_point - wall_) * std::erf(x / (2 * std::sqrt(as * t))) / std::erf(lambda_);
  return start_ - (start_ - metal_.melting_point) * std::erfc(x / (2 * std::sqrt(al * t))) /
                      std::erfc(lambda_ * std::sqrt(as / al));
}

double StefanNeumann::wall_flux(double t) const {
  return metal_.solid.conductivity * (metal_.melting_point - wall_) /
         (std::erf(lambda_) * std::sqrt(std::numbers::pi * metal_.solid.diffusivity() * t));
}

double StefanNeumann::heat_through_wall(double t) const { return 2 * wall_flux(t) * t; }

}  // namespace palier::exact
