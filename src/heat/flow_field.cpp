#include "palier/heat/flow_field.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace palier::heat {

using base::lane;
using base::lane_count;

template <class Real>
FlowField<Real>::FlowField(const Bodies<Real>& bodies) : bodies_(bodies) {
  const auto cells = static_cast<std::size_t>(bodies_[0]->cells());
  for (std::vector<Real>* v : {&theta_, &theta_slope_, &scratch_}) v->assign(cells, base::all_lanes<Real>(0));
  for (std::vector<Real>* v : {&conductance_, &flow_, &by_inner_, &by_outer_})
    v->assign(cells + 1, base::all_lanes<Real>(0));
  for (int l = 0; l < lane_count<Real>; ++l) {
    arrests_.emplace_back(body(l).metal_curve());
    for (std::size_t f = 0; f <= cells; ++f) lane(conductance_[f], l) = body(l).conductance()[f];
  }
}

template <class Real>
void FlowField<Real>::evaluate(const Real& time, const std::vector<Real>& unknown, const LaneFronts<Real>& fronts) {
  const auto cells = unknown.size();
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Body& b = body(l);
    for (int layer = 0; layer < b.layers(); ++layer) {
      const alloy::EnthalpyCurve& curve = b.curve(layer);
      const auto end = static_cast<std::size_t>(b.layer_cells(layer).end);
      const auto begin = static_cast<std::size_t>(b.layer_cells(layer).begin);
      if (curve.is_straight()) {
        double origin = 0, slope = 0;
        curve.potential(0, origin, slope);
        for (auto i = begin; i < end; ++i) {
          lane(theta_[i], l) = origin + slope * lane(unknown[i], l);
          lane(theta_slope_[i], l) = slope;
        }
        continue;
      }
      for (auto i = begin; i < end; ++i)
        curve.potential(lane(unknown[i], l), lane(theta_[i], l), lane(theta_slope_[i], l));
    }
    const Fronts& of_lane = fronts[static_cast<std::size_t>(l)];
    for (int k = 0; k < of_lane.count; ++k) {
      const auto j = static_cast<std::size_t>(of_lane.front[static_cast<std::size_t>(k)].cell);
      lane(theta_[j], l) = arrest(l).potential;
      lane(theta_slope_[j], l) = 0;
    }
  }
  for (std::size_t f = 1; f < cells; ++f) {
    flow_[f] = conductance_[f] * (theta_[f - 1] - theta_[f]);
    by_inner_[f] = conductance_[f] * theta_slope_[f - 1];
    by_outer_[f] = -conductance_[f] * theta_slope_[f];
  }
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Fronts& of_lane = fronts[static_cast<std::size_t>(l)];
    const double t = lane(time, l);
    for (int layer = 0; layer + 1 < body(l).layers(); ++layer) contact(l, layer, t, unknown, of_lane);
    boundary(l, -1, t, unknown, of_lane);
    boundary(l, +1, t, unknown, of_lane);
    for (int k = 0; k < of_lane.count; ++k) front_flows(l, of_lane.front[static_cast<std::size_t>(k)], unknown);
    for (int k = 0; k < of_lane.count; ++k) {
      const Front& f = of_lane.front[static_cast<std::size_t>(k)];
      excess_[static_cast<std::size_t>(l)][static_cast<std::size_t>(k)] =
          front_excess(l, f, lane(unknown[static_cast<std::size_t>(f.cell)], l));
    }
  }
}

/// The cell's center behind half a cell, or its front behind what lies between front and face.
template <class Real>
Terminal FlowField<Real>::terminal(int l, int cell, int side, const std::vector<Real>& unknown,
                                   const Fronts& fronts) const {
  const Body& b = body(l);
  const double u = lane(unknown[static_cast<std::size_t>(cell)], l);
  Terminal t;
  if (const Front* front = fronts.in_cell(cell)) {
    const LastArrest& a = arrest(l);
    const FrontPlace p = place(b, a, *front, u);
    const bool solid = side == front->solid_side;
    const double depth = solid ? p.solid_depth : p.liquid_depth;
    const double k = solid ? a.solid_conductivity : a.liquid_conductivity;
    t.temperature = a.temperature;
    t.resistance = std::max(depth, 0.0) / k;
    t.resistance_slope = depth > 0 ? -side * p.flow_radius_slope / k : 0.0;
    return t;
  }
  const alloy::EnthalpyCurve& curve = b.curve(b.layer_of(cell));
  const double k = curve.conductivity(u);
  t.temperature = curve.temperature(u);
  t.temperature_slope = curve.temperature_slope(u);
  t.resistance = b.half_width(cell) / k;
  t.resistance_slope = -t.resistance / k * curve.conductivity_slope(u);
  return t;
}

