// The moment within a step at which something falls through zero.
#pragma once

#include <cmath>

namespace palier::freeze {

/// Root of a function that is positive at a and not positive at b; regula falsi with the Illinois change, bisection
/// when it drags. The functions have kinks, so nothing smarter is asked.
template <class Function>
double falls_through_zero(const Function& f, double a, double b, double fa, double fb) {
  const double close = 1e-12 * std::abs(b) + 1e-9 * (b - a);
  for (int i = 0; i < 80 && b - a > close; ++i) {
    double t = b - fb * (b - a) / (fb - fa);
    if (i % 3 == 2 || !(t > a && t < b)) t = 0.5 * (a + b);
    const double ft = f(t);
    if (ft > 0) {
      a = t;
      fa = ft;
      fb *= 0.5;
    } else {
      b = t;
      fb = ft;
      fa *= 0.5;
    }
  }
  return b;
}

}  // namespace palier::freeze
