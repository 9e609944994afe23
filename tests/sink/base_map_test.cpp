// The base's temperature field. Behind one film it is the double Fourier series of Muzychka, Culham
// & Yovanovich 2003 (correlations/spreading.hpp). In a stream: closed forms in the limits of high
// and low conductivity, an ordinary differential equation between them, and reciprocity.
#include "src/sink/base_map.hpp"
#include "src/sink/rating.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"
#include "tests/sink/random_sinks.hpp"
#include <algorithm>
#include <numeric>

using namespace finwright;
using correlations::ModeSet;
using correlations::Slab;
using sink::BaseField;
using sink::BaseMap;
using sink::MapCells;
using sink::UniformFilm;
using sink::WarmingAir;
using tests::check_value;
using tests::near;
using tests::RandomSinks;

namespace {

using Pad = correlations::Pad<double>;

/// The base of check values SP-15 to SP-22.
BaseMap reference(std::vector<Pad> pads, std::vector<double> powers) {
    return {0.1, 0.08, 0.005, 200.0, std::move(pads), std::move(powers), UniformFilm{50.0}};
}
const Pad first{0.03, 0.05, 0.02, 0.02}, second{0.08, 0.03, 0.015, 0.02};

MapCells finer(int times) {
    return {30 * times, 30 * times, 3 * times, 8 * times, 5 * times};
}

Slab slab_of(const BaseMap& map) {
    return {map.width, map.length, map.thickness, map.conductivity,
            std::get<UniformFilm>(map.air).conductance};
}

std::vector<double> series(const BaseMap& map) {
    const Slab slab = slab_of(map);
    return pad_mean_rises(slab, map.pads, map.powers, ModeSet::up_to(200.0, slab, map.pads));
}

double total(const std::vector<double>& values) {
    return std::accumulate(values.begin(), values.end(), 0.0);
}

/// Cell whose centre is the last at or before a place, and how far towards the next one it lies.
std::pair<int, double> between_centres(const sink::GridAxis& axis, double place) {
    int i = 0;
    while (i + 2 < axis.cells() && axis.centre(i + 1) <= place)
        ++i;
    return {i, (place - axis.centre(i)) / axis.step(i)};
}

/// Bilinear between cell centres.
double rise_at(const BaseField& f, double x, double y) {
    const auto [i, u] = between_centres(f.across, x);
    const auto [j, v] = between_centres(f.along, y);
    return (1.0 - v) * ((1.0 - u) * f.rise(i, j) + u * f.rise(i + 1, j)) +
           v * ((1.0 - u) * f.rise(i, j + 1) + u * f.rise(i + 1, j + 1));
}

/// Pads in the middle, at an edge, in a corner, small, on a thick base, several at once.
std::vector<BaseMap> layouts() {
    return {reference({first}, {1.0}),
            reference({first, second}, {10.0, 5.0}),
            reference({{0.01, 0.01, 0.02, 0.02}}, {1.0}),
            reference({{0.05, 0.01, 0.03, 0.02}}, {1.0}),
            {0.2, 0.15, 0.004, 160.0, {{0.0513, 0.0771, 0.008, 0.008}}, {1.0}, UniformFilm{300.0}},
            {0.1, 0.1, 0.02, 200.0, {{0.05, 0.05, 0.01, 0.01}}, {1.0}, UniformFilm{1000.0}},
            {0.2, 0.1, 0.01, 200.0, {{0.09, 0.03, 0.15, 0.004}}, {1.0}, UniformFilm{1000.0}},
            {0.25,
             0.2,
             0.008,
             180.0,
             {{0.0513, 0.0771, 0.018, 0.028},
              {0.1237, 0.0767, 0.021, 0.031},
              {0.2001, 0.071, 0.01, 0.015},
              {0.07, 0.157, 0.04, 0.02},
              {0.17, 0.16, 0.013, 0.013}},
             {10.0, 20.0, 5.0, 30.0, 8.0},
             UniformFilm{400.0}}};
}

/// Two equal pads, one behind the other in the stream, off the middle across.
BaseMap in_stream() {
    return {0.12,
            0.2,
            0.005,
            180.0,
            {{0.04, 0.05, 0.03, 0.03}, {0.07, 0.15, 0.02, 0.03}},
            {40.0, 40.0},
            WarmingAir{6.0, 0.9}};
}

BaseMap mirrored_along(BaseMap map) {
    for (Pad& pad : map.pads)
        pad.y = map.length - pad.y;
    return map;
}

double heat_in_outlet(const BaseMap& map, const BaseField& field) {
    double heat = 0.0;
    for (int i = 0; i < field.across.cells(); ++i)
        heat += std::get<WarmingAir>(map.air).capacity_flow * field.across.width(i) / map.width *
                field.outlet[std::size_t(i)];
    return heat;
}

} // namespace

