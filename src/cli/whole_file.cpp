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

void refuse_same_file(const fs::path& target, const fs::path& source) {
    std::error_code absent;
    if (fs::equivalent(target, source, absent)) refuse(target, "it is the job file itself");
}

void write_whole(const fs::path& target, const std::string& text) {
    if (fs::is_directory(target)) refuse(target, "it is a folder");
    if (fs::exists(target) && !fs::is_regular_file(target))
        refuse(target, "it is not a plain file");
    const fs::path real = fs::exists(target) ? fs::canonical(target) : target;
    fs::path temporary = real;
    temporary += fmt::format(".{}.part", ::getpid());
    if (!written(temporary, text)) {
        const std::string why = std::strerror(errno);
        std::error_code ignored_if_absent;
        fs::remove(temporary, ignored_if_absent);
        refuse(target, why);
    }
    std::error_code error;
    fs::rename(temporary, real, error);
    if (error) {
        std::error_code ignored_if_absent;
        fs::remove(temporary, ignored_if_absent);
        refuse(target, error.message());
    }
}

} // namespace finwright::cli
