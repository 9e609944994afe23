// What must hold whatever the numbers: physics, not values.
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/sink/random_sinks.hpp"

using namespace finwright;
using tests::RandomSinks;

namespace {

constexpr int trials = 300;
constexpr double noise = 1e-9;

double hottest(const sink::Geometry<double>& g, const sink::Duty& duty) {
    return sink::rate(g, duty).hottest_pad_rise;
}

double spreading_share(const sink::Geometry<double>& g, const sink::Duty& duty) {
    const auto r = sink::rate(g, duty);
    return r.hottest_pad_rise - r.base_rise;
}

} // namespace

TEST_CASE("more air is never hotter") {
    RandomSinks random(21);
    for (int n = 0; n < trials; ++n) {
        const auto g = random.geometry();
        auto slow = random.ducted(g);
        auto fast = slow;
        std::get<sink::DuctVelocity>(fast.surroundings.air).approach *= random.between(1.01, 3.0);
        CHECK(hottest(g, fast) <= hottest(g, slow) * (1.0 + noise));
    }
}

TEST_CASE("higher emissivity is never hotter") {
    RandomSinks random(22);
    for (int n = 0; n < trials; ++n) {
        const auto g = random.geometry();
        auto dull = random.duty(g);
        auto bright = dull;
        bright.material.emissivity = random.between(0.01, 1.0) * dull.material.emissivity;
        CHECK(hottest(g, dull) <= hottest(g, bright) * (1.0 + noise));
    }
}

TEST_CASE("more power is never cooler, and less than in proportion hotter in still air") {
    RandomSinks random(23);
    for (int n = 0; n < trials; ++n) {
        const auto g = random.geometry();
        const auto duty = random.duty(g);
        auto doubled = duty;
        for (auto& part : doubled.parts)
            part.power *= 2.0;
        const double ratio = sink::rate(g, doubled).base_rise / sink::rate(g, duty).base_rise;
        CHECK(ratio > 1.0);
        CHECK(ratio < 2.0);
    }
}

// A single centred pad: with several pads the share of one may rise as heat crosses over from
// another.
TEST_CASE("a thicker base never raises the spreading share beyond its own thickness") {
    RandomSinks random(24);
    for (int n = 0; n < trials; ++n) {
        const auto g = random.geometry();
        auto duty = random.duty(g);
        duty.parts.resize(1);
        auto thicker = g;
        thicker.base *= random.between(1.02, 1.5);
        const double through_base = duty.power() / (duty.material.conductivity * g.footprint());
        CHECK(spreading_share(thicker, duty) - through_base * thicker.base <=
              (spreading_share(g, duty) - through_base * g.base) * (1.0 + 1e-3));
    }
}

TEST_CASE("thinner air at altitude is never cooler") {
    RandomSinks random(25);
    for (int n = 0; n < trials; ++n) {
        const auto g = random.geometry();
        for (const auto& low : {random.duty(g), random.ducted(g)}) {
            auto high = low;
            high.surroundings.pressure *= 0.8;
            CHECK(hottest(g, high) >= hottest(g, low) * (1.0 - noise));
        }
    }
}
