// Whole worked examples of textbooks, with the books' own property values, and sums from common
// practice.
#include "correlations/fin.hpp"
#include "correlations/interface.hpp"
#include "correlations/natural_channel.hpp"
#include "correlations/natural_face.hpp"
#include "tests/near.hpp"

using namespace finwright::correlations;
using finwright::tests::near;

// Cengel & Ghajar, Heat and Mass Transfer 5e, example 9-2: a 0.6 m square plate at 90 degC in 30
// degC air.
TEST_CASE("Cengel & Ghajar 5e, example 9-2: one plate, three positions") {
    const double nu = 1.896e-5, pr = 0.7202, side = 0.6;
    const auto ra = [&](double l) { return 9.81 / 333.0 * 60.0 * l * l * l * pr / (nu * nu); };
    CHECK(nusselt_vertical(ra(side), pr) == near(113.3, 2e-3)); // the book uses the form for all Ra
    const double lc = side / 4.0;                               // area/perimeter
    CHECK(nusselt_facing_up_laminar_textbook(ra(lc)) == near(31.75, 1e-3));
    CHECK(nusselt_facing_down_textbook(ra(lc)) == near(15.87, 1e-3));
}

// Cengel & Ghajar 5e, example 9-3: W 120, L 180, H 24, t 1 mm, 80 degC fins in 30 degC air.
TEST_CASE("Cengel & Ghajar 5e, example 9-3: optimum spacing 7.45 mm, h 4.863, 29.4 W for 14 fins") {
    const double k = 0.02772, pr = 0.7215, nu = 1.847e-5, beta = 1.0 / 328.0, l = 0.18;
    const double ra = 9.81 * beta * 50.0 * l * l * l * pr / (nu * nu);
    const double gap = optimum_gap_thin_fins(l, ra);
    CHECK(gap == near(7.45e-3, 1e-3));
    const double el = ra * std::pow(gap / l, 4.0);
    CHECK(nusselt_parallel_plates(el) == near(1.307, 1e-3));
    const double h = 1.307 * k / gap;
    CHECK(h == near(4.863, 1e-3));
    CHECK(std::floor(0.12 / (gap + 1e-3)) == 14.0);
    CHECK(h * 2.0 * 14.0 * l * 0.024 * 50.0 == near(29.4, 2e-3));
}

// Cengel & Ghajar 5e, example 9-7.
TEST_CASE("Cengel & Ghajar 5e, example 9-7: mixed convection 49.8 and 29.8") {
    CHECK(mixed_assisting(42.14, 36.46) == near(49.8, 1e-3));
    CHECK(mixed_opposing(42.14, 36.46) == near(29.8, 2e-3));
}

// Incropera, Fundamentals of Heat and Mass Transfer, problem 3.144: chip, solder, base and 11 fins.
TEST_CASE("Incropera problem 3.144: 31.8 W") {
    const double w = 0.02, t = 0.182e-3, height = 0.015, k = 180.0, h = 100.0;
    const double corrected = height + 0.5 * t;
    const double m = std::sqrt(2.0 * h / (k * t));
    const double eta = fin_efficiency(m * corrected);
    const double fins = 11.0 * 2.0 * w * corrected, bare = w * (w - 11.0 * t);
    const double resistance =
        resistance_over_area(2e-6, w * w) + 0.003 / (k * w * w) + 1.0 / (h * (eta * fins + bare));
    CHECK(65.0 / resistance == near(31.8, 5e-3));
}

// Cengel & Ghajar 5e, circuit board with 20 copper fins: base 39.5 degC, fin efficiency 0.985.
TEST_CASE("Cengel & Ghajar board: efficiency 0.985, base 39.5 degC") {
    const double h = 45.0, k = 386.0, t = 0.002, height = 0.02, l = 0.15;
    const double m = straight_fin_parameter(2.0 * h, k, t, l);
    CHECK(fin_efficiency(m * height) == near(0.985, 1e-3));
    const double perimeter = 2.0 * (l + t), corrected = height + 0.5 * t;
    const double fins = 20.0 * perimeter * corrected * fin_efficiency(m * corrected);
    const double bare = 0.1 * l - 20.0 * l * t;
    CHECK(37.0 + 15.0 / (h * (fins + bare)) == near(39.5, 2e-3));
}

// Common practice, no source.
TEST_CASE("common practice: a film pad of 1.13 degC in2/W under 0.12 and 0.24 in2") {
    const double pad = 1.13 * square_inch;
    CHECK(resistance_over_area(pad, 0.12 * square_inch) == near(9.4, 3e-3));
    CHECK(resistance_over_area(pad, 0.24 * square_inch) == near(4.7, 3e-3));
    CHECK(1.0 * square_inch * 1e4 == near(6.4516, 1e-12)); // 1 degC in2/W = 6.4516 K cm2/W
}

// Common practice, no source: a part derating at 2 W/degC up to 175 degC has 0.5 degC/W junction to
// case.
TEST_CASE("common practice: what a part sheds through a chain of resistances") {
    const auto power = [](double sink) { return (175.0 - 25.0) / (0.5 + 0.5 + sink); };
    CHECK(power(1.0) == near(75.0, 1e-12));
    CHECK(power(3.5) == near(33.0, 2e-2));
    CHECK(25.0 + power(3.5) * 3.5 == near(140.0, 2e-2)); // the sink
    CHECK(25.0 + 2.0 * 62.5 == near(150.0, 1e-12));      // 2 W through 62.5 degC/W
    CHECK(60.0 / 4.0 == near(15.0, 1e-12));
    CHECK(rated_junction_to_case(448.15, 300.0) ==
          near(0.5, 1e-12)); // 300 W at 25 degC case, 175 degC
}
