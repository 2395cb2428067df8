#include "palier/alloy/steel.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "freezing_stages.hpp"
#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

/// Delta ferrite, peritectic and austenite of one steel, by one rule.
class SteelStages {
 public:
  SteelStages(const Steel& steel, Mixing mixing) : steel_(steel), lines_(steel.lines), mixing_(mixing) {
    for (const SteelElement& e : steel.elements) liquid_.push_back(e.composition);
  }

  std::vector<Stage> make() {
    std::vector<Stage> stages;
    double left = 1;
    if (steel_.carbon < lines_.peritectic_liquid) {
      stages.push_back(delta());
      left = stages.back().end;
      follow(stages.back());
      if (left > 0 && mixing_ != Mixing::scheil) {
        stages.push_back(peritectic(left));
        left = stages.back().end;
        follow(stages.back());
      }
    }
    if (left > 0) stages.push_back(gamma(left));
    return stages;
  }

 private:
  bool carbon_mixed() const { return mixing_ != Mixing::scheil; }
  bool mixed(const SteelElement& e) const { return mixing_ == Mixing::lever || (carbon_mixed() && e.fast); }

  /// Keeps the liquid with which the next stage begins; a stage that uses up the liquid has none.
  void follow(const Stage& stage) {
    if (stage.end > 0)
      for (std::size_t i = 0; i < liquid_.size(); ++i) liquid_[i] = stage.lines[i + 1].liquid(stage.end);
  }

  Stage delta() const {
    const double k = lines_.peritectic_delta / lines_.peritectic_liquid;
    const double slope = (lines_.peritectic_temperature - lines_.melting_point) / lines_.peritectic_liquid;
    Stage s;
    s.base = lines_.melting_point;
    if (carbon_mixed()) {
      s.lines.push_back(SoluteLine::mixed(slope, k, 0, steel_.carbon));
      s.end = (steel_.carbon - lines_.peritectic_delta) / (lines_.peritectic_liquid - lines_.peritectic_delta);
      s.end = std::max(s.end, 0.0);
    } else {
      s.lines.push_back(SoluteLine::frozen(slope, k, 0, steel_.carbon, 1));
      s.end = std::pow(steel_.carbon / lines_.peritectic_liquid, 1 / (1 - k));
    }
    for (const SteelElement& e : steel_.elements)
      s.lines.push_back(mixed(e) ? SoluteLine::mixed(e.liquidus_slope, e.k_delta, 0, e.composition)
                                 : SoluteLine::frozen(e.liquidus_slope, e.k_delta, 0, e.composition, 1));
    return s;
  }

  /// From the fraction liquid at which delta ferrite is joined by austenite. The carbon of the phases is fixed, so its
  /// balance makes the amount of delta ferrite a straight line over the fraction liquid.
  Stage peritectic(double begin) const {
    const double C = steel_.carbon, L = lines_.peritectic_liquid, D = lines_.peritectic_delta,
                 G = lines_.peritectic_gamma;
    Stage s;
    s.reaction = "peritectic";
    s.base = lines_.peritectic_temperature;
    s.begin = begin;
    s.end = std::max((C - G) / (L - G), 0.0);
    SoluteLine carbon;
    carbon.shift = L;
    carbon.k = gamma_k();
    carbon.offset = gamma_offset();
    s.lines.push_back(carbon);
    for (std::size_t i = 0; i < liquid_.size(); ++i) {
      const SteelElement& e = steel_.elements[i];
      if (!mixed(e)) {
        s.lines.push_back(SoluteLine::frozen(e.liquidus_slope, e.k_gamma, 0, liquid_[i], begin));
        continue;
      }
      // C0 = C (f + k_delta f_delta + k_gamma f_gamma), with f_delta = (G - C + (L - G) f) / (G - D).
      const double more = (e.k_delta - e.k_gamma) / (G - D);
      SoluteLine line = SoluteLine::mixed(e.liquidus_slope, e.k_gamma, 0, e.composition);
      line.constant += more * (G - C);
      line.linear += more * (L - G);
      s.lines.push_back(line);
    }
    return s;
  }

