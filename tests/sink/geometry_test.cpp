// What follows from dimensions alone, against hand arithmetic.
#include "src/sink/geometry.hpp"
#include "tests/near.hpp"

using finwright::tests::near;
using Geometry = finwright::sink::Geometry<double>;

TEST_CASE("a straight section adds up") {
    const Geometry g{5, 20e-3, 2e-3, 8e-3, 4e-3, 100e-3, 0.0};
    CHECK(g.width() == near(42e-3, 1e-12));          // 5 x 2 + 4 x 8 mm
    CHECK(g.overall_height() == near(24e-3, 1e-12)); // 4 + 20 mm
    CHECK(g.section() == near(368e-6, 1e-12));       // 42 x 4 + 5 x 2 x 20 mm2
    CHECK(g.metal() == near(36.8e-6, 1e-12));        // over 100 mm
}

TEST_CASE("a draft thins the tip, widens the gap and keeps the pitch") {
    const Geometry g{5, 20e-3, 2e-3, 8e-3, 4e-3, 100e-3, 0.01};
    CHECK(g.tip_thickness() == near(1.6e-3, 1e-12)); // 2 - 2 x 0.01 x 20 mm
    CHECK(g.mean_thickness() == near(1.8e-3, 1e-12));
    CHECK(g.mean_gap() == near(8.2e-3, 1e-12));
    CHECK(g.pitch() == near(10e-3, 1e-12));
    CHECK(g.section() == near((42e-3 * 4e-3 + 5 * 1.8e-3 * 20e-3), 1e-12));
}

TEST_CASE("gap and width are each other's inverse") {
    const Geometry g{7, 20e-3, 1.3e-3, 5.7e-3, 4e-3, 100e-3, 0.0};
    CHECK(finwright::sink::gap_for_width(7, g.width(), g.thickness) == near(5.7e-3, 1e-12));
}
