// Published constrained engineering design problems. Acceptance: the published best value within
// 1e-6 relative, called optimal, every constraint kept to 1e-9, derivatives right by finite
// differences, from the middle of the bounds plus twenty random
// starts. The best values are widely published (see each case); the formulas and values were
// written from memory and each value was found again here from every start set, so they confirm
// each other.
#include "optimizer/enumerate.hpp"
#include "optimizer/minimise.hpp"
#include "tests/near.hpp"
#include "tests/optimizer/derivative_check.hpp"
#include "tests/optimizer/formula_problem.hpp"
#include <numbers>

using namespace finwright::optimizer;
using finwright::tests::FormulaProblem;
using finwright::tests::near;
using finwright::tests::Num;
using X = std::span<const Num>;

namespace {

Settings many_starts() {
    Settings settings;
    settings.random_starts = 20;
    settings.evaluations = 2000;
    return settings;
}

void check_best(Problem& problem, double published) {
    finwright::tests::check_derivatives(problem);
    const Outcome outcome = minimise(problem, many_starts());
    CHECK(outcome.verdict == Verdict::optimal);
    CHECK(outcome.worst_violation <= 1e-9);
    CHECK(outcome.objective == near(published, 1e-6));
}

} // namespace

// Nowacki 1974; best 263.895843376 (Ray & Saini 2001 and later).
TEST_CASE("three-bar truss: 263.895843") {
    const double length = 100.0, load = 2.0, stress = 2.0, root2 = std::numbers::sqrt2;
    for (Scale scale : {Scale::linear, Scale::logarithmic}) {
        FormulaProblem truss(
            finwright::tests::box(2, 1e-3, 1.0, scale),
            [=](X x) { return (2.0 * root2 * x[0] + x[1]) * length; },
            {[=](X x) {
                 return (root2 * x[0] + x[1]) / (root2 * x[0] * x[0] + 2.0 * x[0] * x[1]) * load -
                        stress;
             },
             [=](X x) { return x[1] / (root2 * x[0] * x[0] + 2.0 * x[0] * x[1]) * load - stress; },
             [=](X x) { return 1.0 / (root2 * x[1] + x[0]) * load - stress; }});
        check_best(truss, 263.895843376);
    }
}

// Arora 1989, Belegundu 1982; best 0.012665232788.
TEST_CASE("tension/compression spring: 0.0126652328") {
    for (Scale scale : {Scale::linear, Scale::logarithmic}) {
        FormulaProblem spring(
            {{"wire", 0.05, 2.0, scale}, {"coil", 0.25, 1.3, scale}, {"turns", 2.0, 15.0, scale}},
            [](X x) { return (x[2] + 2.0) * x[1] * x[0] * x[0]; },
            {[](X x) { return 1.0 - pow(x[1], 3.0) * x[2] / (71785.0 * pow(x[0], 4.0)); },
             [](X x) {
                 return (4.0 * x[1] * x[1] - x[0] * x[1]) /
                            (12566.0 * (x[1] * pow(x[0], 3.0) - pow(x[0], 4.0))) +
                        1.0 / (5108.0 * x[0] * x[0]) - 1.0;
             },
             [](X x) { return 1.0 - 140.45 * x[0] / (x[1] * x[1] * x[2]); },
             [](X x) { return (x[0] + x[1]) / 1.5 - 1.0; }});
        check_best(spring, 0.012665232788);
    }
}

// Ragsdell & Phillips 1976, Rao; best 1.724852308597 in the form with seven constraints.
TEST_CASE("welded beam: 1.724852309") {
    const double load = 6000.0, length = 14.0, young = 30e6, shear = 12e6, tau = 13600.0,
                 sigma = 30000.0, bend = 0.25;
    const auto shear_stress = [=](X x) {
        const Num direct = load / (std::numbers::sqrt2 * x[0] * x[1]);
        const Num moment = load * (length + 0.5 * x[1]);
        const Num radius = sqrt(x[1] * x[1] / 4.0 + pow((x[0] + x[2]) / 2.0, 2.0));
        const Num polar = 2.0 * (std::numbers::sqrt2 * x[0] * x[1] *
                                 (x[1] * x[1] / 12.0 + pow((x[0] + x[2]) / 2.0, 2.0)));
        const Num twist = moment * radius / polar;
        return sqrt(direct * direct + 2.0 * direct * twist * x[1] / (2.0 * radius) + twist * twist);
    };
    FormulaProblem beam(
        {{"weld", 0.1, 2.0, Scale::logarithmic},
         {"length", 0.1, 10.0, Scale::logarithmic},
         {"height", 0.1, 10.0, Scale::logarithmic},
         {"width", 0.1, 2.0, Scale::logarithmic}},
        [](X x) { return 1.10471 * x[0] * x[0] * x[1] + 0.04811 * x[2] * x[3] * (14.0 + x[1]); },
        {[=](X x) { return shear_stress(x) / tau - 1.0; },
         [=](X x) { return 6.0 * load * length / (x[3] * x[2] * x[2]) / sigma - 1.0; },
         [](X x) { return x[0] - x[3]; },
         [](X x) { return 0.10471 * x[0] * x[0] + 0.04811 * x[2] * x[3] * (14.0 + x[1]) - 5.0; },
         [](X x) { return 0.125 - x[0]; },
         [=](X x) {
             return 4.0 * load * length * length * length / (young * x[3] * pow(x[2], 3.0)) / bend -
                    1.0;
         },
         [=](X x) {
             const Num buckling = 4.013 * young / (length * length) / 6.0 * x[2] * pow(x[3], 3.0) *
                                  (1.0 - x[2] / (2.0 * length) * std::sqrt(young / (4.0 * shear)));
             return 1.0 - buckling / load;
         }});
    check_best(beam, 1.724852308597);
}

