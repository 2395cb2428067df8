#include "palier/heat/march.hpp"

#include <algorithm>
#include <cmath>
#include <sstream>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::heat {
namespace {

constexpr double kSafety = 0.85;
constexpr double kLongestGrowth = 3;
constexpr double kNewtonShare = 0.1;  // of the step's tolerance: Newton's error stays well below the step's own
constexpr double kShortest = 1e-13;   // relative to the time gone by
constexpr double kApproach = 0.9;     // of the time to the last liquid: a step comes this near, not beyond,
constexpr double kLastSpan = 1e-5;    // until that time is this short, relative to the time gone by
constexpr int kHardNewton = 18;       // iterations of a step from which on its length may not grow

/// Start well inside the diffusion time of the smallest cell; the error estimate takes over from there.
double first_length(const Body& body) {
  double shortest = 1e300;
  for (int i = 0; i < body.cells(); ++i) {
    const alloy::EnthalpyCurve& c = body.curve(body.layer_of(i));
    double theta = 0, slope = 0;
    c.potential(std::max(c.liquidus_enthalpy(), 0.0), theta, slope);
    const double width = 2 * body.half_width(i);
    if (slope > 0) shortest = std::min(shortest, width * width / slope);
  }
  return 1e-3 * shortest;
}

}  // namespace

double StepView::enthalpy(int cell, double time) const {
  const auto i = static_cast<std::size_t>(cell);
  const double h = end_ - begin_;
  const double s = (time - begin_) / h;
  const double volume = body_.volume()[i];
  const auto rate = [&](const State<double>& at) { return h * (at.flow[i] - at.flow[i + 1]) / volume; };
  const double a = before_->enthalpy[i], b = after_->enthalpy[i], da = rate(*before_), db = rate(*after_);
  return a + s * (da + s * (3 * (b - a) - 2 * da - db + s * (2 * (a - b) + da + db)));
}

double StepView::parabola(double a, double m, double b, double time) const {
  const double g = ImplicitStep<double>::gamma(), s = (time - begin_) / (end_ - begin_);
  return a * (s - g) * (s - 1) / g + m * s * (s - 1) / (g * (g - 1)) + b * s * (s - g) / (1 - g);
}

double StepView::inner_surface(double time) const {
  return parabola(before_->marks[0].inner_surface, middle_.inner_surface, after_->marks[0].inner_surface, time);
}

double StepView::outer_surface(double time) const {
  return parabola(before_->marks[0].outer_surface, middle_.outer_surface, after_->marks[0].outer_surface, time);
}

double StepView::front_radius(int solid_side, double time) const {
  const std::size_t k = solid_side > 0 ? 1 : 0;
  const double at_begin = before_->marks[0].front_radius[k], at_end = after_->marks[0].front_radius[k];
  if (std::isfinite(at_end) || !std::isfinite(last_liquid_))
    return parabola(at_begin, middle_.front_radius[k], at_end, time);
  // It ends in this step: straight to the end of the metal, and there it stays.
  const LayerCells metal = body_.metal_cells();
  const double goal = body_.face()[static_cast<std::size_t>(solid_side > 0 ? metal.begin : metal.end)];
  const double s = std::min(1.0, (time - begin_) / (last_liquid_ - begin_));
  return at_begin + s * (goal - at_begin);
}

double StepView::surface_flux(int side, double time) const {
  const LayerCells metal = body_.metal_cells();
  const auto f = static_cast<std::size_t>(side > 0 ? metal.end : metal.begin);
  if (!(body_.area()[f] > 0)) return 0.0;
  const double s = (time - begin_) / (end_ - begin_);
  return side * ((1 - s) * before_->flow[f] + s * after_->flow[f]) / body_.area()[f];
}

March::March(const Body& body, const std::vector<double>& enthalpy, std::vector<double> scale, double tolerance)
    : body_(body),
      arrest_(body.metal_curve()),
      scale_(std::move(scale)),
      tolerance_(tolerance),
      step_({&body}, scale_),
      states_{step_.start(enthalpy, 0.0), {}},
      view_(body, states_[0], states_[0]),
      length_(first_length(body)) {
  states_[1] = states_[0];
  heat_at_start_ = heat();
  for (int i = body.metal_cells().begin; i < body.metal_cells().end; ++i)
    heat_scale_ += body.volume()[static_cast<std::size_t>(i)] * scale_[static_cast<std::size_t>(i)];
}

double March::heat() const {
  double sum = 0;
  const std::vector<double>& enthalpy = states_[current_].enthalpy;
  for (std::size_t i = 0; i < enthalpy.size(); ++i) sum += body_.volume()[i] * enthalpy[i];
  return sum;
}

