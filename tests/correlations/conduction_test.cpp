// Spreading and interfaces: Lee et al. 1995 closed form, Muzychka et al. 2003 series (finite
// volumes agree), half-space limits (Carslaw & Jaeger; Yovanovich), Incropera.
#include "correlations/interface.hpp"
#include "correlations/spreading.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"

using namespace finwright::correlations;
using finwright::tests::check_value;
using finwright::tests::near;

namespace {

const Slab slab{0.1, 0.08, 0.005, 200.0, 50.0};
const Pad<double> first{0.03, 0.05, 0.02, 0.02}, second{0.08, 0.03, 0.015, 0.02};

double alone(const Pad<double>& pad) {
    return pad_mean_rises(slab, {pad}, {1.0})[0];
}

} // namespace

TEST_CASE("closed form on discs, SP-10c, SP-10d, SP-11c, SP-11d, SP-12c, SP-12d, SP-13d (Lee et "
          "al. 1995)") {
    CHECK(spreading_mean(0.25, 0.1, 0.1) == near(check_value("SP-10c").value(), 2e-6));
    CHECK(spreading_largest(0.25, 0.1, 0.1) == near(check_value("SP-10d").value(), 2e-6));
    CHECK(spreading_mean(0.5, 0.1, 1.0) == near(check_value("SP-11c").value(), 2e-6));
    CHECK(spreading_largest(0.5, 0.1, 1.0) == near(check_value("SP-11d").value(), 2e-6));
    CHECK(spreading_mean(0.1, 0.5, 0.01) == near(check_value("SP-12c").value(), 2e-6));
    CHECK(spreading_largest(0.1, 0.5, 0.01) == near(check_value("SP-12d").value(), 2e-6));
    CHECK(spreading_largest(0.3, 0.05, 0.1) == near(check_value("SP-13d").value(), 2e-6));
}

TEST_CASE(
    "closed form against exact disc series: stated error, SP-10a/b, SP-11a/b, SP-12a, SP-13b") {
    const auto error = [](double closed, const char* id) {
        return closed / check_value(id).value() - 1.0;
    };
    for (double e : {error(spreading_mean(0.25, 0.1, 0.1), "SP-10a"),
                     error(spreading_mean(0.5, 0.1, 1.0), "SP-11a"),
                     error(spreading_mean(0.1, 0.5, 0.01), "SP-12a")}) {
        CHECK(e > -0.06);
        CHECK(e < 0.02);
    }
    for (double e : {error(spreading_largest(0.25, 0.1, 0.1), "SP-10b"),
                     error(spreading_largest(0.5, 0.1, 1.0), "SP-11b"),
                     error(spreading_largest(0.3, 0.05, 0.1), "SP-13b")}) {
        CHECK(e > -0.02);
        CHECK(e < 0.04);
    }
}

TEST_CASE(
    "series, one pad: SP-16, SP-17, SP-18, SP-21, SP-22 (finite volumes give 2.7888 and 2.7480)") {
    CHECK(alone(first) == near(check_value("SP-17").value(), 1.5e-4));
    CHECK(surface_rise(slab, {first}, {1.0}, 0.03, 0.05) ==
          near(check_value("SP-16").value(), 2e-5));
    CHECK(surface_rise(slab, {first}, {1.0}, 0.09, 0.01) ==
          near(check_value("SP-18").value(), 2e-5));
    CHECK(alone({0.05, 0.04, 0.02, 0.02}) == near(check_value("SP-21").values[1], 1.5e-4));
    CHECK(alone({0.01, 0.01, 0.02, 0.02}) == near(check_value("SP-22").values[1], 1.5e-4));
}

TEST_CASE("series, two pads: SP-19, SP-20 and symmetry") {
    const auto rises = pad_mean_rises(slab, {first, second}, {10.0, 5.0});
    CHECK(rises[0] == near(check_value("SP-19b").value(), 1.5e-4));
    CHECK(rises[1] == near(check_value("SP-19d").value(), 1.5e-4));
    const double f12 = pad_mean_rises(slab, {first, second}, {0.0, 1.0})[0];
    const double f21 = pad_mean_rises(slab, {first, second}, {1.0, 0.0})[1];
    CHECK(f12 == near(f21, 1e-12));
    CHECK(f12 == near(check_value("SP-20b").value(), 1e-5));
    CHECK(alone(second) == near(check_value("SP-20c").value(), 1.5e-4));
}

TEST_CASE("series, two layers: SP-23") {
    CHECK(mean_rise_two_layers({0.1, 0.08, 0.004, 200.0, 50.0}, {0.001, 390.0}, first) ==
          near(check_value("SP-23").values[1], 2e-5));
}

TEST_CASE("a pad over the whole base spreads nothing, SP-15") {
    CHECK(alone({0.05, 0.04, 0.1, 0.08}) == near(check_value("SP-15").value(), 1e-9));
}

TEST_CASE("a small pad on a thick base tends to the half space, SP-31a (Carslaw & Jaeger)") {
    const Slab deep{1.0, 1.0, 1.0, 1.0, 1e6};
    const double side = 0.02;
    const double spreading =
        pad_mean_rises(deep, {Pad<double>{0.5, 0.5, side, side}}, {1.0})[0] - 1.0;
    // The base itself takes a little off: within 3 % of the half space.
    CHECK(spreading * side == near(check_value("SP-31a").value(), 3e-2));
}

TEST_CASE("interface layers, IF-10, IF-11 (k from memory), IF-03 (Incropera 6e, example 3.2)") {
    CHECK(layer_area_resistance(2.54e-5, 0.12, 0.0) * 1e4 ==
          near(check_value("IF-10").value(), 1e-5));
    CHECK(layer_area_resistance(7.5e-5, 0.6, 0.0) * 1e4 ==
          near(check_value("IF-11").value(), 1e-9));
    // Chip between air and a board: 1e4 W/m2 leave by 1/h and by contact + layer + 1/h in parallel.
    const double lower = layer_area_resistance(0.008, 239.0, 0.9e-4) + 1.0 / 100.0;
    const double chip = 25.0 + 1e4 / (100.0 + 1.0 / lower);
    CHECK(chip == near(check_value("IF-03").value(), 1e-3));
}
