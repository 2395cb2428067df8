#include "palier/freeze/judgement.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace palier::freeze {
namespace {

constexpr double kNever = std::numeric_limits<double>::quiet_NaN();

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

}  // namespace

Judgement judge(const Outcome& fine, const Outcome& coarse, const alloy::SolidificationPath& path) {
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
  Judgement j;
  for (std::size_t k = 0; k < fine.probes.size(); ++k)
    j.probes.push_back({fine.probes[k], {fine.probes[k].depth, start[k], end[k], local[k]}});
  j.solidification_time_error = end.back();
  return j;
}

/// Largest error of an end of freezing, as a share of the time the section takes.
double worst(const Judgement& judgement, double duration) {
  double error = std::isfinite(judgement.solidification_time_error) ? judgement.solidification_time_error : 0;
  for (const ProbeReading& p : judgement.probes)
    if (std::isfinite(p.error.end)) error = std::max(error, p.error.end);
  return error / duration;
}

}  // namespace palier::freeze
