#include "exact/solutions/lumped.hpp"

#include <boost/math/quadrature/gauss_kronrod.hpp>
#include <cmath>

namespace palier::exact {

double LumpedCasting::cooling_time(double heat_capacity, double from, double to) const {
  return density * heat_capacity * modulus / film * std::log((from - surroundings) / (to - surroundings));
}

double LumpedCasting::cooling_time(const std::function<double(double)>& heat_capacity, double from, double to) const {
  const auto integrand = [&](double T) { return heat_capacity(T) / (T - surroundings); };
  return density * modulus / film *
         boost::math::quadrature::gauss_kronrod<double, 61>::integrate(integrand, to, from, 12, 1e-13);
}

double LumpedCasting::arrest_time(double heat, double T) const {
  return density * heat * modulus / (film * (T - surroundings));
}

}  // namespace palier::exact
