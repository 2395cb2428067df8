#include "palier/heat/face_flow.hpp"

#include <algorithm>
#include <cmath>

namespace palier::heat {
namespace {

constexpr double kStefanBoltzmann = 5.670374419e-8;  // [W/m2/K4] CODATA 2018
constexpr int kIterations = 50;                      // bound of the scalar Newton; 3 to 5 are used

/// Conductance [W/m2/K] and its slope in what it depends on; a perfect contact is handled by its caller.
struct Law {
  double conductance;
  double slope;
};

Law at(const Contact& contact, double x) { return {contact.conductance(x), contact.conductance.slope(x)}; }

/// Contact whose conductance follows the temperature Ts of the first face: solves
///   q R(q) = Ta - Tb,  R = Ra + Rb + 1/h(Ts),  Ts = Ta - q Ra
/// by Newton, kept in the bracket between the fluxes of the smallest and the largest conductance.
FaceFlow follows_surface_temperature(const Contact& contact, const Terminal& a, const Terminal& b) {
  const double drop = a.temperature - b.temperature;
  const double bound1 = drop / (a.resistance + b.resistance + 1 / contact.conductance.smallest());
  const double bound2 = drop / (a.resistance + b.resistance + 1 / contact.conductance.largest());
  double low = std::min(bound1, bound2), high = std::max(bound1, bound2);
  double q = bound1, resistance = 0, law_term = 0, slope = 1;
  for (int i = 0; i < kIterations; ++i) {
    const Law h = at(contact, a.temperature - q * a.resistance);
    resistance = a.resistance + b.resistance + 1 / h.conductance;
    law_term = h.slope / (h.conductance * h.conductance);
    slope = resistance + q * law_term * a.resistance;
    const double excess = q * resistance - drop;
    (excess > 0 ? high : low) = q;
    double next = slope > 0 ? q - excess / slope : 0.5 * (low + high);
    if (!(next >= low && next <= high)) next = 0.5 * (low + high);
    if (std::abs(next - q) <= 1e-14 * std::abs(q)) break;
    q = next;
  }
  FaceFlow f;
  f.flux = q;
  const double factor = 1 + q * law_term;
  f.by_first = factor * (a.temperature_slope - q * a.resistance_slope) / slope;
  f.by_second = (-b.temperature_slope - q * b.resistance_slope) / slope;
  f.surface = a.temperature - q * a.resistance;
  return f;
}

}  // namespace

FaceFlow contact_flow(const Contact& contact, const Terminal& a, const Terminal& b, const ContactState& state) {
  if (contact.over == Contact::Over::surface_temperature) return follows_surface_temperature(contact, a, b);
  double gap = 0, gap_slope = 0;  // resistance of the contact itself
  switch (contact.over) {
    case Contact::Over::perfect:
      break;
    case Contact::Over::time:
      gap = 1 / contact.conductance(state.time);
      break;
    case Contact::Over::surface_fraction_solid: {
      const Law h = at(contact, state.fraction_solid);
      gap = 1 / h.conductance;
      gap_slope = -h.slope * gap * gap * state.fraction_solid_slope;
      break;
    }
    default:
      gap = 1 / contact.conductance(0);
  }
  const double conductance = 1 / (a.resistance + gap + b.resistance);
  FaceFlow f;
  f.flux = conductance * (a.temperature - b.temperature);
  f.by_first = conductance * (a.temperature_slope - f.flux * (a.resistance_slope + gap_slope));
  f.by_second = conductance * (-b.temperature_slope - f.flux * b.resistance_slope);
  f.surface = a.temperature - f.flux * a.resistance;
  return f;
}

FaceFlow film_flow(const Boundary& film, const Terminal& a) {
  const double ambient = film.temperature, radiation = film.emissivity * kStefanBoltzmann;
  const auto taken = [&](double T) {
    const double square = T * T, ambient_square = ambient * ambient;
    return film.film_coefficient * (T - ambient) + radiation * (square * square - ambient_square * ambient_square);
  };
  // Newton from the cell's temperature: the flux leaving is convex and rising in Ts, so it converges from above.
  double Ts = a.temperature, q = 0, slope = 0;
  for (int i = 0; i < kIterations; ++i) {
    q = taken(Ts);
    slope = film.film_coefficient + 4 * radiation * Ts * Ts * Ts;
    const double step = (Ts - a.temperature + a.resistance * q) / (1 + a.resistance * slope);
    Ts -= step;
    if (std::abs(step) <= 1e-13 * std::abs(Ts)) break;
  }
  FaceFlow f;
  f.flux = taken(Ts);
  f.by_first = (a.temperature_slope - f.flux * a.resistance_slope) * slope / (1 + a.resistance * slope);
  f.surface = Ts;
  return f;
}

}  // namespace palier::heat
