// Problems of Hock & Schittkowski, Test Examples for Nonlinear Programming Codes (1981), by their
// number, from the book's starting point and from random ones. Functions and best values from
// memory; each value was found again here. Variables the book leaves unbounded have wide bounds
// here, none of which binds. Acceptance: the book's value within 1e-6 relative, called optimal,
// every constraint kept to 1e-9, derivatives right by finite differences.
#include "optimizer/minimise.hpp"
#include "tests/near.hpp"
#include "tests/optimizer/derivative_check.hpp"
#include "tests/optimizer/formula_problem.hpp"

using namespace finwright::optimizer;
using finwright::tests::box;
using finwright::tests::FormulaProblem;
using finwright::tests::near;
using finwright::tests::Num;
using X = std::span<const Num>;

namespace {

Num square(const Num& a) {
    return a * a;
}

void check_from(FormulaProblem problem, const std::vector<double>& start, double published) {
    finwright::tests::check_derivatives(problem);
    Settings settings;
    for (int random : {0, 5}) {
        settings.random_starts = random;
        const Outcome outcome = minimise(problem.from({start}), settings);
        CHECK(outcome.verdict == Verdict::optimal);
        CHECK(outcome.worst_violation <= 1e-9);
        CHECK(outcome.objective == near(published, 1e-6));
    }
}

} // namespace

TEST_CASE("HS 35: 1/9") {
    check_from({box(3, 0.0, 10.0),
                [](X x) {
                    return 9.0 - 8.0 * x[0] - 6.0 * x[1] - 4.0 * x[2] + 2.0 * square(x[0]) +
                           2.0 * square(x[1]) + square(x[2]) + 2.0 * x[0] * x[1] +
                           2.0 * x[0] * x[2];
                },
                {[](X x) { return x[0] + x[1] + 2.0 * x[2] - 3.0; }}},
               {0.5, 0.5, 0.5}, 1.0 / 9.0);
}

TEST_CASE("HS 43 (Rosen & Suzuki): -44") {
    check_from({box(4, -10.0, 10.0),
                [](X x) {
                    return square(x[0]) + square(x[1]) + 2.0 * square(x[2]) + square(x[3]) -
                           5.0 * x[0] - 5.0 * x[1] - 21.0 * x[2] + 7.0 * x[3];
                },
                {[](X x) {
                     return square(x[0]) + square(x[1]) + square(x[2]) + square(x[3]) + x[0] -
                            x[1] + x[2] - x[3] - 8.0;
                 },
                 [](X x) {
                     return square(x[0]) + 2.0 * square(x[1]) + square(x[2]) + 2.0 * square(x[3]) -
                            x[0] - x[3] - 10.0;
                 },
                 [](X x) {
                     return 2.0 * square(x[0]) + square(x[1]) + square(x[2]) + 2.0 * x[0] - x[1] -
                            x[3] - 5.0;
                 }}},
               {0.0, 0.0, 0.0, 0.0}, -44.0);
}

TEST_CASE("HS 65: 0.9535288567") {
    check_from({{{"x1", -4.5, 4.5}, {"x2", -4.5, 4.5}, {"x3", -5.0, 5.0}},
                [](X x) {
                    return square(x[0] - x[1]) + square(x[0] + x[1] - 10.0) / 9.0 +
                           square(x[2] - 5.0);
                },
                {[](X x) { return square(x[0]) + square(x[1]) + square(x[2]) - 48.0; }}},
               {-5.0, 5.0, 0.0}, 0.9535288567);
}

TEST_CASE("HS 76: -4.681818181") {
    check_from({box(4, 0.0, 10.0),
                [](X x) {
                    return square(x[0]) + 0.5 * square(x[1]) + square(x[2]) + 0.5 * square(x[3]) -
                           x[0] * x[2] + x[2] * x[3] - x[0] - 3.0 * x[1] + x[2] - x[3];
                },
                {[](X x) { return x[0] + 2.0 * x[1] + x[2] + x[3] - 5.0; },
                 [](X x) { return 3.0 * x[0] + x[1] + 2.0 * x[2] - x[3] - 4.0; },
                 [](X x) { return 1.5 - x[1] - 4.0 * x[2]; }}},
               {0.5, 0.5, 0.5, 0.5}, -4.681818181);
}

TEST_CASE("HS 100: 680.6300573") {
    check_from(
        {box(7, -10.0, 10.0),
         [](X x) {
             return square(x[0] - 10.0) + 5.0 * square(x[1] - 12.0) + pow(x[2], 4.0) +
                    3.0 * square(x[3] - 11.0) + 10.0 * pow(x[4], 6.0) + 7.0 * square(x[5]) +
                    pow(x[6], 4.0) - 4.0 * x[5] * x[6] - 10.0 * x[5] - 8.0 * x[6];
         },
         {[](X x) {
              return 2.0 * square(x[0]) + 3.0 * pow(x[1], 4.0) + x[2] + 4.0 * square(x[3]) +
                     5.0 * x[4] - 127.0;
          },
          [](X x) { return 7.0 * x[0] + 3.0 * x[1] + 10.0 * square(x[2]) + x[3] - x[4] - 282.0; },
          [](X x) { return 23.0 * x[0] + square(x[1]) + 6.0 * square(x[5]) - 8.0 * x[6] - 196.0; },
          [](X x) {
              return 4.0 * square(x[0]) + square(x[1]) - 3.0 * x[0] * x[1] + 2.0 * square(x[2]) +
                     5.0 * x[5] - 11.0 * x[6];
          }}},
        {1.0, 2.0, 0.0, 4.0, 0.0, 1.0, 1.0}, 680.6300573);
}

