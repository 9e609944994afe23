// Integers by enumeration: the best of all, candidates kept, any number of threads the same.
#include "optimizer/enumerate.hpp"
#include "tests/near.hpp"
#include "tests/optimizer/formula_problem.hpp"
#include <stdexcept>

using namespace finwright::optimizer;
using finwright::tests::FormulaProblem;
using finwright::tests::Num;
using X = std::span<const Num>;

namespace {

/// min (x - 0.3 n)^2 + (n - 7.4)^2/10 with x >= n/4; n = 13 is impossible.
std::unique_ptr<Problem> made(std::span<const int> n) {
    if (n[0] == 13) return nullptr;
    const double k = n[0];
    return std::make_unique<FormulaProblem>(
        std::vector<Variable>{{"x", 0.01, 10.0, Scale::logarithmic}},
        [k](X x) { return (x[0] - 0.3 * k) * (x[0] - 0.3 * k) + (k - 7.4) * (k - 7.4) / 10.0; },
        std::vector<finwright::tests::Formula>{[k](X x) { return 0.25 * k - x[0]; }});
}

} // namespace

TEST_CASE("every combination is kept, impossible ones left out, and the best is found") {
    const IntegerRange range{"n", 1, 20};
    const auto mixed = enumerate(std::span(&range, 1), made, Settings{});
    CHECK(mixed.candidates.size() == 19);
    REQUIRE(mixed.best);
    CHECK(mixed.candidates[*mixed.best].integers[0] == 7);
    CHECK(mixed.verdict == Verdict::optimal);
}

TEST_CASE("one, two and three threads give the same digits") {
    const std::vector<IntegerRange> ranges{{"n", 1, 12}, {"m", 1, 3}};
    const auto run = [&](int threads) {
        const auto mixed = enumerate(
            ranges, [](std::span<const int> n) { return made(n.first(1)); }, Settings{}, threads);
        std::vector<double> all;
        for (const auto& c : mixed.candidates)
            all.insert(all.end(), c.outcome.x.begin(), c.outcome.x.end());
        return all;
    };
    const auto one = run(1);
    CHECK(one == run(2));
    CHECK(one == run(3));
}

TEST_CASE("an exception in any thread arrives whole") {
    const IntegerRange range{"n", 1, 20};
    const auto failing = [](std::span<const int> n) -> std::unique_ptr<Problem> {
        if (n[0] != 11) return made(n);
        return std::make_unique<FormulaProblem>(
            std::vector<Variable>{{"x", 0.0, 1.0}},
            [](X) -> Num { throw std::runtime_error("eleven is broken"); },
            std::vector<finwright::tests::Formula>{});
    };
    CHECK_THROWS_WITH(enumerate(std::span(&range, 1), failing, Settings{}, 2), "eleven is broken");
}

namespace {

/// (x - 2)^2 (x - 6)^2/16 + x/8: two valleys, the one at 2 deeper. From above the hill between them
/// only the shallow one is found; all start there, and only n = m = 4 from below as well.
std::unique_ptr<Problem> two_valleys(std::span<const int> n) {
    const double shift = 0.01 * (n[0] - 2) * (n[0] - 2) + 0.01 * (n[1] - 2) * (n[1] - 2);
    auto problem = std::make_unique<FormulaProblem>(
        std::vector<Variable>{{"x", 0.5, 8.0}},
        [shift](X x) {
            return (x[0] - 2.0) * (x[0] - 2.0) * (x[0] - 6.0) * (x[0] - 6.0) / 16.0 + x[0] / 8.0 +
                   shift;
        },
        std::vector<finwright::tests::Formula>{});
    if (n[0] == 4 && n[1] == 4)
        problem->from({{7.0}, {1.5}});
    else
        problem->from({{7.0}});
    return problem;
}

} // namespace

TEST_CASE("a better valley found at one combination spreads to its neighbours and on to the best") {
    const std::vector<IntegerRange> ranges{{"n", 1, 5}, {"m", 1, 5}};
    const auto mixed = enumerate(ranges, two_valleys, Settings{});
    REQUIRE(mixed.best);
    CHECK(mixed.candidates[*mixed.best].integers == std::vector<int>{2, 2});
    CHECK(mixed.candidates[*mixed.best].outcome.x[0] < 3.0);
}

TEST_CASE("an enumeration cut short never claims the best") {
    const IntegerRange range{"n", 1, 20};
    std::stop_source source;
    source.request_stop();
    Settings asked;
    asked.stop = source.get_token();
    CHECK(enumerate(std::span(&range, 1), made, asked).verdict != Verdict::optimal);
    Settings late;
    late.time = std::chrono::duration<double>(-1.0);
    CHECK(enumerate(std::span(&range, 1), made, late).verdict != Verdict::optimal);
}

TEST_CASE("where every combination is infeasible the verdict says so") {
    const IntegerRange range{"n", 41, 45}; // x >= n/4 lies above its bound of 10
    const auto mixed = enumerate(std::span(&range, 1), made, Settings{});
    CHECK_FALSE(mixed.best);
    CHECK(mixed.verdict == Verdict::infeasible);
}
