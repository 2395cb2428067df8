// The parts of reading a case: the section, then its walls.
#pragma once

#include <string>
#include <vector>

#include "palier/files/case_file.hpp"
#include "palier/files/map_reader.hpp"
#include "palier/files/material_file.hpp"

namespace palier::files {

/// The materials a case has named so far, each read once.
class Materials {
 public:
  Materials(MaterialFolders folders, std::vector<MaterialFile>& used) : folders_(std::move(folders)), used_(used) {}

  /// The alloy or mold a key of the case names. Throws base::InputError.
  AlloyFile alloy(const MapReader& map, const std::string& key);
  MoldFile mold(const MapReader& map, const std::string& key);

 private:
  void note(const MaterialFile& file);

  MaterialFolders folders_;
  std::vector<MaterialFile>& used_;
};

/// Shape, size, alloy, path and pouring.
void read_section(const MapReader& map, Materials& materials, freeze::Section& section);

/// The walls that the shape asks for. The shape and sizes of the section must be set.
void read_walls(const MapReader& map, Materials& materials, freeze::Section& section);

/// One wall from its list of entries.
freeze::Wall read_wall(const MapReader& walls, const std::string& side, Materials& materials);

}  // namespace palier::files