// Golinski 1970; best 2994.471066 with 17 teeth (Ray 2003 and later). The teeth are enumerated.
TEST_CASE("speed reducer: 2994.471066 with 17 teeth") {
    const auto make = [](std::span<const int> teeth) -> std::unique_ptr<Problem> {
        const double z = teeth[0];
        return std::make_unique<FormulaProblem>(
            std::vector<Variable>{{"face width", 2.6, 3.6, Scale::logarithmic},
                                  {"module", 0.7, 0.8, Scale::logarithmic},
                                  {"shaft 1", 7.3, 8.3, Scale::logarithmic},
                                  {"shaft 2", 7.3, 8.3, Scale::logarithmic},
                                  {"diameter 1", 2.9, 3.9, Scale::logarithmic},
                                  {"diameter 2", 5.0, 5.5, Scale::logarithmic}},
            [z](X x) {
                return 0.7854 * x[0] * x[1] * x[1] * (3.3333 * z * z + 14.9334 * z - 43.0934) -
                       1.508 * x[0] * (x[4] * x[4] + x[5] * x[5]) +
                       7.4777 * (pow(x[4], 3.0) + pow(x[5], 3.0)) +
                       0.7854 * (x[2] * x[4] * x[4] + x[3] * x[5] * x[5]);
            },
            std::vector<finwright::tests::Formula>{
                [z](X x) { return 27.0 / (x[0] * x[1] * x[1] * z) - 1.0; },
                [z](X x) { return 397.5 / (x[0] * x[1] * x[1] * z * z) - 1.0; },
                [z](X x) { return 1.93 * pow(x[2], 3.0) / (x[1] * z * pow(x[4], 4.0)) - 1.0; },
                [z](X x) { return 1.93 * pow(x[3], 3.0) / (x[1] * z * pow(x[5], 4.0)) - 1.0; },
                [z](X x) {
                    return sqrt(pow(745.0 * x[2] / (x[1] * z), 2.0) + 16.9e6) /
                               (110.0 * pow(x[4], 3.0)) -
                           1.0;
                },
                [z](X x) {
                    return sqrt(pow(745.0 * x[3] / (x[1] * z), 2.0) + 157.5e6) /
                               (85.0 * pow(x[5], 3.0)) -
                           1.0;
                },
                [z](X x) { return x[1] * z / 40.0 - 1.0; },
                [](X x) { return 5.0 * x[1] / x[0] - 1.0; },
                [](X x) { return x[0] / (12.0 * x[1]) - 1.0; },
                [](X x) { return (1.5 * x[4] + 1.9) / x[2] - 1.0; },
                [](X x) { return (1.1 * x[5] + 1.9) / x[3] - 1.0; }});
    };
    const int fewest[] = {17};
    finwright::tests::check_derivatives(*make(fewest));
    const IntegerRange teeth{"teeth", 17, 28};
    const MixedOutcome mixed = enumerate(std::span(&teeth, 1), make, many_starts());
    REQUIRE(mixed.best);
    const Candidate& best = mixed.candidates[*mixed.best];
    CHECK(best.integers[0] == 17);
    CHECK(best.outcome.objective == near(2994.471066, 1e-6));
    CHECK(best.outcome.worst_violation <= 1e-9);
    CHECK(mixed.verdict == Verdict::optimal);
}

// Kannan & Kramer 1994; best 6059.714335 with thicknesses in sixteenths of an inch (13 and 7 of
// them).
TEST_CASE("pressure vessel: 6059.714335 with plates of 13/16 and 7/16 in") {
    const auto make = [](std::span<const int> sixteenths) -> std::unique_ptr<Problem> {
        const double shell = 0.0625 * sixteenths[0], head = 0.0625 * sixteenths[1];
        return std::make_unique<FormulaProblem>(
            std::vector<Variable>{{"radius", 10.0, 200.0, Scale::logarithmic},
                                  {"length", 10.0, 200.0, Scale::logarithmic}},
            [=](X x) {
                return 0.6224 * shell * x[0] * x[1] + 1.7781 * head * x[0] * x[0] +
                       3.1661 * shell * shell * x[1] + 19.84 * shell * shell * x[0];
            },
            std::vector<finwright::tests::Formula>{
                [=](X x) { return 0.0193 * x[0] / shell - 1.0; },
                [=](X x) { return 0.00954 * x[0] / head - 1.0; },
                [](X x) {
                    return 1.0 - (std::numbers::pi * x[0] * x[0] * x[1] +
                                  4.0 / 3.0 * std::numbers::pi * pow(x[0], 3.0)) /
                                     1296000.0;
                },
                [](X x) { return x[1] / 240.0 - 1.0; }});
    };
    const int thirteen_seven[] = {13, 7};
    finwright::tests::check_derivatives(*make(thirteen_seven));
    const std::vector<IntegerRange> plates{{"shell", 10, 22}, {"head", 4, 14}};
    const MixedOutcome mixed = enumerate(plates, make, Settings{});
    REQUIRE(mixed.best);
    const Candidate& best = mixed.candidates[*mixed.best];
    CHECK(best.integers == std::vector<int>{13, 7});
    CHECK(best.outcome.objective == near(6059.714335, 1e-6));
    CHECK(best.outcome.x[0] == near(42.0984456, 1e-6));
    CHECK(best.outcome.x[1] == near(176.6365958, 1e-5));
}
