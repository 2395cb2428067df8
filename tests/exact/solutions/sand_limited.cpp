#include "exact/solutions/sand_limited.hpp"

#include <boost/math/quadrature/sinh_sinh.hpp>
#include <boost/math/special_functions/bessel.hpp>
#include <cmath>
#include <numbers>

#include "exact/solutions/conduction.hpp"
#include "exact/solutions/root.hpp"

namespace palier::exact {
namespace {

constexpr double pi = std::numbers::pi;

double square(double x) { return x * x; }

/// J0^2 + Y0^2 at u = exp(log_u). Far out by the asymptotic series (Abramowitz & Stegun 1964, eq. 9.2.28), close to 0,
/// where u itself may vanish, by its logarithm.
double squared_modulus(double log_u) {
  if (log_u < -16) return 1 + square(2 / pi * (log_u - std::numbers::ln2 + std::numbers::egamma));
  const double u = std::exp(log_u);
  if (u < 100) return square(boost::math::cyl_bessel_j(0, u)) + square(boost::math::cyl_neumann(0, u));
  return 2 / (pi * u) * (1 - 1 / (8 * u * u) + 27 / (128 * square(u * u)));
}

}  // namespace

double SandLimited::chvorinov_constant() const {
  return pi / 4 * square(heat_of_freezing() / (sand.effusivity() * step()));
}

double SandLimited::plate_time(double modulus) const { return chvorinov_constant() * square(modulus); }

double SandLimited::plate_heat(double t) const { return 2 * sand.effusivity() * step() * std::sqrt(t / pi); }

double SandLimited::plate_heat(double t, double conductance) const {
  const double a = conductance / sand.effusivity(), z = a * std::sqrt(t);
  return conductance * step() / square(a) * (scaled_erfc(z) - 1 + 2 * z / std::sqrt(pi));
}

double SandLimited::sphere_heat(double t, double radius) const {
  return plate_heat(t) + sand.conductivity * step() * t / radius;
}

// Flux at the face of an endless body around a cylinder (Carslaw & Jaeger 13.5(7)), integrated over time; u = exp(y).
double SandLimited::cylinder_heat(double t, double radius) const {
  const double fourier = sand.diffusivity() * t / square(radius);
  const auto integrand = [&](double y) {
    if (std::abs(y) > 300) return y > 0 ? 0.0 : fourier / squared_modulus(y);
    const double u2 = std::exp(2 * y), fading = -std::expm1(-fourier * u2) / u2;
    return fading / squared_modulus(y);
  };
  boost::math::quadrature::sinh_sinh<double> rule;
  const double integral = rule.integrate(integrand, 1e-11);
  return 4 / square(pi) * sand.conductivity * step() * radius / sand.diffusivity() * integral;
}

double SandLimited::plate_time(double modulus, double conductance) const {
  const double needed = heat_of_freezing() * modulus, longest = plate_time(modulus) + needed / (conductance * step());
  return root([&](double t) { return plate_heat(t, conductance) / needed - 1; }, plate_time(modulus), 2 * longest);
}

double SandLimited::cylinder_time(double modulus) const {
  const double needed = heat_of_freezing() * modulus, plate = plate_time(modulus);
  return root([&](double t) { return cylinder_heat(t, 2 * modulus) / needed - 1; }, 0.01 * plate, plate);
}

// (2/sqrt(pi)) e sqrt(t) + n k t / (2 R) = rho H M / (T_m - T_0), a quadratic in sqrt(t).
double SandLimited::shape_time(double modulus, int n) const {
  const double radius = (n + 1) * modulus;
  const double a = n * sand.conductivity / (2 * radius), b = 2 / std::sqrt(pi) * sand.effusivity();
  const double c = heat_of_freezing() * modulus / step();
  return square(2 * c / (b + std::sqrt(b * b + 4 * a * c)));
}

double SandLimited::sphere_time(double modulus) const { return shape_time(modulus, 2); }

double SandLimited::adams_taylor_cylinder_time(double modulus) const { return shape_time(modulus, 1); }

}  // namespace palier::exact
