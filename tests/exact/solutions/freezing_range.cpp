#include "exact/solutions/freezing_range.hpp"

#include <array>
#include <boost/math/special_functions/expint.hpp>
#include <cmath>
#include <limits>
#include <numbers>
#include <stdexcept>

#include "exact/solutions/root.hpp"

namespace palier::exact {
namespace {

const double sqrt_pi = std::sqrt(std::numbers::pi);

/// Area at unit radius.
double unit_area(SinkShape shape) {
  return std::array{1.0, 2 * std::numbers::pi, 4 * std::numbers::pi}.at(static_cast<std::size_t>(shape));
}

double width(const Phase& phase, double heat_capacity) {
  return 2 * std::sqrt(phase.conductivity / (phase.density * heat_capacity));
}

double square(double x) { return x * x; }

}  // namespace

double LinearAlloy::mush_heat_capacity() const {
  return mush.heat_capacity + latent_heat * (1 - eutectic) / (liquidus - solidus);
}

LinearFreezing LinearFreezing::fixed_wall(const LinearAlloy& alloy, double wall, double start) {
  if (!(wall < alloy.solidus)) throw std::domain_error("the wall must be below the solidus");
  return {alloy, SinkShape::plane, start, wall, 0};
}

LinearFreezing LinearFreezing::line_sink(const LinearAlloy& alloy, double rate, double start) {
  return {alloy, SinkShape::line, start, std::nullopt, rate};
}

LinearFreezing LinearFreezing::point_sink(const LinearAlloy& alloy, double strength, double start) {
  return {alloy, SinkShape::point, start, std::nullopt, strength};
}

LinearFreezing::LinearFreezing(const LinearAlloy& alloy, SinkShape shape, double start, std::optional<double> wall,
                               double strength)
    : alloy_(alloy),
      shape_(shape),
      start_(start),
      wall_(wall),
      solid_width_(width(alloy.solid, alloy.solid.heat_capacity)),
      mush_width_(alloy.pure() ? 0 : width(alloy.mush, alloy.mush_heat_capacity())),
      liquid_width_(width(alloy.liquid, alloy.liquid.heat_capacity)) {
  if (start < alloy.liquidus || (!alloy.pure() && start == alloy.liquidus))
    throw std::domain_error("the melt must start above the liquidus: otherwise the mush has no outer front");
  // The rate of a sink is unit_area k B (2 sqrt(alpha t))^(m-1).
  solid_strength_ =
      strength / (unit_area(shape) * alloy.solid.conductivity * std::pow(solid_width_, static_cast<int>(shape) - 1));
  lambda_ = root([this](double trial) { return balance_at_end_front(trial); }, 1e-6, 5.0);
  mu_ = alloy.pure() ? std::numeric_limits<double>::quiet_NaN() : outer_front(lambda_);
}

double LinearFreezing::F(double u) const {
  switch (shape_) {
    case SinkShape::plane:
      return sqrt_pi / 2 * std::erfc(u);
    case SinkShape::line:
      return boost::math::expint(1, u * u) / 2;
    case SinkShape::point:
      return std::exp(-u * u) / u - sqrt_pi * std::erfc(u);
  }
  throw std::logic_error("no such shape");
}

double LinearFreezing::decay(double u) const { return std::exp(-u * u) * std::pow(u, -static_cast<int>(shape_)); }

double LinearFreezing::amplitude_solid(double lambda) const {
  return wall_ ? (alloy_.solidus - *wall_) / (F(0) - F(lambda)) : solid_strength_;
}

// Start-of-freezing front (as mu) from equal fluxes on both of its sides, with the end of freezing at lambda.
double LinearFreezing::outer_front(double lambda) const {
  const double inner = lambda * solid_width_ / mush_width_;
  const auto flux_jump = [&](double mu) {
    const double outside = mu * mush_width_ / liquid_width_;
    const double from_liquid =
        alloy_.liquid.conductivity * (start_ - alloy_.liquidus) * decay(outside) / (F(outside) * liquid_width_);
    // Multiplied with F(inner) - F(mu), which vanishes at mu = inner.
    return alloy_.mush.conductivity * (alloy_.liquidus - alloy_.solidus) * decay(mu) / mush_width_ -
           from_liquid * (F(inner) - F(mu));
  };
  return root(flux_jump, inner, inner + 10);
}

// Flux leaving the end-of-freezing front less flux entering it and latent heat set free there, times sqrt(t).
double LinearFreezing::balance_at_end_front(double lambda) const {
  const double out = alloy_.solid.conductivity * amplitude_solid(lambda) * decay(lambda) / solid_width_;
  const double speed = lambda * solid_width_ / 2;
  if (alloy_.pure()) {
    const double u = lambda * solid_width_ / liquid_width_;
    const double in = alloy_.liquid.conductivity * (start_ - alloy_.liquidus) / F(u) * decay(u) / liquid_width_;
    return out - in - alloy_.solid.density * alloy_.latent_heat * speed;
  }
  const double u = lambda * solid_width_ / mush_width_;
  const double amplitude = (alloy_.liquidus - alloy_.solidus) / (F(u) - F(outer_front(lambda)));
  const double in = alloy_.mush.conductivity * amplitude * decay(u) / mush_width_;
  return out - in - alloy_.solid.density * alloy_.latent_heat * alloy_.eutectic * speed;
}

double LinearFreezing::end_front(double t) const { return lambda_ * solid_width_ * std::sqrt(t); }

double LinearFreezing::start_front(double t) const {
  return alloy_.pure() ? end_front(t) : mu_ * mush_width_ * std::sqrt(t);
}

double LinearFreezing::end_arrival(double r) const { return square(r / end_front(1)); }

double LinearFreezing::start_arrival(double r) const { return square(r / start_front(1)); }

double LinearFreezing::temperature(double r, double t) const {
  const double sigma = r / std::sqrt(t);
  if (r < end_front(t)) return alloy_.solidus - amplitude_solid(lambda_) * (F(sigma / solid_width_) - F(lambda_));
  if (r < start_front(t)) {
    const double outer = F(mu_), inner = F(lambda_ * solid_width_ / mush_width_);
    return alloy_.liquidus - (alloy_.liquidus - alloy_.solidus) * (F(sigma / mush_width_) - outer) / (inner - outer);
  }
  return start_ - (start_ - alloy_.liquidus) * F(sigma / liquid_width_) / F(start_front(1) / liquid_width_);
}

double LinearFreezing::heat_rate(double r, double t) const {
  return wall_flux(t) * std::exp(-square(r / solid_width_) / t);
}

double LinearFreezing::wall_flux(double t) const {
  return unit_area(shape_) * alloy_.solid.conductivity * amplitude_solid(lambda_) *
         std::pow(solid_width_ * std::sqrt(t), static_cast<int>(shape_) - 1);
}

double LinearFreezing::heat_through_wall(double t) const {
  return wall_flux(t) * t * 2 / (1 + static_cast<int>(shape_));  // the rate goes with t^((m-1)/2)
}

}  // namespace palier::exact
