#include "palier/freeze/profile.hpp"

#include <algorithm>
#include <cmath>

namespace palier::freeze {
namespace {

// A metal without a freezing range starts and ends at one temperature; a thermocouple shows the start about this much
// above it.
constexpr double kStartAbovePoint = 1.0;  // [K]
constexpr double kIsothermal = 1e-6;      // [K]

}  // namespace

Profile::Profile(const heat::Body& body, const alloy::SolidificationPath& path)
    : body_(body),
      path_(path),
      metal_(body.metal_cells()),
      arrest_(body.metal_curve()),
      start_temperature_(path.liquidus() + (path.freezing_range() < kIsothermal ? kStartAbovePoint : 0.0)),
      start_enthalpy_(body.metal_curve().enthalpy(start_temperature_)) {}

Profile::Sure Profile::started(const heat::StepView& step) const {
  const auto first = step.before().enthalpy.begin() + metal_.begin, last = step.before().enthalpy.begin() + metal_.end;
  const auto then = std::minmax_element(first, last);
  const auto now =
      std::minmax_element(step.after().enthalpy.begin() + metal_.begin, step.after().enthalpy.begin() + metal_.end);
  const heat::Marks &a = step.before().marks[0], &b = step.after().marks[0];
  const double coldest_face = std::min({a.inner_surface, a.outer_surface, b.inner_surface, b.outer_surface});
  const double hottest_face = std::max({a.inner_surface, a.outer_surface, b.inner_surface, b.outer_surface});
  // What is read between cells, faces and the ends of the step lies within a margin of what they have.
  const double margin = 0.02 * std::abs(start_enthalpy_ - body_.metal_curve().end_of_freezing_enthalpy()) + 1.0;
  const double margin_T = 1.0;
  if (std::min(*then.first, *now.first) > start_enthalpy_ + margin && coldest_face > start_temperature_ + margin_T)
    return Sure::none;
  if (std::max(*then.second, *now.second) < start_enthalpy_ - margin && hottest_face < start_temperature_ - margin_T)
    return Sure::all;
  return Sure::unknown;
}

bool Profile::surely_none_solid(const heat::StepView& step) const {
  const heat::Marks &a = step.before().marks[0], &b = step.after().marks[0];
  const double coldest_face = std::min({a.inner_surface, a.outer_surface, b.inner_surface, b.outer_surface});
  if (coldest_face <= path_.end_of_freezing() + 1.0) return false;
  if (step.before().fronts[0].count + step.after().fronts[0].count > 0) return false;
  const double solid = arrest_.exists ? arrest_.hot : body_.metal_curve().end_of_freezing_enthalpy();
  const double margin = 0.02 * std::abs(start_enthalpy_ - solid);
  for (const heat::State<double>* state : {&step.before(), &step.after()})
    for (int i = metal_.begin; i < metal_.end; ++i)
      if (state->enthalpy[static_cast<std::size_t>(i)] <= solid + margin) return false;
  return true;
}

bool Profile::has_center() const {
  return metal_.begin == 0 && body_.face().front() <= 0 && body_.inner().kind == heat::Boundary::Kind::adiabatic;
}

Point Profile::point(double radius) const {
  const auto begin = body_.center().begin() + metal_.begin, end = body_.center().begin() + metal_.end;
  Point p;
  p.radius = radius;
  p.left = metal_.begin + static_cast<int>(std::upper_bound(begin, end, radius) - begin) - 1;
  const auto faces = body_.face().begin();
  p.cell = static_cast<int>(std::upper_bound(faces + metal_.begin, faces + metal_.end, radius) - faces) - 1;
  p.cell = std::clamp(p.cell, metal_.begin, metal_.end - 1);
  return p;
}

/// The front that sweeps the cell in this step; its enthalpy has kinks in time then, and a cubic through both ends of
/// the step says nothing.
const heat::Front* Profile::swept_by(const heat::StepView& step, int cell) const {
  const heat::Fronts &before = step.before().fronts[0], &after = step.after().fronts[0];
  for (int k = 0; k < before.count; ++k) {
    const heat::Front& f = before.front[static_cast<std::size_t>(k)];
    if (!std::isfinite(step.front_radius(f.solid_side, step.end()))) continue;
    const heat::Front* later = after.with_solid_side(f.solid_side);
    const int end = later ? later->cell : (f.solid_side > 0 ? metal_.begin : metal_.end - 1);
    if (cell >= std::min(f.cell, end) && cell <= std::max(f.cell, end)) return &f;
  }
  return nullptr;
}

/// Temperature at a cell's center in a state that has a front at `radius`: the cell's own, or, in the front's cell, on
/// the line from the front to the neighbor on the center's side.
double Profile::beside_front(const heat::State<double>& state, const heat::Front& front, double radius,
                             int cell) const {
  const alloy::EnthalpyCurve& curve = body_.metal_curve();
  const heat::Front* here = state.fronts[0].with_solid_side(front.solid_side);
  if (!here || here->cell != cell) return curve.temperature(state.enthalpy[static_cast<std::size_t>(cell)]);
  const double center = body_.center()[static_cast<std::size_t>(cell)];
  const int side = center > radius ? 1 : -1;
  const int neighbor = cell + side;
  double there = side > 0 ? state.marks[0].outer_surface : state.marks[0].inner_surface;
  double at = body_.face()[static_cast<std::size_t>(side > 0 ? metal_.end : metal_.begin)];
  if (neighbor >= metal_.begin && neighbor < metal_.end) {
    there = curve.temperature(state.enthalpy[static_cast<std::size_t>(neighbor)]);
    at = body_.center()[static_cast<std::size_t>(neighbor)];
  } else if (neighbor < metal_.begin && body_.inner().kind == heat::Boundary::Kind::adiabatic) {
    return arrest_.temperature;
  }
  return arrest_.temperature + (there - arrest_.temperature) * (center - radius) / (at - radius);
}

double Profile::center_temperature(const heat::StepView& step, int cell, double time) const {
  const heat::Front* front = swept_by(step, cell);
  if (!front) return step.temperature(cell, time);
  const int side = front->solid_side;
  const double center = body_.center()[static_cast<std::size_t>(cell)], T = arrest_.temperature;
  const double r0 = step.front_radius(side, step.begin()), r1 = step.front_radius(side, step.end());
  const double r = step.front_radius(side, time);
  // Distance of the center from the front, positive on the solid side: at begin, now, at end.
  const double d0 = side * (center - r0), d = side * (center - r), d1 = side * (center - r1);
  const double T0 = beside_front(step.before(), *front, r0, cell), T1 = beside_front(step.after(), *front, r1, cell);
  if ((d0 > 0) == (d1 > 0)) return T0 + (T1 - T0) * (time - step.begin()) / (step.end() - step.begin());
  // The front passes the center within the step; there the temperature is the arrest's.
  if ((d > 0) == (d1 > 0)) return T + (T1 - T) * std::clamp(d / d1, 0.0, 1.0);
  return T + (T0 - T) * std::clamp(d / d0, 0.0, 1.0);
}

double Profile::cell_fraction(const heat::StepView& step, int cell, double time) const {
  const auto c = static_cast<std::size_t>(cell);
  const alloy::EnthalpyCurve& curve = body_.metal_curve();
  const heat::Front* front = swept_by(step, cell);
  if (!front) return std::clamp(curve.fraction_solid(step.enthalpy(cell, time)), 0.0, 1.0);
  const double inside = body_.volume_inside(step.front_radius(front->solid_side, time));
  const double left = body_.volume_inside(body_.face()[c]), right = body_.volume_inside(body_.face()[c + 1]);
  const double share = std::clamp((front->solid_side > 0 ? right - inside : inside - left) / (right - left), 0.0, 1.0);
  // What is not yet behind the front is mush, and holds what it had frozen already.
  const double before = curve.fraction_solid(step.before().enthalpy[c]);
  const double mush = path_.fraction_above(std::max(center_temperature(step, cell, time), arrest_.temperature));
  return share + (1 - share) * std::clamp(mush, std::min(before, 1.0), 1.0);
}

Profile::Node Profile::left_node(const heat::StepView& step, const Point& p, double time) const {
  if (p.left >= metal_.begin)
    return {body_.center()[static_cast<std::size_t>(p.left)], center_temperature(step, p.left, time)};
  const double face = body_.face()[static_cast<std::size_t>(metal_.begin)];
  if (metal_.begin > 0 || body_.inner().kind != heat::Boundary::Kind::adiabatic)
    return {face, step.inner_surface(time)};
  // Flat at the center of symmetry: a parabola through the first two centers.
  const double T0 = center_temperature(step, metal_.begin, time);
  const double T1 = metal_.end - metal_.begin > 1 ? center_temperature(step, metal_.begin + 1, time) : T0;
  return {face, T0 + (T0 - T1) / 8};
}

Profile::Node Profile::right_node(const heat::StepView& step, const Point& p, double time) const {
  if (p.left + 1 < metal_.end)
    return {body_.center()[static_cast<std::size_t>(p.left + 1)], center_temperature(step, p.left + 1, time)};
  return {body_.face()[static_cast<std::size_t>(metal_.end)], step.outer_surface(time)};
}

double Profile::temperature(const heat::StepView& step, const Point& p, double time) const {
  Node left = left_node(step, p, time), right = right_node(step, p, time);
  // A front between the point and a node takes the node's place; a node in the front's own cell is no temperature at
  // all.
  for (const int solid_side : {-1, +1}) {
    const double radius = step.front_radius(solid_side, time);
    if (!std::isfinite(radius)) continue;
    const double reach = std::max(std::abs(right.radius - p.radius), std::abs(p.radius - left.radius));
    if (radius <= p.radius && radius > left.radius - reach) {
      const bool hosts = p.left >= metal_.begin && radius > body_.face()[static_cast<std::size_t>(p.left)];
      if (radius >= left.radius || hosts) left = {radius, arrest_.temperature};
    } else if (radius > p.radius && radius < right.radius + reach) {
      const bool hosts = p.left + 1 < metal_.end && radius < body_.face()[static_cast<std::size_t>(p.left + 2)];
      if (radius <= right.radius || hosts) right = {radius, arrest_.temperature};
    }
  }
  const double width = right.radius - left.radius;
  if (!(width > 0)) return left.temperature;
  return left.temperature + (right.temperature - left.temperature) * (p.radius - left.radius) / width;
}

double Profile::liquid_left(const heat::StepView& step, int cell, double time) const {
  if (const heat::Front* front = swept_by(step, cell)) {
    const auto c = static_cast<std::size_t>(front->solid_side > 0 ? cell : cell + 1);
    const double left = front->solid_side * (step.front_radius(front->solid_side, time) - body_.face()[c]);
    return std::isfinite(step.last_liquid()) && time >= step.last_liquid() ? -1.0 : std::max(left, 1e-300);
  }
  return step.enthalpy(cell, time) - body_.metal_curve().end_of_freezing_enthalpy();
}

double Profile::to_end(const heat::StepView& step, const Point& p, double time) const {
  const auto metal_begin = static_cast<std::size_t>(metal_.begin), metal_end = static_cast<std::size_t>(metal_.end);
  const double end_temperature = path_.end_of_freezing();
  const bool at_outer = p.radius >= body_.face()[metal_end], at_inner = p.radius <= body_.face()[metal_begin];
  const bool center = at_inner && metal_.begin == 0 && body_.inner().kind == heat::Boundary::Kind::adiabatic;
  if (at_outer && body_.outer().kind != heat::Boundary::Kind::adiabatic)
    return step.outer_surface(time) - end_temperature;
  if (at_inner && !center) return step.inner_surface(time) - end_temperature;
  if (!arrest_.exists) return temperature(step, p, time) - end_temperature;
  double nearest = 0;
  for (const int side : {-1, +1}) {
    const double radius = step.front_radius(side, time);
    if (!std::isfinite(radius)) continue;
    const double ahead = side * (radius - p.radius);  // positive: the point is on the liquid side
    if (ahead <= 0) return ahead;
    nearest = nearest > 0 ? std::min(nearest, ahead) : ahead;
  }
  // No front is followed past the point: the cell's own enthalpy tells, the solid part lying on its colder side.
  const double H = step.enthalpy(p.cell, time);
  if (nearest > 0 && H > arrest_.cold) return nearest;
  const auto c = static_cast<std::size_t>(p.cell);
  const double left = body_.volume_inside(body_.face()[c]), right = body_.volume_inside(body_.face()[c + 1]);
  const double T_left = p.cell > metal_.begin ? step.temperature(p.cell - 1, time) : step.inner_surface(time);
  const double T_right = p.cell + 1 < metal_.end ? step.temperature(p.cell + 1, time) : step.outer_surface(time);
  const double inside = body_.volume_inside(p.radius);
  const double share = std::clamp((T_right < T_left ? right - inside : inside - left) / (right - left), 0.0, 1.0);
  return (H - (arrest_.hot - share * (arrest_.hot - arrest_.cold))) / (arrest_.hot - arrest_.cold);
}

double Profile::fraction_solid(const heat::StepView& step, const Point& p, double time) const {
  if (to_end(step, p, time) <= 0) return 1.0;
  return std::min(path_.fraction_above(std::max(temperature(step, p, time), path_.end_of_freezing())), 1.0);
}

}  // namespace palier::freeze
