// A progress bar on a terminal, for work over a second.
#pragma once

#include <chrono>

namespace palier::app {

class ProgressBar {
 public:
  /// Shows nothing unless `wanted`, standard error is a terminal and neither CI nor TERM=dumb speaks against it.
  explicit ProgressBar(bool wanted);
  ~ProgressBar();
  ProgressBar(const ProgressBar&) = delete;
  ProgressBar& operator=(const ProgressBar&) = delete;

  /// @param share of the work done, 0..1. Draws at most ten times a second, and not before one second has gone.
  void show(double share);

 private:
  using Clock = std::chrono::steady_clock;
  bool active_;
  bool drawn_ = false;
  Clock::time_point begin_, last_;
};

}  // namespace palier::app
