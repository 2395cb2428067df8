#include "progress_bar.hpp"

#include <fmt/format.h>
#include <unistd.h>

#include <algorithm>
#include <cstdio>
#include <cstdlib>
#include <string>

namespace palier::app {
namespace {

bool terminal_can_show_it() {
  const char* term = std::getenv("TERM");
  return isatty(STDERR_FILENO) != 0 && std::getenv("CI") == nullptr && term != nullptr && std::string(term) != "dumb";
}

}  // namespace

ProgressBar::ProgressBar(bool wanted)
    : active_(wanted && terminal_can_show_it()), begin_(Clock::now()), last_(begin_) {}

ProgressBar::~ProgressBar() {
  if (drawn_) std::fputs("\r\033[K", stderr);
}

void ProgressBar::show(double share) {
  if (!active_) return;
  using namespace std::chrono_literals;
  const Clock::time_point now = Clock::now();
  if (now - begin_ < 1s || now - last_ < 100ms) return;
  last_ = now;
  drawn_ = true;
  constexpr int kWidth = 40;
  const int full = static_cast<int>(kWidth * std::clamp(share, 0.0, 1.0));
  const double gone = std::chrono::duration<double>(now - begin_).count();
  const double left = share > 0.01 ? gone * (1 - share) / share : 0.0;
  fmt::print(stderr, "\r[{:=<{}}{: <{}}] {:3.0f} %  {:.0f} s left\033[K", "", full, "", kWidth - full, 100 * share,
             left);
  std::fflush(stderr);
}

}  // namespace palier::app
