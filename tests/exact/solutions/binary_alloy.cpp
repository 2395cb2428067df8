// Path and enthalpy of the binary of the similarity solution.
#include <algorithm>
#include <cmath>

#include "exact/solutions/alloy_similarity.hpp"

namespace palier::exact {

double BinaryAlloy::end_of_freezing() const {
  if (rule == Rule::scheil) return eutectic;
  return std::max(eutectic, melting_point + slope * composition / partition_coefficient);
}

double BinaryAlloy::last_fraction() const {
  const double T = end_of_freezing();
  if (rule == Rule::lever && T > eutectic) return 0;
  return 1 - fraction_solid(T);
}

double BinaryAlloy::fraction_solid(double T) const {
  if (T >= liquidus()) return 0;
  if (T < end_of_freezing()) return 1;
  if (rule == Rule::lever) return (liquidus() - T) / ((1 - partition_coefficient) * (melting_point - T));
  return 1 - std::pow((melting_point - T) / (melting_point - liquidus()), 1 / (partition_coefficient - 1));
}

double BinaryAlloy::fraction_solid_slope(double T) const {
  const double undercooling = melting_point - T;
  if (rule == Rule::lever)
    return -(melting_point - liquidus()) / ((1 - partition_coefficient) * undercooling * undercooling);
  return (1 - fraction_solid(T)) / ((partition_coefficient - 1) * undercooling);
}

double BinaryAlloy::conductivity(double T) const {
  const double fs = fraction_solid(T);
  return fs * solid.conductivity + (1 - fs) * liquid.conductivity;
}

double BinaryAlloy::heat_set_free(double T) const {
  if (latent_heat_rule == LatentHeat::constant) return latent_heat;
  return latent_heat + (liquid.heat_capacity - solid.heat_capacity) * (T - eutectic);
}

double BinaryAlloy::enthalpy_slope(double T) const {
  const double fs = fraction_solid(T);
  return fs * solid.heat_capacity + (1 - fs) * liquid.heat_capacity - fraction_solid_slope(T) * heat_set_free(T);
}

double BinaryAlloy::arrest_heat() const { return last_fraction() * heat_set_free(end_of_freezing()); }

}  // namespace palier::exact
