// Alloy and mold files: looked up by name, read, and turned into what the lower layers take.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "palier/alloy/diagram.hpp"
#include "palier/alloy/dilute.hpp"
#include "palier/alloy/enthalpy_curve.hpp"
#include "palier/alloy/path.hpp"
#include "palier/alloy/ripening.hpp"
#include "palier/alloy/steel.hpp"
#include "palier/files/case_file.hpp"
#include "palier/files/map_reader.hpp"

namespace palier::files {

/// Folders in which materials are looked up.
struct MaterialFolders {
  std::string beside;   ///< folder of the case; wins
  std::string library;  ///< with the folders `alloys` and `molds`
};

enum class MaterialKind { alloy, mold };

/// Name of the file of a material: every run of characters other than letters, digits, '.', '+' and '-' is one '-'.
/// "silica sand, dry" -> "silica-sand-dry.yaml".
std::string material_file_name(const std::string& name);

/// Path of the file of a material: NAME beside the case, then in the library; a value ending in .yaml is a path
/// relative to the case. @param in_case the value in the case, for the message Throws base::InputError with the nearest
/// names where there is none.
std::string find_material(const Reading& reading, const SourceNode& in_case, const std::string& key, MaterialKind kind,
                          const MaterialFolders& folders);

/// A binary's lines and the composition the alloy file is about.
struct BinaryAlloy {
  std::string base, solute;  ///< symbols of the elements
  double composition = 0;    ///< [mass %]
  std::shared_ptr<const alloy::PhaseDiagram> diagram;
};

/// What the rules of back-diffusion need besides a binary's lines.
struct BackDiffusionData {
  double diffusivity = 0;    ///< of the solute in the solid [m2/s]
  alloy::Ripening ripening;  ///< of the secondary arms
};

/// An alloy file as read.
struct AlloyFile {
  MaterialFile file;
  alloy::MetalProperties metal;
  std::string default_path;
  std::optional<double> pure_melting_point;  ///< [K]
  std::optional<BinaryAlloy> binary;
  std::optional<alloy::DiluteAlloy> dilute;
  std::optional<alloy::Steel> steel;
  std::optional<alloy::SolidificationPath> measured;
  std::optional<BackDiffusionData> back_diffusion;
};

/// A mold file as read.
struct MoldFile {
  MaterialFile file;
  alloy::MoldProperties properties;
};

/// Names of the rules an alloy file has data for: "pure", "lever", "scheil", "partial", "measured".
std::vector<std::string> rules_of(const AlloyFile& alloy);

/// Path by one of rules_of. @param composition [mass %], of a binary; the others have that of the file. Throws
/// base::InputError where the rule does not end.
alloy::SolidificationPath path_of(const std::string& rule, const AlloyFile& alloy, double composition);

/// An element and its content [mass %].
struct ElementContent {
  std::string element;
  double composition = 0;
};

/// Contents of the elements of a dilute alloy or a steel, carbon of a steel first; none for other alloys.
std::vector<ElementContent> elements_of(const AlloyFile& alloy);

/// Freezing by lever, scheil or partial of an alloy with elements_of. Throws base::InputError where the rule does not
/// end.
alloy::DiluteFreezing freezing_of(const std::string& rule, const AlloyFile& alloy);

/// Names of the rules that also need the time freezing takes: "brody-flemings", "clyne-kurz", "ohnaka"; none where the
/// file lacks data on back-diffusion.
std::vector<std::string> timed_rules_of(const AlloyFile& alloy);

/// Path by one of timed_rules_of after a local solidification time [s]. Throws base::InputError as its rule does.
alloy::SolidificationPath timed_path_of(const std::string& rule, const AlloyFile& alloy, double composition,
                                        double local_solidification_time);

/// Path of an alloy's file by its name, outside a case. Throws base::InputError with the nearest names.
std::string find_alloy(const std::string& name, const MaterialFolders& folders);

/// Both throw base::InputError with the place of what is wrong.
AlloyFile read_alloy(const std::string& path);
MoldFile read_mold(const std::string& path);

/// Of the maps `dilute` and `steel`. Both throw base::InputError with the place of what is wrong, also where no alloy
/// can freeze by these lines.
alloy::DiluteAlloy read_dilute(const MapReader& map);
alloy::Steel read_steel(const MapReader& map);

/// A datum with its source that is one value; noted with its source.
double read_sourced_value(const MapReader& map, const std::string& key);

/// The same for a composition [mass %]. @param base @param solute symbols of the elements, to convert at%
double read_sourced_composition(const MapReader& map, const std::string& key, const std::string& base,
                                const std::string& solute);

/// A datum with its source that is one value, or points over what x describes.
base::Table read_sourced_table(const MapReader& map, const std::string& key, const KeySpec& x);

/// A composition [mass %], converted from at% where it is written so; limits checked.
double read_composition(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec,
                        const std::string& base, const std::string& solute);

/// Runs what may throw a base::InputError without a place and gives it one.
template <typename Make>
auto at_place(const Reading& reading, const SourceNode& node, const std::string& key, const Make& make) {
  try {
    return make();
  } catch (const base::InputError& error) {
    if (!error.place().file.empty()) throw;
    refuse(reading, node, key, error.what());
  }
}

}  // namespace palier::files
