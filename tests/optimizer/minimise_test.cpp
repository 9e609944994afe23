// What minimise() promises besides finding minima: honest verdicts, whole exceptions, stopping,
// determinism, and exact results from models that are only right at their centre.
#include "optimizer/minimise.hpp"
#include "tests/near.hpp"
#include "tests/optimizer/formula_problem.hpp"
#include <cmath>
#include <stdexcept>

using namespace finwright::optimizer;
using finwright::tests::box;
using finwright::tests::FormulaProblem;
using finwright::tests::near;
using finwright::tests::Num;
using X = std::span<const Num>;

TEST_CASE("an infeasible problem is called infeasible, and least_violation says by how much") {
    FormulaProblem problem(box(2, 0.0, 1.0), [](X x) { return x[0] + x[1]; },
                           {[](X x) { return 3.0 - x[0] - x[1]; }});
    CHECK(minimise(problem, Settings{}).verdict == Verdict::infeasible);
    const Outcome least = least_violation(problem, Settings{});
    CHECK(least.verdict == Verdict::infeasible);
    CHECK(least.objective == near(1.0, 1e-6));
}

TEST_CASE("a feasible corner far from the start is found by way of the least violation") {
    FormulaProblem problem(
        box(2, 0.0, 10.0), [](X x) { return x[0] * x[0] + x[1]; },
        {[](X x) { return 9.99 - x[1]; }, [](X x) { return 9.5 - x[0] + 0.1 * sin(3.0 * x[0]); }});
    const Outcome outcome = minimise(problem, Settings{});
    CHECK(outcome.keeps_limits());
    CHECK(outcome.x[1] == near(9.99, 1e-6));
}

TEST_CASE("a region without numbers is walked around") {
    FormulaProblem problem(box(1, -1.0, 4.0), [](X x) { return sqrt(x[0]) + 1.0 / x[0]; }, {});
    const Outcome outcome = minimise(problem.from({{3.5}}), Settings{});
    CHECK(outcome.x[0] == near(std::pow(2.0, 2.0 / 3.0), 1e-4)); // d/dx = 0 at 2^(2/3)
}

TEST_CASE("std::domain_error marks a point without values: walked around and counted") {
    FormulaProblem problem(box(1, -1.0, 4.0),
                           [](X x) {
                               if (x[0].v < 0.5) throw std::domain_error("below a half");
                               return x[0] * x[0] - x[0] * 2.0;
                           },
                           {});
    const Outcome outcome = minimise(problem.from({{3.9}, {-0.5}}), Settings{});
    CHECK(outcome.keeps_limits());
    CHECK(outcome.x[0] == near(1.0, 1e-4));
    CHECK(outcome.undefined > 0);
    CHECK(outcome.undefined < outcome.evaluations);
}

TEST_CASE("a problem without values anywhere is not called infeasible, nor anything better") {
    const auto nowhere = [](X) -> Num { throw std::domain_error("nowhere"); };
    FormulaProblem free(box(2, 0.0, 1.0), nowhere, {});
    const Outcome outcome = minimise(free, Settings{});
    CHECK(outcome.verdict == Verdict::limit_reached);
    CHECK(outcome.undefined == outcome.evaluations);
    FormulaProblem limited(box(2, 0.0, 1.0), nowhere, {nowhere});
    CHECK(minimise(limited, Settings{}).verdict == Verdict::limit_reached);
}

TEST_CASE("variables and starts that make no sense are refused by name") {
    const auto sum = [](X x) { return x[0]; };
    const auto refused = [&](const Variable& v, const std::vector<double>& start, const char* why) {
        FormulaProblem problem({v}, sum, {});
        CHECK_THROWS_WITH_AS(minimise(problem.from({start}), Settings{}), why,
                             std::invalid_argument);
    };
    refused({"a", 2.0, 1.0}, {1.5}, "a: its bounds are crossed or not finite");
    refused({"b", 0.0, 1.0, Scale::logarithmic}, {0.5},
            "b: on a logarithmic scale its bounds are positive");
    refused({"c", 0.0, 1.0}, {std::nan("")}, "c: a start has no number for it");
    refused({"d", 0.0, 1.0}, {0.5, 0.5}, "a start has one number for each variable");
}

TEST_CASE("a start outside the bounds and a variable that cannot move are fine") {
    for (Scale scale : {Scale::linear, Scale::logarithmic}) {
        FormulaProblem problem({{"free", 1.0, 9.0, scale}, {"held", 2.0, 2.0, scale}},
                               [](X x) { return x[0] * x[1]; },
                               {[](X x) { return 6.0 - x[0] * x[1]; }});
        const Outcome outcome = minimise(problem.from({{50.0, -7.0}}), Settings{});
        CHECK(outcome.verdict == Verdict::optimal);
        CHECK(outcome.x[0] == near(3.0, 1e-8));
        CHECK(outcome.x[1] == 2.0);
    }
}

TEST_CASE("an answer keeps its limits to 1e-9 even where the search may break them by 1e-3") {
    Settings loose;
    loose.constraint_tolerance = 1e-3;
    FormulaProblem problem(box(2, 0.1, 10.0, Scale::logarithmic),
                           [](X x) { return x[0] + 2.0 * x[1]; },
                           {[](X x) { return 4.0 - x[0] * x[1]; }, [](X x) { return x[0] - 2.0; }});
    const Outcome outcome = minimise(problem, loose);
    CHECK(outcome.verdict == Verdict::optimal);
    CHECK(outcome.worst_violation <= 1e-9);
    CHECK(outcome.objective == near(6.0, 1e-6)); // x = (2, 2), by hand
}

