// Every file in tests/data/bad_jobs is refused with the message in its .expected sibling.
// FINWRIGHT_COLLECT=1 rewrites the expectations: read the difference before committing it.

#include "src/job/document.hpp"
#include "src/job/read_job.hpp"
#include <algorithm>
#include <cstdlib>
#include <doctest/doctest.h>
#include <filesystem>
#include <fstream>

using namespace finwright::job;
namespace fs = std::filesystem;

namespace {

std::string refusal(const fs::path& file) {
    try {
        read_job_text(read_text_file(file), file.filename().string());
    } catch (const InputError& error) {
        CHECK(error.place().line > 0);
        return std::string(error.what()) + "\n";
    }
    return "accepted\n";
}

std::vector<fs::path> bad_jobs() {
    std::vector<fs::path> files;
    for (const auto& entry : fs::directory_iterator(fs::path(TEST_DATA_DIR) / "bad_jobs"))
        if (entry.path().extension() == ".yaml") files.push_back(entry.path());
    std::sort(files.begin(), files.end());
    return files;
}

} // namespace

TEST_CASE("bad jobs are refused as expected") {
    const bool collect = std::getenv("FINWRIGHT_COLLECT") != nullptr;
    const auto files = bad_jobs();
    CHECK(files.size() >= 60);
    for (const fs::path& file : files) {
        CAPTURE(file.filename().string());
        const std::string message = refusal(file);
        CHECK(message != "accepted\n");
        fs::path expected = file;
        expected.replace_extension(".expected");
        if (collect) std::ofstream(expected, std::ios::binary) << message;
        REQUIRE(fs::exists(expected));
        CHECK(message == read_text_file(expected));
    }
}
