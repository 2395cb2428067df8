#include <cmath>
#include <nlohmann/json.hpp>
#include <string>

#include "answer.hpp"

namespace palier::app {
namespace {

using Json = nlohmann::ordered_json;

/// JSON has no NaN: what was not reached is null.
Json number(double x) { return std::isfinite(x) ? Json(x) : Json(nullptr); }

Json times(const freeze::Reading& r) {
  return {{"start_s", number(r.start)},
          {"end_s", number(r.end)},
          {"local_solidification_time_s", number(r.local_solidification_time)}};
}

}  // namespace

std::string answer_json(const files::CaseFile& input, const freeze::Result& r) {
  Json out;
  out["case"] = input.path;
  out["title"] = input.section.title;
  out["solidification_time_s"] = number(r.solidification_time);
  out["numerical_error"] = {{"solidification_time_s", number(r.solidification_time_error)}};
  out["last_to_freeze_m"] = number(r.last_to_freeze);
  out["end_time_s"] = number(r.end_time);
  out["heat_imbalance"] = number(r.heat_imbalance);
  out["steps"] = r.steps;
  out["rejected_steps"] = r.rejected_steps;
  out["newton_iterations"] = r.newton_iterations;
  out["cpu_s"] = number(r.cpu_seconds);
  out["readings"] = Json::array();
  for (const freeze::ProbeReading& p : r.probes) {
    Json reading = {{"depth_m", p.value.depth}};
    reading.update(times(p.value));
    reading["numerical_error"] = times(p.error);
    out["readings"].push_back(reading);
  }
  out["remarks"] = r.remarks;
  out["caution"] = caution();
  return out.dump(2) + "\n";
}

}  // namespace palier::app
