// Samples a march at equal intervals into a History.
#pragma once

#include <vector>

#include "palier/freeze/profile.hpp"
#include "palier/freeze/result.hpp"
#include "palier/freeze/setup.hpp"

namespace palier::freeze {

class Recorder {
 public:
  /// @param every interval [s], > 0; @param probe_radius of the probes [m]
  Recorder(const Setup& setup, const Profile& profile, const std::vector<double>& probe_radius, double every);

  /// Adds the rows that are due in a step. Steps must follow each other; the first adds the row at time 0.
  void record(const heat::StepView& step);
  /// Adds a last row at the end of the run, unless one is there already.
  void finish(const heat::StepView& step, double time);

  History&& take() { return std::move(history_); }

 private:
  void row(const heat::StepView& step, double time);
  void waves(const heat::StepView& step, double time);

  const Setup& setup_;
  const Profile& profile_;
  std::vector<Point> probes_, centers_;
  std::vector<Point> walk_;  ///< the metal's faces, from the surface inward
  std::vector<double> to_start_, to_end_;
  double every_;
  long next_ = 0;
  History history_;
};

}  // namespace palier::freeze