TEST_CASE("base map: one film, means under pads within 1 % of the series (Muzychka et al. 2003)") {
    for (const BaseMap& map : layouts()) {
        const auto field = base_field(map);
        const auto exact = series(map);
        for (std::size_t p = 0; p < exact.size(); ++p)
            CHECK(field.pad_rises[p] == near(exact[p], 1e-2));
    }
}

TEST_CASE("base map: one film, the face within 1 % of the series at every pad's centre and edges") {
    for (const BaseMap& map : layouts()) {
        const auto field = base_field(map);
        for (const Pad& pad : map.pads)
            for (double side : {-0.5, 0.0, 0.5}) {
                const double x = pad.x + side * pad.across;
                const double exact = surface_rise(slab_of(map), map.pads, map.powers, x, pad.y);
                CHECK(rise_at(field, x, pad.y) == near(exact, 1e-2));
            }
    }
}

TEST_CASE("base map: one film, converges to the series with order 2 (Muzychka et al. 2003)") {
    for (const BaseMap& map : {reference({first}, {1.0}), reference({first, second}, {10.0, 5.0}),
                               reference({{0.01, 0.01, 0.02, 0.02}}, {1.0})}) {
        const double exact = series(map)[0];
        const auto error = [&](int times) {
            return base_field(map, finer(times)).pad_rises[0] - exact;
        };
        const double coarse = error(1), middle = error(2), fine = error(4);
        // The singular edges of the pads cost a logarithm: a little less than 2.
        for (double order : {std::log2(coarse / middle), std::log2(middle / fine)}) {
            CHECK(order > 1.7);
            CHECK(order < 2.3);
        }
    }
}

TEST_CASE("base map: stored cases SP-16 to SP-22 within 1e-3") {
    const auto one = base_field(reference({first}, {1.0}));
    CHECK(rise_at(one, 0.03, 0.05) == near(check_value("SP-16").value(), 1e-3));
    CHECK(one.pad_rises[0] == near(check_value("SP-17").value(), 1e-3));
    CHECK(rise_at(one, 0.09, 0.01) == near(check_value("SP-18").value(), 1e-3));
    const auto two = base_field(reference({first, second}, {10.0, 5.0}));
    CHECK(rise_at(two, 0.03, 0.05) == near(check_value("SP-19a").value(), 1e-3));
    CHECK(two.pad_rises[0] == near(check_value("SP-19b").value(), 1e-3));
    CHECK(rise_at(two, 0.08, 0.03) == near(check_value("SP-19c").value(), 1e-3));
    CHECK(two.pad_rises[1] == near(check_value("SP-19d").value(), 1e-3));
    const auto other = base_field(reference({first, second}, {0.0, 1.0}));
    CHECK(other.pad_rises[0] == near(check_value("SP-20b").value(), 1e-3));
    CHECK(other.pad_rises[1] == near(check_value("SP-20c").value(), 1e-3));
    const auto centred = base_field(reference({{0.05, 0.04, 0.02, 0.02}}, {1.0}));
    CHECK(rise_at(centred, 0.05, 0.04) == near(check_value("SP-21").values[0], 1e-3));
    CHECK(centred.pad_rises[0] == near(check_value("SP-21").values[1], 1e-3));
    const auto corner = base_field(reference({{0.01, 0.01, 0.02, 0.02}}, {1.0}));
    CHECK(rise_at(corner, 0.01, 0.01) == near(check_value("SP-22").values[0], 1e-3));
    CHECK(corner.pad_rises[0] == near(check_value("SP-22").values[1], 1e-3));
}

