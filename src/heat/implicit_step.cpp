#include "palier/heat/implicit_step.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace palier::heat {

using base::all_lanes;
using base::lane;
using base::lane_count;

namespace {

constexpr int kMostIterations = 14;
constexpr double kPastKink = 1e-12;  // relative; a cell stopped at a kink lands just on its far side

const double kGamma = 2 - std::sqrt(2.0);
const double kDiagonal = kGamma / 2;        // weight of the stage itself
const double kWeight = std::sqrt(2.0) / 4;  // weight of the two earlier stages in the last

}  // namespace

template <class Real>
double ImplicitStep<Real>::gamma() {
  return kGamma;
}

template <class Real>
ImplicitStep<Real>::ImplicitStep(const Bodies<Real>& bodies, std::vector<Real> scale)
    : field_(bodies), passage_(field_), scale_(std::move(scale)), matrix_(scale_.size()) {
  const std::size_t n = scale_.size();
  inverse_scale_.assign(n, all_lanes<Real>(0));
  inverse_volume_ = change_ = middle_unknown_ = rate_ = stage_.unknown = stage_.base = inverse_scale_;
  stage_.weight = all_lanes<Real>(0);
  middle_flow_.assign(n + 1, all_lanes<Real>(0));
  metal_heat_.assign(lane_count<Real>, 0.0);
  for (std::size_t i = 0; i < n; ++i) inverse_scale_[i] = 1.0 / scale_[i];
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Body& b = field_.body(l);
    for (std::size_t i = 0; i < n; ++i) lane(inverse_volume_[i], l) = 1 / b.volume()[i];
    for (int i = b.metal_cells().begin; i < b.metal_cells().end; ++i) {
      const auto c = static_cast<std::size_t>(i);
      metal_heat_[static_cast<std::size_t>(l)] += b.volume()[c] * lane(scale_[c], l);
    }
  }
}

template <class Real>
State<Real> ImplicitStep<Real>::start(const std::vector<Real>& enthalpy, const Real& time) {
  State<Real> s;
  s.enthalpy = s.unknown = stage_.unknown = enthalpy;
  stage_.fronts = s.fronts;
  field_.evaluate(time, s.unknown, s.fronts);
  s.flow = field_.flow();
  for (int l = 0; l < lane_count<Real>; ++l) s.marks[static_cast<std::size_t>(l)] = marks(l);
  return s;
}

template <class Real>
StepReport ImplicitStep<Real>::advance(const State<Real>& from, const Real& time, const Real& length,
                                       double newton_tolerance, State<Real>& to, Real& error) {
  const std::size_t n = scale_.size();
  const Real weight = kDiagonal * length;
  StepReport report;
  stage_.weight = weight;
  for (int l = 0; l < lane_count<Real>; ++l)
    for (const int side : {-1, +1}) passage_.note_solid_gain(l, side, from);

  // First stage, trapezoidal rule to time + gamma * length.
  for (std::size_t i = 0; i < n; ++i) stage_.base[i] = from.enthalpy[i] + weight * gain(from.flow, i);
  stage_.fronts = from.fronts;
  stage_.unknown = from.unknown;
  predict(time, Real(kGamma * length));
  if (!solve_stage(time + kGamma * length, newton_tolerance, report)) return report;
  middle_flow_ = field_.flow();
  middle_unknown_ = stage_.unknown;
  const LaneFronts<Real> middle_fronts = stage_.fronts;
  for (int l = 0; l < lane_count<Real>; ++l) middle_marks_[static_cast<std::size_t>(l)] = marks(l);

  // Second stage, backward differentiation to time + length.
  const Real share = kWeight * length;
  for (std::size_t i = 0; i < n; ++i)
    stage_.base[i] = from.enthalpy[i] + share * (gain(from.flow, i) + gain(middle_flow_, i));
  for (int l = 0; l < lane_count<Real>; ++l)
    for (const int side : {-1, +1}) passage_.pass_on_debts(stage_, l, side, from.fronts[static_cast<std::size_t>(l)]);
  set_rate(from.unknown, from.fronts, Real(kGamma * length));
  predict(time, Real((1 - kGamma) * length));
  if (!solve_stage(time + length, newton_tolerance, report)) return report;

  to.flow = field_.flow();
  to.unknown = stage_.unknown;
  to.fronts = stage_.fronts;
  for (std::size_t i = 0; i < n; ++i) {
    const Real last = gain(to.flow, i);
    to.enthalpy[i] = stage_.base[i] + weight * last;
    // Embedded third-order weights (1-w)/3, (3w+1)/3, d/3 against w, w, d.
    change_[i] =
        length * ((4 * kWeight - 1) / 3 * gain(from.flow, i) - gain(middle_flow_, i) / 3.0 + 2 * kDiagonal / 3 * last);
  }
  for (int l = 0; l < lane_count<Real>; ++l) {
    const auto s = static_cast<std::size_t>(l);
    to.marks[s] = marks(l);
    const Fronts& fronts = to.fronts[s];
    // A cell without a front starts the next step from its exact enthalpy.
    for (std::size_t i = 0; i < n; ++i)
      if (!fronts.in_cell(static_cast<int>(i))) lane(to.unknown[i], l) = lane(to.enthalpy[i], l);
  }
  for (int l = 0; l < lane_count<Real>; ++l)
    for (const int side : {-1, +1})
      if (const Front* before = from.fronts[static_cast<std::size_t>(l)].with_solid_side(side))
        share_error(l, before->cell, last_swept(l, *before));
  // Damped by the step's own operator, or stiff cells would make the estimate meaningless.
  assemble();
  matrix_.solve(change_);
  for (int l = 0; l < lane_count<Real>; ++l) lane(error, l) = error_norm(l);
  set_rate(middle_unknown_, middle_fronts, Real((1 - kGamma) * length));
  return report;
}