double March::time_to_last_liquid() const {
  const State<double>& now = states_[current_];
  const double never = std::numeric_limits<double>::infinity();
  if (now.fronts[0].count != 1) return never;
  const Front& f = now.fronts[0].front[0];
  // Only where all that lies ahead of the front is at the arrest's temperature or hotter, up to the end of the metal.
  const LayerCells metal = body_.metal_cells();
  const auto j = static_cast<std::size_t>(f.cell);
  const FrontPlace where = place(body_, arrest_, f, now.unknown[j]);
  const double end = body_.face()[static_cast<std::size_t>(f.solid_side > 0 ? metal.begin : metal.end)];
  const auto volume_left = [&](double radius) {
    return std::abs(body_.volume_inside(radius) - body_.volume_inside(end));
  };
  // The pace of the last step where there was one: the flows at its end may hold what two cells still owe each other.
  const double earlier = view_.before_->marks[0].front_radius[f.solid_side > 0 ? 1 : 0];
  const double pace = std::isfinite(earlier)
                          ? (volume_left(earlier) - volume_left(where.radius)) / (view_.end_ - view_.begin_)
                          : f.solid_side * (now.flow[j + 1] - now.flow[j]) / (arrest_.hot - arrest_.cold);
  return pace > 0 ? volume_left(where.radius) / pace : never;
}

bool March::all_solid(const State<double>& state) const {
  const LayerCells metal = body_.metal_cells();
  const auto first = state.unknown.begin();
  return state.fronts[0].count == 0 &&
         std::all_of(first + metal.begin, first + metal.end, [this](double H) { return H <= arrest_.cold; });
}

const StepView& March::step(double limit) {
  const State<double>& from = states_[current_];
  State<double>& to = states_[1 - current_];
  const double begin = view_.end_;
  const double to_last = time_to_last_liquid();
  if (to_last > kLastSpan * begin) length_ = std::min(length_, kApproach * to_last);
  while (true) {
    // A rest much shorter than a step is taken in two halves rather than a whole and a sliver.
    double h = std::min(length_, limit - begin);
    if (h < limit - begin && 1.8 * h > limit - begin) h = 0.5 * (limit - begin);
    double error = 0;
    const StepReport report = step_.advance(from, begin, h, kNewtonShare * tolerance_, to, error);
    counts_.iterations += report.iterations;
    const bool stalled = report.status == StepReport::Status::stalled;
    const double ratio = error / tolerance_;
    if (!stalled && ratio <= 1) {
      const double growth = std::min(kLongestGrowth, kSafety * std::cbrt(1 / std::max(ratio, 1e-9)));
      const bool hold = after_rejection_ || report.iterations > kHardNewton;
      length_ = h * (hold ? std::min(1.0, growth) : growth);
      after_rejection_ = false;
      view_.before_ = &from;
      view_.after_ = &to;
      view_.middle_ = step_.middle_marks(0);
      view_.begin_ = begin;
      view_.end_ = begin + h;
      view_.last_liquid_ = from.fronts[0].count > 0 && all_solid(to) && std::isfinite(to_last)
                               ? std::min(begin + to_last, begin + h)
                               : std::numeric_limits<double>::quiet_NaN();
      heat_out_ += step_.heat_out(0, from, to, h);
      ++counts_.steps;
      current_ = 1 - current_;
      imbalance_ = std::max(imbalance_, std::abs(heat_at_start_ - heat() - heat_out_) / heat_scale_);
      step_.adopt_fronts(to, view_.end_);
      return view_;
    }
    ++counts_.rejected;
    after_rejection_ = true;
    length_ = h * (stalled ? 0.4 : std::max(0.2, kSafety * std::cbrt(1 / ratio)));
    if (!(length_ > kShortest * std::max(begin, 1e-6))) {
      std::ostringstream text;
      const int cell = std::max(report.worst_cell, 0);
      text << "step from t = " << begin << " s failed even at a length of " << h << " s: Newton stalled after "
           << report.iterations << " iterations, residual " << report.residual << " of the heat scale (wanted "
           << kNewtonShare * tolerance_ << "), worst in cell " << cell
           << " at r = " << body_.center()[static_cast<std::size_t>(cell)]
           << " m, T = " << body_.curve(body_.layer_of(cell)).temperature(from.enthalpy[static_cast<std::size_t>(cell)])
           << " K";
      throw base::NoSolution(text.str());
    }
  }
}

}  // namespace palier::heat
