// View factors against Howell's catalogue and Siegel & Howell; channels against finely zoned
// enclosures.
#include "correlations/radiation.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"

using namespace finwright::correlations;
using finwright::tests::check_value;
using finwright::tests::near;

TEST_CASE(
    "aligned rectangles, RD-01 to RD-08 (Howell C-11), RD-10 (Siegel & Howell 4th ed. p. 843)") {
    for (const char* id : {"RD-01", "RD-02", "RD-03", "RD-04", "RD-05", "RD-07", "RD-08"}) {
        const auto row = check_value(id);
        CHECK(aligned_rectangles(row["a"], row["b"], row["c"]) == near(row.value(), 3e-7));
    }
    CHECK(aligned_rectangles(1.0, 1.5, 0.5) == near(check_value("RD-10").value(), 1e-4));
}

TEST_CASE("perpendicular rectangles, RD-22 to RD-24 (Howell C-14)") {
    for (const char* id : {"RD-22", "RD-23", "RD-24"}) {
        const auto row = check_value(id);
        CHECK(perpendicular_rectangles(row["Z"], row["Y"], row["X"]) == near(row.value(), 3e-7));
    }
}

TEST_CASE("reciprocity and closure") {
    CHECK(2.0 * perpendicular_rectangles(1.0, 2.0, 3.0) ==
          near(1.0 * perpendicular_rectangles(2.0, 1.0, 3.0), 1e-12));
    // Two wide plates close together see nothing else.
    CHECK(aligned_rectangles(1000.0, 1000.0, 1.0) > 0.997);
}

TEST_CASE("channel openings, RD-31, RD-32, RD-34 (exact from view factors)") {
    const double s = 0.01, l = 0.1;
    CHECK(channel_opening(s, 0.03, l) / (s * l) == near(check_value("RD-31").value(), 1e-5));
    CHECK(channel_opening(s, 0.02, l) / (s * l) == near(check_value("RD-32").value(), 1e-5));
    CHECK(channel_opening(s, 0.01, l) / (s * l) == near(check_value("RD-34").value(), 1e-5));
}

TEST_CASE("one-zone channels, RD-51 to RD-55, and how far finely zoned solutions lie below") {
    struct Case {
        const char* base;
        double s, h, l;
    };
    for (const Case& c : {Case{"RD-51", 0.01, 0.03, 0.1}, Case{"RD-53", 0.006, 0.03, 0.1},
                          Case{"RD-55", 0.008, 0.04, 0.15}}) {
        const double wetted = (2.0 * c.h + c.s) * c.l;
        const auto one_zone = [&](double eps) {
            return channel_radiation_conductance(eps, wetted, channel_opening(c.s, c.h, c.l)) /
                   (c.s * c.l);
        };
        const std::string base = c.base;
        CHECK(one_zone(0.9) == near(check_value(base + "-0.9-1").value(), 1e-5));
        CHECK(one_zone(0.8) == near(check_value(base + "-0.8-1").value(), 1e-5));
    }
    // Stated error: within 3 % at eps 0.8, 6 to 14 % high for bare deep channels.
    const auto ratio = [](double eps, const char* fine) {
        const double wetted = (0.08 + 0.008) * 0.15;
        return channel_radiation_conductance(eps, wetted, channel_opening(0.008, 0.04, 0.15)) /
               (0.008 * 0.15) / check_value(fine).value();
    };
    CHECK(ratio(0.8, "RD-55-0.8-f") < 1.03);
    CHECK(ratio(0.1, "RD-55-0.1-f") > 1.06);
    CHECK(ratio(0.1, "RD-55-0.1-f") < 1.14);
}

TEST_CASE("two-dimensional limit of long channels, RD-6 one-zone rows") {
    const double s = 0.01, h = 0.01, l = 100.0; // long: the ends no longer count
    const double wetted = (2.0 * h + s) * l;
    CHECK(channel_radiation_conductance(0.9, wetted, channel_opening(s, h, l)) / (s * l) ==
          near(check_value("RD-6-1-0.9-1").value(), 1e-3));
}

// The library values use sigma of CODATA 2014, 1.3e-6 below today's exact constant.
TEST_CASE("coefficient and emissive power, RD-70, RD-73, RD-74") {
    CHECK(radiation_coefficient(1.0, 350.0, 300.0) == near(check_value("RD-70").value(), 1e-7));
    CHECK(radiated(400.0, 0.0) == near(check_value("RD-73").value(), 2e-6));
    CHECK(0.85 * radiated(400.0, 305.0) == near(check_value("RD-74").value(), 2e-6));
}
