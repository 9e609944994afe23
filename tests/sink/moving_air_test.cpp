// Air past and between the fins: bypass, free stream, fans.
#include "correlations/air.hpp"
#include "src/sink/moving_air.hpp"
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"
#include "tests/sink/forced_reference.hpp"
#include "tests/sink/random_sinks.hpp"

using namespace finwright;
using tests::near;
using tests::number;
using tests::RandomSinks;

namespace {

job::Fan straight_fan(double shut_off, double free_delivery) {
    job::Fan fan;
    fan.name = "straight";
    fan.flows = {0.0, free_delivery};
    fan.pressures = {shut_off, 0.0};
    return fan;
}

} // namespace

// Reference solution, this project (tests/data/reference/README.md): a gap of an endless row under
// a clearance, laminar. The aim set for heat is 10 %.
TEST_CASE("bypass: heat within 10 %, share of the flow within 6 % of the reference solutions") {
    for (const auto& row : tests::rows_of("forced_cfd.csv")) {
        const tests::ForcedReference at(row);
        const sink::MovingAirSink<double> model(at.g, at.duty);
        const auto v = model.view(number(row, "dT_K"));
        const double gaps = at.g.fins - 1;
        CAPTURE(number(row, "clearance_mm"));
        CAPTURE(v.channel_flow / v.volume_flow);
        CAPTURE(number(row, "flow_share_mid"));
        CHECK(model.heat(v).channels / gaps == near(number(row, "Q_channel_W"), 0.10));
        CHECK(v.channel_flow / v.volume_flow == near(number(row, "flow_share_mid"), 0.06));
    }
}

TEST_CASE("a clearance that closes becomes the closed duct, one without end the free stream") {
    RandomSinks random(81);
    for (int n = 0; n < 40; ++n) {
        const auto g = random.geometry();
        auto duty = random.duty(g);
        const auto rated = [&](const auto& air) {
            duty.surroundings.air = air;
            return sink::rate(g, duty);
        };
        const double velocity = random.log_between(0.5, 8.0);
        const auto stream = [&](double clearance) {
            return rated(sink::Stream{velocity, job::Clearance{clearance, clearance}});
        };
        const auto closed = rated(sink::DuctVelocity{velocity});
        const auto nearly = stream(1e-4);
        CHECK(nearly.base_rise == near(closed.base_rise, 0.06));
        CHECK(nearly.pressure_drop == near(closed.pressure_drop, 0.10));
        CHECK(stream(50.0).base_rise ==
              near(rated(sink::Stream{velocity, std::nullopt}).base_rise, 1e-2));
    }
}

TEST_CASE(
    "a fan runs where its curve meets the sink, and no jump parts one setting from the next") {
    RandomSinks random(82);
    for (int n = 0; n < 20; ++n) {
        const auto g = random.geometry();
        auto duty = random.duty(g);
        const double density = correlations::air_density(duty.surroundings.air_temperature,
                                                         duty.surroundings.pressure);
        sink::FanDriven driven{straight_fan(60.0, 0.02), std::nullopt};
        if (n % 2 == 1) driven.clearance = job::Clearance{5e-3, 2e-3};
        double before = 0.0;
        for (double speed = 0.3; speed < 1.5; speed *= 1.001) {
            driven.fan.speed = speed;
            duty.surroundings.air = driven;
            const double now = sink::balance(g, duty).base_rise;
            if (before > 0.0 && before < 120.0) {
                CHECK(now < before);
                CHECK(now > 0.995 * before);
            }
            before = now;
        }
        const auto rating = sink::rate(g, duty);
        const auto& v = std::get<sink::MovingAirView<double>>(rating.view);
        CHECK(v.pressure_drop ==
              near(sink::FanCurve(driven.fan, density).pressure(v.volume_flow), 1e-8));
    }
}

// Fan laws (similarity, textbook): flow ~ speed, pressure ~ density speed^2; equal fans in series
// add pressures, in parallel flows.
TEST_CASE("fan curves by the similarity laws") {
    auto fan = straight_fan(60.0, 0.02);
    const sink::FanCurve one(fan, 1.2);
    CHECK(one.pressure(0.0) == near(60.0, 1e-12));
    CHECK(one.pressure(0.005) == near(45.0, 1e-12));
    CHECK(one.free_delivery() == near(0.02, 1e-12));
    fan.speed = 1.3;
    const sink::FanCurve fast(fan, 0.9);
    CHECK(fast.pressure(1.3 * 0.005) == near(45.0 * 1.3 * 1.3 * 0.75, 1e-12));
    fan.speed = 1.0;
    fan.count = 2;
    CHECK(sink::FanCurve(fan, 1.2).pressure(0.01) == near(45.0, 1e-12));
    fan.in_series = true;
    CHECK(sink::FanCurve(fan, 1.2).pressure(0.005) == near(90.0, 1e-12));
}

TEST_CASE("a curve with a dip: the stable crossing of highest flow") {
    job::Fan fan;
    fan.name = "with a dip";
    fan.flows = {0.0, 0.004, 0.006, 0.0075, 0.012, 0.02};
    fan.pressures = {60.0, 40.0, 10.0, 28.0, 24.0, 0.0};
    const sink::FanCurve curve(fan, 1.2);
    CHECK_FALSE(curve.falls());
    RandomSinks random(83);
    int several = 0;
    for (int n = 0; n < 60; ++n) {
        const auto g = random.geometry();
        auto duty = random.duty(g);
        duty.surroundings.pressure = 101325.0;
        duty.surroundings.air_temperature = 101325.0 / (287.05287 * 1.2);
        duty.surroundings.air = sink::FanDriven{fan, std::nullopt};
        const auto rating = sink::rate(g, duty);
        const auto& v = std::get<sink::MovingAirView<double>>(rating.view);
        const auto loss = [&](double flow) {
            auto stated = duty;
            stated.surroundings.air = sink::DuctFlow{flow};
            return sink::balance(g, stated).pressure_drop;
        };
        int crossings = 0;
        for (int k = 1; k < 400; ++k) {
            const double at = 0.02 * k / 400.0, next = 0.02 * (k + 1) / 400.0;
            const double here = curve.pressure(at) - loss(at);
            const double then = curve.pressure(next) - loss(next);
            if ((here > 0.0) != (then > 0.0)) ++crossings;
            if (at > v.volume_flow) CHECK(here < 1e-6);
        }
        several += crossings > 1 ? 1 : 0;
    }
    CHECK(several > 0);
}
