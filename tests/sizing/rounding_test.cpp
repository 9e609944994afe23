// The rounded part: multiples of the shop's steps, and the best of all combinations in reach.
#include "src/job/read_job.hpp"
#include "src/sizing/sizing.hpp"
#include "tests/near.hpp"
#include <cmath>

using namespace finwright;

namespace {

bool multiple(double value, double step) {
    const double steps = value / step;
    return std::abs(steps - std::round(steps)) < 1e-6;
}

} // namespace

TEST_CASE("every free dimension is a multiple of its step") {
    for (const char* name : {"pump_controller", "bench_supply"}) {
        const auto job = job::read_job(std::string(CONFIGS_DIR) + "/jobs/" + name + ".yaml");
        auto sizing = sizing::size(job);
        const auto& answer = std::get<sizing::Answer>(sizing);
        std::vector<sizing::Design> designs = answer.alternatives;
        designs.push_back(answer.design);
        for (const auto& d : designs) {
            const auto& g = d.rounded;
            const auto& s = job.sink.steps;
            CHECK(multiple(g.height, s.fin_height));
            CHECK(multiple(g.tip_thickness(), s.fin_thickness));
            CHECK(multiple(g.gap, s.gap));
            CHECK(multiple(g.base, s.base_thickness));
            CHECK(multiple(g.length, s.length));
            CHECK(d.rounded_aim >= d.optimum_aim * (1.0 - 1e-4)); // rounding never pays
        }
    }
}

TEST_CASE("finer steps never make the rounded design heavier") {
    auto job = job::read_job(std::string(CONFIGS_DIR) + "/jobs/bench_supply.yaml");
    auto coarse = sizing::size_on_even_air(job);
    job.sink.steps.fin_thickness /= 10.0;
    job.sink.steps.gap /= 10.0;
    auto fine = sizing::size_on_even_air(job);
    CHECK(std::get<sizing::Answer>(fine).rating.mass <=
          std::get<sizing::Answer>(coarse).rating.mass * (1.0 + 1e-9));
}
