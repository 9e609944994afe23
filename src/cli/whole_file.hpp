#pragma once
// A file appears whole or not at all.

#include <filesystem>
#include <stdexcept>
#include <string>

namespace finwright::cli {

struct UnwritableFile : std::runtime_error {
    using std::runtime_error::runtime_error;
};

/// Throws UnwritableFile where the result would replace the file it was made from.
void refuse_same_file(const std::filesystem::path& target, const std::filesystem::path& source);

/// Writes to a temporary name beside the target, then renames; a link is followed. Throws
/// UnwritableFile, leaving nothing behind, also where the target is no plain file.
void write_whole(const std::filesystem::path& target, const std::string& text);

} // namespace finwright::cli
