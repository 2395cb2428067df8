#include "exact/cases/exact_case.hpp"

#include <cmath>

#include "palier/freeze/run.hpp"

namespace palier::exact {

double Verdict::error() const { return std::abs(found - known); }

bool Verdict::honest() const { return error() <= claimed + uncertainty + 1e-9 * known; }

std::vector<Verdict> judge(const ExactCase& exact, const freeze::Result& result) {
  std::vector<Verdict> verdicts;
  for (const KnownTime& k : exact.times) {
    if (k.what == KnownTime::What::whole) {
      verdicts.push_back({exact.name + ", whole", k.time, result.solidification_time, result.solidification_time_error,
                          k.uncertainty});
      continue;
    }
    const freeze::ProbeReading& probe = result.probes.at(static_cast<std::size_t>(k.probe));
    const bool end = k.what == KnownTime::What::end_at_probe;
    verdicts.push_back({exact.name + ", probe " + std::to_string(k.probe) + (end ? " end" : " start"), k.time,
                        end ? probe.value.end : probe.value.start, end ? probe.error.end : probe.error.start,
                        k.uncertainty});
  }
  return verdicts;
}

std::vector<Verdict> judge(const ExactCase& exact) { return judge(exact, freeze::run(exact.section)); }

}  // namespace palier::exact
