#include "palier/heat/front.hpp"

#include <algorithm>
#include <cmath>
#include <utility>
#include <vector>

namespace palier::heat {
namespace {

// A front outside its cell may come close to a neighbor's center; the distance is not let under this share of a cell.
constexpr double kClosest = 0.05;
// Share of the cell's radius within which flows to a front are taken as if it were there still.
constexpr double kNearestCenter = 0.25;

}  // namespace

LastArrest::LastArrest(const alloy::EnthalpyCurve& metal) {
  if (metal.arrests().empty() || metal.arrests().front().cold_end != metal.end_of_freezing_enthalpy()) return;
  const alloy::FlatPiece& a = metal.arrests().front();
  exists = true;
  temperature = a.temperature;
  cold = a.cold_end;
  hot = a.hot_end;
  const double past = 1e-9 * (hot - cold);
  double slope = 0;
  metal.potential(0.5 * (cold + hot), potential, slope);
  solid_conductivity = metal.conductivity(cold - past);
  liquid_conductivity = metal.conductivity(hot + past);
  solid_capacity = 1 / metal.temperature_slope(cold - past);
  // Straight between points of equal spacing in enthalpy up to the liquidus, then with the liquid's heat capacity.
  constexpr int kPoints = 64;
  const double liquidus = metal.liquidus_enthalpy();
  std::vector<double> T{temperature}, H{hot};
  for (int i = 1; liquidus > hot + past && i <= kPoints; ++i) {
    H.push_back(hot + (liquidus - hot) * i / kPoints);
    T.push_back(metal.temperature(H.back()));
  }
  constexpr double kFarAbove = 5000;  // [K]
  T.push_back(T.back() + kFarAbove);
  H.push_back(H.back() + kFarAbove / metal.temperature_slope(H.back() + past));
  hot_enthalpy = base::Table(std::move(T), std::move(H));
}

FrontPlace place(const Body& body, const LastArrest& arrest, const Front& front, double unknown) {
  const auto j = static_cast<std::size_t>(front.cell);
  const double left = body.face()[j], right = body.face()[j + 1], volume = body.volume()[j];
  const double latent = arrest.hot - arrest.cold;
  FrontPlace p;
  p.solid_share = (arrest.hot - unknown) / latent;
  const bool outward = front.solid_side > 0;
  p.radius = body.radius_of_volume(outward ? body.volume_inside(right) - p.solid_share * volume
                                           : body.volume_inside(left) + p.solid_share * volume);
  const double least = body.exponent() == 0 ? p.radius : kNearestCenter * (left > 0 ? left : right);
  p.flow_radius = std::max(p.radius, least);
  if (p.radius >= least)
    p.flow_radius_slope = (outward ? 1 : -1) * volume / (std::pow(p.radius, body.exponent()) * latent);
  p.solid_depth = outward ? right - p.flow_radius : p.flow_radius - left;
  p.liquid_depth = outward ? p.flow_radius - left : right - p.flow_radius;
  return p;
}

FrontFlow flow_to_neighbor(const Body& body, const LastArrest& arrest, const Front& front, const FrontPlace& where,
                           int side, double neighbor_potential, double neighbor_potential_slope) {
  const auto j = static_cast<std::size_t>(front.cell);
  const double center = body.center()[static_cast<std::size_t>(front.cell + side)];
  const double closest = kClosest * (body.face()[j + 1] - body.face()[j]);
  const bool too_close = side * (center - where.flow_radius) < closest;
  const double radius = too_close ? center - side * closest : where.flow_radius;
  const double inner = std::min(radius, center), outer = std::max(radius, center);
  const double G = body.shell_conductance(inner, outer);
  // d G / d r1 = G^2 / r1^m, d G / d r2 = -G^2 / r2^m
  const double by_radius = too_close || radius <= 0 ? 0.0 : side * G * G / std::pow(radius, body.exponent());
  const double drop = side * (arrest.potential - neighbor_potential);
  FrontFlow f;
  f.flow = G * drop;
  f.by_front = by_radius * drop * where.flow_radius_slope;
  f.by_neighbor = -side * G * neighbor_potential_slope;
  return f;
}

}  // namespace palier::heat
