// Enthalpy and conduction potential of a metal over temperature, integrated apart from the curve under test.
#pragma once

#include <algorithm>
#include <boost/math/quadrature/gauss.hpp>
#include <cstddef>
#include <functional>
#include <utility>
#include <vector>

#include "palier/alloy/enthalpy_curve.hpp"

namespace palier::samples {

/// Ten-point Gauss-Legendre between neighbours of a fine grid of temperatures that holds every jump and bend.
class CurveReference {
 public:
  /// @param bends temperatures at which the path or a table bends, besides the ends of freezing and the arrests
  CurveReference(alloy::MetalProperties metal, alloy::SolidificationPath path, double low, double high,
                 const std::vector<double>& bends)
      : metal_(std::move(metal)), path_(std::move(path)) {
    const int n = 1500;
    const double end = path_.end_of_freezing(), liquidus = path_.liquidus();
    for (int i = 0; i <= n; ++i) T_.push_back(low + (high - low) * i / n);
    // Denser towards the liquidus, where a path is steepest.
    for (int i = 0; i <= n; ++i) T_.push_back(liquidus - (liquidus - end) * i * i / n / n);
    T_.push_back(end);
    T_.insert(T_.end(), bends.begin(), bends.end());
    std::sort(T_.begin(), T_.end());
    T_.erase(std::unique(T_.begin(), T_.end()), T_.end());
    sensible_.resize(T_.size(), 0.0);
    theta_.resize(T_.size(), 0.0);
    for (std::size_t i = 1; i < T_.size(); ++i) {
      sensible_[i] = sensible_[i - 1] + integral([this](double T) { return capacity(T); }, T_[i - 1], T_[i]);
      theta_[i] = theta_[i - 1] + integral([this](double T) { return conductivity(T); }, T_[i - 1], T_[i]);
    }
  }

  std::size_t size() const { return T_.size(); }
  double T(std::size_t i) const { return T_[i]; }
  /// Before an arrest at this temperature has begun.
  double enthalpy(std::size_t i) const {
    return sensible_[i] + metal_.density * metal_.latent_heat * (1 - path_.fraction_above(T_[i]));
  }
  double theta(std::size_t i) const { return theta_[i]; }
  double fraction(std::size_t i) const { return path_.fraction_above(T_[i]); }

 private:
  static double integral(const std::function<double(double)>& f, double a, double b) {
    return boost::math::quadrature::gauss<double, 10>::integrate(f, a, b);
  }
  double conductivity(double T) const { return mixed(T, metal_.solid.conductivity, metal_.liquid.conductivity); }
  double mixed(double T, const base::Table& solid, const base::Table& liquid) const {
    const double f = path_.fraction_above(T);
    return f * solid(T) + (1 - f) * liquid(T);
  }
  double capacity(double T) const {
    return metal_.density * mixed(T, metal_.solid.heat_capacity, metal_.liquid.heat_capacity);
  }

  alloy::MetalProperties metal_;
  alloy::SolidificationPath path_;
  std::vector<double> T_, sensible_, theta_;
};

}  // namespace palier::samples