template <class Real>
void FlowField<Real>::contact(int l, int layer, double time, const std::vector<Real>& unknown, const Fronts& fronts) {
  const Body& b = body(l);
  const int f = b.layer_cells(layer).end;
  const bool outward = layer >= b.metal();  // the metal lies on the side of the smaller radius
  const int metal_side = outward ? f - 1 : f, other_side = outward ? f : f - 1;
  ContactState state;
  state.time = time;
  const bool at_metal = b.layer_of(metal_side) == b.metal();
  if (at_metal && b.contact(layer).over == Contact::Over::surface_fraction_solid) {
    const double u = lane(unknown[static_cast<std::size_t>(metal_side)], l);
    state.fraction_solid = b.metal_curve().fraction_solid(u);
    state.fraction_solid_slope = b.metal_curve().fraction_slope(u);
  }
  const int direction = outward ? 1 : -1;
  const FaceFlow flow = contact_flow(b.contact(layer), terminal(l, metal_side, direction, unknown, fronts),
                                     terminal(l, other_side, -direction, unknown, fronts), state);
  const auto face = static_cast<std::size_t>(f);
  const double scale = direction * b.area()[face];
  lane(flow_[face], l) = scale * flow.flux;
  lane(by_inner_[face], l) = scale * (outward ? flow.by_first : flow.by_second);
  lane(by_outer_[face], l) = scale * (outward ? flow.by_second : flow.by_first);
  if (at_metal) surface_[static_cast<std::size_t>(l)][outward ? 1 : 0] = flow.surface;
}

template <class Real>
void FlowField<Real>::boundary(int l, int side, double time, const std::vector<Real>& unknown, const Fronts& fronts) {
  const Body& b = body(l);
  const Boundary& end = side > 0 ? b.outer() : b.inner();
  const int cell = side > 0 ? b.cells() - 1 : 0;
  const auto face = static_cast<std::size_t>(side > 0 ? b.cells() : 0);
  const Terminal t = terminal(l, cell, side, unknown, fronts);
  FaceFlow flow;  // out of the body
  flow.surface = t.temperature;
  switch (end.kind) {
    case Boundary::Kind::adiabatic:
      break;
    case Boundary::Kind::film:
      flow = film_flow(end, t);
      break;
    case Boundary::Kind::heat_flux:
      flow.flux = end.heat_flux(time);
      flow.surface = t.temperature - flow.flux * t.resistance;
      break;
    case Boundary::Kind::fixed_temperature: {
      const double wall = side > 0 ? b.outer_potential() : b.inner_potential();
      const auto i = static_cast<std::size_t>(cell);
      const Front* front = fronts.in_cell(cell);
      double distance = b.half_width(cell), distance_slope = 0;
      if (front) {
        const FrontPlace p = place(b, arrest(l), *front, lane(unknown[i], l));
        const double depth = side == front->solid_side ? p.solid_depth : p.liquid_depth;
        // The flux to a front at the very face has no bound; a tenth of a half cell is where this stops.
        const double least = 0.1 * b.half_width(cell);
        distance = std::max(depth, least);
        distance_slope = depth > least ? -side * p.flow_radius_slope : 0.0;
      }
      flow.flux = (lane(theta_[i], l) - wall) / distance;
      flow.by_first = (lane(theta_slope_[i], l) - flow.flux * distance_slope) / distance;
      flow.surface = end.temperature;
      break;
    }
  }
  const double scale = side * b.area()[face];
  lane(flow_[face], l) = scale * flow.flux;
  lane((side > 0 ? by_inner_ : by_outer_)[face], l) = scale * flow.by_first;
  if (b.layer_of(cell) == b.metal()) surface_[static_cast<std::size_t>(l)][side > 0 ? 1 : 0] = flow.surface;
}

/// Flows from a front to the centers of its neighbors inside the metal; contacts and ends are done by then.
template <class Real>
void FlowField<Real>::front_flows(int l, const Front& front, const std::vector<Real>& unknown) {
  const Body& b = body(l);
  const FrontPlace where = place(b, arrest(l), front, lane(unknown[static_cast<std::size_t>(front.cell)], l));
  for (const int side : {-1, +1}) {
    const int neighbor = front.cell + side;
    if (neighbor < b.metal_cells().begin || neighbor >= b.metal_cells().end) continue;
    const auto n = static_cast<std::size_t>(neighbor);
    const FrontFlow flow =
        flow_to_neighbor(b, arrest(l), front, where, side, lane(theta_[n], l), lane(theta_slope_[n], l));
    const auto face = static_cast<std::size_t>(side > 0 ? front.cell + 1 : front.cell);
    lane(flow_[face], l) = flow.flow;
    lane(by_inner_[face], l) = side > 0 ? flow.by_front : flow.by_neighbor;
    lane(by_outer_[face], l) = side > 0 ? flow.by_neighbor : flow.by_front;
  }
}

