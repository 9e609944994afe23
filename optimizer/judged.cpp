#include "optimizer/judged.hpp"

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace finwright::optimizer {

namespace {

bool all_finite(const std::vector<double>& values) {
    return std::all_of(values.begin(), values.end(), [](double v) { return std::isfinite(v); });
}

void make_undefined(Judged& j, const Problem& problem) {
    const std::size_t n = problem.variables().size(), m = problem.constraint_count();
    constexpr double none = std::numeric_limits<double>::quiet_NaN();
    j.objective = none;
    j.constraints.assign(m, none);
    j.violation = std::numeric_limits<double>::infinity();
    j.multipliers = {std::vector<double>(m), std::vector<double>(n), std::vector<double>(n),
                     std::numeric_limits<double>::infinity()};
}

} // namespace

double worst_violation(std::span<const double> constraints) {
    double worst = 0.0;
    for (double c : constraints)
        worst = std::max(worst, c);
    return worst;
}

bool evaluate(Problem& problem, std::span<const double> x, Evaluation& out, Effort& effort) {
    ++effort.evaluations;
    bool defined = false;
    try {
        problem.evaluate(x, out);
        defined = std::isfinite(out.objective) && all_finite(out.constraints);
    } catch (const std::domain_error&) {
    }
    if (!defined) ++effort.undefined;
    return defined;
}

Judged by_model(Problem& problem, const std::vector<double>& x, Effort& effort) {
    Evaluation at(problem.variables().size(), problem.constraint_count());
    Judged j;
    j.x = x;
    if (!evaluate(problem, x, at, effort)) {
        make_undefined(j, problem);
        return j;
    }
    j.objective = at.objective;
    j.multipliers = multipliers_at(problem.variables(), x, at);
    j.constraints = std::move(at.constraints);
    j.violation = worst_violation(j.constraints);
    return j;
}

Judged exactly(Problem& problem, Judged j) {
    try {
        problem.judge(j.x, j.objective, j.constraints);
        if (std::isfinite(j.objective) && all_finite(j.constraints)) {
            j.violation = worst_violation(j.constraints);
            return j;
        }
    } catch (const std::domain_error&) {
    }
    make_undefined(j, problem);
    return j;
}

bool better(const Judged& a, const Judged& b, const Settings& s) {
    if (a.holds(s) != b.holds(s)) return a.holds(s);
    return a.holds(s) ? a.objective < b.objective : a.violation < b.violation;
}

} // namespace finwright::optimizer
