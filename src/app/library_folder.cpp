#include "library_folder.hpp"

#include <filesystem>
#include <system_error>

#include "palier/base/error.hpp"

namespace palier::app {

std::string library_folder() {
  namespace fs = std::filesystem;
  std::error_code trouble;
  const fs::path program = fs::read_symlink("/proc/self/exe", trouble);
  for (fs::path folder = program.parent_path(); folder.has_relative_path(); folder = folder.parent_path())
    for (const char* place : {"cases", "share/palier/cases"})
      if (fs::is_directory(folder / place / "alloys", trouble)) return (folder / place).string();
  throw base::FileTrouble("the folder of the shipped alloys and molds was not found above " + program.string() +
                          "; give it with --library FOLDER");
}

}  // namespace palier::app
