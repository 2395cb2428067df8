#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <string>

#include "answer.hpp"

namespace palier::app {
namespace {

constexpr double kCelsius = 273.15;

/// Seconds with as many digits as their error bears, e.g. "412.3 ± 0.2".
std::string with_error(double value, double error) {
  if (!std::isfinite(value)) return "-";
  if (!std::isfinite(error)) return fmt::format("{:.4g}", value);
  const int digits = std::clamp(static_cast<int>(1 - std::floor(std::log10(std::max(error, 1e-9)))), 0, 4);
  return fmt::format("{:.{}f} ± {:.{}f}", value, digits, error, digits);
}

/// Right-aligned in columns of what a person sees: "±" is one sign of two bytes.
std::string column(const std::string& text, std::size_t width) {
  const auto seen = static_cast<std::size_t>(
      std::count_if(text.begin(), text.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U; }));
  return std::string(width > seen ? width - seen : 0, ' ') + text;
}

std::string shape_in_words(const freeze::Section& s) {
  switch (s.shape) {
    case heat::Shape::plate:
      return fmt::format("plate {:g} mm{}", s.thickness * 1e3, s.inside ? ", two different sides" : "");
    case heat::Shape::cylinder:
      return s.bore > 0 ? fmt::format("cylinder {:g} mm, bore {:g} mm", s.thickness * 1e3, s.bore * 1e3)
                        : fmt::format("cylinder {:g} mm", s.thickness * 1e3);
    default:
      return fmt::format("sphere {:g} mm", s.thickness * 1e3);
  }
}

}  // namespace

std::string caution() {
  return "A design aid: confirm by trial casting and inspection, follow local codes and qualified practice.\n"
         "Damp chills and molds can explode.";
}

std::string answer_table(const files::CaseFile& input, const freeze::Result& r) {
  const freeze::Section& s = input.section;
  std::string out;
  if (!s.title.empty()) out += s.title + "\n";
  out += fmt::format("{}, {}, poured at {:.1f} degC\n", s.alloy, shape_in_words(s), s.pouring_temperature - kCelsius);
  out += fmt::format("freezes from {:.1f} to {:.1f} degC ({} path)\n\n", s.path->liquidus() - kCelsius,
                     s.path->end_of_freezing() - kCelsius, s.path->rule());
  if (std::isfinite(r.solidification_time))
    out += fmt::format("Solid after {} s; last to freeze: {:.2f} mm below the surface.\n",
                       with_error(r.solidification_time, r.solidification_time_error), r.last_to_freeze * 1e3);
  else
    out += fmt::format("Not solid throughout when the run stopped after {:.4g} s.\n", r.end_time);
  out += "\n" + column("depth", 9) + column("freezing starts", 22) + column("freezing ends", 22) +
         column("local solidification", 24) + "\n";
  out += column("mm", 9) + column("s", 22) + column("s", 22) + column("time, s", 24) + "\n";
  for (const freeze::ProbeReading& p : r.probes) {
    out += column(fmt::format("{:.2f}", p.value.depth * 1e3), 9);
    out += column(with_error(p.value.start, p.error.start), 22);
    out += column(with_error(p.value.end, p.error.end), 22);
    out += column(with_error(p.value.local_solidification_time, p.error.local_solidification_time), 24) + "\n";
  }
  out +=
      fmt::format("\n± is the numerical error, from a coarser companion run; what the data are worth comes on top.\n");
  out += fmt::format("Heat balance closes to {:.1e}; {} steps, {:.1f} ms of CPU.\n", r.heat_imbalance, r.steps,
                     r.cpu_seconds * 1e3);
  for (const std::string& remark : r.remarks) out += "Note: " + remark + "\n";
  return out + "\n" + caution() + "\n";
}

}  // namespace palier::app