TEST_CASE("base map: a pad over the whole base behind one film is t/k + 1/h everywhere, SP-15") {
    const auto field = base_field(reference({{0.05, 0.04, 0.1, 0.08}}, {1.0}));
    for (double rise : field.rises)
        CHECK(rise == near(check_value("SP-15").value(), 1e-9));
}

TEST_CASE("base map: the hottest place is the hottest cell, inside the pad of highest flux") {
    const auto field = base_field(reference({first, second}, {10.0, 5.0}));
    CHECK(field.hottest.rise == *std::max_element(field.rises.begin(), field.rises.end()));
    CHECK(rise_at(field, field.hottest.x, field.hottest.y) == near(field.hottest.rise, 1e-12));
    CHECK(std::abs(field.hottest.x - first.x) < 0.5 * first.across);
    CHECK(std::abs(field.hottest.y - first.y) < 0.5 * first.along);
}

TEST_CASE("base map: heat into the fins is the power put in, and the stream carries it (balance)") {
    RandomSinks random(31);
    for (int n = 0; n < 20; ++n) {
        const auto g = random.geometry();
        for (const auto& duty : {random.duty(g), random.mounted(g), random.ducted(g)}) {
            const auto map = base_map(g, duty, sink::rate(g, duty));
            const auto field = base_field(map, finer(1));
            CHECK(field.heat == near(duty.power(), 1e-9));
            if (duty.surroundings.still())
                CHECK(total(field.outlet) == 0.0);
            else
                CHECK(heat_in_outlet(map, field) == near(duty.power(), 1e-9));
        }
    }
}

TEST_CASE("base map: a weak film under thick copper closes its balance as well") {
    const BaseMap map{
        0.3, 0.3, 0.02, 390.0, {{0.05, 0.05, 0.004, 0.004}}, {50.0}, UniformFilm{1e-3}};
    CHECK(base_field(map).heat == near(50.0, 1e-9));
}

TEST_CASE("base map: an isothermal base sheds m cp (1 - exp(-NTU)) of its rise on any grid") {
    for (double units : {0.05, 0.9, 6.0}) {
        BaseMap map = in_stream();
        map.conductivity = 1e9;
        map.air = WarmingAir{6.0, units};
        for (const MapCells& cells : {MapCells{}, MapCells{5, 7, 2, 3, 3}})
            for (double rise : base_field(map, cells).rises)
                CHECK(-6.0 * std::expm1(-units) * rise == near(80.0, 1e-6));
    }
}

TEST_CASE("base map: one flux over a base that does not conduct: air and base rise linearly") {
    const double flow = 4.0, units = 0.8, power = 60.0;
    const BaseMap map{
        0.1, 0.2, 1e-6, 1.0, {{0.05, 0.1, 0.1, 0.2}}, {power}, WarmingAir{flow, units}};
    const auto field = base_field(map);
    // Local balance: q = h (T - a), m cp a' = q W; h = NTU m cp/(W L).
    const double over_air = power / (units * flow) + power / (0.1 * 0.2) * 1e-6 / 1.0;
    const double margin = 1e-3; // the insulated rims bend the line within sqrt(k t/h) = 0.08 mm
    for (int j = 0; j < field.along.cells(); ++j) {
        const double y = field.along.centre(j);
        if (y < margin || y > 0.2 - margin) continue;
        for (int i = 0; i < field.across.cells(); ++i)
            CHECK(field.rise(i, j) == near(over_air + power / flow * y / 0.2, 1e-4));
    }
    for (double rise : field.outlet)
        CHECK(rise == near(power / flow, 1e-9));
}

