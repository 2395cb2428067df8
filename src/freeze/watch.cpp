#include "palier/freeze/watch.hpp"

#include <array>
#include <cmath>
#include <limits>

#include "palier/freeze/crossing.hpp"

namespace palier::freeze {
namespace {

constexpr double kNever = std::numeric_limits<double>::quiet_NaN();

}  // namespace

Watch::Watch(const Profile& profile, const std::vector<double>& radius)
    : profile_(profile),
      start_(radius.size(), kNever),
      end_(radius.size(), kNever),
      started_(radius.size(), 0),
      ended_(radius.size(), 0),
      frozen_(kNever),
      last_radius_(kNever),
      met_radius_(kNever) {
  for (const double r : radius) points_.push_back(profile.point(r));
  if (profile.has_center()) center_ = profile.point(0);
}

void Watch::look(const heat::StepView& step) {
  const double a = step.begin(), b = step.end();
  const bool none_started = profile_.started(step) == Profile::Sure::none;
  const bool none_solid = profile_.surely_none_solid(step);
  for (std::size_t k = 0; k < points_.size(); ++k) {
    const Point& p = points_[k];
    if (!started_[k] && !none_started) {
      const auto f = [&](double t) { return profile_.to_start(step, p, t); };
      const double fb = f(b);
      if (fb <= 0) {
        const double fa = f(a);
        started_[k] = 1;
        start_[k] = fa > 0 ? falls_through_zero(f, a, b, fa, fb) : a;
      }
    }
    if (!started_[k] || (none_solid && !ended_[k])) continue;
    const auto g = [&](double t) { return profile_.to_end(step, p, t); };
    const double gb = g(b);
    if (gb <= 0 && !ended_[k]) {
      const double ga = g(a);
      ended_[k] = 1;
      end_[k] = ga > 0 ? falls_through_zero(g, a, b, ga, gb) : a;
    } else if (gb > 0 && ended_[k]) {
      ended_[k] = 0;  // it has melted again; the last freezing counts
      end_[k] = kNever;
    }
  }
  if (!none_solid) {
    look_at_whole(step);
    return;
  }
  frozen_ = last_radius_ = kNever;
  liquid_seen_ = true;
}

void Watch::look_at_whole(const heat::StepView& step) {
  const heat::LayerCells cells = profile_.cells();
  if (step.before().fronts[0].count == 2 && step.after().fronts[0].count < 2) {
    const std::array<double, 2>& radius = step.before().marks[0].front_radius;
    met_radius_ = 0.5 * (radius[0] + radius[1]);
  }
  int last = -1;
  double latest = 0;
  bool all = true;
  const auto gone = [&](int cell, const auto& liquid) {
    const double after = liquid(step.end());
    all = all && after <= 0;
    if (!all || std::isfinite(frozen_)) return;
    const double before = liquid(step.begin());
    if (!(before > 0)) return;
    const double t = falls_through_zero(liquid, step.begin(), step.end(), before, after);
    if (last >= 0 && t <= latest) return;
    last = cell;
    latest = t;
  };
  for (int i = cells.begin; i < cells.end && all; ++i)
    gone(i, [&](double t) { return profile_.liquid_left(step, i, t); });
  // The center of symmetry is a little hotter than the middle of its cell.
  if (center_ && all) gone(cells.begin, [&](double t) { return profile_.to_end(step, *center_, t); });
  if (!all) {
    frozen_ = last_radius_ = kNever;
    liquid_seen_ = true;
    return;
  }
  if (last < 0 && liquid_seen_ && !std::isfinite(frozen_)) {
    // The last front ended so close to the begin of the step that the mean of its cell already counts as solid there.
    const heat::Fronts& before = step.before().fronts[0];
    last = before.count > 0 ? before.front[0].cell : cells.begin;
    latest = step.begin();
  }
  if (last < 0) return;
  frozen_ = latest;
  const heat::Body& body = step.body();
  const bool at_center = center_ && last == cells.begin;
  const bool met_here = std::isfinite(met_radius_) && profile_.point(met_radius_).cell == last;
  last_radius_ = at_center ? body.face()[0] : met_here ? met_radius_ : body.center()[static_cast<std::size_t>(last)];
}

}  // namespace palier::freeze
