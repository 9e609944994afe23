// Broken copies of the demo jobs: whatever comes in, a Job or an InputError with a place goes out.
// Deterministic: the same cases on every run and machine.

#include "src/job/document.hpp"
#include "src/job/read_job.hpp"
#include <cmath>
#include <doctest/doctest.h>
#include <random>
#include <sstream>

using namespace finwright::job;

namespace {

using Random = std::mt19937; // its sequence is fixed by the standard; distributions are not

std::size_t below(Random& random, std::size_t bound) {
    return bound == 0 ? 0 : std::size_t(random()) % bound;
}

std::vector<std::string> lines_of(const std::string& text) {
    std::vector<std::string> lines;
    std::istringstream stream(text);
    for (std::string line; std::getline(stream, line);)
        lines.push_back(line);
    return lines;
}

std::string joined(const std::vector<std::string>& lines) {
    std::string text;
    for (const std::string& line : lines)
        text += line + "\n";
    return text;
}

std::string flip_byte(std::string text, Random& random) {
    if (!text.empty()) text[below(random, text.size())] ^= char(1u << below(random, 8));
    return text;
}

std::string put_symbol(std::string text, Random& random) {
    static const std::string symbols = "{}[]:,#&*!|>'\"%@`-?0.9e\t\n /()^~";
    text.insert(below(random, text.size() + 1), 1, symbols[below(random, symbols.size())]);
    return text;
}

std::string change_lines(const std::string& text, Random& random) {
    auto lines = lines_of(text);
    if (lines.empty()) return text;
    const auto at = lines.begin() + std::ptrdiff_t(below(random, lines.size()));
    switch (below(random, 4)) {
    case 0:
        lines.insert(at, *at);
        break;
    case 1:
        lines.erase(at);
        break;
    case 2:
        std::swap(*at, lines[below(random, lines.size())]);
        break;
    default:
        at->insert(0, below(random, 4), ' ');
    }
    return joined(lines);
}

std::string mutated(std::string text, Random& random) {
    const std::size_t rounds = 1 + below(random, 3);
    for (std::size_t i = 0; i < rounds; ++i) {
        switch (below(random, 5)) {
        case 0:
            text = flip_byte(std::move(text), random);
            break;
        case 1:
            text.resize(below(random, text.size() + 1));
            break;
        case 2:
            text = put_symbol(std::move(text), random);
            break;
        default:
            text = change_lines(text, random);
        }
    }
    return text;
}

void check_sound(const Job& job) {
    CHECK(std::isfinite(job.total_power()));
    CHECK(job.total_power() > 0.0);
    for (const Part& part : job.parts)
        CHECK((part.pad_across > 0.0 && part.pad_along > 0.0 && part.interface >= 0.0 &&
               part.junction_to_case >= 0.0));
}

} // namespace

TEST_CASE("mutated demo jobs give a job or an error with a place") {
    Random random(20261201);
    int accepted = 0, refused = 0;
    for (const char* name : {"pump_controller", "bench_supply"}) {
        const std::string text =
            read_text_file(std::string(CONFIGS_DIR) + "/jobs/" + name + ".yaml");
        for (int i = 0; i < 4000; ++i) {
            const std::string broken = mutated(text, random);
            CAPTURE(broken);
            try {
                check_sound(read_job_text(broken, "mutated.yaml"));
                ++accepted;
            } catch (const InputError& error) {
                CHECK(error.place().line > 0);
                CHECK(error.place().column > 0);
                CHECK_FALSE(error.reason().empty());
                ++refused;
            }
        }
    }
    CHECK(accepted > 500); // else the mutations are too wild to reach the later checks
    CHECK(refused > 3000);
}
