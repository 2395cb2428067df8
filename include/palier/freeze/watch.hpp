// Watches points of the metal during a march and notes when freezing starts and ends there.
#pragma once

#include <optional>
#include <vector>

#include "palier/freeze/profile.hpp"
#include "palier/freeze/result.hpp"

namespace palier::freeze {

class Watch {
 public:
  /// @param radius of the points [m], within the metal
  Watch(const Profile& profile, const std::vector<double>& radius);

  /// Looks for events in a step; allocates nothing.
  void look(const heat::StepView& step);

  /// Time the last liquid of the whole metal was gone [s]; NaN while there is some.
  double frozen() const { return frozen_; }
  /// Where it was [m].
  double last_radius() const { return last_radius_; }
  double start(std::size_t point) const { return start_[point]; }
  double end(std::size_t point) const { return end_[point]; }

 private:
  void look_at_whole(const heat::StepView& step);

  const Profile& profile_;
  std::vector<Point> points_;
  std::optional<Point> center_;  ///< of symmetry
  std::vector<double> start_, end_;
  std::vector<char> started_, ended_;
  double frozen_, last_radius_;
  bool liquid_seen_ = false;
  double met_radius_;  ///< where two fronts met [m]
};

}  // namespace palier::freeze
