// What a drawing adds: flanges, cleared length, joints, round tips, serrated faces, a plate without
// fins.
#include "correlations/air.hpp"
#include "correlations/natural_inclined.hpp"
#include "correlations/radiation.hpp"
#include "src/sink/fin_conduction.hpp"
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/sink/random_sinks.hpp"
#include <numbers>

using namespace finwright;
using tests::near;
using tests::RandomSinks;

TEST_CASE("metal by hand: flanges, cleared length, round tips") {
    sink::Geometry<double> g{5, 20e-3, 2e-3, 6e-3, 4e-3, 100e-3};
    g.details = {8e-3, 15e-3, 0.0, 1.0, true};
    const double width = 5 * 2e-3 + 4 * 6e-3 + 2 * 8e-3;
    CHECK(g.width() == near(width, 1e-12));
    const double tips = (1.0 - std::numbers::pi / 4.0) * 2e-3 * 2e-3;
    CHECK(g.metal() == near(width * 4e-3 * 0.1 + 5 * (20e-3 * 2e-3 - tips) * 85e-3, 1e-12));
    CHECK(g.bare() == near(2 * 8e-3 * 0.1 + (width - 16e-3) * 15e-3, 1e-12));
}

TEST_CASE("with every detail heat out equals heat in, in still and in moving air") {
    RandomSinks random(91);
    for (int n = 0; n < 100; ++n) {
        auto g = random.geometry();
        g.details = {random.between(0.0, 20e-3), random.between(0.0, 0.5) * g.length,
                     random.between(0.0, 5e-5), random.between(1.0, 1.5), n % 2 == 0};
        for (const auto& duty : {random.mounted(g), random.ducted(g), random.driven(g)}) {
            const auto rating = sink::rate(g, duty);
            CHECK(rating.heat.total() == near(duty.power() + rating.sun, 1e-9));
        }
    }
}

TEST_CASE("a joint never cools, serrated faces and flanges never heat the base") {
    RandomSinks random(92);
    for (int n = 0; n < 60; ++n) {
        const auto g = random.geometry();
        const auto duty = random.duty(g);
        const double plain = sink::balance(g, duty).base_rise;
        const auto with = [&](job::FinDetails details) {
            auto changed = g;
            changed.details = details;
            return sink::balance(changed, duty).base_rise;
        };
        CHECK(with({0.0, 0.0, 1e-5, 1.0, false}) > plain);
        CHECK(with({0.0, 0.0, 0.0, 1.2, false}) == near(plain, 1e-12)); // still air: no gain
        const auto blown = random.ducted(g);
        auto serrated = g;
        serrated.details.area_factor = 1.2;
        CHECK(sink::balance(serrated, blown).base_rise < sink::balance(g, blown).base_rise);
        CHECK(with({10e-3, 0.0, 0.0, 1.0, false}) < plain);
    }
}

// A fin in a groove is a fin behind a series resistance: 1/(eta G) + R. Textbook network.
TEST_CASE("the joint is in series with the fin") {
    sink::Geometry<double> g{5, 20e-3, 2e-3, 6e-3, 4e-3, 100e-3};
    g.details.joint = 3e-5;
    const double conductance = 0.2, shape = sink::fin_shape(g, 200.0);
    const double eta = sink::efficiency(conductance, shape);
    const double joint = 3e-5 / (2e-3 * 0.1);
    CHECK(conductance * sink::joined_efficiency(conductance, shape, g) ==
          near(1.0 / (1.0 / (eta * conductance) + joint), 1e-12));
}

// Churchill & Chu 1975 and Stefan-Boltzmann on both faces and the rim, worked here apart from the
// sink model.
TEST_CASE("a plate without fins is the vertical plate's law plus radiation") {
    sink::Geometry<double> g{0, 0.0, 0.0, 120e-3, 3e-3, 150e-3};
    RandomSinks random(93);
    auto duty = random.duty(g);
    duty.parts.resize(1);
    duty.parts[0].pad_across = duty.parts[0].pad_along = 15e-3;
    sink::StillAir still;
    still.mounting.back_exposed = true;
    duty.surroundings.air = still;
    const auto rating = sink::rate(g, duty);
    const auto& v = std::get<sink::StillAirView<double>>(rating.view);
    const auto air = correlations::air_at(
        duty.surroundings.air_temperature + 0.5 * rating.base_rise, duty.surroundings.pressure);
    const double gr = 9.80665 * air.expansion * rating.base_rise /
                      (air.kinematic_viscosity() * air.diffusivity());
    const double film =
        correlations::nusselt_vertical_laminar(gr * std::pow(0.15, 3.0), air.prandtl()) *
        air.conductivity / 0.15;
    CHECK(v.edge_film == near(film, 1e-12));
    const double area = 2.0 * 0.12 * 0.15 - 15e-3 * 15e-3 + 2.0 * (0.12 + 0.15) * 3e-3;
    const double radiated =
        duty.material.emissivity * area *
        (correlations::radiated(duty.surroundings.air_temperature + rating.base_rise,
                                duty.surroundings.air_temperature));
    CHECK(film * area * rating.base_rise + radiated == near(duty.power(), 1e-9));
}
