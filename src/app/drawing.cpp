#include "drawing.hpp"

#include <cstdio>
#include <filesystem>
#include <system_error>

#include "palier/base/error.hpp"

namespace palier::app {
namespace {

/// For the shell: within single quotes only the quote itself is special.
std::string quoted(const std::string& text) {
  std::string out = "'";
  for (const char c : text) out += c == '\'' ? std::string("'\\''") : std::string(1, c);
  return out + "'";
}

}  // namespace

void draw_diagram(const std::string& answer, const std::string& file, const std::string& library) {
  namespace fs = std::filesystem;
  std::error_code ignored;
  const fs::path tool = fs::absolute(library, ignored).parent_path() / "tools/plot_diagram.py";
  if (!fs::exists(tool, ignored)) throw base::FileTrouble("cannot draw: " + tool.string() + " is not there");
  const std::string command = "/usr/bin/python3 " + quoted(tool.string()) + " - -o " + quoted(file) + " >/dev/null";
  std::FILE* pipe = popen(command.c_str(), "w");
  if (pipe == nullptr) throw base::FileTrouble("cannot draw: no process could be started");
  const bool handed = std::fputs(answer.c_str(), pipe) >= 0;
  if (pclose(pipe) != 0 || !handed) throw base::FileTrouble("cannot draw " + file + ": " + tool.string() + " failed");
}

}  // namespace palier::app
