#include "exact/solutions/conduction.hpp"

#include <boost/math/special_functions/bessel.hpp>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "exact/solutions/root.hpp"

namespace palier::exact {
namespace {

constexpr double pi = std::numbers::pi;

double J(int n, double z) { return boost::math::cyl_bessel_j(n, z); }

}  // namespace

CoolingSeries::CoolingSeries(Body body, double biot, int terms) : body_(body), biot_(biot) {
  if (!(biot > 0)) throw std::domain_error("the Biot number must be positive");
  for (int n = 1; n <= terms; ++n) {
    roots_.push_back(root_of(n));
    coefficients_.push_back(coefficient_of(roots_.back()));
  }
}

// n-th root of (minus gradient) = Bi (value) at the surface; multiplied out, so that nothing is infinite.
double CoolingSeries::root_of(int n) const {
  double low = 0, high = 0;  // value at the surface vanishes at `high`, its gradient at `low`
  switch (body_) {
    case Body::plate:
      low = (n - 1) * pi;
      high = (n - 0.5) * pi;
      break;
    case Body::cylinder:
      low = n == 1 ? 0 : boost::math::cyl_bessel_j_zero(1.0, n - 1);
      high = boost::math::cyl_bessel_j_zero(0.0, n);
      break;
    case Body::sphere:
      // tan z = z between n - 1 and n - 1/2 times pi
      low = n == 1 ? 0 : root([](double z) { return std::sin(z) - z * std::cos(z); }, (n - 1) * pi, (n - 0.5) * pi);
      high = n * pi;
      break;
  }
  if (std::isinf(biot_)) return high;
  return root([this](double z) { return shape_gradient(z) - biot_ * shape(z); }, low, high);
}

double CoolingSeries::shape(double zx) const {
  switch (body_) {
    case Body::plate:
      return std::cos(zx);
    case Body::cylinder:
      return J(0, zx);
    case Body::sphere:
      return zx == 0 ? 1 : std::sin(zx) / zx;
  }
  throw std::logic_error("no such body");
}

double CoolingSeries::shape_gradient(double z) const {
  switch (body_) {
    case Body::plate:
      return z * std::sin(z);
    case Body::cylinder:
      return z * J(1, z);
    case Body::sphere:
      return z == 0 ? 0 : std::sin(z) / z - std::cos(z);
  }
  throw std::logic_error("no such body");
}

double CoolingSeries::coefficient_of(double z) const {
  switch (body_) {
    case Body::plate:
      return 4 * std::sin(z) / (2 * z + std::sin(2 * z));
    case Body::cylinder:
      return 2 / z * J(1, z) / (J(0, z) * J(0, z) + J(1, z) * J(1, z));
    case Body::sphere:
      return 4 * (std::sin(z) - z * std::cos(z)) / (2 * z - std::sin(2 * z));
  }
  throw std::logic_error("no such body");
}

double CoolingSeries::theta(double place, double fourier) const {
  double sum = 0;
  for (std::size_t i = 0; i < roots_.size(); ++i)
    sum += coefficients_[i] * std::exp(-roots_[i] * roots_[i] * fourier) * shape(roots_[i] * place);
  return sum;
}

double CoolingSeries::surface_flux(double fourier) const {
  double sum = 0;
  for (std::size_t i = 0; i < roots_.size(); ++i)
    sum += coefficients_[i] * std::exp(-roots_[i] * roots_[i] * fourier) * shape_gradient(roots_[i]);
  return sum;
}

// The mean of a term over the body is (m + 1) / z^2 times its surface gradient (divergence theorem).
double CoolingSeries::heat_lost(double fourier) const {
  double left = 0;
  for (std::size_t i = 0; i < roots_.size(); ++i) {
    const double z2 = roots_[i] * roots_[i];
    left += coefficients_[i] * std::exp(-z2 * fourier) * shape_gradient(roots_[i]) * (1 + static_cast<int>(body_)) / z2;
  }
  return 1 - left;
}

double CoolingSeries::time_of(double place, double theta_wanted, double low, double high) const {
  return root([&](double fourier) { return theta(place, fourier) - theta_wanted; }, low, high);
}

double HalfSpaceContact::interface() const {
  const double l = left.effusivity(), r = right.effusivity();
  return (l * left_start + r * right_start) / (l + r);
}

double HalfSpaceContact::temperature(double x, double t) const {
  const Phase& body = x < 0 ? left : right;
  const double from = x < 0 ? left_start : right_start;
  return from + (interface() - from) * std::erfc(std::abs(x) / (2 * std::sqrt(body.diffusivity() * t)));
}

double HalfSpaceContact::flux(double t) const {
  return left.effusivity() * (interface() - left_start) / std::sqrt(pi * t);
}

double HalfSpaceFilm::temperature(double x, double t) const {
  const double u = x / (2 * std::sqrt(body.diffusivity() * t));
  const double v = film * std::sqrt(t) / body.effusivity();
  // exp(h x / k + v^2) erfc(u + v) = exp(-u^2) scaled_erfc(u + v)
  return start + (surroundings - start) * (std::erfc(u) - std::exp(-u * u) * scaled_erfc(u + v));
}

double HalfSpaceFlux::temperature(double x, double t) const {
  const double length = std::sqrt(body.diffusivity() * t), u = x / (2 * length);
  return start + flux / body.conductivity * (2 * length / std::sqrt(pi) * std::exp(-u * u) - x * std::erfc(u));
}

double scaled_erfc(double x) {
  if (x < 10) return std::exp(x * x) * std::erfc(x);
  // Asymptotic series (Abramowitz & Stegun 1964, eq. 7.1.23); its terms fall below 1e-16 before they grow.
  double term = 1, sum = 1;
  for (int n = 1; n <= 12; ++n) {
    term *= -(2 * n - 1) / (2 * x * x);
    sum += term;
  }
  return sum / (x * std::sqrt(pi));
}

}  // namespace palier::exact
