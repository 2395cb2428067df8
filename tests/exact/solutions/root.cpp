#include "exact/solutions/root.hpp"

#include <boost/math/tools/roots.hpp>
#include <cstdint>
#include <stdexcept>

namespace palier::exact {

double root(const std::function<double(double)>& f, double low, double high) {
  namespace tools = boost::math::tools;
  std::uintmax_t evaluations = 200;
  const auto [a, b] = tools::toms748_solve(f, low, high, tools::eps_tolerance<double>(52), evaluations);
  if (evaluations >= 200) throw std::runtime_error("root: not converged");
  return 0.5 * (a + b);
}

}  // namespace palier::exact
