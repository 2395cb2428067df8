// Writes a file so that under its name it is always whole.
#pragma once

#include <cstddef>
#include <span>
#include <string>

namespace palier::files {

/// Writes `path` + ".partial", waits until the disk has it, and renames it. Whatever happens, a file called `path` is
/// either the one that was there before or the new one in full. The partial file is removed on failure; a killed
/// process leaves it behind, and the next run replaces it. A symbolic link is followed. Two processes that write the
/// same file at once do not mix: the second is refused.
/// Throws base::FileTrouble naming path and cause.
void write_whole(const std::string& path, std::span<const std::byte> bytes);

}  // namespace palier::files
