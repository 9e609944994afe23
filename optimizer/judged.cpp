#include "optimizer/judged.hpp"

#include <algorithm>
#include <cmath>

namespace finwright::optimizer {

namespace {

double violation_of(const Judged& j) {
    return std::isfinite(j.objective) ? worst_violation(j.constraints) : not_a_number_violation;
}

} // namespace

double worst_violation(std::span<const double> constraints) {
    double worst = 0.0;
    for (double c : constraints)
        worst = std::max(worst, std::isfinite(c) ? c : not_a_number_violation);
    return worst;
}

Judged by_model(Problem& problem, const std::vector<double>& x, Effort& effort) {
    Evaluation at(problem.variables().size(), problem.constraint_count());
    ++effort.evaluations;
    problem.evaluate(x, at);
    Judged j;
    j.x = x;
    j.objective = at.objective;
    j.multipliers = multipliers_at(problem.variables(), x, at);
    j.constraints = std::move(at.constraints);
    j.violation = violation_of(j);
    return j;
}

Judged exactly(Problem& problem, Judged j) {
    problem.judge(j.x, j.objective, j.constraints);
    j.violation = violation_of(j);
    return j;
}

bool better(const Judged& a, const Judged& b, const Settings& s) {
    if (a.holds(s) != b.holds(s)) return a.holds(s);
    return a.holds(s) ? a.objective < b.objective : a.violation < b.violation;
}

} // namespace finwright::optimizer