TEST_CASE("base map: without conduction sideways only the pad's own strips and what lies behind it "
          "are warm") {
    const double flow = 4.0;
    const BaseMap map{
        0.1, 0.2, 1e-9, 1.0, {{0.05, 0.1, 0.04, 0.05}}, {60.0}, WarmingAir{flow, 0.8}};
    const auto field = base_field(map);
    const double warm = 60.0 / (flow * 0.4); // in the 0.4 of the flow that passes the pad
    const double blur = 3e-3;                // a cell
    for (int i = 0; i < field.across.cells(); ++i) {
        const double x = std::abs(field.across.centre(i) - 0.05);
        if (x > 0.02 + blur) CHECK(field.outlet[std::size_t(i)] < 1e-6 * warm);
        if (x > 0.02 - blur) continue;
        CHECK(field.outlet[std::size_t(i)] == near(warm, 1e-3));
        CHECK(rise_at(field, field.across.centre(i), 0.02) < 1e-6 * warm);
        // Behind the pad the base has the air's temperature.
        CHECK(rise_at(field, field.across.centre(i), 0.18) == near(warm, 1e-3));
    }
}

namespace {

/// A thin plate with a pad over its whole width from `from` to `to`, in a stream along y:
///     k t T'' = h (T - a) - q,  C' a' = h (T - a),  T'(0) = T'(L) = 0, a(0) = 0,
/// by shooting for T(0) with the classical Runge-Kutta method.
class PlateInStream {
public:
    PlateInStream(const BaseMap& map) : map_(map), length_(map.length) {
        const auto& stream = std::get<WarmingAir>(map.air);
        const Pad& pad = map.pads[0];
        film_ = stream.transfer_units * stream.capacity_flow / (map.width * map.length);
        warming_ = film_ * map.width / stream.capacity_flow;
        flux_ = map.powers[0] / (pad.across * pad.along);
        from_ = pad.y - 0.5 * pad.along;
        to_ = pad.y + 0.5 * pad.along;
        const double slope_0 = shoot(0.0).back().slope, slope_1 = shoot(1.0).back().slope;
        states_ = shoot(-slope_0 / (slope_1 - slope_0));
    }

    double rise(double y) const { return states_[std::size_t(y / length_ * steps)].rise; }
    double outlet() const { return states_.back().air; }

private:
    static constexpr int steps = 20000;
    struct State {
        double rise, slope, air;
    };

    State slope_of(const State& s, double y) const {
        const double flux = y > from_ && y < to_ ? flux_ : 0.0;
        return {s.slope, (film_ * (s.rise - s.air) - flux) / (map_.conductivity * map_.thickness),
                warming_ * (s.rise - s.air)};
    }
    static State moved(const State& s, const State& by, double step) {
        return {s.rise + step * by.rise, s.slope + step * by.slope, s.air + step * by.air};
    }
    std::vector<State> shoot(double rise) const {
        std::vector<State> states{{rise, 0.0, 0.0}};
        const double step = length_ / steps;
        for (int n = 0; n < steps; ++n) {
            const State& s = states.back();
            const double y = n * step;
            const State a = slope_of(s, y), b = slope_of(moved(s, a, 0.5 * step), y + 0.5 * step),
                        c = slope_of(moved(s, b, 0.5 * step), y + 0.5 * step),
                        d = slope_of(moved(s, c, step), y + step);
            states.push_back(
                moved(moved(moved(moved(s, a, step / 6.0), b, step / 3.0), c, step / 3.0), d,
                      step / 6.0));
        }
        return states;
    }

    BaseMap map_;
    double length_, film_, warming_, flux_, from_, to_;
    std::vector<State> states_;
};

} // namespace

