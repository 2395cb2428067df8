// Root of a function between two points, to the last digits of a double.
#pragma once

#include <functional>

namespace palier::exact {

/// Root of f in [low, high]. Throws std::domain_error where f has the same sign at both ends, and
/// std::runtime_error where 200 evaluations do not suffice.
/// Source of the method: Alefeld, Potra, Shi, ACM Trans. Math. Softw. 21 (1995) 327 (as in Boost.Math).
double root(const std::function<double(double)>& f, double low, double high);

}  // namespace palier::exact
