#include "exact/solutions/inward_freezing.hpp"

#include <stdexcept>

namespace palier::exact {

double InwardFreezing::plank_time() const {
  return solid.density * latent_heat * radius * radius / (2 * (shape + 1) * solid.conductivity * undercooling) *
         (1 + 2 / biot());
}

double InwardFreezing::plate_time_first_order(double depth) const {
  if (shape != 0) throw std::domain_error("for a plate only");
  const double s = depth, b = solid.conductivity / film;
  const double quasi_steady = s * s / 2 + b * s;
  const double correction = (s * s * s / 6 + b * s * s / 2) / ((s + b) * quasi_steady);
  return solid.density * latent_heat / (solid.conductivity * undercooling) * quasi_steady * (1 + stefan() * correction);
}

}  // namespace palier::exact
