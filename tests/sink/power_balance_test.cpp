// Powers that follow their junctions: closed forms, independent solves, runaway exactly where it
// must be.
#include "src/sink/power_balance.hpp"
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/sink/random_sinks.hpp"
#include <array>

using namespace finwright;
using job::PowerTable;
using sink::balance_powers;
using sink::Junctions;
using tests::near;
using tests::RandomSinks;

namespace {

constexpr double air = 300.0; // [K]

/// T = air + R P.
Junctions resistance(double r) {
    return
        [r](const std::vector<double>& powers) { return std::vector<double>{air + r * powers[0]}; };
}

/// P0 (1 + a (T - air)) from the air on.
PowerTable line(double p0, double a) {
    return PowerTable({{air, p0}, {air + 10.0, p0 * (1.0 + 10.0 * a)}});
}

using Matrix = std::array<std::array<double, 2>, 2>;

Junctions coupled(const Matrix& r) {
    return [r](const std::vector<double>& p) {
        return std::vector<double>{air + r[0][0] * p[0] + r[0][1] * p[1],
                                   air + r[1][0] * p[0] + r[1][1] * p[1]};
    };
}

/// Plain repetition from cold, the definition itself: slow, and without any of the method.
std::vector<double> repeated(const std::vector<PowerTable>& tables, const Junctions& junctions) {
    std::vector<double> powers, at;
    for (const PowerTable& table : tables)
        powers.push_back(table.power_at(air));
    for (int i = 0; i < 200000; ++i) {
        at = junctions(powers);
        for (std::size_t k = 0; k < at.size(); ++k)
            powers[k] = tables[k].power_at(at[k]);
    }
    return at;
}

PowerTable random_table(RandomSinks& random, double steepest) {
    std::vector<PowerTable::Point> points{
        {random.between(280.0, 330.0), random.between(2.0, 20.0)}};
    const int more = random.whole(1, 5);
    for (int i = 0; i < more; ++i) {
        const double stretch = random.between(2.0, 60.0);
        const double slope = random.between(0.0, steepest);
        points.push_back(
            {points.back().temperature + stretch, points.back().power + slope * stretch});
    }
    return PowerTable(points);
}

} // namespace

// P = P0 (1 + a x), x = R P over the air: x = R P0/(1 - a P0 R), worked by hand.
TEST_CASE("one part on one resistance: the closed form") {
    for (const auto& [p0, a, r] : std::vector<std::array<double, 3>>{
             {10.0, 0.006, 4.0}, {20.0, 0.004, 2.5}, {50.0, 1e-4, 1.0}, {10.0, 0.017, 5.0}}) {
        const auto b = balance_powers({line(p0, a)}, air, resistance(r));
        REQUIRE_FALSE(b.runaway);
        const double rise = r * p0 / (1.0 - a * p0 * r);
        CAPTURE(rise);
        CHECK(b.junctions[0] - air == near(rise, 1e-9));
        CHECK(b.powers[0] == near(p0 * (1.0 + a * rise), 1e-9));
        CHECK(b.loop_gain == near(a * p0 * r, 1e-8));
        CHECK_FALSE(b.air_left); // one slope, below 1 for good
    }
}

TEST_CASE("one part on one resistance: runaway exactly from a P0 R = 1 on") {
    const double p0 = 10.0, r = 5.0;
    for (const double gain : {1.0 + 1e-9, 1.001, 1.5, 20.0}) {
        const auto b = balance_powers({line(p0, gain / (p0 * r))}, air, resistance(r));
        CAPTURE(gain);
        REQUIRE(b.runaway);
        CHECK(b.runaway->loop_gain == near(gain, 1e-7));
        CHECK(b.runaway->junction == near(air, 1e-12)); // from cold on
    }
    // Just below 1 the root lies far out: 50 K/(1 - gain), here 500 K over the air.
    const auto b = balance_powers({line(p0, 0.9 / (p0 * r))}, air, resistance(r));
    REQUIRE_FALSE(b.runaway);
    CHECK(b.junctions[0] == near(air + 500.0, 1e-9));
}

TEST_CASE("a stable part with no root below the hottest junction is said not to settle") {
    const auto b = balance_powers({line(10.0, 0.95 / 50.0)}, air, resistance(5.0));
    REQUIRE(b.runaway); // 50 K/0.05 = 1000 K over the air
    CHECK(b.runaway->loop_gain == near(0.95, 1e-6));
    CHECK(b.runaway->junction == near(job::hottest_junction, 1e-9));
}

// Flat at 10 W to 360 K, then 1 W/K: on 4 K/W the gain there is 4. Cold, it settles at 340 K; air
// 20 K warmer puts it on the kink.
TEST_CASE("how much warmer the air may be: to the kink beyond which the gain is above 1") {
    const PowerTable table({{300.0, 10.0}, {360.0, 10.0}, {370.0, 20.0}});
    const auto b = balance_powers({table}, air, resistance(4.0));
    REQUIRE_FALSE(b.runaway);
    CHECK(b.junctions[0] == near(340.0, 1e-12));
    CHECK(b.loop_gain == 0.0);
    REQUIRE(b.air_left);
    CHECK(*b.air_left <= 20.0);
    CHECK(*b.air_left > 19.9);
    const auto hot = balance_powers({table}, air + 20.1, [](const std::vector<double>& p) {
        return std::vector<double>{air + 20.1 + 4.0 * p[0]};
    });
    REQUIRE(hot.runaway);
    CHECK(hot.runaway->junction == near(360.0, 1e-12)); // the kink
}

