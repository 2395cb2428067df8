#include "palier/freeze/recorder.hpp"

#include <algorithm>
#include <cmath>

namespace palier::freeze {

Recorder::Recorder(const Setup& setup, const Profile& profile, const std::vector<double>& probe_radius, double every)
    : setup_(setup), profile_(profile), every_(every) {
  const heat::Body& body = *setup.body;
  for (const double r : probe_radius) probes_.push_back(profile.point(r));
  for (int i = profile.cells().begin; i < profile.cells().end; ++i)
    centers_.push_back(profile.point(body.center()[static_cast<std::size_t>(i)]));
  for (int i = profile.cells().begin; i <= profile.cells().end; ++i)
    walk_.push_back(profile.point(body.face()[static_cast<std::size_t>(i)]));
  if (setup.surface_side > 0) std::reverse(walk_.begin(), walk_.end());
  to_start_.resize(walk_.size());
  to_end_.resize(walk_.size());
  history_.radius = body.center();
  history_.face = body.face();
  for (int i = 0; i < body.cells(); ++i) history_.layer.push_back(body.layer_of(i));
  history_.layer_name = setup.layer_names;
  history_.metal_begin = profile.cells().begin;
  history_.metal_end = profile.cells().end;
}

void Recorder::record(const heat::StepView& step) {
  for (; static_cast<double>(next_) * every_ <= step.end(); ++next_) row(step, static_cast<double>(next_) * every_);
}

void Recorder::finish(const heat::StepView& step, double time) {
  // Rows beyond the end of the run were recorded while its last step was not yet known to be the last.
  while (!history_.time.empty() && history_.time.back() > time) {
    const auto cells = history_.radius.size(), metal = centers_.size(), probes = probes_.size();
    history_.time.pop_back();
    history_.temperature.resize(history_.temperature.size() - cells);
    history_.fraction_solid.resize(history_.fraction_solid.size() - metal);
    history_.probe_temperature.resize(history_.probe_temperature.size() - probes);
    history_.probe_fraction.resize(history_.probe_fraction.size() - probes);
    for (std::vector<double>* v :
         {&history_.solidus_depth, &history_.liquidus_depth, &history_.mushy_width, &history_.surface_flux})
      v->pop_back();
  }
  if (history_.time.empty() || history_.time.back() < time) row(step, time);
}

void Recorder::row(const heat::StepView& step, double time) {
  const heat::Body& body = *setup_.body;
  const heat::LayerCells metal = profile_.cells();
  history_.time.push_back(time);
  for (int i = 0; i < body.cells(); ++i) {
    const bool in_metal = i >= metal.begin && i < metal.end;
    history_.temperature.push_back(
        in_metal ? profile_.temperature(step, centers_[static_cast<std::size_t>(i - metal.begin)], time)
                 : step.temperature(i, time));
    if (in_metal) history_.fraction_solid.push_back(profile_.cell_fraction(step, i, time));
  }
  for (const Point& p : probes_) {
    history_.probe_temperature.push_back(profile_.temperature(step, p, time));
    history_.probe_fraction.push_back(profile_.fraction_solid(step, p, time));
  }
  history_.surface_flux.push_back(step.surface_flux(setup_.surface_side, time));
  waves(step, time);
}

/// Positions where freezing has started and ended, seen from the surface, and the width between them over the section.
void Recorder::waves(const heat::StepView& step, double time) {
  const Profile::Sure begun = profile_.started(step);
  const bool none_solid = profile_.surely_none_solid(step);
  for (std::size_t i = 0; i < walk_.size(); ++i) {
    to_start_[i] = begun == Profile::Sure::unknown ? profile_.to_start(step, walk_[i], time)
                                                   : (begun == Profile::Sure::none ? 1.0 : -1.0);
    to_end_[i] = none_solid ? 1.0 : profile_.to_end(step, walk_[i], time);
  }
  // A stretch of metal between two faces counts for the share on which a measure is below zero. The measure may bend
  // within it, so where its sign changes the place is found by halving.
  const auto share_below = [&](std::size_t i, double a, double b, const auto& measure) {
    if (a <= 0 && b <= 0) return 1.0;
    if (a > 0 && b > 0) return 0.0;
    double low = 0, high = 1;
    for (int k = 0; k < 20; ++k) {
      const double mid = 0.5 * (low + high);
      const double radius = walk_[i - 1].radius + mid * (walk_[i].radius - walk_[i - 1].radius);
      ((measure(profile_.point(radius)) <= 0) == (a <= 0) ? low : high) = mid;
    }
    return a <= 0 ? low : 1 - low;
  };
  double started = 0, frozen = 0, started_from_surface = 0, frozen_from_surface = 0;
  bool start_open = true, end_open = true;
  for (std::size_t i = 1; i < walk_.size(); ++i) {
    const double length = std::abs(walk_[i].radius - walk_[i - 1].radius);
    const double start = length * share_below(i, to_start_[i - 1], to_start_[i],
                                              [&](const Point& p) { return profile_.to_start(step, p, time); });
    const double end = length * share_below(i, to_end_[i - 1], to_end_[i],
                                            [&](const Point& p) { return profile_.to_end(step, p, time); });
    started += start;
    frozen += end;
    if (start_open) started_from_surface += start;
    if (end_open) frozen_from_surface += end;
    start_open = start_open && start >= length;
    end_open = end_open && end >= length;
  }
  history_.solidus_depth.push_back(frozen_from_surface);
  history_.liquidus_depth.push_back(started_from_surface);
  history_.mushy_width.push_back(std::max(0.0, started - frozen));
}

}  // namespace palier::freeze
