// Still air in every mounting: limits, continuity, and the reference solutions there are.
#include "correlations/natural_inclined.hpp"
#include "correlations/registry.hpp"
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"
#include "tests/sink/random_sinks.hpp"
#include <functional>
#include <numbers>

using namespace finwright;
using tests::near;
using tests::number;
using tests::RandomSinks;

namespace {

constexpr double quarter = 0.5 * std::numbers::pi;

using Change = std::function<void(sink::StillAir&, sink::Surroundings&)>;

sink::Duty changed(sink::Duty duty, const Change& change) {
    sink::StillAir still;
    change(still, duty.surroundings);
    duty.surroundings.air = still;
    return duty;
}

double rise(const sink::Geometry<double>& g, const sink::Duty& duty, const Change& change) {
    return sink::balance(g, changed(duty, change)).base_rise;
}

} // namespace

// Reference solution, this project (tests/data/reference/README.md): three lying arrays, unsteady,
// averaged over 15 s; their least and greatest heat lie 15 to 25 % apart. The length factor was
// fitted to these rows.
TEST_CASE("fins up on a horizontal base, against the three solutions there are") {
    for (const auto& row : tests::rows_of("horizontal_cfd.csv")) {
        const double gap = number(row, "S_mm") * 1e-3, length = number(row, "L_mm") * 1e-3;
        const double ra = 9.80665 * number(row, "beta_1_K") * number(row, "dT_K") * gap * gap *
                          gap / (number(row, "nu_m2_s") * number(row, "alpha_m2_s"));
        const double film = correlations::nusselt_horizontal_array(ra) *
                            correlations::horizontal_length_factor(length) * number(row, "k_W_mK") /
                            gap;
        CAPTURE(length);
        CHECK(film == near(number(row, "h_wetted_W_m2K"), 0.10));
    }
}

// Jones & Smith's two printed forms agree to 3 % and about +-25 % with measurements; the value here
// pins the formula (worked by hand from the coefficients, which are from memory).
TEST_CASE("the horizontal array's formula at Ra 7460") {
    const double open = 1.0 - std::exp(-1.0);
    CHECK(correlations::nusselt_horizontal_array(7460.0) ==
          near(6.7e-4 * 7460.0 * std::pow(open, 1.7), 1e-12));
}

// Raithby & Hollands 1998: a face at +-90 deg is the facing-up or facing-down law, at 0 the
// vertical one.
TEST_CASE("a single face ends in the published laws at both ends of its tilt") {
    const double gr = 3e9, pr = 0.71, rise = 0.1, across = 0.2;
    const double size = rise * across / (2.0 * (rise + across));
    const auto face = [&](double tilt) {
        return correlations::inclined_face(gr, pr, rise, across, tilt);
    };
    CHECK(face(0.0) == near(correlations::nusselt_vertical_laminar(gr * 1e-3, pr) / rise, 1e-12));
    CHECK(face(quarter) ==
          near(correlations::nusselt_facing_up(gr * size * size * size, pr) / size, 1e-6));
    CHECK(face(-quarter) ==
          near(correlations::nusselt_facing_down(gr * size * size * size, pr) / size, 1e-4));
}

// Gebhart, Pera & Schorr 1970: T - T_air ~ q^(4/5) x^(-3/5) above a line source.
TEST_CASE("the plume's exponents") {
    const auto plume = [](double q, double x) {
        return correlations::plume_rise(q, x, 0.0033, 1.16, 1.85e-5, 1007.0);
    };
    CHECK(plume(200.0, 0.1) / plume(100.0, 0.1) == near(std::pow(2.0, 0.8), 1e-12));
    CHECK(plume(100.0, 0.2) / plume(100.0, 0.1) == near(std::pow(2.0, -0.6), 1e-12));
}

TEST_CASE("no output jumps by 0.5 % anywhere in the tilt, in the drift, or where either begins") {
    RandomSinks random(71);
    for (int n = 0; n < 8; ++n) {
        const auto g = random.geometry();
        const auto duty = random.duty(g);
        for (bool level : {false, true}) {
            double before = 0.0;
            for (int step = -1800; step <= 1800; ++step) { // close where a law begins or ends
                const double share = std::sin(step * quarter / 1800.0);
                const double tilt = quarter * share * std::abs(share);
                const double now = rise(g, duty, [&](auto& still, auto&) {
                    still.mounting.tilt = tilt;
                    still.mounting.fins_level = level;
                    still.mounting.back_exposed = true;
                });
                CAPTURE(tilt);
                if (before > 0.0) CHECK(std::abs(now / before - 1.0) < 5e-3);
                before = now;
            }
        }
        for (auto direction : {job::Drift::Direction::assisting, job::Drift::Direction::opposing,
                               job::Drift::Direction::crossing}) {
            double before = rise(g, duty, [](auto&, auto&) {});
            for (double speed = 1e-5; speed < 1.0; speed *= 1.0005) {
                const double now = rise(g, duty, [&](auto& still, auto&) {
                    still.drift = job::Drift{speed, direction};
                });
                CAPTURE(speed);
                CHECK(std::abs(now / before - 1.0) < 5e-3);
                before = now;
            }
        }
    }
}

