#include "palier/freeze/run.hpp"

#include <algorithm>
#include <cmath>
#include <ctime>
#include <limits>
#include <memory>
#include <optional>
#include <sstream>
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
    if (std::isfinite(watch.frozen()) && f(step.end()) <= 0)
      stop = f(step.begin()) > 0 ? passes(f, step.begin(), step.end()) : step.end();
  } else if (std::isfinite(watch.frozen())) {
    stop = watch.frozen();
  }
  if (s.stop.after && step.end() >= *s.stop.after) stop = std::min(stop.value_or(*s.stop.after), *s.stop.after);
  return stop;
}

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
  if (table.is_constant() || (table.x().front() <= low + kWorthTelling && table.x().back() >= high - kWorthTelling))
    return;
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

std::string accuracy_missed(double reached, double asked) {
  std::ostringstream text;
  text.precision(2);
  text << "the accuracy asked for, " << 100 * asked
       << " %, was not reached: the ends of freezing bear a numerical error of up to " << 100 * reached
       << " % of the time the section takes";
  return text.str();
}

/// Shares of what coarsening by two changed that are claimed as error. The change is three times the error left where
/// the order is two, once where it is one. The front of an arrest is followed and of order two; liquidus, and solidus
/// without an arrest, pass through cells that are not looked into, and are of order one to two.
constexpr double kShareOfFollowed = 0.5;
constexpr double kShareOfOthers = 1.2;

/// Half widths of the ± of times. By chance a single time may change little: none is trusted more, relative to its
/// size, than the median of its kind.
std::vector<double> numerical_errors(const std::vector<double>& fine, const std::vector<double>& coarse, double share) {
  std::vector<double> relative;
  for (std::size_t k = 0; k < fine.size(); ++k) {
    const double change = std::abs(fine[k] - coarse[k]) / fine[k];
    if (std::isfinite(change)) relative.push_back(change);
  }
  double typical = 0;
  if (!relative.empty()) {
    const auto middle = relative.begin() + static_cast<long>(relative.size() / 2);
    std::nth_element(relative.begin(), middle, relative.end());
    typical = *middle;
  }
  std::vector<double> errors;
  for (std::size_t k = 0; k < fine.size(); ++k)
    errors.push_back(share * std::max(std::abs(fine[k] - coarse[k]), typical * std::abs(fine[k])));
  return errors;
}

/// Halves the number of cells set by hand, for the companion run.
Section with_half_the_cells(Section s) {
  if (s.cells) s.cells = std::max(2, *s.cells / 2);
  for (Wall* wall : {&s.outside, s.inside ? &*s.inside : nullptr})
    for (std::size_t i = 0; wall && i < wall->layers.size(); ++i)
      if (std::optional<int>& cells = wall->layers[i].cells) cells = std::max(2, *cells / 2);
  return s;
}

/// Readings at the probes with what a coarser run says of their error.
struct Judged {
  std::vector<ProbeReading> probes;
  double solidification_time_error;
};

Judged judge(const Outcome& fine, const Outcome& coarse, const alloy::SolidificationPath& path) {
  const auto errors_of = [&](double Reading::*time, bool with_whole, double share) {
    std::vector<double> a, b;
    for (const Reading& probe : fine.probes) a.push_back(probe.*time);
    for (const Reading& probe : coarse.probes) b.push_back(probe.*time);
    a.push_back(with_whole ? fine.frozen : kNever);
    b.push_back(with_whole ? coarse.frozen : kNever);
    return numerical_errors(a, b, share);
  };
  const bool followed = !path.arrests().empty() && path.arrests().back().temperature == path.end_of_freezing();
  const double start_share = path.freezing_range() > 0 ? kShareOfOthers : kShareOfFollowed;
  const double end_share = followed ? kShareOfFollowed : kShareOfOthers;
  const std::vector<double> start = errors_of(&Reading::start, false, start_share),
                            end = errors_of(&Reading::end, true, end_share),
                            local = errors_of(&Reading::local_solidification_time, false, start_share);
  Judged j;
  for (std::size_t k = 0; k < fine.probes.size(); ++k)
    j.probes.push_back({fine.probes[k], {fine.probes[k].depth, start[k], end[k], local[k]}});
  j.solidification_time_error = end.back();
  return j;
}

/// Largest error of an end of freezing, as a share of the time the section takes.
double worst(const Judged& judged, double duration) {
  double error = std::isfinite(judged.solidification_time_error) ? judged.solidification_time_error : 0;
  for (const ProbeReading& p : judged.probes)
    if (std::isfinite(p.error.end)) error = std::max(error, p.error.end);
  return error / duration;
}

bool set_by_hand(const Section& s) {
  bool any = s.cells.has_value();
  for (const Wall* wall : {&s.outside, s.inside ? &*s.inside : nullptr})
    for (std::size_t i = 0; wall && i < wall->layers.size(); ++i) any = any || wall->layers[i].cells.has_value();
  return any;
}

}  // namespace

Result run(const Section& section, const Progress& progress) {
  constexpr int kMostRefinements = 2;
  const std::clock_t begin = std::clock();
  const std::shared_ptr<const alloy::EnthalpyCurve> metal = metal_curve(section);
  const auto tell = [&](double share) {
    if (progress) progress(share);
  };
  tell(0);
  Resolution resolution = resolution_for(section);
  Outcome coarse = march(with_half_the_cells(section), companion_of(resolution), metal, std::nullopt, [](double) {});
  const double duration = coarse.end_time;
  const double every = section.record_every.value_or(round_interval(duration));
  const auto fine_march = [&](double from, double to) {
    return march(section, resolution, metal, every,
                 [&, from, to](double t) { tell(from + (to - from) * std::min(1.0, t / duration)); });
  };
  Outcome out = fine_march(0.1, 0.9);
  Judged judged = judge(out, coarse, *section.path);
  // Where the companion says that the accuracy asked for was missed, the run becomes the companion of a finer one.
  for (int k = 0; k < kMostRefinements && !set_by_hand(section) && worst(judged, duration) > section.accuracy; ++k) {
    resolution = refined(resolution);
    coarse = std::move(out);
    out = fine_march(0.9, 1);
    judged = judge(out, coarse, *section.path);
  }

  Result r;
  r.solidification_time = out.frozen;
  r.solidification_time_error = judged.solidification_time_error;
  r.last_to_freeze = out.last_depth;
  r.end_time = out.end_time;
  r.heat_imbalance = std::max(out.imbalance, coarse.imbalance);
  r.steps = out.counts.steps;
  r.rejected_steps = out.counts.rejected;
  r.newton_iterations = out.counts.iterations;
  const double reached = worst(judged, duration);
  r.probes = std::move(judged.probes);
  r.by_depth = std::move(out.by_depth);
  r.history = std::move(out.history);
  r.remarks = remarks_on(section, r.history);
  if (reached > section.accuracy) r.remarks.push_back(accuracy_missed(reached, section.accuracy));
  r.cpu_seconds = static_cast<double>(std::clock() - begin) / CLOCKS_PER_SEC;
  tell(1);
  return r;
}

}  // namespace palier::freeze