  Stage gamma(double begin) const {
    const double slope = (lines_.eutectic_temperature - lines_.peritectic_temperature) /
                         (lines_.eutectic_liquid - lines_.peritectic_liquid);
    Stage s;
    s.base = lines_.peritectic_temperature - slope * lines_.peritectic_liquid;
    s.begin = begin;
    s.lines.push_back(carbon_mixed() ? SoluteLine::mixed(slope, gamma_k(), gamma_offset(), steel_.carbon)
                                     : SoluteLine::frozen(slope, gamma_k(), gamma_offset(),
                                                          std::max(steel_.carbon, lines_.peritectic_liquid), begin));
    for (std::size_t i = 0; i < liquid_.size(); ++i) {
      const SteelElement& e = steel_.elements[i];
      s.lines.push_back(mixed(e) ? SoluteLine::mixed(e.liquidus_slope, e.k_gamma, 0, e.composition)
                                 : SoluteLine::frozen(e.liquidus_slope, e.k_gamma, 0, liquid_[i], begin));
    }
    return s;
  }

  double gamma_k() const {
    return (lines_.eutectic_gamma - lines_.peritectic_gamma) / (lines_.eutectic_liquid - lines_.peritectic_liquid);
  }
  double gamma_offset() const { return lines_.peritectic_gamma - gamma_k() * lines_.peritectic_liquid; }

  const Steel& steel_;
  const IronCarbon& lines_;
  Mixing mixing_;
  std::vector<double> liquid_;  ///< of the elements other than carbon, where the stage begins [mass %]
};

void check(const IronCarbon& c) {
  if (!(c.eutectic_temperature > 0 && c.eutectic_temperature < c.peritectic_temperature &&
        c.peritectic_temperature < c.melting_point))
    throw base::InputError("iron-carbon: expected 0 K < eutectic < peritectic < melting point");
  if (!(c.peritectic_delta > 0 && c.peritectic_delta < c.peritectic_gamma && c.peritectic_gamma < c.peritectic_liquid))
    throw base::InputError("iron-carbon: expected carbon of 0 < delta < gamma < liquid at the peritectic");
  if (!(c.eutectic_gamma > c.peritectic_gamma && c.eutectic_liquid > c.peritectic_liquid &&
        c.eutectic_liquid - c.eutectic_gamma > c.peritectic_liquid - c.peritectic_gamma))
    throw base::InputError("iron-carbon: liquidus and solidus of austenite must part from peritectic to eutectic");
}

void check(const Steel& steel) {
  check(steel.lines);
  if (!(steel.carbon >= 0 && steel.carbon <= steel.lines.eutectic_gamma))
    throw base::InputError("carbon: found " + std::to_string(steel.carbon) + " mass %; expected 0 to " +
                           std::to_string(steel.lines.eutectic_gamma) + " for a steel");
  // The checks of a dilute alloy hold for either phase.
  for (const double SteelElement::*k : {&SteelElement::k_delta, &SteelElement::k_gamma}) {
    DiluteAlloy alloy{"iron", steel.lines.melting_point, {{"C", steel.carbon, 0, 1, {}, true}}, {}};
    for (const SteelElement& e : steel.elements)
      alloy.elements.push_back({e.name, e.composition, e.liquidus_slope, e.*k, {}, e.fast});
    dilute_liquidus(alloy);
  }
}

}  // namespace

SteelElement steel_element(const std::string& name, double composition) {
  // Won & Thomas 2001; slope and partition coefficients of P from memory.
  if (name == "Si") return {name, composition, -7.6, 0.77, 0.52, false};
  if (name == "Mn") return {name, composition, -4.9, 0.76, 0.78, false};
  if (name == "P") return {name, composition, -34.4, 0.23, 0.13, false};
  if (name == "S") return {name, composition, -38, 0.05, 0.035, false};
  throw base::InputError("no lines are known of " + name + " in steel; expected Si, Mn, P or S");
}

DiluteFreezing freeze_steel(const Steel& steel, Mixing mixing) {
  check(steel);
  return DiluteFreezing(std::make_shared<const FreezingStages>(mixing, SteelStages(steel, mixing).make(), steel.end));
}

}  // namespace palier::alloy
