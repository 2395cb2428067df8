// Balance of solute over the freezing of a dilute alloy, from what it says of its phases alone.
#pragma once

#include <boost/math/quadrature/gauss.hpp>
#include <cmath>
#include <cstddef>

#include "palier/alloy/dilute.hpp"

namespace palier::samples {

/// Temperature at which a fraction liquid is left, by bisection [K].
inline double temperature_at(const alloy::DiluteFreezing& freezing, double liquid) {
  double low = freezing.end_of_freezing(), high = freezing.liquidus();
  for (int i = 0; i < 100; ++i) {
    const double middle = 0.5 * (low + high);
    (1 - freezing.fraction_solid(middle) < liquid ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

/// Solute that froze in between two fractions liquid, each layer with the composition it formed with [mass %].
inline double frozen_between(const alloy::DiluteFreezing& freezing, std::size_t element, double begin, double end) {
  // Over ln f, in which the compositions are smooth down to the last liquid.
  const auto layer = [&](double ln_f) {
    const double f = std::exp(ln_f);
    return f * freezing.compositions(temperature_at(freezing, f)).solid[element];
  };
  return boost::math::quadrature::gauss<double, 30>::integrate(layer, std::log(end), std::log(begin));
}

}  // namespace palier::samples
