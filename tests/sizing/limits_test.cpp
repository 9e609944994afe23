// Aims, fixed and bounded dimensions, binding limits and what easing them buys, refusals.
#include "src/job/read_job.hpp"
#include "src/sizing/broken_limits.hpp"
#include "src/sizing/sizing.hpp"
#include "src/sizing/stated_sink.hpp"
#include "tests/near.hpp"
#include <algorithm>

using namespace finwright;
using tests::near;

namespace {

job::Job pump() {
    return job::read_job(std::string(CONFIGS_DIR) + "/jobs/pump_controller.yaml");
}
job::Job bench() {
    return job::read_job(std::string(CONFIGS_DIR) + "/jobs/bench_supply.yaml");
}

sizing::Answer answered(const job::Job& job) {
    auto sizing = sizing::size(job);
    REQUIRE(std::holds_alternative<sizing::Answer>(sizing));
    return std::get<sizing::Answer>(sizing);
}

job::Range fixed(double value) {
    job::Range range;
    range.from = range.to = value;
    return range;
}

} // namespace

TEST_CASE("each aim is smallest when it is aimed at") {
    for (const auto& base : {pump(), bench()}) {
        std::vector<job::Aim> aims{job::Aim::mass, job::Aim::volume, job::Aim::height,
                                   job::Aim::footprint, job::Aim::resistance};
        if (std::holds_alternative<job::DuctedAir>(base.air.state))
            aims.push_back(job::Aim::pressure_drop);
        std::vector<sizing::Answer> answers;
        for (job::Aim aim : aims) {
            job::Job job = base;
            job.sink.aim = aim;
            answers.push_back(answered(job));
        }
        for (std::size_t i = 0; i < aims.size(); ++i)
            for (std::size_t j = 0; j < aims.size(); ++j) {
                CAPTURE(i);
                CAPTURE(j);
                // Before rounding: the step of rounding may hide a small advantage.
                const auto aim_of = [&](const sizing::Answer& a) {
                    return sizing::aim_value(aims[i],
                                             sink::rate(a.design.optimum, sink::duty_of(base)));
                };
                CHECK(aim_of(answers[i]) <= aim_of(answers[j]) * (1.0 + 2e-3));
            }
    }
}

TEST_CASE("fixed and bounded dimensions are kept") {
    job::Job job = pump();
    job.sink.fins = fixed(14);
    job.sink.fin_height = fixed(30e-3);
    job.sink.width = fixed(150e-3);
    job.sink.base_thickness.from = 5e-3;
    job.sink.length.to = 190e-3;
    const auto g = answered(job).design.rounded;
    CHECK(g.fins == 14);
    CHECK(g.height == near(30e-3, 1e-12));
    CHECK(g.width() == near(150e-3, 1e-9));
    CHECK(g.base >= 5e-3 - 1e-12);
    CHECK(g.length <= 190e-3 + 1e-12);
}

TEST_CASE("a gap and a width both fixed leave the thickness to follow") {
    job::Job job = pump();
    job.sink.gap = fixed(7e-3);
    job.sink.width = fixed(160e-3);
    const auto g = answered(job).design.optimum;
    CHECK(g.gap == near(7e-3, 1e-12));
    CHECK(g.width() == near(160e-3, 1e-9));
}

TEST_CASE("a draft thins the tips and is kept") {
    job::Job job = pump();
    job.sink.fin_draft = 0.5 * 3.14159265358979 / 180.0;
    const auto answer = answered(job);
    const auto& g = answer.design.rounded;
    CHECK(g.thickness ==
          near(g.tip_thickness() + 2.0 * std::tan(job.sink.fin_draft) * g.height, 1e-12));
    CHECK(g.tip_thickness() >= job.sink.process.smallest_thickness - 1e-12);
}

TEST_CASE("a target resistance alone sizes a sink that meets it") {
    job::Job job = pump();
    for (auto& part : job.parts)
        part.junction_limit.reset();
    job.limits.sink_resistance = 1.5;
    const auto answer = answered(job);
    CHECK(answer.rating.sink_resistance() <= 1.5 + 1e-9);
    CHECK(answer.rating.sink_resistance() > 1.4);
}

