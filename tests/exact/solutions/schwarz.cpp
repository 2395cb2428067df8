#include "exact/solutions/schwarz.hpp"

#include <cmath>
#include <numbers>
#include <stdexcept>

#include "exact/solutions/root.hpp"

namespace palier::exact {

Schwarz::Schwarz(const PureMetal& metal, double start, const Phase& mold, double mold_start)
    : liquid_(metal.liquid), mold_(mold), start_(start), mold_start_(mold_start) {
  const double Tm = metal.melting_point;
  if (!(mold_start < Tm) || start < Tm)
    throw std::domain_error("the mold must start below the melting point, the melt not");
  const double em = mold.effusivity(), el = metal.liquid.effusivity(), es = metal.solid.effusivity();
  if (el * (start - Tm) >= em * (Tm - mold_start)) {
    interface_ = (el * start + em * mold_start) / (el + em);
    return;
  }
  // Face temperature from equal fluxes on both sides of it, with a skin up to lambda.
  const auto face = [&](double lambda) { return mold_start + (Tm - mold_start) * es / (es + em * std::erf(lambda)); };
  const double lambda = root([&](double trial) { return front_balance(metal, face(trial), start, trial); }, 1e-8, 5.0);
  interface_ = face(lambda);
  metal_part_.emplace(metal, interface_, start);
}

double Schwarz::lambda() const { return metal_part_.value().lambda(); }

double Schwarz::front(double t) const { return metal_part_ ? metal_part_->front(t) : 0.0; }

double Schwarz::temperature(double x, double t) const {
  const auto contact = [&](const Phase& body, double from) {
    return from + (interface_ - from) * std::erfc(std::abs(x) / (2 * std::sqrt(body.diffusivity() * t)));
  };
  if (x < 0) return contact(mold_, mold_start_);
  return metal_part_ ? metal_part_->temperature(x, t) : contact(liquid_, start_);
}

double Schwarz::wall_flux(double t) const {
  return mold_.effusivity() * (interface_ - mold_start_) / std::sqrt(std::numbers::pi * t);
}

double Schwarz::heat_through_wall(double t) const { return 2 * wall_flux(t) * t; }

}  // namespace palier::exact
