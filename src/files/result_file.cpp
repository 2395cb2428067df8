#include "palier/files/result_file.hpp"

#include <fmt/core.h>
#include <fmt/format.h>

#include <Eigen/Core>
#include <filesystem>
#include <limits>
#include <stdexcept>
#include <utility>

#include "palier/base/error.hpp"
#include "palier/files/netcdf_file.hpp"
#include "palier/files/whole_file.hpp"

namespace palier::files {
namespace {

using freeze::History;
using freeze::ProbeReading;
using freeze::Reading;
using freeze::Result;
using freeze::Section;

constexpr const char* caution =
    "A design aid, not a release for production: confirm by trial casting and inspection; follow local codes and "
    "qualified practice. Damp or rusty chills and damp molds can explode when metal meets them.";

/// A time that a reading gives, with the words for it.
struct Moment {
  const char* name;
  const char* long_name;
  double Reading::*at;
};
constexpr Moment moments[] = {
    {"start_of_freezing", "time at which freezing starts", &Reading::start},
    {"end_of_freezing", "time at which freezing ends", &Reading::end},
    {"local_solidification_time", "local solidification time", &Reading::local_solidification_time}};

template <typename Rows, typename Get>
std::vector<double> column(const Rows& rows, Get get) {
  std::vector<double> values;
  values.reserve(rows.size());
  for (const auto& row : rows) values.push_back(get(row));
  return values;
}

const char* name_of(heat::Shape shape) {
  switch (shape) {
    case heat::Shape::plate:
      return "plate";
    case heat::Shape::cylinder:
      return "cylinder";
    case heat::Shape::sphere:
      return "sphere";
  }
  throw std::logic_error("a shape without a name");
}

void write_root_texts(NetcdfFile& file, const CaseFile& input, const Result& result, const Provenance& provenance) {
  const Section& section = input.section;
  std::string remarks;
  for (const std::string& remark : result.remarks) remarks += (remarks.empty() ? "" : "\n") + remark;
  file.text("Conventions", "CF-1.8");
  file.text("title", section.title);
  file.text("source", fmt::format("palier {} ({})", provenance.version, provenance.commit));
  file.text("history", provenance.command_line);
  file.text("shape", name_of(section.shape));
  file.text("alloy", section.alloy);
  file.text("solidification_path", section.path->rule());
  file.text("remarks", remarks);
  file.text("caution", caution);
}

/// Inner and outer face of each cell, pair by pair.
std::vector<double> cell_bounds(const History& history) {
  if (history.face.size() != history.radius.size() + 1) {
    throw std::logic_error("faces and cells of the history do not match");
  }
  std::vector<double> bounds;
  bounds.reserve(2 * history.radius.size());
  for (std::size_t cell = 0; cell < history.radius.size(); ++cell) {
    bounds.push_back(history.face[cell]);
    bounds.push_back(history.face[cell + 1]);
  }
  return bounds;
}

/// What the coordinate of the cells is measured from.
std::string radius_in_words(const Section& section) {
  if (section.shape != heat::Shape::plate) return "radius";
  return section.inside ? "distance from the left side of the metal" : "distance from the middle of the plate";
}

void write_coordinates(NetcdfFile& file, const Section& section, const Result& result) {
  const History& history = result.history;
  const std::vector<double> r_metal(history.radius.begin() + history.metal_begin,
                                    history.radius.begin() + history.metal_end);
  const std::string radius = radius_in_words(section);
  file.write({"time", {"time"}, "s", "time since the mold was filled", {{"axis", "T"}}}, history.time);
  file.write({"r", {"r"}, "m", radius + ", at the center of each cell", {{"bounds", "r_bounds"}}}, history.radius);
  file.write({"r_metal", {"r_metal"}, "m", radius + ", at the center of each cell of the metal"}, r_metal);
  file.dimension("probe", result.probes.size());
  file.dimension("side", 2);
  file.write({"r_bounds", {"r", "side"}, "m", "inner and outer face of each cell"}, cell_bounds(history));
  file.write({"depth", {"probe"}, "m", "depth of each probe below the surface"},
             column(result.probes, [](const ProbeReading& probe) { return probe.value.depth; }));
  file.write({"depth_metal", {"r_metal"}, "m", "depth of each cell of the metal below the surface"},
             column(result.by_depth, [](const Reading& reading) { return reading.depth; }));
  file.write_flags({"layer", {"r"}, "1", "layer each cell belongs to"}, history.layer, history.layer_name);
}

void write_history(NetcdfFile& file, const History& history) {
  const std::vector<std::pair<std::string, std::string>> at_depth{{"coordinates", "depth"}};
  file.write({"temperature", {"time", "r"}, "K", "temperature"}, history.temperature);
  file.write(
      {"fraction_solid", {"time", "r_metal"}, "1", "fraction solid of the metal", {{"coordinates", "depth_metal"}}},
      history.fraction_solid);
  file.write({"probe_temperature", {"time", "probe"}, "K", "temperature at the probes", at_depth},
             history.probe_temperature);
  file.write({"probe_fraction_solid", {"time", "probe"}, "1", "fraction solid at the probes", at_depth},
             history.probe_fraction);
  file.write({"solidus_depth", {"time"}, "m", "depth of the end-of-freezing front below the surface", {}, true},
             history.solidus_depth);
  file.write({"liquidus_depth", {"time"}, "m", "depth of the start-of-freezing front below the surface", {}, true},
             history.liquidus_depth);
  file.write({"mushy_width", {"time"}, "m", "width of the mushy zone: distance between the two fronts", {}, true},
             history.mushy_width);
  file.write({"surface_heat_flux", {"time"}, "W m-2", "heat flux out of the metal at its surface"},
             history.surface_flux);
}

void write_readings(NetcdfFile& file, const Result& result) {
  for (const Moment& moment : moments) {
    const std::string name = moment.name;
    const std::string words = moment.long_name;
    file.write({name,
                {"probe"},
                "s",
                words + " at the probes",
                {{"coordinates", "depth"}, {"ancillary_variables", name + "_error"}},
                true},
               column(result.probes, [&](const ProbeReading& probe) { return probe.value.*moment.at; }));
    file.write({name + "_error",
                {"probe"},
                "s",
                "numerical error (half width) of: " + words + " at the probes",
                {{"coordinates", "depth"}},
                true},
               column(result.probes, [&](const ProbeReading& probe) { return probe.error.*moment.at; }));
  }
  for (const Moment& moment : moments) {
    file.write({std::string(moment.name) + "_by_depth",
                {"r_metal"},
                "s",
                std::string(moment.long_name) + " at each depth of the metal",
                {{"coordinates", "depth_metal"}},
                true},
               column(result.by_depth, [&](const Reading& reading) { return reading.*moment.at; }));
  }
}

std::int32_t count(long number, const char* what) {
  if (number < 0 || number > std::numeric_limits<std::int32_t>::max()) {
    throw std::logic_error(fmt::format("{} {} cannot be stored", number, what));
  }
  return static_cast<std::int32_t>(number);
}

void write_scalars(NetcdfFile& file, const Section& section, const Result& result) {
  file.write({"solidification_time",
              {},
              "s",
              "time at which the last of the metal is solid",
              {{"ancillary_variables", "solidification_time_error"}},
              true},
             result.solidification_time);
  file.write({"solidification_time_error", {}, "s", "numerical error (half width) of: solidification time", {}, true},
             result.solidification_time_error);
  file.write({"last_to_freeze_depth", {}, "m", "depth below the surface at which the metal freezes last", {}, true},
             result.last_to_freeze);
  file.write({"end_time", {}, "s", "time at which the run stopped"}, result.end_time);
  file.write({"liquidus_temperature", {}, "K", "liquidus temperature of the alloy"}, section.path->liquidus());
  file.write({"end_of_freezing_temperature", {}, "K", "temperature at which the alloy has no liquid left"},
             section.path->end_of_freezing());
  file.write({"pouring_temperature", {}, "K", "pouring temperature"}, section.pouring_temperature);
  file.write({"heat_imbalance", {}, "1", "worst heat imbalance of the run, relative to the heat content"},
             result.heat_imbalance);
  file.write({"steps", {}, "1", "accepted time steps"}, count(result.steps, "steps"));
  file.write({"rejected_steps", {}, "1", "rejected time steps"}, count(result.rejected_steps, "rejected steps"));
  file.write({"newton_iterations", {}, "1", "Newton iterations"}, count(result.newton_iterations, "Newton iterations"));
}

/// A path that tells nothing of the machine: as given where that was relative, otherwise folder and name.
std::string portable(const std::string& given) {
  const std::filesystem::path path(given);
  if (path.is_relative()) return path.generic_string();
  return (path.parent_path().filename() / path.filename()).generic_string();
}

/// Lines of key, value and source with a tab between.
std::string table_of(const std::vector<ResolvedValue>& values) {
  std::string lines;
  for (const ResolvedValue& value : values) lines += fmt::format("{}\t{}\t{}\n", value.key, value.value, value.from);
  return lines;
}

void write_provenance(NetcdfFile& file, const CaseFile& input, const Provenance& provenance) {
  const std::string group = "/provenance";
  file.text(group, "version", provenance.version);
  file.text(group, "commit", provenance.commit);
  file.text(group, "command_line", provenance.command_line);
  file.text(group, "hdf5_version", hdf5_version());
  file.text(group, "eigen_version",
            fmt::format("{}.{}.{}", EIGEN_WORLD_VERSION, EIGEN_MAJOR_VERSION, EIGEN_MINOR_VERSION));
  file.text(group, "fmt_version",
            fmt::format("{}.{}.{}", FMT_VERSION / 10000, FMT_VERSION / 100 % 100, FMT_VERSION % 100));
  file.text(group, "compiler", __VERSION__);
  file.text(group, "case_file", portable(input.path));
  file.text(group, "case_text", input.text);
  file.text(group, "resolved_case", table_of(input.resolved));
  for (std::size_t i = 0; i < input.materials.size(); ++i) {
    const MaterialFile& material = input.materials[i];
    const std::string own_group = fmt::format("{}/material_{}", group, i + 1);
    file.text(own_group, "name", material.name);
    file.text(own_group, "path", portable(material.path));
    file.text(own_group, "text", material.text);
    file.text(own_group, "values", table_of(material.values));
  }
}

}  // namespace

void write_result(const std::string& path, const CaseFile& input, const Result& result, const Provenance& provenance) {
  if (!input.section.path) throw base::InputError({input.path}, "section", "has no solidification path");
  NetcdfFile file(path);
  write_root_texts(file, input, result, provenance);
  write_coordinates(file, input.section, result);
  write_history(file, result.history);
  write_readings(file, result);
  write_scalars(file, input.section, result);
  write_provenance(file, input, provenance);
  write_whole(path, file.bytes());
}

}  // namespace palier::files