TEST_CASE("base map: a conducting plate in a stream solves its differential equation") {
    const double width = 0.05, length = 0.2;
    for (double from : {0.02, 0.13}) {
        const BaseMap map{width,
                          length,
                          0.5e-3,
                          800.0, // h t/k = 4e-4: no rise across the plate to speak of
                          {{0.5 * width, from + 0.025, width, 0.05}},
                          {30.0},
                          WarmingAir{5.0, 1.2}};
        const PlateInStream exact(map);
        REQUIRE(exact.outlet() == near(30.0 / 5.0, 1e-4)); // its own balance
        const auto field = base_field(map, finer(4));
        for (int j = 0; j < field.along.cells(); j += 5)
            CHECK(field.rise(3, j) == near(exact.rise(field.along.centre(j)), 1e-3));
    }
}

TEST_CASE("base map: reversing the stream exchanges cause and effect (reciprocity)") {
    // The transposed problem is that of the reversed stream: what one pad's watt does to the other
    // downstream is what the other's does to it upstream when the air comes from the other end.
    BaseMap there = in_stream();
    there.powers = {1.0, 0.0};
    BaseMap back = mirrored_along(there);
    back.powers = {0.0, 1.0};
    const double downstream = base_field(there).pad_rises[1];
    CHECK(base_field(back).pad_rises[0] == near(downstream, 1e-9));
    CHECK(base_field(mirrored_along(there)).pad_rises[1] < 0.9 * downstream);
}

TEST_CASE("base map: a pad downstream is hotter than the same pad upstream, and one film sees no "
          "difference") {
    BaseMap map = in_stream();
    map.pads[1] = map.pads[0];
    map.pads[1].y = map.length - map.pads[0].y;
    const auto field = base_field(map);
    CHECK(field.pad_rises[1] > 1.1 * field.pad_rises[0]);
    CHECK(field.hottest.y > 0.5 * map.length);
    map.air = UniformFilm{200.0};
    const auto still = base_field(map);
    CHECK(still.pad_rises[1] == near(still.pad_rises[0], 1e-9));
}

TEST_CASE("base map: a stream of endless capacity is a uniform film") {
    BaseMap map = in_stream();
    const double flow = 1e9, film = 250.0;
    map.air = WarmingAir{flow, film * map.width * map.length / flow};
    const auto streamed = base_field(map);
    map.air = UniformFilm{film};
    const auto still = base_field(map);
    for (std::size_t i = 0; i < still.rises.size(); ++i)
        CHECK(streamed.rises[i] == near(still.rises[i], 1e-6));
}

TEST_CASE("base map of a rating: an isothermal base has the rating's base rise") {
    RandomSinks random(32);
    for (int n = 0; n < 10; ++n) {
        const auto g = random.geometry();
        for (const auto& duty : {random.duty(g), random.mounted(g), random.ducted(g)}) {
            const auto rating = sink::rate(g, duty);
            auto map = base_map(g, duty, rating);
            map.conductivity = 1e9;
            for (double rise : base_field(map, finer(1)).pad_rises)
                CHECK(rise == near(rating.base_rise, 1e-5));
        }
    }
}

TEST_CASE(
    "base map of a rating in still air: pads within 0.5 % of the rating's (Muzychka et al.)") {
    RandomSinks random(33);
    for (int n = 0; n < 20; ++n) {
        const auto g = random.geometry();
        for (const auto& duty : {random.duty(g), random.mounted(g)}) {
            const auto rating = sink::rate(g, duty);
            const auto field = base_field(base_map(g, duty, rating));
            for (std::size_t p = 0; p < rating.parts.size(); ++p)
                CHECK(field.pad_rises[p] ==
                      near(rating.parts[p].pad_temperature - rating.air_temperature, 5e-3));
        }
    }
}

TEST_CASE("base map: a pad that reaches beyond the base is refused") {
    CHECK_THROWS_AS(base_field(reference({{0.005, 0.04, 0.02, 0.02}}, {1.0})), std::domain_error);
    CHECK_THROWS_AS(base_field(reference({{0.05, 0.075, 0.02, 0.02}}, {1.0})), std::domain_error);
    CHECK_THROWS_AS(base_field(reference({{0.05, 0.04, 0.0, 0.02}}, {1.0})), std::domain_error);
}
