#include "palier/freeze/run.hpp"

#include <algorithm>
#include <cmath>
#include <ctime>
#include <limits>
#include <memory>
#include <optional>
#include <string>

#include "palier/base/error.hpp"
#include "palier/freeze/recorder.hpp"
#include "palier/freeze/setup.hpp"
#include "palier/freeze/watch.hpp"

namespace palier::freeze {
namespace {

constexpr double kNever = std::numeric_limits<double>::quiet_NaN();
constexpr double kRows = 200;            // recorded when the user does not say how often
constexpr long kMostSteps = 20'000'000;  // a run this long will not end

std::vector<double> probe_depths(const Section& s) {
  if (!s.probes.empty()) return s.probes;
  std::vector<double> depths;
  for (const double share : {0.0, 0.25, 0.5, 0.75, 1.0}) depths.push_back(share * s.depth());
  return depths;
}

/// What one march tells.
struct Outcome {
  double frozen = kNever, last_depth = kNever, end_time = 0, imbalance = 0;
  std::vector<Reading> probes, by_depth;
  heat::MarchCounts counts;
  History history;
};

/// Largest temperature of the metal.
double hottest(const Profile& profile, const heat::StepView& step, double time) {
  double T = 0;
  for (int i = profile.cells().begin; i < profile.cells().end; ++i) T = std::max(T, step.temperature(i, time));
  return T;
}

/// Time within a step at which a falling function of time passes zero, by bisection.
template <class Function>
double passes(const Function& f, double a, double b) {
  for (int i = 0; i < 60; ++i) {
    const double t = 0.5 * (a + b);
    (f(t) > 0 ? a : b) = t;
  }
  return b;
}

/// Where the run ends within this step; nothing if it goes on.
std::optional<double> stops_in(const Section& s, const Watch& watch, const Profile& profile,
                               const heat::StepView& step) {
  std::optional<double> stop;
  if (s.stop.below) {
    const auto f = [&](double t) { return hottest(profile, step, t) - *s.stop.below; };
    if (std::isfinite(watch.frozen()) && f(step.end()) <= 0) stop = f(step.begin()) > 0 ? passes(f, step.begin(), step.end()) : step.end();
  } else if (std::isfinite(watch.frozen())) {
    stop = watch.frozen();
  }
  if (s.stop.after && step.end() >= *s.stop.after) stop = std::min(stop.value_or(*s.stop.after), *s.stop.after);
  return stop;
}

Outcome march(const Section& s, const Resolution& resolution,
              const std::shared_ptr<const alloy::EnthalpyCurve>& metal, std::optional<double> record_every,
              const std::function<void(double)>& at_time) {
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

/// An interval of 1, 2 or 5 times a power of ten that gives about kRows rows.
double round_interval(double duration) {
  const double raw = duration / kRows, power = std::pow(10, std::floor(std::log10(raw)));
  for (const double step : {1.0, 2.0, 5.0})
    if (raw <= step * power * 1.0000001) return step * power;
  return 10 * power;
}

/// Tells where a table of a property was held constant because the run went beyond it.
void remark_beyond(std::vector<std::string>& remarks, const std::string& whose, const base::Table& table, double low,
                   double high) {
  constexpr double kWorthTelling = 1;  // [K]
  if (table.is_constant() || (table.x().front() <= low + kWorthTelling && table.x().back() >= high - kWorthTelling)) return;
  const auto celsius = [](double T) { return std::to_string(std::lround(T - 273.15)); };
  remarks.push_back(whose + " is known from " + celsius(table.x().front()) + " to " + celsius(table.x().back()) +
                    " degC and was held constant beyond; the run went from " + celsius(low) + " to " + celsius(high) +
                    " degC");
}

/// Assumptions worth telling, judged by the temperatures each layer went through.
std::vector<std::string> remarks_on(const Section& s, const History& h) {
  std::vector<std::string> remarks;
  std::vector<double> low(h.layer_name.size(), 1e300), high(h.layer_name.size(), 0);
  const std::size_t cells = h.radius.size();
  for (std::size_t k = 0; k < h.temperature.size(); ++k) {
    const auto layer = static_cast<std::size_t>(h.layer[k % cells]);
    low[layer] = std::min(low[layer], h.temperature[k]);
    high[layer] = std::max(high[layer], h.temperature[k]);
  }
  const auto metal = static_cast<std::size_t>(h.layer[static_cast<std::size_t>(h.metal_begin)]);
  const auto both = [&](const std::string& who, const alloy::PhaseProperties& p, double a, double b) {
    remark_beyond(remarks, "heat capacity of " + who, p.heat_capacity, a, b);
    remark_beyond(remarks, "conductivity of " + who, p.conductivity, a, b);
  };
  both("solid " + s.alloy, s.metal.solid, std::min(low[metal], s.path->end_of_freezing()), s.path->liquidus());
  both("liquid " + s.alloy, s.metal.liquid, s.path->end_of_freezing(), std::max(high[metal], s.path->liquidus()));
  const std::size_t inside = s.inside ? s.inside->layers.size() : 0;
  for (std::size_t l = 0; l < h.layer_name.size(); ++l) {
    if (l == metal) continue;
    const WallLayer& wall = l < metal ? s.inside->layers[inside - 1 - l] : s.outside.layers[l - metal - 1];
    both(wall.material, wall.properties.body, low[l], high[l]);
  }
  return remarks;
}

/// Half width of the ± of a time: what coarsening by two changed, times a factor. The change is three times the error
/// left where the order is two, once where it is one; a half covers what lies between with room for chance.
double numerical_error(double fine, double coarse) {
  constexpr double kShare = 0.5;
  return kShare * std::abs(fine - coarse);
}

}  // namespace

Result run(const Section& section, const Progress& progress) {
  const std::clock_t begin = std::clock();
  const Resolution fine = resolution_for(section);
  Section coarse_section = section;
  if (section.cells) coarse_section.cells = std::max(2, *section.cells / 2);
  for (Wall* wall : {&coarse_section.outside, coarse_section.inside ? &*coarse_section.inside : nullptr})
    for (std::size_t i = 0; wall && i < wall->layers.size(); ++i)
      if (std::optional<int>& cells = wall->layers[i].cells) cells = std::max(2, *cells / 2);

  const std::shared_ptr<const alloy::EnthalpyCurve> metal = metal_curve(section);
  const auto tell = [&](double share) {
    if (progress) progress(share);
  };
  tell(0);
  const Outcome coarse = march(coarse_section, companion_of(fine), metal, std::nullopt, [](double) {});
  const double duration = coarse.end_time;
  const double every = section.record_every.value_or(round_interval(duration));
  Outcome out = march(section, fine, metal, every, [&](double t) { tell(0.2 + 0.8 * std::min(1.0, t / duration)); });

  Result r;
  r.solidification_time = out.frozen;
  r.solidification_time_error = numerical_error(out.frozen, coarse.frozen);
  r.last_to_freeze = out.last_depth;
  r.end_time = out.end_time;
  r.heat_imbalance = std::max(out.imbalance, coarse.imbalance);
  r.steps = out.counts.steps;
  r.rejected_steps = out.counts.rejected;
  r.newton_iterations = out.counts.iterations;
  for (std::size_t k = 0; k < out.probes.size(); ++k) {
    const Reading &a = out.probes[k], &b = coarse.probes[k];
    r.probes.push_back({a,
                        {a.depth, numerical_error(a.start, b.start), numerical_error(a.end, b.end),
                         numerical_error(a.local_solidification_time, b.local_solidification_time)}});
  }
  r.by_depth = std::move(out.by_depth);
  r.history = std::move(out.history);
  r.remarks = remarks_on(section, r.history);
  r.cpu_seconds = static_cast<double>(std::clock() - begin) / CLOCKS_PER_SEC;
  tell(1);
  return r;
}

}  // namespace palier::freeze