/// The cell in which a front that was there at the begin of the step is now. Where it has ended, or was let go before a
/// neighbor still too hot for it: the first cell on its way that is not solid, or the end of the metal.
template <class Real>
int ImplicitStep<Real>::last_swept(int l, const Front& before) const {
  const int side = before.solid_side;
  if (const Front* still = stage_.fronts[static_cast<std::size_t>(l)].with_solid_side(side)) return still->cell;
  const LayerCells metal = field_.body(l).metal_cells();
  const int end = side > 0 ? metal.begin : metal.end - 1;
  int cell = before.cell;
  while (cell != end && lane(stage_.unknown[static_cast<std::size_t>(cell)], l) < field_.arrest(l).cold) cell -= side;
  return cell;
}

/// Cells swept by a front share one mean error. Each alone has a kink in time where the front came or went, so its own
/// estimate is large, but what one has too much its neighbor has too little: the error of the front's place is that of
/// their sum.
template <class Real>
void ImplicitStep<Real>::share_error(int l, int first, int last) {
  const std::vector<double>& all_volumes = field_.body(l).volume();
  const auto low = static_cast<std::size_t>(std::min(first, last)),
             high = static_cast<std::size_t>(std::max(first, last));
  double sum = 0, volume = 0;
  for (std::size_t i = low; i <= high; ++i) {
    sum += all_volumes[i] * lane(change_[i], l);
    volume += all_volumes[i];
  }
  for (std::size_t i = low; i <= high; ++i) lane(change_[i], l) = sum / volume;
}

/// Root of the sum of volume * error^2 / scale over the metal's volume * scale: the error as a share of the heat that
/// must leave the metal.
template <class Real>
double ImplicitStep<Real>::error_norm(int l) const {
  double sum = 0;
  const std::vector<double>& volume = field_.body(l).volume();
  for (std::size_t i = 0; i < change_.size(); ++i) {
    const double e = lane(change_[i], l);
    sum += volume[i] * e * e * lane(inverse_scale_[i], l);
  }
  return std::sqrt(sum / metal_heat_[static_cast<std::size_t>(l)]);
}

/// Moves the unknowns along the rate they had, through the same stops as Newton's changes.
template <class Real>
void ImplicitStep<Real>::predict(const Real& time, const Real& length) {
  for (std::size_t i = 0; i < change_.size(); ++i) change_[i] = rate_[i] * length;
  move(time);
}

/// Rate of the unknowns from a former stage to now; none where a front came or went, since the unknown changed meaning.
template <class Real>
void ImplicitStep<Real>::set_rate(const std::vector<Real>& before, const LaneFronts<Real>& fronts_before,
                                  const Real& length) {
  for (std::size_t i = 0; i < rate_.size(); ++i) rate_[i] = (stage_.unknown[i] - before[i]) / length;
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Fronts &then = fronts_before[static_cast<std::size_t>(l)], &now = stage_.fronts[static_cast<std::size_t>(l)];
    for (const Fronts* some : {&then, &now})
      for (int k = 0; k < some->count; ++k) {
        const int cell = some->front[static_cast<std::size_t>(k)].cell;
        if (!then.in_cell(cell) || !now.in_cell(cell)) lane(rate_[static_cast<std::size_t>(cell)], l) = 0;
      }
  }
}

template <class Real>
Marks ImplicitStep<Real>::marks(int l) const {
  Marks m;
  m.inner_surface = field_.inner_surface(l);
  m.outer_surface = field_.outer_surface(l);
  const Fronts& fronts = stage_.fronts[static_cast<std::size_t>(l)];
  for (int k = 0; k < fronts.count; ++k) {
    const Front& f = fronts.front[static_cast<std::size_t>(k)];
    m.front_radius[f.solid_side > 0 ? 1 : 0] =
        place(field_.body(l), field_.arrest(l), f, lane(stage_.unknown[static_cast<std::size_t>(f.cell)], l)).radius;
  }
  return m;
}