// Above a stretch with a gain over 1 a flat one: the climb goes through and settles beyond it.
TEST_CASE("a steep stretch is climbed through to the stable root above it") {
    const PowerTable table({{300.0, 10.0}, {330.0, 10.0}, {350.0, 30.0}, {351.0, 30.0}});
    const auto b = balance_powers({table}, air, resistance(4.0));
    REQUIRE_FALSE(b.runaway);
    CHECK(b.junctions[0] == near(air + 120.0, 1e-12));
    CHECK(b.loop_gain == 0.0);
}

TEST_CASE("of several roots the coldest is found") {
    // On 4 K/W: 340 K at 10 W, unstable where the slope of 1 W/K crosses, stable again at 460 K.
    const PowerTable table({{300.0, 10.0}, {345.0, 10.0}, {375.0, 40.0}, {376.0, 40.0}});
    const auto b = balance_powers({table}, air, resistance(4.0));
    REQUIRE_FALSE(b.runaway);
    CHECK(b.junctions[0] == near(340.0, 1e-12));
}

// Independent: the two linear equations T = air + R (P0 + s (T - air)) solved by Cramer's rule, the
// loop gain as the larger root of the quadratic in trace and determinant.
TEST_CASE("two parts on one sink against Cramer's rule") {
    RandomSinks random(91);
    int stable = 0, away = 0;
    for (int n = 0; n < 400; ++n) {
        const Matrix r{{{random.between(0.5, 6.0), random.between(0.0, 2.0)},
                        {random.between(0.0, 2.0), random.between(0.5, 6.0)}}};
        const double p[2] = {random.between(2.0, 12.0), random.between(2.0, 12.0)};
        const double a[2] = {random.between(0.0, 0.03), random.between(0.0, 0.03)};
        const double s[2] = {p[0] * a[0], p[1] * a[1]};
        const double m[2][2] = {{r[0][0] * s[0], r[0][1] * s[1]}, {r[1][0] * s[0], r[1][1] * s[1]}};
        const double trace = m[0][0] + m[1][1], det = m[0][0] * m[1][1] - m[0][1] * m[1][0];
        const double gain = 0.5 * trace + std::sqrt(0.25 * trace * trace - det);
        const auto b = balance_powers({line(p[0], a[0]), line(p[1], a[1])}, air, coupled(r));
        const double cold[2] = {r[0][0] * p[0] + r[0][1] * p[1], r[1][0] * p[0] + r[1][1] * p[1]};
        const double d = (1.0 - m[0][0]) * (1.0 - m[1][1]) - m[0][1] * m[1][0];
        const double x = ((1.0 - m[1][1]) * cold[0] + m[0][1] * cold[1]) / d;
        const double y = ((1.0 - m[0][0]) * cold[1] + m[1][0] * cold[0]) / d;
        CAPTURE(gain);
        const bool settles = gain < 1.0 && std::max(x, y) < job::hottest_junction - air;
        CHECK(b.runaway.has_value() == !settles);
        (settles ? stable : away) += 1;
        if (!settles) continue;
        CHECK(b.loop_gain == near(gain, 1e-6));
        CHECK(b.junctions[0] - air == near(x, 1e-9));
        CHECK(b.junctions[1] - air == near(y, 1e-9));
    }
    CHECK(stable > 100);
    CHECK(away > 50);
}

TEST_CASE("kinked tables, several parts: what plain repetition from cold comes to") {
    RandomSinks random(92);
    int compared = 0;
    for (int n = 0; n < 60; ++n) {
        const std::vector<PowerTable> tables{random_table(random, 0.3), random_table(random, 0.3)};
        const Matrix r{{{random.between(0.5, 4.0), random.between(0.0, 1.0)},
                        {random.between(0.0, 1.0), random.between(0.5, 4.0)}}};
        const auto b = balance_powers(tables, air, coupled(r));
        if (b.runaway || b.loop_gain > 0.999) continue;
        ++compared;
        const auto at = repeated(tables, coupled(r));
        CHECK(b.junctions[0] == near(at[0], 1e-9));
        CHECK(b.junctions[1] == near(at[1], 1e-9));
    }
    CHECK(compared > 30);
}

