// The heat balance: closed, and differentiated exactly.
#include "src/sink/balance.hpp"
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/sink/random_sinks.hpp"
#include <array>

using namespace finwright;
using correlations::Dual;
using tests::near;
using tests::RandomSinks;

namespace {

using D5 = Dual<5>;

sink::Geometry<D5> seeded(const sink::Geometry<double>& g) {
    return {g.fins,
            D5::variable(g.height, 0),
            D5::variable(g.thickness, 1),
            D5::variable(g.gap, 2),
            D5::variable(g.base, 3),
            D5::variable(g.length, 4),
            g.draft_tangent};
}

double& dimension(sink::Geometry<double>& g, int i) {
    switch (i) {
    case 0:
        return g.height;
    case 1:
        return g.thickness;
    case 2:
        return g.gap;
    case 3:
        return g.base;
    default:
        return g.length;
    }
}

struct Values {
    double rise, drop, pad;
};

Values values(const sink::Geometry<double>& g, const sink::Duty& duty,
              const correlations::ModeSet& modes) {
    const auto b = sink::balance(g, duty);
    return {b.base_rise, b.pressure_drop, sink::pad_rises(g, duty, b, modes)[0]};
}

/// Slopes against central differences, on the scale of value per dimension.
void check_slopes(const sink::Geometry<double>& g, const sink::Duty& duty) {
    const auto balance = sink::balance(seeded(g), duty);
    const auto modes = sink::modes_for_means(g, duty);
    const auto pads = sink::pad_rises(seeded(g), duty, balance, modes);
    const Values at = values(g, duty, modes);
    for (int i = 0; i < 5; ++i) {
        auto high = g, low = g;
        const double step = 1e-5 * dimension(high, i);
        dimension(high, i) += step;
        dimension(low, i) -= step;
        const Values up = values(high, duty, modes), down = values(low, duty, modes);
        const auto agrees = [&](double slope, double difference, double value) {
            return std::abs(slope - difference / (2.0 * step)) <
                   2e-5 * std::abs(value) / dimension(low, i) + 1e-300;
        };
        CAPTURE(i);
        CHECK(agrees(balance.base_rise.slope[std::size_t(i)], up.rise - down.rise, at.rise));
        CHECK(agrees(pads[0].slope[std::size_t(i)], up.pad - down.pad, at.pad));
        if (!duty.surroundings.still())
            CHECK(
                agrees(balance.pressure_drop.slope[std::size_t(i)], up.drop - down.drop, at.drop));
    }
}

bool near_a_regime_seam(const sink::Geometry<double>& g, const sink::Duty& duty) {
    const auto rating = sink::rate(g, duty);
    const auto* duct = std::get_if<sink::MovingAirView<double>>(&rating.view);
    if (!duct) return false;
    const auto close = [&](double re) { return std::abs(duct->reynolds / re - 1.0) < 1e-3; };
    const auto beside = [&](double re) {
        return std::abs(duct->bypass_reynolds / re - 1.0) < 1e-3;
    };
    return close(2300.0) || close(4000.0) || beside(2300.0) || beside(4000.0) ||
           std::abs(g.mean_gap() / g.height - 1.0) < 1e-3;
}

} // namespace

TEST_CASE("heat out of all surfaces equals heat in, within 1e-9") {
    RandomSinks random(11);
    for (int n = 0; n < 300; ++n) {
        const auto g = random.geometry();
        for (const auto& duty :
             {random.duty(g), random.mounted(g), random.ducted(g), random.driven(g)}) {
            const auto rating = sink::rate(g, duty);
            CHECK(rating.heat.total() == near(duty.power() + rating.sun, 1e-9));
        }
    }
}

TEST_CASE("air leaving a duct carries the whole power") {
    RandomSinks random(12);
    for (int n = 0; n < 100; ++n) {
        const auto g = random.geometry();
        const auto duty = random.ducted(g);
        const auto rating = sink::rate(g, duty);
        const auto& view = std::get<sink::MovingAirView<double>>(rating.view);
        CHECK(view.capacity_flow * (rating.outlet_temperature().value() - rating.air_temperature) ==
              near(duty.power(), 1e-9));
    }
}

TEST_CASE("slopes of rise, pressure drop and pad rise agree with central differences") {
    RandomSinks random(13);
    for (int n = 0; n < 60; ++n) {
        const auto g = random.geometry();
        for (const auto& duty :
             {random.duty(g), random.mounted(g), random.ducted(g), random.driven(g)})
            if (!near_a_regime_seam(g, duty)) check_slopes(g, duty);
    }
}

TEST_CASE("geometry without room for air is refused") {
    sink::Geometry<double> g{4, 20e-3, 2e-3, 5e-3, 4e-3, 100e-3, 0.0};
    RandomSinks random(14);
    const auto duty = random.duty(g);
    g.gap = 0.0;
    CHECK_THROWS_AS(sink::balance(g, duty), std::domain_error);
    g.gap = 5e-3;
    g.draft_tangent = 0.06; // the tip would be thinner than nothing
    CHECK_THROWS_AS(sink::balance(g, duty), std::domain_error);
}
