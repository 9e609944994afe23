// Every law's derivative by Dual numbers against central differences, on random points of its
// range.
#include "correlations/air.hpp"
#include "correlations/atmosphere.hpp"
#include "correlations/channel_radiation.hpp"
#include "correlations/fin.hpp"
#include "correlations/forced_channel.hpp"
#include "correlations/interface.hpp"
#include "correlations/natural_channel.hpp"
#include "correlations/natural_face.hpp"
#include "correlations/radiation.hpp"
#include "correlations/spreading.hpp"
#include "tests/near.hpp"
#include <random>

using namespace finwright::correlations;
using finwright::tests::near;

namespace {

constexpr int points = 40;

/// f takes an array of N numbers of either type. Ranges are searched in logarithms.
template <std::size_t N, class F>
void check_law(const char* name, const std::array<std::pair<double, double>, N>& ranges, F&& f) {
    std::mt19937 engine(7);
    CAPTURE(name);
    for (int p = 0; p < points; ++p) {
        std::array<double, N> x;
        for (std::size_t i = 0; i < N; ++i) {
            std::uniform_real_distribution<double> u(std::log(ranges[i].first),
                                                     std::log(ranges[i].second));
            x[i] = std::exp(u(engine));
        }
        for (std::size_t i = 0; i < N; ++i) {
            std::array<Dual<1>, N> d;
            for (std::size_t j = 0; j < N; ++j)
                d[j] = j == i ? Dual<1>::variable(x[j], 0) : Dual<1>(x[j]);
            const Dual<1> value = f(d);
            const double step = 3e-6 * x[i];
            auto high = x, low = x;
            high[i] += step;
            low[i] -= step;
            const double central = (f(high) - f(low)) / (2.0 * step);
            CAPTURE(i);
            CAPTURE(x[i]);
            // Relative to the value over the input: what a slope of order one in logarithms would
            // be.
            const double scale = std::abs(value.value / x[i]) + std::abs(central);
            CHECK(std::abs(value.slope[0] - central) <= 2e-6 * scale);
        }
    }
}

constexpr std::pair<double, double> kelvin{250.0, 450.0}, el{0.1, 1e5}, ra{1e2, 1e9}, pr{0.6, 1.0},
    laminar{50.0, 2200.0}, turbulent{4100.0, 1e5}, aspect{0.02, 0.9}, ratio{3.0, 100.0},
    side{2e-3, 0.2};

} // namespace

TEST_CASE("air and atmosphere") {
    check_law<1>("viscosity", {{kelvin}}, [](const auto& x) { return air_viscosity(x[0]); });
    check_law<1>("conductivity", {{kelvin}}, [](const auto& x) { return air_conductivity(x[0]); });
    check_law<1>("specific heat", {{kelvin}},
                 [](const auto& x) { return air_specific_heat(x[0]); });
    check_law<1>("prandtl", {{kelvin}}, [](const auto& x) { return air_at(x[0], 9e4).prandtl(); });
    check_law<1>("atmosphere", {{{100.0, 8000.0}}},
                 [](const auto& x) { return pressure_at_altitude(x[0]); });
}

TEST_CASE("natural convection") {
    check_law<1>("elenbaas", {{el}}, [](const auto& x) { return nusselt_elenbaas(x[0]); });
    check_law<1>("plates", {{el}}, [](const auto& x) { return nusselt_parallel_plates(x[0]); });
    check_law<1>("one side", {{el}},
                 [](const auto& x) { return nusselt_parallel_plates_one_side(x[0]); });
    check_law<1>("flux end", {{el}}, [](const auto& x) { return nusselt_uniform_flux_end(x[0]); });
    check_law<1>("flux middle", {{el}},
                 [](const auto& x) { return nusselt_uniform_flux_middle(x[0]); });
    check_law<3>("u channel", {{el, {2e-3, 2e-2}, {1e-2, 0.1}}},
                 [](const auto& x) { return nusselt_u_channel(x[0], x[1], x[2]); });
    check_law<5>("fin channel", {{el, {5.0, 200.0}, {2e-3, 2e-2}, {1e-2, 0.1}, {0.05, 0.3}}},
                 [](const auto& x) { return nusselt_fin_channel(x[0], x[1], x[2], x[3], x[4]); });
    check_law<2>("vertical laminar", {{ra, pr}},
                 [](const auto& x) { return nusselt_vertical_laminar(x[0], x[1]); });
    check_law<2>("vertical", {{ra, pr}},
                 [](const auto& x) { return nusselt_vertical(x[0], x[1]); });
    check_law<2>("up", {{ra, pr}}, [](const auto& x) { return nusselt_facing_up(x[0], x[1]); });
    check_law<2>("down", {{ra, pr}}, [](const auto& x) { return nusselt_facing_down(x[0], x[1]); });
    check_law<2>("assisting", {{{1.0, 50.0}, {1.0, 50.0}}},
                 [](const auto& x) { return mixed_assisting(x[0], x[1]); });
    check_law<2>("optimum gap", {{side, ra}},
                 [](const auto& x) { return optimum_gap_thin_fins(x[0], x[1]); });
}