TEST_CASE("what helps never makes it hotter, what heats never cooler") {
    RandomSinks random(72);
    for (int n = 0; n < 60; ++n) {
        const auto g = random.geometry();
        const auto duty = random.duty(g);
        const double plain = rise(g, duty, [](auto&, auto&) {});
        const double hair = 1.0 + 1e-9;
        const auto with = [&](const Change& change) { return rise(g, duty, change); };
        CHECK(with([](auto& s, auto&) { s.mounting.back_exposed = true; }) <= plain * hair);
        CHECK(with([&](auto& s, auto& around) {
                  s.mounting.wall_conductance = 0.5;
                  s.mounting.wall_temperature = around.air_temperature;
              }) < plain);
        CHECK(with([](auto& s, auto&) {
                  s.drift = job::Drift{0.3, job::Drift::Direction::assisting};
              }) < plain);
        CHECK(with([](auto&, auto& around) {
                  around.radiating_temperature = around.air_temperature - 20.0;
              }) < plain);
        CHECK(with([](auto&, auto& around) {
                  around.radiating_temperature = around.air_temperature + 20.0;
              }) > plain);
        CHECK(with([](auto& s, auto&) { s.sun = job::Sun{500.0, 0.5}; }) > plain);
        CHECK(with([](auto& s, auto&) { s.mounting.tilt = -quarter; }) >
              with([](auto& s, auto&) { s.mounting.tilt = quarter; }));
    }
}

TEST_CASE(
    "the sun's heat: all of it on black, none in the dark, a channel takes more than a plate") {
    RandomSinks random(73);
    for (int n = 0; n < 60; ++n) {
        auto g = random.geometry();
        sink::Surroundings around;
        sink::StillAir still;
        const auto taken = [&](double irradiance, double absorptivity) {
            still.sun = job::Sun{irradiance, absorptivity};
            around.air = still;
            return sink::sun_taken(g, around);
        };
        CHECK(taken(800.0, 1.0) == near(800.0 * g.footprint(), 1e-12));
        CHECK(taken(800.0, 0.3) > 0.3 * 800.0 * g.footprint());
        CHECK(taken(800.0, 0.3) < 800.0 * g.footprint());
    }
}

TEST_CASE("every estimate that enters a rating is named in it") {
    RandomSinks random(74);
    const auto g = random.geometry();
    const auto duty = random.duty(g);
    const auto estimates = [&](const Change& change) {
        int count = 0;
        for (const auto& use : sink::rate(g, changed(duty, change)).laws)
            count += correlations::find_passport(use.passport)->estimate ? 1 : 0;
        return count;
    };
    CHECK(estimates([](auto&, auto&) {}) == 0);
    CHECK(estimates([](auto& s, auto&) { s.mounting.tilt = -quarter; }) >= 1);
    CHECK(estimates([](auto& s, auto&) { s.mounting.fins_level = true; }) == 1);
    CHECK(estimates([](auto& s, auto&) { s.mounting.tilt = 0.5; }) >= 1);
    CHECK(estimates([](auto& s, auto&) {
              s.drift = job::Drift{0.3, job::Drift::Direction::opposing};
          }) == 2);
}

TEST_CASE("a drift against the rising air never helps, however strong it is stated") {
    RandomSinks random(75);
    for (int n = 0; n < 20; ++n) {
        const auto g = random.geometry();
        const auto duty = random.duty(g);
        double before = rise(g, duty, [](auto&, auto&) {});
        for (double speed = 0.02; speed < 1.0; speed *= 1.2) {
            const double now = rise(g, duty, [&](auto& s, auto&) {
                s.drift = job::Drift{speed, job::Drift::Direction::opposing};
            });
            CHECK(now >= before * (1.0 - 1e-9));
            before = now;
        }
    }
}

TEST_CASE("a wall that takes more than the parts give is refused, not answered") {
    RandomSinks random(76);
    const auto g = random.geometry();
    const auto duty = random.duty(g);
    const auto cold = changed(duty, [&](auto& s, auto& around) {
        s.mounting.wall_conductance = duty.power();
        s.mounting.wall_temperature = around.air_temperature - 2.0;
    });
    CHECK_THROWS_AS(sink::rate(g, cold), sink::ColderThanAir);
}

// The film that spreads the heat under a pad is what the base sheds per kelvin, whatever a wall off
// the air's temperature adds to or takes from the whole: the same wall at any temperature leaves
// the rise of a pad over the base's mean nearly where it was (films change with the rise a little).
TEST_CASE("a wall's temperature shifts the base, not the spreading in it") {
    RandomSinks random(77);
    for (int n = 0; n < 40; ++n) {
        const auto g = random.geometry();
        const auto duty = random.duty(g);
        const auto over_mean = [&](double off) {
            const auto rating = sink::rate(g, changed(duty, [&](auto& s, auto& around) {
                                               s.mounting.wall_conductance = 0.2;
                                               s.mounting.wall_temperature =
                                                   around.air_temperature + off;
                                           }));
            return rating.hottest_pad_rise - rating.base_rise;
        };
        CHECK(over_mean(-5.0) == near(over_mean(5.0), 0.02));
    }
}
