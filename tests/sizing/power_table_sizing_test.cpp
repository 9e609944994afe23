// Parts with a power table in the search: sized at the junction allowed, rated as they settle.
#include "src/job/read_job.hpp"
#include "src/sizing/sizing.hpp"
#include "tests/near.hpp"

using namespace finwright;
using job::PowerTable;
using tests::near;

namespace {

sizing::Answer answered(const job::Job& job) {
    auto sizing = sizing::size(job);
    REQUIRE(std::holds_alternative<sizing::Answer>(sizing));
    return std::get<sizing::Answer>(sizing);
}

/// One part of a demo job, allowed 125 degC, with a table in place of its power; few fin counts.
std::string one_part(const std::string& power) {
    return "job: One switch\n"
           "air: {state: still, temperature: 38 degC}\n"
           "parts:\n"
           "  - name: switch\n"
           "    power: " +
           power +
           "\n    junction_limit: 150 degC\n"
           "    junction_to_case: 0.55 K/W\n"
           "    interface: {area_resistance: 0.5 K cm2/W}\n"
           "    pad: {across: 15.5 mm, along: 20 mm}\n"
           "limits: {margin: 25 K, space: {width: 120 mm, height: 50 mm, length: 150 mm}}\n"
           "sink: {process: extruded-easy, alloy: 6063-T5, finish: black-anodised, "
           "fins: {from: 8, to: 10}}\n";
}

job::Job read(const std::string& power) {
    return job::read_job_text(one_part(power), "job.yaml");
}

} // namespace

TEST_CASE("a rising table leads to the sink of its power at the junction allowed") {
    // 125 degC lies halfway between 20 and 24 W.
    const auto table =
        answered(read("{at: [[25 degC, 14 W], [100 degC, 20 W], [150 degC, 24 W]]}"));
    const auto stated = answered(read("22 W"));
    CHECK(table.design.optimum_aim == near(stated.design.optimum_aim, 1e-9));
    CHECK(table.design.rounded_aim == near(stated.design.rounded_aim, 1e-9));
    // Rated as it settles: a little less power than it was sized for, and never too hot.
    CHECK(table.rating.power <= 22.0 * (1.0 + 1e-9));
    CHECK(table.rating.power > 21.0);
    CHECK(*table.rating.parts[0].headroom() >= *stated.rating.parts[0].headroom() - 1e-6);
}

TEST_CASE("where the part's limit binds the size is exact: it settles at the junction allowed") {
    const auto job = read("{at: [[25 degC, 14 W], [100 degC, 20 W], [150 degC, 24 W]]}");
    const auto g = answered(job).design.optimum;
    const auto rating = sink::rate(g, sink::duty_of(job));
    CHECK(rating.parts[0].junction_temperature == near(398.15, 2e-5));
    CHECK(rating.power == near(22.0, 1e-3));
}

TEST_CASE("a falling table is sized at the most in reach, the power at the air") {
    // 38 degC: 26 - 13 * 6/125 W.
    const auto table = answered(read("{at: [[25 degC, 26 W], [150 degC, 20 W]]}"));
    const auto stated = answered(read("25.376 W"));
    CHECK(table.design.rounded_aim == near(stated.design.rounded_aim, 1e-9));
    CHECK(*table.rating.parts[0].headroom() > *stated.rating.parts[0].headroom());
    CHECK(table.rating.feedback->loop_gain < 0.0);
}

TEST_CASE("a refusal rests on the powers the search took, and names no feedback") {
    auto sizing = sizing::size(read("{at: [[25 degC, 40 W], [100 degC, 80 W]]}"));
    REQUIRE(std::holds_alternative<sizing::Refusal>(sizing));
    const auto& refusal = std::get<sizing::Refusal>(sizing);
    REQUIRE(refusal.closest);
    CHECK_FALSE(refusal.closest->feedback);
    CHECK(refusal.closest->power == near(40.0 + 40.0 * 100.0 / 75.0, 1e-9));
    CHECK(refusal.shortfall == near(-*refusal.closest->parts[0].headroom(), 1e-6));
}
