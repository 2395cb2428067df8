#include "palier/freeze/outcome.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "palier/base/error.hpp"
#include "palier/freeze/crossing.hpp"
#include "palier/freeze/recorder.hpp"
#include "palier/freeze/watch.hpp"

namespace palier::freeze {
namespace {

constexpr long kMostSteps = 20'000'000;  // a run this long will not end

std::vector<double> probe_depths(const Section& s) {
  if (!s.probes.empty()) return s.probes;
  std::vector<double> depths;
  for (const double share : {0.0, 0.25, 0.5, 0.75, 1.0}) depths.push_back(share * s.depth());
  return depths;
}

/// Largest temperature of the metal.
double hottest(const Profile& profile, const heat::StepView& step, double time) {
  double T = 0;
  for (int i = profile.cells().begin; i < profile.cells().end; ++i) T = std::max(T, step.temperature(i, time));
  return T;
}

/// Where the run ends within this step; nothing if it goes on.
std::optional<double> stops_in(const Section& s, const Watch& watch, const Profile& profile,
                               const heat::StepView& step) {
  std::optional<double> stop;
  if (s.stop.below) {
    const auto f = [&](double t) { return hottest(profile, step, t) - *s.stop.below; };
    const double before = f(step.begin()), after = f(step.end());
    if (std::isfinite(watch.frozen()) && after <= 0)
      stop = before > 0 ? falls_through_zero(f, step.begin(), step.end(), before, after) : step.end();
  } else if (std::isfinite(watch.frozen())) {
    stop = watch.frozen();
  }
  if (s.stop.after && step.end() >= *s.stop.after) stop = std::min(stop.value_or(*s.stop.after), *s.stop.after);
  return stop;
}

}  // namespace

Outcome march(const Section& s, const Resolution& resolution, const std::shared_ptr<const alloy::EnthalpyCurve>& metal,
              std::optional<double> record_every, const std::function<void(double)>& at_time) {
  const Setup setup = set_up(s, resolution, metal);
  const Profile profile(*setup.body, *s.path);
  std::vector<double> radius;
  for (const double depth : probe_depths(s)) radius.push_back(setup.radius_at(depth));
  const std::size_t probes = radius.size();
  for (int i = profile.cells().begin; record_every && i < profile.cells().end; ++i)
    radius.push_back(setup.body->center()[static_cast<std::size_t>(i)]);
  Watch watch(profile, radius);
  std::optional<Recorder> recorder;
  if (record_every)
    recorder.emplace(setup, profile, std::vector<double>(radius.begin(), radius.begin() + static_cast<long>(probes)),
                     *record_every);

  heat::March march(*setup.body, setup.enthalpy, setup.scale, resolution.tolerance);
  const double limit = s.stop.after.value_or(std::numeric_limits<double>::max());
  Outcome out;
  while (true) {
    const heat::StepView& step = march.step(limit);
    watch.look(step);
    if (recorder) recorder->record(step);
    at_time(step.end());
    if (const std::optional<double> stop = stops_in(s, watch, profile, step)) {
      out.end_time = *stop;
      if (recorder) recorder->finish(step, *stop);
      break;
    }
    if (march.counts().steps >= kMostSteps)
      throw base::NoSolution("the section is not solid after " + std::to_string(step.end()) +
                             " s; if it cannot get solid, give `stop: {after: ...}`");
  }
  out.frozen = watch.frozen();
  out.last_depth = setup.depth_of(watch.last_radius());
  out.imbalance = march.imbalance();
  out.counts = march.counts();
  for (std::size_t k = 0; k < radius.size(); ++k) {
    const double start = watch.start(k), end = watch.end(k);
    (k < probes ? out.probes : out.by_depth).push_back({setup.depth_of(radius[k]), start, end, end - start});
  }
  if (recorder) out.history = recorder->take();
  return out;
}

}  // namespace palier::freeze