template <class Real>
double ImplicitStep<Real>::heat_out(int l, const State<Real>& from, const State<Real>& to, double length) const {
  const auto out = [&](const std::vector<Real>& flow) { return lane(flow.back(), l) - lane(flow.front(), l); };
  return length * (kWeight * (out(from.flow) + out(middle_flow_)) + kDiagonal * out(to.flow));
}

template <class Real>
bool ImplicitStep<Real>::solve_stage(const Real& time, double tolerance, StepReport& report) {
  for (int iteration = 0;; ++iteration) {
    field_.evaluate(time, stage_.unknown, stage_.fronts);
    ++report.iterations;
    report.residual = residual(report.worst_cell);
    if (report.residual <= tolerance) return true;
    if (iteration == kMostIterations || !std::isfinite(report.residual)) {
      report.status = StepReport::Status::stalled;
      return false;
    }
    assemble();
    matrix_.solve(change_);
    move(time);
  }
}

/// Leaves minus the residual in change_; returns its largest value relative to the heat scale over cells and lanes.
template <class Real>
double ImplicitStep<Real>::residual(int& worst) {
  const std::size_t n = change_.size();
  for (std::size_t i = 0; i < n; ++i)
    change_[i] = stage_.base[i] - stage_.unknown[i] + stage_.weight * gain(field_.flow(), i);
  double largest = 0;
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Fronts& fronts = stage_.fronts[static_cast<std::size_t>(l)];
    for (int k = 0; k < fronts.count; ++k)
      lane(change_[static_cast<std::size_t>(fronts.front[static_cast<std::size_t>(k)].cell)], l) -=
          field_.excess(l, k).excess;
    for (std::size_t i = 0; i < n; ++i) {
      const double r = std::abs(lane(change_[i], l) * lane(inverse_scale_[i], l));
      if (r <= largest) continue;  // so written that a NaN is not passed over
      largest = r;
      worst = static_cast<int>(i);
      if (!std::isfinite(r)) return r;
    }
  }
  return largest;
}

/// Jacobian of unknown + excess - weight * gain.
template <class Real>
void ImplicitStep<Real>::assemble() {
  const std::size_t n = change_.size();
  const std::vector<Real>&inner = field_.by_inner(), &outer = field_.by_outer();
  for (std::size_t i = 0; i < n; ++i) {
    const Real s = stage_.weight * inverse_volume_[i];
    matrix_.lower[i] = -s * inner[i];
    matrix_.diagonal[i] = 1.0 - s * (outer[i] - inner[i + 1]);
    matrix_.upper[i] = s * outer[i + 1];
  }
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Fronts& fronts = stage_.fronts[static_cast<std::size_t>(l)];
    for (int k = 0; k < fronts.count; ++k) {
      const auto j = static_cast<std::size_t>(fronts.front[static_cast<std::size_t>(k)].cell);
      const FrontExcess& e = field_.excess(l, k);
      lane(matrix_.lower[j], l) += e.by_left;
      lane(matrix_.diagonal[j], l) += e.by_self;
      lane(matrix_.upper[j], l) += e.by_right;
    }
  }
}

/// Applies change_ to the unknowns. A cell stops just past the first kink of its curve on the way, or Newton would
/// cycle about it; a front that leaves its cell is handed over to the next one.
template <class Real>
void ImplicitStep<Real>::move(const Real& time) {
  for (int l = 0; l < lane_count<Real>; ++l) {
    const Body& b = field_.body(l);
    const Fronts before = stage_.fronts[static_cast<std::size_t>(l)];
    for (int layer = 0; layer < b.layers(); ++layer) {
      const std::vector<double>& kinks = b.curve(layer).kinks();
      if (kinks.empty()) {
        for (int i = b.layer_cells(layer).begin; i < b.layer_cells(layer).end; ++i)
          lane(stage_.unknown[static_cast<std::size_t>(i)], l) += lane(change_[static_cast<std::size_t>(i)], l);
        continue;
      }
      for (int i = b.layer_cells(layer).begin; i < b.layer_cells(layer).end; ++i) {
        const auto c = static_cast<std::size_t>(i);
        double& u = lane(stage_.unknown[c], l);
        const double step = lane(change_[c], l);
        if (before.count > 0 && before.in_cell(i)) continue;
        double next = u + step;
        for (const double kink : kinks) {
          const double past = kPastKink * std::max(std::abs(kink), lane(scale_[c], l));
          if (u > kink && next < kink - past) {
            next = std::max(next, kink - past);
          } else if (u < kink && next > kink + past) {
            next = std::min(next, kink + past);
          }
        }
        u = next;
      }
    }
    for (int k = 0; k < before.count; ++k) {
      const Front& f = before.front[static_cast<std::size_t>(k)];
      if (stage_.fronts[static_cast<std::size_t>(l)].in_cell(f.cell))
        passage_.move(stage_, l, f, lane(change_[static_cast<std::size_t>(f.cell)], l), lane(time, l));
    }
  }
}

template class ImplicitStep<double>;
template class ImplicitStep<base::Lanes<4>>;

}  // namespace palier::heat
