#include "palier/alloy/path.hpp"

#include <cmath>
#include <memory>
#include <utility>

#include "palier/base/error.hpp"
#include "palier/base/table.hpp"

namespace palier::alloy {

namespace {

constexpr double kRounding = 1e-9;  // fractions are asked to add up to within this

double arrest_at(const std::vector<Arrest>& arrests, double T) {
  for (const Arrest& a : arrests)
    if (a.temperature == T) return a.fraction;
  return 0.0;
}

}  // namespace

SolidificationPath::SolidificationPath(Parts parts) : parts_(std::move(parts)) {
  const Parts& p = parts_;
  if (!(p.liquidus > 0) || !(p.end_of_freezing > 0) || p.end_of_freezing > p.liquidus)
    throw base::InputError("a solidification path needs 0 K < end of freezing <= liquidus");
  for (std::size_t i = 0; i < p.arrests.size(); ++i) {
    const Arrest& a = p.arrests[i];
    if (!(a.fraction > 0 && a.fraction <= 1) || a.temperature > p.liquidus || a.temperature < p.end_of_freezing)
      throw base::InputError("an arrest must lie within the freezing range and hold a fraction of 0 to 1");
    if (i > 0 && a.temperature >= p.arrests[i - 1].temperature)
      throw base::InputError("arrests must be given by falling temperature");
  }
  constexpr int kSamples = 64;
  double last = 0.0;
  for (int i = 0; i <= kSamples; ++i) {
    const double T = p.liquidus + (p.end_of_freezing - p.liquidus) * i / kSamples;
    const double f = p.fraction_above(T);
    if (!(f >= last - kRounding && f <= 1 + kRounding))
      throw base::InputError("the fraction solid of a path must rise from 0 to 1 as the temperature falls");
    last = f;
  }
  if (std::abs(fraction_below(p.end_of_freezing) - 1) > kRounding)
    throw base::InputError("the fractions of a path do not add up to 1 at the end of freezing");
}

double SolidificationPath::fraction_above(double T) const {
  if (T >= parts_.liquidus) return 0.0;
  if (T < parts_.end_of_freezing) return 1.0;
  return parts_.fraction_above(T);
}

double SolidificationPath::fraction_below(double T) const {
  if (T > parts_.liquidus) return 0.0;
  if (T < parts_.end_of_freezing) return 1.0;
  return fraction_above(T) + arrest_at(parts_.arrests, T);
}

std::optional<SoluteState> SolidificationPath::solute(double T) const {
  if (!parts_.solute || T > parts_.liquidus || T < parts_.end_of_freezing) return std::nullopt;
  return parts_.solute(T);
}

SolidificationPath pure_path(double melting_point) {
  SolidificationPath::Parts p;
  p.rule = "pure";
  p.liquidus = p.end_of_freezing = melting_point;
  p.arrests = {{melting_point, 1.0, "melting point"}};
  p.fraction_above = [](double) { return 0.0; };
  return SolidificationPath(std::move(p));
}

SolidificationPath measured_path(std::vector<double> temperature, std::vector<double> fraction_solid) {
  const std::size_t n = temperature.size();
  if (fraction_solid.size() != n)
    throw base::InputError("measured points: found " + std::to_string(n) + " temperatures and " +
                           std::to_string(fraction_solid.size()) + " fractions solid; expected as many of both");
  if (n < 2) throw base::InputError("measured points: found " + std::to_string(n) + "; expected at least two");
  if (fraction_solid.front() != 0.0) throw base::InputError("measured points: the first must have fraction solid 0");
  for (std::size_t i = 0; i < n; ++i) {
    const std::string which = "measured point " + std::to_string(i + 1) + ": ";
    if (!std::isfinite(temperature[i]) || !std::isfinite(fraction_solid[i]))
      throw base::InputError(which + "not a finite number");
    if (fraction_solid[i] < 0 || fraction_solid[i] > 1) throw base::InputError(which + "fraction solid not in 0..1");
    if (i > 0 && !(temperature[i] < temperature[i - 1])) throw base::InputError(which + "temperature must fall");
    if (i > 0 && !(fraction_solid[i] > fraction_solid[i - 1]))
      throw base::InputError(which + "fraction solid must rise");
  }
  SolidificationPath::Parts p;
  p.rule = "measured";
  p.liquidus = temperature.front();
  p.end_of_freezing = temperature.back();
  if (fraction_solid.back() < 1)
    p.arrests = {{temperature.back(), 1 - fraction_solid.back(), "last point of the record"}};
  const base::Table table({temperature.rbegin(), temperature.rend()}, {fraction_solid.rbegin(), fraction_solid.rend()});
  p.fraction_above = [table](double T) { return table(T); };
  return SolidificationPath(std::move(p));
}

}  // namespace palier::alloy