/// excess = phi C_s dT_s + (1 - phi) [H(T + dT_l) - H_hot],  dT_s = -1/2 q_s a/k_s,  dT_l = +1/2 q_l b/k_l:
/// the means of straight profiles on both sides of the front, a and b the depths of the two parts, q_s and q_l the flux
/// toward the solid side on either side of the front, H the enthalpy above the arrest.
template <class Real>
FrontExcess FlowField<Real>::front_excess(int l, const Front& front, double unknown) const {
  const Body& b = body(l);
  const LastArrest& a = arrest(l);
  const FrontPlace p = place(b, a, front, unknown);
  const int s = front.solid_side;
  const double share_slope = -1 / (a.hot - a.cold);
  FrontExcess e;
  const auto add = [&](int side, double depth, double share, double share_change, double half_per_k, const auto& heat) {
    const auto face = static_cast<std::size_t>(side > 0 ? front.cell + 1 : front.cell);
    const double area = b.area()[face];
    if (!(area > 0)) return;  // the center of a cylinder or sphere: nothing flows
    const double flux = s * lane(flow_[face], l) / area;
    const double by_self = s * lane((side > 0 ? by_inner_ : by_outer_)[face], l) / area;
    const double by_neighbor = s * lane((side > 0 ? by_outer_ : by_inner_)[face], l) / area;
    const double depth_slope = -side * p.flow_radius_slope;
    const auto [held, capacity] = heat(half_per_k * depth * flux);
    e.excess += share * held;
    e.by_self += share_change * held + share * capacity * half_per_k * (depth_slope * flux + depth * by_self);
    (side > 0 ? e.by_right : e.by_left) += share * capacity * half_per_k * depth * by_neighbor;
  };
  add(s, p.solid_depth, p.solid_share, share_slope, -0.5 / a.solid_conductivity,
      [&](double dT) { return std::pair(a.solid_capacity * dT, a.solid_capacity); });
  add(-s, p.liquid_depth, 1 - p.solid_share, -share_slope, 0.5 / a.liquid_conductivity, [&](double dT) {
    const double T = a.temperature + std::max(dT, 0.0), capacity = a.hot_enthalpy.slope(T);
    return std::pair(a.hot_enthalpy(T) - a.hot + std::min(dT, 0.0) * capacity, capacity);
  });
  return e;
}

/// The unknown with which a front in a cell makes up the cell's enthalpy; nothing where none within reach does.
template <class Real>
std::optional<double> FlowField<Real>::unknown_for(int l, const Front& front, double enthalpy, double lowest,
                                                   double highest, double time, const std::vector<Real>& unknowns,
                                                   const Fronts& fronts) {
  const auto surplus = [&](double unknown) {
    return unknown + excess_of(l, front, unknown, time, unknowns, fronts).excess - enthalpy;
  };
  double a = lowest, b = highest, fa = surplus(a), fb = surplus(b);
  if (fa > 0 || fb < 0) return std::nullopt;
  for (int i = 0; i < 30 && b - a > 1e-9 * (highest - lowest); ++i) {  // regula falsi, every third step a halving
    double u = i % 3 == 2 ? 0.5 * (a + b) : b - fb * (b - a) / (fb - fa);
    if (!(u > a && u < b)) u = 0.5 * (a + b);
    const double f = surplus(u);
    (f > 0 ? b : a) = u;
    (f > 0 ? fb : fa) = f;
  }
  return 0.5 * (a + b);
}

template <class Real>
FrontExcess FlowField<Real>::excess_of(int l, const Front& front, double unknown, double time,
                                       const std::vector<Real>& unknowns, const Fronts& fronts) {
  const Body& b = body(l);
  const auto j = static_cast<std::size_t>(front.cell);
  Fronts with = fronts;
  with.remove(front.cell);
  with.add(front);
  std::vector<Real>& u = scratch_;
  for (int i = std::max(0, front.cell - 1); i <= std::min(b.cells() - 1, front.cell + 1); ++i) {
    const auto c = static_cast<std::size_t>(i);
    u[c] = unknowns[c];
    b.curve(b.layer_of(i)).potential(lane(u[c], l), lane(theta_[c], l), lane(theta_slope_[c], l));
    if (with.in_cell(i)) {
      lane(theta_[c], l) = arrest(l).potential;
      lane(theta_slope_[c], l) = 0;
    }
  }
  lane(u[j], l) = unknown;
  for (int layer = 0; layer + 1 < b.layers(); ++layer) {
    const int f = b.layer_cells(layer).end;
    if (f == front.cell || f == front.cell + 1) contact(l, layer, time, u, with);
  }
  if (front.cell == 0) boundary(l, -1, time, u, with);
  if (front.cell + 1 == b.cells()) boundary(l, +1, time, u, with);
  front_flows(l, front, u);
  return front_excess(l, front, unknown);
}

template class FlowField<double>;
template class FlowField<base::Lanes<4>>;

}  // namespace palier::heat
