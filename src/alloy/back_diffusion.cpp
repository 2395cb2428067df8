#include "palier/alloy/back_diffusion.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>
#include <string>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

std::string name_of(BackDiffusion rule) {
  switch (rule) {
    case BackDiffusion::brody_flemings:
      return "brody-flemings";
    case BackDiffusion::clyne_kurz:
      return "clyne-kurz";
    case BackDiffusion::ohnaka:
      return "ohnaka";
    case BackDiffusion::ohnaka_columnar:
      return "ohnaka-columnar";
  }
  throw base::InputError("unknown rule of back-diffusion");
}

/// The form that all rules share, for one partition coefficient k and one parameter p.
struct BackDiffusionForm {
  double k;
  double p;

  double bracket() const { return 1 - 2 * p * k; }
  /// Fraction solid when the liquid has become `enrichment` times as rich as the alloy.
  double fraction(double enrichment) const {
    return -std::expm1(-bracket() / (1 - k) * std::log(enrichment)) / bracket();
  }
  /// Enrichment of the last liquid where no invariant intervenes; infinite for Scheil's rule.
  double last_enrichment() const {
    const double taken_up = 2 * p * k;
    if (taken_up == 0) return std::numeric_limits<double>::infinity();
    return std::exp(-(1 - k) / bracket() * std::log(taken_up));
  }
};

}  // namespace

double back_diffusion_parameter(BackDiffusion rule, double diffusion_number) {
  const double a = diffusion_number;
  if (!(a >= 0 && std::isfinite(a)))
    throw base::InputError("diffusion number: found " + std::to_string(a) + "; expected a finite number, 0 or more");
  switch (rule) {
    case BackDiffusion::brody_flemings:
      if (a > 0.5)
        throw base::InputError("the rule of Brody and Flemings holds up to a diffusion number of 1/2, found " +
                               std::to_string(a) + "; above it more would diffuse back than the solid can hold");
      return a;
    case BackDiffusion::clyne_kurz:
      return a == 0 ? 0.0 : -a * std::expm1(-1 / a) - 0.5 * std::exp(-0.5 / a);
    case BackDiffusion::ohnaka:
      return 1 / (1 / a + 2);  // as written, but for every finite a
    case BackDiffusion::ohnaka_columnar:
      return 1 / (0.5 / a + 2);
  }
  throw base::InputError("unknown rule of back-diffusion");
}

SolidificationPath back_diffusion_path(const std::shared_ptr<const PhaseDiagram>& diagram, double composition,
                                       BackDiffusion rule, double diffusion_number) {
  const std::string name = name_of(rule);
  const double p = back_diffusion_parameter(rule, diffusion_number);
  const std::optional<double> k = diagram->constant_partition();
  if (!k) throw base::InputError("rule " + name + " needs a constant partition coefficient");
  const BackDiffusionForm form{*k, p};
  SolidificationPath::Parts parts;
  parts.rule = name;
  parts.liquidus = diagram->liquidus(composition);

  const std::optional<Invariant> last = diagram->invariant();
  const double richest = last ? last->liquid : diagram->largest_composition();
  const double last_liquid = composition * form.last_enrichment();
  double solidus = 0;  // [K]; none where the invariant ends freezing
  if (last_liquid <= richest) {
    solidus = parts.end_of_freezing = diagram->liquidus(last_liquid);
  } else if (last) {
    parts.end_of_freezing = last->temperature;
    // The last liquid may pass the invariant by less than a last bit of the share.
    const double share = 1 - form.fraction(std::max(last->liquid / composition, 1.0));
    if (share > 0) parts.arrests = {{last->temperature, share, last->reaction}};
  } else {
    throw base::InputError("freezing under rule " + name +
                           " does not end within the diagram: give a eutectic temperature, or take the lever rule");
  }
  parts.fraction_above = [diagram, composition, form, solidus](double T) {
    if (T <= solidus) return 1.0;
    return std::min(form.fraction(std::max(diagram->tie_line(T).liquid / composition, 1.0)), 1.0);
  };
  parts.solute = [diagram](double T) {
    const TieLine tie = diagram->tie_line(T);
    return SoluteState{tie.liquid, tie.solid};
  };
  return SolidificationPath(std::move(parts));
}

}  // namespace palier::alloy
