#pragma once
// A file appears whole or not at all.

#include <filesystem>
#include <stdexcept>
#include <string>

namespace finwright::cli {

struct UnwritableFile : std::runtime_error {
    using std::runtime_error::runtime_error;
};

/// Writes to a temporary name beside the target, then renames. Throws UnwritableFile, leaving
/// nothing behind.
void write_whole(const std::filesystem::path& target, const std::string& text);

} // namespace finwright::cli