TEST_CASE("too few evaluations are said so") {
    Settings few;
    few.evaluations = 2;
    few.repair = false;
    FormulaProblem problem(
        box(2, -5.0, 5.0),
        [](X x) { return 100.0 * pow(x[1] - x[0] * x[0], 2.0) + pow(1.0 - x[0], 2.0); },
        {[](X x) { return 3.0 - x[0] - x[1]; }});
    const Outcome outcome = minimise(problem.from({{-1.2, 1.0}}), few);
    CHECK(outcome.verdict != Verdict::optimal);
    CHECK(outcome.stop == Stop::evaluations);
}

TEST_CASE("an exception in the problem arrives whole") {
    FormulaProblem problem(box(2, 0.0, 1.0),
                           [](X) -> Num { throw std::runtime_error("the furnace is out"); }, {});
    CHECK_THROWS_WITH_AS(minimise(problem, Settings{}), "the furnace is out", std::runtime_error);
}

TEST_CASE("a request to stop and a time limit end the search and say so") {
    FormulaProblem problem(box(2, 0.0, 1.0), [](X x) { return x[0] + x[1]; },
                           {[](X x) { return 0.5 - x[0]; }});
    std::stop_source source;
    source.request_stop();
    Settings asked;
    asked.stop = source.get_token();
    CHECK(minimise(problem, asked).stop == Stop::asked);
    Settings late;
    late.time = std::chrono::duration<double>(-1.0);
    CHECK(minimise(problem, late).stop == Stop::time);
}

TEST_CASE("a time limit holds for the whole call, its search for the least violation included") {
    using Clock = std::chrono::steady_clock;
    FormulaProblem slow(box(3, 0.0, 1.0), [](X x) { return x[0] + x[1] + x[2]; }, {[](X x) {
                            const auto until = Clock::now() + std::chrono::milliseconds(2);
                            while (Clock::now() < until) {
                            }
                            return 9.0 - x[0] * x[1] - sin(20.0 * x[2]);
                        }});
    Settings settings;
    settings.random_starts = 1000;
    settings.time = std::chrono::milliseconds(60);
    const auto begun = Clock::now();
    const Outcome outcome = minimise(slow, settings);
    CHECK(Clock::now() - begun < std::chrono::seconds(1));
    CHECK(outcome.stop == Stop::time);
    CHECK(outcome.verdict == Verdict::limit_reached);
}

TEST_CASE("the same seed gives the same digits") {
    Settings settings;
    settings.random_starts = 7;
    settings.seed = 42;
    const auto run = [&] {
        FormulaProblem problem(box(2, -5.0, 5.0),
                               [](X x) {
                                   return sin(3.0 * x[0]) + sin(4.0 * x[1]) + 0.1 * x[0] * x[0] +
                                          0.1 * x[1] * x[1];
                               },
                               {[](X x) { return x[0] * x[1] - 1.0; }});
        return minimise(problem, settings);
    };
    const Outcome a = run(), b = run();
    CHECK(a.x == b.x);
    CHECK(a.objective == b.objective);
}

TEST_CASE("no variables: the one point is judged") {
    FormulaProblem good({}, [](X) { return Num(3.0); }, {[](X) { return Num(-1.0); }});
    CHECK(minimise(good, Settings{}).keeps_limits());
    FormulaProblem bad({}, [](X) { return Num(3.0); }, {[](X) { return Num(0.5); }});
    CHECK(minimise(bad, Settings{}).verdict == Verdict::infeasible);
}

namespace {

/// min x + y with 1/x + exp(-y) + 0.2 sin(x y) <= 1, where evaluate() knows the last term only to
/// first order about a centre.
class Centred final : public Problem {
public:
    const std::vector<Variable>& variables() const override { return variables_; }
    std::size_t constraint_count() const override { return 1; }

    void evaluate(std::span<const double> x, Evaluation& out) override {
        const double wave = 0.2 * std::sin(a_ * b_), slope = 0.2 * std::cos(a_ * b_);
        out.objective = x[0] + x[1];
        out.gradient = {1.0, 1.0};
        out.constraints = {1.0 / x[0] + std::exp(-x[1]) + wave +
                           slope * (b_ * (x[0] - a_) + a_ * (x[1] - b_)) - 1.0};
        out.jacobian = {-1.0 / (x[0] * x[0]) + slope * b_, -std::exp(-x[1]) + slope * a_};
    }
    void judge(std::span<const double> x, double& objective,
               std::span<double> constraints) override {
        objective = x[0] + x[1];
        constraints[0] = 1.0 / x[0] + std::exp(-x[1]) + 0.2 * std::sin(x[0] * x[1]) - 1.0;
    }
    bool recentre(std::span<const double> x) override {
        const bool moved = std::abs(x[0] - a_) + std::abs(x[1] - b_) > 1e-9;
        a_ = x[0];
        b_ = x[1];
        return moved;
    }

private:
    std::vector<Variable> variables_{{"x", 0.5, 5.0}, {"y", 0.1, 5.0}};
    double a_ = 1.0, b_ = 1.0;
};

} // namespace

TEST_CASE("re-centring leads a first-order model to the exact solution") {
    Centred centred;
    Settings settings;
    settings.recentres = 30;
    const Outcome outcome = minimise(centred, settings);
    FormulaProblem exact(
        {{"x", 0.5, 5.0}, {"y", 0.1, 5.0}}, [](X x) { return x[0] + x[1]; }, {[](X x) {
            return 1.0 / x[0] + chain(x[1], std::exp(-x[1].v), -std::exp(-x[1].v)) +
                   0.2 * sin(x[0] * x[1]) - 1.0;
        }});
    exact.from({outcome.x});
    const Outcome direct = minimise(exact, Settings{});
    CHECK(outcome.keeps_limits());
    CHECK(outcome.objective == near(direct.objective, 1e-7));
}
