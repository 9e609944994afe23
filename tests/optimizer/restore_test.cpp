// Feasibility restoration and the non-negative least squares beneath it, against cases worked by
// hand.
#include "optimizer/non_negative_least_squares.hpp"
#include "optimizer/restore.hpp"
#include "tests/near.hpp"
#include "tests/optimizer/formula_problem.hpp"

using namespace finwright::optimizer;
using finwright::tests::box;
using finwright::tests::FormulaProblem;
using finwright::tests::near;
using finwright::tests::Num;
using X = std::span<const Num>;

TEST_CASE("non-negative least squares: free where the answer is positive, held at zero elsewhere") {
    // Columns (1, 0) and (1, 1), b = (3, 1): y = (2, 1) exactly.
    const auto free =
        non_negative_least_squares(std::vector{1.0, 0.0, 1.0, 1.0}, std::vector{3.0, 1.0});
    CHECK(free[0] == near(2.0, 1e-12));
    CHECK(free[1] == near(1.0, 1e-12));
    // b = (1, 3) would need y = (-2, 3); held at (0, 2), the projection on (1, 1).
    const auto held =
        non_negative_least_squares(std::vector{1.0, 0.0, 1.0, 1.0}, std::vector{1.0, 3.0});
    CHECK(held[0] == 0.0);
    CHECK(held[1] == near(2.0, 1e-12));
    CHECK(non_negative_least_squares(std::vector{-1.0, -1.0}, std::vector{1.0, 1.0}) ==
          std::vector{0.0});
}

namespace {

Judged restored_from(FormulaProblem& problem, const std::vector<double>& x) {
    const Settings settings;
    Effort effort(settings);
    return restored(problem, exactly(problem, by_model(problem, x, effort)), settings, effort);
}

} // namespace

TEST_CASE("restoration takes the shortest way onto a plane, and turns along a bound") {
    FormulaProblem plane(box(2, 0.0, 1.0), [](X x) { return x[0]; },
                         {[](X x) { return 1.0 - x[0] - x[1]; }});
    const Judged middle = restored_from(plane, {0.3, 0.5});
    CHECK(middle.violation == 0.0);
    CHECK(middle.x[0] == near(0.4, 1e-8));
    CHECK(middle.x[1] == near(0.6, 1e-8));

    FormulaProblem steep(box(2, 0.0, 1.0), [](X x) { return x[0]; },
                         {[](X x) { return 1.5 - x[0] - x[1]; }});
    const Judged corner = restored_from(steep, {0.1, 0.95});
    CHECK(corner.violation <= 1e-9);
    CHECK(corner.x[0] == near(0.5, 1e-8));
    CHECK(corner.x[1] == near(1.0, 1e-8));
}

TEST_CASE("restoration leaves alone what is feasible, and what it cannot help is no worse") {
    FormulaProblem kept(box(1, 0.0, 1.0), [](X x) { return x[0]; },
                        {[](X x) { return x[0] - 0.5; }});
    CHECK(restored_from(kept, {0.2}).x[0] == 0.2);
    FormulaProblem hopeless(box(1, 0.0, 1.0), [](X x) { return x[0]; },
                            {[](X x) { return 3.0 - x[0]; }});
    CHECK(restored_from(hopeless, {0.2}).violation <= 2.8);
}
