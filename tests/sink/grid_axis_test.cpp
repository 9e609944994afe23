// The grid keeps the promises of its header.
#include "src/sink/grid_axis.hpp"
#include "tests/near.hpp"
#include <numeric>

using namespace finwright;
using sink::Focus;
using sink::GridAxis;
using tests::near;

namespace {

bool has_line(const GridAxis& axis, double place) {
    for (double line : axis.lines())
        if (std::abs(line - place) < 1e-12) return true;
    return false;
}

} // namespace

TEST_CASE("grid axis: nothing to see gives equal cells") {
    const GridAxis axis(0.3, {}, {60, 16});
    CHECK(axis.cells() == 60);
    for (int i = 0; i < axis.cells(); ++i)
        CHECK(axis.width(i) == near(0.005, 1e-9));
}

TEST_CASE("grid axis: lines on a pad's edges, cells as fine as promised") {
    const std::vector<Focus> edges{{0.05, 0.008}, {0.058, 0.008}};
    const GridAxis axis(0.2, edges, {60, 16});
    CHECK(axis.lines().front() == 0.0);
    CHECK(axis.lines().back() == 0.2);
    CHECK(has_line(axis, 0.05));
    CHECK(has_line(axis, 0.058));
    CHECK(axis.cells() >= 60);
    for (int i = 0; i < axis.cells(); ++i) {
        CHECK(axis.width(i) > 0.0);
        CHECK(axis.width(i) < 0.2 / 60 * (1.0 + 1e-9));
        for (const Focus& edge : edges) {
            // The farther end of a cell is where the widest is allowed.
            const double farther = std::abs(axis.centre(i) - edge.place) + 0.5 * axis.width(i);
            CHECK(axis.width(i) < (edge.size + 2.0 * farther) / 16.0);
        }
    }
}

TEST_CASE("grid axis: edges that all but touch share a line, no sliver between") {
    const GridAxis axis(0.1, {{0.04, 0.02}, {0.040001, 0.02}, {0.0999999, 0.02}}, {20, 16});
    CHECK(has_line(axis, 0.04));
    CHECK_FALSE(has_line(axis, 0.040001));
    for (int i = 0; i < axis.cells(); ++i)
        CHECK(axis.width(i) > 1e-4);
}

TEST_CASE("grid axis: shares of a stretch add up to one wherever its ends fall") {
    const GridAxis axis(0.1, {{0.04, 0.02}}, {20, 16});
    for (const sink::Stretch stretch :
         {sink::Stretch{0.0, 0.1}, {0.0312, 0.0313}, {0.0171, 0.0899}}) {
        const auto shares = axis.shares(stretch);
        CHECK(std::accumulate(shares.begin(), shares.end(), 0.0) == near(1.0, 1e-12));
        double middle = 0.0;
        for (int i = 0; i < axis.cells(); ++i)
            middle += shares[std::size_t(i)] * axis.centre(i);
        CHECK(std::abs(middle - stretch.middle()) < 0.005);
    }
}