// T = air + R P and P = 20 - 0.1 (T - 300): x = 20 R/(1 + 0.1 R), worked by hand.
TEST_CASE("a falling table settles however steep, where plain repetition would swing") {
    for (const double r : {2.0, 9.0}) {
        const PowerTable table({{300.0, 20.0}, {490.0, 1.0}});
        const auto b = balance_powers({table}, air, resistance(r));
        REQUIRE_FALSE(b.runaway);
        CHECK(b.junctions[0] == near(air + 20.0 * r / (1.0 + 0.1 * r), 1e-9));
        CHECK(b.loop_gain == near(-0.1 * r, 1e-6));
        CHECK_FALSE(b.air_left);
    }
    const PowerTable steep({{300.0, 50.0}, {340.0, 50.0}, {341.0, 1.0}});
    const auto b = balance_powers({steep, steep}, air, coupled({{{4.0, 1.0}, {1.0, 4.0}}}));
    REQUIRE_FALSE(b.runaway);
    CHECK(b.powers[0] == near(steep.power_at(b.junctions[0]), 1e-9));
    CHECK(b.junctions[0] == near(air + 5.0 * b.powers[0], 1e-9));
}

namespace {

/// Random duties of parts with junctions and tables near where they work.
sink::Duty with_tables(RandomSinks& random, sink::Duty duty, double growth) {
    for (job::Part& part : duty.parts) {
        part.junction_to_case = random.between(0.1, 1.0);
        part.interface = random.between(0.05, 0.5);
        const double p = part.power, t = duty.surroundings.air_temperature;
        part.power_table = PowerTable(
            {{t, p}, {t + 40.0, p * (1.0 + 0.5 * growth)}, {t + 90.0, p * (1.0 + 1.6 * growth)}});
    }
    return duty;
}

} // namespace

TEST_CASE("rated sinks: powers and junctions agree with the tables to 1e-9, and heat is closed") {
    RandomSinks random(93);
    int settled = 0, away = 0;
    for (int n = 0; n < 60; ++n) {
        const auto g = random.geometry();
        for (const auto& plain : {random.duty(g), random.ducted(g)}) {
            const auto duty = with_tables(random, plain, 0.4);
            const auto rating = sink::rate(g, duty);
            REQUIRE(rating.feedback);
            double power = 0.0;
            for (const auto& part : rating.parts)
                power += part.power;
            CHECK(rating.power == near(power, 1e-12));
            CHECK(rating.heat.total() == near(power, 1e-9));
            (rating.runs_away() ? away : settled) += 1;
            if (rating.runs_away()) continue;
            for (std::size_t i = 0; i < duty.parts.size(); ++i)
                CHECK(rating.parts[i].power == near(duty.parts[i].power_table->power_at(
                                                        rating.parts[i].junction_temperature),
                                                    1e-9));
            CHECK(rating.feedback->loop_gain < 1.0);
        }
    }
    CHECK(settled > 60);
    CHECK(away > 3);
}

// The loop gain is what grows a disturbance: one watt more in a table moves the power by
// 1/(1 - gain).
TEST_CASE("a rated sink's loop gain says what a small disturbance grows to") {
    RandomSinks random(94);
    for (int n = 0; n < 20; ++n) {
        const auto g = random.geometry();
        auto duty = random.duty(g);
        duty.parts.resize(1);
        duty = with_tables(random, duty, 0.25);
        const auto before = sink::rate(g, duty);
        if (before.runs_away()) continue;
        auto points = duty.parts[0].power_table->points();
        const double more = 1e-5 * before.power;
        for (auto& point : points)
            point.power += more;
        duty.parts[0].power_table = PowerTable(points);
        const auto after = sink::rate(g, duty);
        CHECK((after.power - before.power) / more ==
              near(1.0 / (1.0 - before.feedback->loop_gain), 1e-3));
    }
}

TEST_CASE("a level table is a stated power") {
    RandomSinks random(95);
    const auto g = random.geometry();
    auto duty = random.duty(g);
    const auto stated = sink::rate(g, duty);
    for (auto& part : duty.parts)
        part.power_table = PowerTable({{300.0, part.power}, {400.0, part.power}});
    const auto rating = sink::rate(g, duty);
    CHECK(rating.hottest_pad_rise == near(stated.hottest_pad_rise, 1e-12));
    CHECK(rating.feedback->loop_gain == 0.0);
}

TEST_CASE("sixteen parts with tables on one sink in a duct agree with all their tables") {
    RandomSinks random(96);
    sink::Geometry<double> g{20, 30e-3, 1.5e-3, 6e-3, 6e-3, 200e-3, 0.0};
    auto duty = random.ducted(g);
    duty.parts.clear();
    for (int i = 0; i < 16; ++i) {
        job::Part part;
        part.name = "part " + std::to_string(i);
        part.power = 4.0;
        part.pad_across = part.pad_along = 8e-3;
        part.across = job::Coordinate{0.1 + 0.2 * (i % 4), true};
        part.along = job::Coordinate{0.1 + 0.2 * (i / 4), true};
        duty.parts.push_back(part);
    }
    duty = with_tables(random, duty, 0.2);
    const auto rating = sink::rate(g, duty);
    REQUIRE_FALSE(rating.runs_away());
    for (std::size_t i = 0; i < duty.parts.size(); ++i)
        CHECK(
            rating.parts[i].power ==
            near(duty.parts[i].power_table->power_at(rating.parts[i].junction_temperature), 1e-9));
}