TEST_CASE("what easing a limit buys agrees with easing it") {
    job::Job job = pump();
    const auto before = answered(job);
    const auto limit =
        std::find_if(before.binding.begin(), before.binding.end(),
                     [](const auto& b) { return b.name == "pad rise of motor leg"; });
    REQUIRE(limit != before.binding.end());
    job.sink.fins = fixed(before.design.optimum.fins); // the price holds at this fin count
    const auto same = answered(job);
    job.limits.margin -= 0.5;
    const auto eased = answered(job);
    const double saved = same.design.optimum_aim - eased.design.optimum_aim;
    CHECK(saved / 0.5 == near(limit->worth, 0.05));
}

TEST_CASE("an impossible job is refused with its shortfall and with power that would fit") {
    job::Job job = pump();
    job.limits.mass = 0.1;
    auto sizing = sizing::size(job);
    REQUIRE(std::holds_alternative<sizing::Refusal>(sizing));
    const auto& refusal = std::get<sizing::Refusal>(sizing);
    REQUIRE(refusal.closest);
    double hottest = 0.0;
    for (const auto& part : refusal.closest->parts)
        if (-part.headroom().value() > hottest) hottest = -part.headroom().value();
    CHECK(refusal.shortfall == near(hottest, 1e-9));
    CHECK(refusal.shortfall > 10.0);
    CHECK_FALSE(refusal.part.empty());
    CHECK(refusal.closest->mass <= 0.1 * (1.0 + 1e-5));
    // At a tenth less than that power (rounding takes its share) the job has an answer.
    const double share = 0.9 * refusal.possible_power / job.total_power();
    for (auto& part : job.parts)
        part.power *= share;
    CHECK(std::holds_alternative<sizing::Answer>(sizing::size(job)));
}

TEST_CASE("the same job gives the same answer with one thread and with two") {
    const job::Job job = pump();
    sizing::SearchOptions two;
    two.threads = 2;
    auto one = sizing::size(job), other = sizing::size(job, two);
    CHECK(std::get<sizing::Answer>(one).design.optimum_aim ==
          std::get<sizing::Answer>(other).design.optimum_aim);
    CHECK(std::get<sizing::Answer>(one).rating.mass == std::get<sizing::Answer>(other).rating.mass);
}

TEST_CASE("a rating names the dimension that is still open") {
    job::Job job = pump();
    CHECK_THROWS_WITH_AS(sizing::stated_sink(job), doctest::Contains("fins is still open"),
                         job::InputError);
}

TEST_CASE("limits that shut every design out whatever the temperatures are named") {
    job::Job job = pump();
    job.limits.mass = 5e-3;
    auto sizing = sizing::size(job);
    REQUIRE(std::holds_alternative<sizing::Refusal>(sizing));
    CHECK(std::get<sizing::Refusal>(sizing).reason.find("mass (job)") != std::string::npos);
}

TEST_CASE("a flow without a pressure limit still gives air a fan could move") {
    job::Job job = bench();
    job.limits.pressure_drop.reset();
    job.air.state = job::DuctedAir{std::nullopt, 40.0 / 3600.0};
    const auto answer = answered(job);
    const auto& view = std::get<sink::MovingAirView<double>>(answer.rating.view);
    CHECK(view.channel_velocity <= 30.0 + 1e-6);
}

TEST_CASE("a rating names every limit its sink breaks") {
    job::Job job = bench();
    const auto g = answered(job).design.rounded;
    CHECK(sizing::broken_limits(job, sink::rate(g, sink::duty_of(job))).empty());
    job.limits.mass = 0.1;
    job.limits.pressure_drop = 1.0;
    job.limits.space.width = 50e-3;
    job.sink.process.smallest_gap = 10e-3;
    CHECK(sizing::broken_limits(job, sink::rate(g, sink::duty_of(job))).size() == 4);
}

TEST_CASE("every alternative is optimised to the end: fixing its fin count finds nothing better") {
    job::Job job = pump();
    for (const auto& alternative : answered(job).alternatives) {
        job.sink.fins = fixed(alternative.rounded.fins);
        CHECK(alternative.optimum_aim <= answered(job).least_aim * (1.0 + 1e-3));
    }
}
