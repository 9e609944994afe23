#include "src/cli/whole_file.hpp"

#include <cerrno>
#include <cstdio>
#include <cstring>
#include <fmt/format.h>
#include <unistd.h>

namespace finwright::cli {

namespace fs = std::filesystem;

namespace {

[[noreturn]] void refuse(const fs::path& target, const std::string& why) {
    throw UnwritableFile(
        fmt::format("{} cannot be written: {}; nothing was left behind", target.string(), why));
}

bool written(const fs::path& path, const std::string& text) {
    std::FILE* file = std::fopen(path.c_str(), "wb");
    if (!file) return false;
    const bool complete = std::fwrite(text.data(), 1, text.size(), file) == text.size();
    return (std::fclose(file) == 0) && complete;
}

} // namespace

void write_whole(const fs::path& target, const std::string& text) {
    if (fs::is_directory(target)) refuse(target, "it is a folder");
    fs::path temporary = target;
    temporary += fmt::format(".{}.part", ::getpid());
    if (!written(temporary, text)) {
        const std::string why = std::strerror(errno);
        std::error_code ignored_if_absent;
        fs::remove(temporary, ignored_if_absent);
        refuse(target, why);
    }
    std::error_code error;
    fs::rename(temporary, target, error);
    if (error) {
        std::error_code ignored_if_absent;
        fs::remove(temporary, ignored_if_absent);
        refuse(target, error.message());
    }
}

} // namespace finwright::cli
