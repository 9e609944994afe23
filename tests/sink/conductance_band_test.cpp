// Band elimination: against multiplication, and on chains whose answer is known (Ohm's law).
#include "src/sink/conductance_band.hpp"
#include "tests/near.hpp"
#include "tests/sink/random_sinks.hpp"

using namespace finwright;
using sink::ConductanceBand;
using tests::near;
using tests::RandomSinks;

TEST_CASE("conductance band: the solution put back gives the right side") {
    RandomSinks random(21);
    const int rows = 40, half_width = 5;
    ConductanceBand band(rows, half_width);
    std::vector<std::vector<double>> dense(rows, std::vector<double>(rows, 0.0));
    std::vector<double> right;
    for (int i = 0; i < rows; ++i) {
        const double ground = random.log_between(1e-3, 1.0);
        band.ground(i, ground);
        dense[std::size_t(i)][std::size_t(i)] += ground;
        for (int j = std::max(0, i - half_width); j <= std::min(rows - 1, i + half_width); ++j) {
            if (j == i) continue;
            const double tie = random.log_between(1e-3, 1e3); // not symmetric
            band.tie(i, j, tie);
            dense[std::size_t(i)][std::size_t(i)] += tie;
            dense[std::size_t(i)][std::size_t(j)] -= tie;
        }
        right.push_back(random.between(1.0, 2.0));
    }
    const auto solution = std::move(band).solve(right);
    for (int i = 0; i < rows; ++i) {
        double sum = 0.0;
        for (int j = 0; j < rows; ++j)
            sum += dense[std::size_t(i)][std::size_t(j)] * solution[std::size_t(j)];
        CHECK(sum == near(right[std::size_t(i)], 1e-6)); // the largest terms are 1e6 times larger
    }
}

TEST_CASE("conductance band: a ground 1e-16 of the ties keeps its digits (Grassmann et al. 1985)") {
    const int rows = 50;
    ConductanceBand band(rows, 2);
    for (int i = 0; i + 1 < rows; ++i) {
        band.tie(i, i + 1, 1e8);
        band.tie(i + 1, i, 1e8);
    }
    band.ground(rows - 1, 1e-8);
    std::vector<double> right(rows, 0.0);
    right[0] = 1.0;
    // All of it passes every link: Ohm's law.
    CHECK(std::move(band).solve(right)[0] == near(1e8 + (rows - 1) * 1e-8, 1e-13));
}
