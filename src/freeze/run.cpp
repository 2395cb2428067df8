#include "palier/freeze/run.hpp"

#include <algorithm>
#include <cmath>
#include <ctime>
#include <memory>
#include <optional>
#include <sstream>
#include <string>

#include "palier/freeze/judgement.hpp"
#include "palier/freeze/outcome.hpp"
#include "palier/freeze/settled_path.hpp"
#include "palier/freeze/setup.hpp"

namespace palier::freeze {
namespace {

constexpr double kRows = 200;  // recorded when the user does not say how often

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

/// Halves the number of cells set by hand, for the companion run.
Section with_half_the_cells(Section s) {
  if (s.cells) s.cells = std::max(2, *s.cells / 2);
  for (Wall* wall : {&s.outside, s.inside ? &*s.inside : nullptr})
    for (std::size_t i = 0; wall && i < wall->layers.size(); ++i)
      if (std::optional<int>& cells = wall->layers[i].cells) cells = std::max(2, *cells / 2);
  return s;
}

bool set_by_hand(const Section& s) {
  bool any = s.cells.has_value();
  for (const Wall* wall : {&s.outside, s.inside ? &*s.inside : nullptr})
    for (std::size_t i = 0; wall && i < wall->layers.size(); ++i) any = any || wall->layers[i].cells.has_value();
  return any;
}

Result run_with_path(const Section& section, const Progress& progress) {
  constexpr int kMostRefinements = 2;
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
  Judgement judged = judge(out, coarse, *section.path);
  // Where the companion says that the accuracy asked for was missed, the run becomes the companion of a finer one.
  for (int k = 0; k < kMostRefinements && !set_by_hand(section) && worst(judged, duration) > section.accuracy; ++k) {
    resolution = refined(resolution);
    coarse = std::move(out);
    out = fine_march(0.9, 1);
    judged = judge(out, coarse, *section.path);
  }

  Result r;
  r.path = section.path;
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
  tell(1);
  return r;
}

}  // namespace

Result run(const Section& section, const Progress& progress) {
  const std::clock_t begin = std::clock();
  Section with = section;
  std::string settled_note;
  if (section.path_after) {
    const SettledPath settled = settle_path(section);
    with.path = settled.path;
    settled_note = in_words(settled);
  }
  Result r = run_with_path(with, progress);
  if (!settled_note.empty()) r.remarks.push_back(settled_note);
  r.cpu_seconds = static_cast<double>(std::clock() - begin) / CLOCKS_PER_SEC;
  return r;
}

}  // namespace palier::freeze
