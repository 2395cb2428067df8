#include "scheil_integral.hpp"

#include <algorithm>
#include <boost/math/quadrature/gauss.hpp>
#include <cmath>
#include <utility>

namespace palier::alloy {

ScheilIntegral::ScheilIntegral(std::shared_ptr<const PhaseDiagram> diagram, double composition, const Invariant& last)
    : diagram_(std::move(diagram)) {
  constexpr double kMeet = 1e-9, kClose = 1e-8;  // shares of C_end
  constexpr int kPieces = 256;
  const TieLine end = diagram_->tie_line(last.temperature);
  const bool meet = end.liquid - end.solid < kMeet * end.liquid;
  if (meet) meeting_ = end.liquid;
  first_ = variable(composition);
  // Where they meet, the fraction vanishes as a power of 1 - C / C_end, which is a straight line in v.
  last_ = variable(meet ? end.liquid * (1 - kClose) : end.liquid);
  if (!(last_ - first_ > 1e-12)) return;
  std::vector<double> v, log_fraction, slope;
  for (int i = 0; i <= kPieces; ++i) {
    const double at = i == kPieces ? last_ : first_ + (last_ - first_) * i / kPieces;
    if (i > 0)
      last_log_ -=
          boost::math::quadrature::gauss<double, 7>::integrate([this](double u) { return integrand(u); }, v.back(), at);
    last_slope_ = -integrand(at);
    v.push_back(at);
    log_fraction.push_back(last_log_);
    slope.push_back(last_slope_);
  }
  log_fraction_ = std::make_shared<const Line>(std::move(v), std::move(log_fraction), std::move(slope));
}

double ScheilIntegral::variable(double C) const { return std::log(C) - std::log1p(-C / meeting_); }

double ScheilIntegral::integrand(double v) const {
  const double rest = 1 / (1 + std::exp(v) / meeting_);  // 1 - C / C_end
  const double C = std::exp(v) * rest;
  const double T = diagram_->liquidus(std::min(C, diagram_->largest_composition()));
  return C * rest / (C - diagram_->tie_line(T).solid);
}

double ScheilIntegral::liquid_left(double T) const {
  const double C = diagram_->tie_line(T).liquid;
  if (C >= meeting_) return 0;
  const double v = variable(C);
  if (!log_fraction_ || v <= first_) return 1;
  if (v > last_) return std::exp(last_log_ + last_slope_ * (v - last_));
  return std::exp((*log_fraction_)(v));
}

}  // namespace palier::alloy
