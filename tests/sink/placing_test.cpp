// Pads on the base: where they stand and when they fit.
#include "src/sink/placing.hpp"
#include "tests/near.hpp"

using namespace finwright;
using tests::near;

namespace {

job::Part pad(double across, double along) {
    job::Part part;
    part.pad_across = across;
    part.pad_along = along;
    return part;
}

} // namespace

TEST_CASE("parts without a place stand in a row by pad width") {
    const std::vector<job::Part> parts{pad(10e-3, 20e-3), pad(30e-3, 20e-3)};
    const auto pads = sink::pads_on_base(parts, 0.1, 0.2);
    CHECK(pads[0].x == near(0.0125, 1e-12)); // the first quarter of the width
    CHECK(pads[1].x == near(0.0625, 1e-12)); // the other three
    CHECK(pads[0].y == near(0.1, 1e-12));
    CHECK_FALSE(sink::overlap_on(parts, 0.04, 0.2)); // pads add up to the width
    CHECK(sink::overlap_on(parts, 0.039, 0.2));
}

TEST_CASE("the smallest base holds every pad whole") {
    auto corner = pad(10e-3, 20e-3);
    corner.across = job::Coordinate{60e-3, false};
    corner.along = job::Coordinate{0.25, true};
    const auto base = sink::smallest_base({corner});
    CHECK(base.width == near(65e-3, 1e-12));
    CHECK(base.length == near(40e-3, 1e-12)); // 10 mm is a quarter of it
}
