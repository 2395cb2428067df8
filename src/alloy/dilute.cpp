#include "palier/alloy/dilute.hpp"

#include <cmath>
#include <utility>

#include "freezing_stages.hpp"
#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

constexpr double kGasConstant = 8.314462618;  // [J/mol/K] CODATA 2018

void check(const DiluteElement& e) {
  if (!(e.composition >= 0 && e.composition < 100))
    throw base::InputError(e.name + ": found " + std::to_string(e.composition) + " mass %; expected 0 to 100");
  if (!(e.partition_coefficient > 0 && std::isfinite(e.partition_coefficient)))
    throw base::InputError(e.name + ": the partition coefficient must be above 0");
  if (!std::isfinite(e.liquidus_slope)) throw base::InputError(e.name + ": the liquidus slope is not a finite number");
}

}  // namespace

double Diffusivity::at(double T) const {
  if (!(T > 0)) throw base::InputError("a diffusivity needs a temperature above 0 K");
  return D0 * std::exp(-Q / (kGasConstant * T));
}

double dilute_liquidus(const DiluteAlloy& alloy) {
  if (!(alloy.melting_point > 0 && std::isfinite(alloy.melting_point)))
    throw base::InputError(alloy.base + ": the melting point must be above 0 K");
  double T = alloy.melting_point, solute = 0;
  for (const DiluteElement& e : alloy.elements) {
    check(e);
    T += e.liquidus_slope * e.composition;
    solute += e.composition;
  }
  if (!(solute < 100))
    throw base::InputError("the elements add up to " + std::to_string(solute) + " mass %; expected less than 100");
  return T;
}

DiluteFreezing freeze_dilute(const DiluteAlloy& alloy, Mixing mixing) {
  dilute_liquidus(alloy);  // for its checks
  Stage stage;
  stage.base = alloy.melting_point;
  for (const DiluteElement& e : alloy.elements) {
    const bool even = mixing == Mixing::lever || (mixing == Mixing::partial && e.fast);
    stage.lines.push_back(even ? SoluteLine::mixed(e.liquidus_slope, e.partition_coefficient, 0, e.composition)
                               : SoluteLine::frozen(e.liquidus_slope, e.partition_coefficient, 0, e.composition, 1));
  }
  return DiluteFreezing(
      std::make_shared<const FreezingStages>(mixing, std::vector<Stage>{std::move(stage)}, alloy.end));
}

DiluteFreezing::DiluteFreezing(std::shared_ptr<const FreezingStages> stages) : stages_(std::move(stages)) {}

double DiluteFreezing::liquidus() const { return stages_->liquidus(); }

double DiluteFreezing::end_of_freezing() const { return stages_->end_of_freezing(); }

double DiluteFreezing::last_liquid_fraction() const { return stages_->last_liquid_fraction(); }

double DiluteFreezing::fraction_solid(double T) const {
  if (T > liquidus()) return 0;
  if (T < end_of_freezing()) return 1;
  return 1 - stages_->fraction_liquid(T);
}

Compositions DiluteFreezing::compositions(double T) const {
  if (!(T <= liquidus() && T >= end_of_freezing()))
    throw base::InputError(std::to_string(T) + " K is outside the freezing range");
  return stages_->compositions(T);
}

Compositions DiluteFreezing::first_solid() const { return stages_->compositions(liquidus()); }

Compositions DiluteFreezing::last_liquid() const { return stages_->last_liquid(); }

SolidificationPath DiluteFreezing::path() const {
  SolidificationPath::Parts p;
  p.rule = stages_->rule();
  p.liquidus = liquidus();
  p.end_of_freezing = end_of_freezing();
  p.arrests = stages_->arrests();
  p.fraction_above = [stages = stages_](double T) { return 1 - stages->fraction_liquid(T); };
  if (first_solid().liquid.size() == 1)
    p.solute = [stages = stages_](double T) {
      const Compositions c = stages->compositions(T);
      return SoluteState{c.liquid[0], c.solid[0]};
    };
  return SolidificationPath(std::move(p));
}

}  // namespace palier::alloy
