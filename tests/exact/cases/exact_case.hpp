// A section whose freezing is known exactly, with the times that palier should find.
#pragma once

#include <string>
#include <vector>

#include "palier/freeze/result.hpp"
#include "palier/freeze/section.hpp"

namespace palier::exact {

/// A time that is known exactly.
struct KnownTime {
  enum class What { start_at_probe, end_at_probe, whole };
  What what = What::whole;  ///< whole: last point of the metal
  int probe = 0;            ///< index into Section::probes
  double time = 0;          ///< [s] from the start of the run
  double uncertainty = 0;   ///< of `time`, where it comes from a computation [s]
};

struct ExactCase {
  std::string name;
  freeze::Section section;
  std::vector<KnownTime> times;
};

/// What a run made of a known time.
struct Verdict {
  std::string name;    ///< of the case and the reading
  double known = 0;    ///< [s]
  double found = 0;    ///< [s]
  double claimed = 0;  ///< numerical error claimed by the run [s]
  double uncertainty = 0;
  double error() const;  ///< |found - known| [s]
  /// The true error is no larger than claimed; the uncertainty of the known time and the rounding of readings (1e-9 of
  /// the time) are granted.
  bool honest() const;
};

std::vector<Verdict> judge(const ExactCase& exact, const freeze::Result& result);

/// Runs the case and judges it.
std::vector<Verdict> judge(const ExactCase& exact);

}  // namespace palier::exact