TEST_CASE("forced convection and friction") {
    check_law<2>("inlet plates", {{{0.3, 150.0}, pr}},
                 [](const auto& x) { return nusselt_inlet_plates(x[0], x[1]); });
    check_law<2>("gap", {{{0.5, 1e4}, pr}},
                 [](const auto& x) { return nusselt_developing_gap(x[0], x[1]); });
    for (auto re : {laminar, {2400.0, 3900.0}, turbulent}) {
        check_law<4>("duct", {{re, pr, aspect, ratio}}, [](const auto& x) {
            return nusselt_duct_all_regimes(x[0], x[1], x[2], x[3]);
        });
        check_law<3>("friction", {{re, aspect, ratio}},
                     [](const auto& x) { return fapp_all_regimes(x[0], x[1], x[2]); });
    }
    check_law<1>("plates friction", {{{1e-3, 1.0}}},
                 [](const auto& x) { return fapp_re_plates(x[0]); });
    check_law<1>("duct developed", {{aspect}},
                 [](const auto& x) { return duct_nusselt_developed(x[0]); });
    check_law<1>("contraction", {{{0.02, 0.98}}},
                 [](const auto& x) { return contraction_coefficient(x[0]); });
    check_law<1>("entry", {{{0.02, 0.9}}}, [](const auto& x) { return entry_loss(x[0]); });
    check_law<2>("flat plate", {{{1e3, 5e5}, pr}},
                 [](const auto& x) { return nusselt_flat_plate(x[0], x[1]); });
}

TEST_CASE("fins, radiation, spreading") {
    check_law<1>("fin", {{{0.01, 5.0}}}, [](const auto& x) { return fin_efficiency(x[0]); });
    check_law<3>("opening", {{{2e-3, 2e-2}, {5e-3, 0.1}, {0.05, 0.3}}},
                 [](const auto& x) { return channel_opening(x[0], x[1], x[2]); });
    check_law<2>("conductance", {{side, side}},
                 [](const auto& x) { return channel_radiation_conductance(0.3, x[0], x[1]); });
    for (const double emissivity : {0.05, 0.3, 0.9})
        check_law<3>(
            "zoned channel", {{{2e-3, 2e-2}, {5e-3, 0.1}, {0.05, 0.3}}},
            [&](const auto& x) { return channel_radiation_zoned(emissivity, x[0], x[1], x[2]); });
    check_law<2>("radiation", {{kelvin, kelvin}},
                 [](const auto& x) { return radiation_coefficient(0.8, x[0], x[1]); });
    check_law<3>("spreading", {{{0.05, 0.9}, {0.01, 1.0}, {0.01, 10.0}}},
                 [](const auto& x) { return spreading_mean(x[0], x[1], x[2]); });
}

TEST_CASE("the series' slopes by width, length, thickness and film, pads moving with the sides") {
    const std::array<double, 4> at{0.1213, 0.0917, 0.004, 60.0};
    const auto slab = [](const std::array<double, 4>& x) {
        return Slab{x[0], x[1], x[2], 200.0, x[3]};
    };
    const auto pads = [](auto w, auto l) {
        using T = decltype(w);
        return std::vector{Pad<T>{T(0.035), 0.4 * l, 0.15 * w, T(0.03)},
                           Pad<T>{0.7 * w, T(0.06), T(0.01), 0.1 * l}};
    };
    const std::vector powers{10.0, 4.0};
    const auto moving = pads(Dual<1>::variable(at[0], 0), Dual<1>::variable(at[1], 0));
    const ModeSet modes = ModeSet::for_means(slab(at), moving);
    const auto sloped = pad_mean_rises_with_slopes(slab(at), moving, powers, modes);
    const auto rises = [&](const std::array<double, 4>& x) {
        return pad_mean_rises(slab(x), pads(x[0], x[1]), powers, modes);
    };
    const auto plain = rises(at);
    for (std::size_t i = 0; i < 4; ++i) {
        auto high = at, low = at;
        const double step = 1e-6 * at[i];
        high[i] += step;
        low[i] -= step;
        const auto up = rises(high), down = rises(low);
        for (std::size_t pad = 0; pad < 2; ++pad) {
            CHECK(sloped[pad].value == near(plain[pad], 1e-14));
            CHECK(std::abs(sloped[pad].slope[i] - (up[pad] - down[pad]) / (2.0 * step)) <
                  1e-8 * plain[pad] / at[i]);
        }
    }
}
