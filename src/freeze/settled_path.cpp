#include "palier/freeze/settled_path.hpp"

#include <cmath>
#include <sstream>

#include "palier/base/error.hpp"
#include "palier/freeze/outcome.hpp"

namespace palier::freeze {

SettledPath settle_path(Section s) {
  constexpr double kSettled = 0.005;
  constexpr int kMostRounds = 20;
  s.probes = {s.depth() / 2};
  s.stop.below.reset();
  double time = rough_freezing_time(s);
  for (int round = 1; round <= kMostRounds; ++round) {
    s.path = s.path_after(time);
    const Outcome out = march(s, companion_of(resolution_for(s)), metal_curve(s), std::nullopt, [](double) {});
    const double found = out.probes.front().local_solidification_time;
    if (!(found > 0))
      throw base::InputError(
          "back-diffusion needs the local solidification time at half depth, but the run stops before");
    if (std::abs(found / time - 1) < kSettled) return {*s.path, found, round};
    time = found;
  }
  throw base::NoSolution("the path under back-diffusion and the time freezing takes do not settle after " +
                         std::to_string(kMostRounds) + " rounds; the last local solidification time was " +
                         std::to_string(time) + " s");
}

std::string in_words(const SettledPath& settled) {
  std::ostringstream text;
  text.precision(4);
  text << "back-diffusion (" << settled.path.rule()
       << ") taken at all depths with the local solidification time at half "
       << "depth, " << settled.time << " s; path and time settled in " << settled.rounds << " rounds";
  return text.str();
}

}  // namespace palier::freeze