TEST_CASE("HS 29: -22.627417") {
    check_from({box(3, -10.0, 10.0), [](X x) { return -(x[0] * x[1] * x[2]); }, {[](X x) {
                    return square(x[0]) + 2.0 * square(x[1]) + 4.0 * square(x[2]) - 48.0;
                }}},
               {1.0, 1.0, 1.0}, -16.0 * std::sqrt(2.0));
}

TEST_CASE("HS 30: 1") {
    check_from({{{"x1", 1.0, 10.0}, {"x2", -10.0, 10.0}, {"x3", -10.0, 10.0}},
                [](X x) { return square(x[0]) + square(x[1]) + square(x[2]); },
                {[](X x) { return 1.0 - square(x[0]) - square(x[1]); }}},
               {1.0, 1.0, 1.0}, 1.0);
}

TEST_CASE("HS 12: -30") {
    check_from({box(2, -10.0, 10.0),
                [](X x) {
                    return 0.5 * square(x[0]) + square(x[1]) - x[0] * x[1] - 7.0 * x[0] -
                           7.0 * x[1];
                },
                {[](X x) { return 4.0 * square(x[0]) + square(x[1]) - 25.0; }}},
               {0.0, 0.0}, -30.0);
}

// The book's variables are only >= 0; 0.5 to 20 here.
TEST_CASE("HS 93 (transformer design): 135.075961") {
    check_from({box(6, 0.5, 20.0),
                [](X x) {
                    return 0.0204 * x[0] * x[3] * (x[0] + x[1] + x[2]) +
                           0.0187 * x[1] * x[2] * (x[0] + 1.57 * x[1] + x[3]) +
                           0.0607 * x[0] * x[3] * square(x[4]) * (x[0] + x[1] + x[2]) +
                           0.0437 * x[1] * x[2] * square(x[5]) * (x[0] + 1.57 * x[1] + x[3]);
                },
                {[](X x) { return 2.07 - 1e-3 * x[0] * x[1] * x[2] * x[3] * x[4] * x[5]; },
                 [](X x) {
                     return 0.00062 * x[0] * x[3] * square(x[4]) * (x[0] + x[1] + x[2]) +
                            0.00058 * x[1] * x[2] * square(x[5]) * (x[0] + 1.57 * x[1] + x[3]) -
                            1.0;
                 }}},
               {5.54, 4.4, 12.02, 11.82, 0.702, 0.852}, 135.075961);
}

TEST_CASE("HS 113 (Wong 2): 24.3062091") {
    check_from(
        {box(10, -10.0, 10.0),
         [](X x) {
             return square(x[0]) + square(x[1]) + x[0] * x[1] - 14.0 * x[0] - 16.0 * x[1] +
                    square(x[2] - 10.0) + 4.0 * square(x[3] - 5.0) + square(x[4] - 3.0) +
                    2.0 * square(x[5] - 1.0) + 5.0 * square(x[6]) + 7.0 * square(x[7] - 11.0) +
                    2.0 * square(x[8] - 10.0) + square(x[9] - 7.0) + 45.0;
         },
         {[](X x) { return 4.0 * x[0] + 5.0 * x[1] - 3.0 * x[6] + 9.0 * x[7] - 105.0; },
          [](X x) { return 10.0 * x[0] - 8.0 * x[1] - 17.0 * x[6] + 2.0 * x[7]; },
          [](X x) { return -8.0 * x[0] + 2.0 * x[1] + 5.0 * x[8] - 2.0 * x[9] - 12.0; },
          [](X x) {
              return 3.0 * square(x[0] - 2.0) + 4.0 * square(x[1] - 3.0) + 2.0 * square(x[2]) -
                     7.0 * x[3] - 120.0;
          },
          [](X x) {
              return 5.0 * square(x[0]) + 8.0 * x[1] + square(x[2] - 6.0) - 2.0 * x[3] - 40.0;
          },
          [](X x) {
              return 0.5 * square(x[0] - 8.0) + 2.0 * square(x[1] - 4.0) + 3.0 * square(x[4]) -
                     x[5] - 30.0;
          },
          [](X x) {
              return square(x[0]) + 2.0 * square(x[1] - 2.0) - 2.0 * x[0] * x[1] + 14.0 * x[4] -
                     6.0 * x[5];
          },
          [](X x) { return -3.0 * x[0] + 6.0 * x[1] + 12.0 * square(x[8] - 8.0) - 7.0 * x[9]; }}},
        {2.0, 3.0, 5.0, 5.0, 1.0, 2.0, 7.0, 3.0, 6.0, 10.0}, 24.3062091);
}

// The book's equality sum of squares = 40; only this side of it binds.
TEST_CASE("HS 71: 17.0140173") {
    check_from(
        {box(4, 1.0, 5.0),
         [](X x) { return x[0] * x[3] * (x[0] + x[1] + x[2]) + x[2]; },
         {[](X x) { return 25.0 - x[0] * x[1] * x[2] * x[3]; },
          [](X x) { return square(x[0]) + square(x[1]) + square(x[2]) + square(x[3]) - 40.0; }}},
        {1.0, 5.0, 5.0, 1.0}, 17.0140173);
}
