#pragma once
// A point with what is known of it.

#include "optimizer/effort.hpp"
#include "optimizer/multipliers.hpp"
#include "optimizer/problem.hpp"
#include <cmath>
#include <limits>

namespace finwright::optimizer {

/// The largest constraint, 0 when all hold.
double worst_violation(std::span<const double> constraints);

/// Evaluates and counts. False where the model has no values.
bool evaluate(Problem& problem, std::span<const double> x, Evaluation& out, Effort& effort);

struct Judged {
    std::vector<double> x;
    double objective = std::numeric_limits<double>::infinity();
    std::vector<double> constraints;
    double violation = std::numeric_limits<double>::infinity();
    Multipliers multipliers;

    bool defined() const { return std::isfinite(violation); } ///< whether the model has values here
    bool holds(const Settings& s) const { return violation <= s.constraint_tolerance; }
    bool stationary(const Settings& s) const {
        return holds(s) && multipliers.residual <= s.residual_tolerance;
    }
};

/// By the model as it is centred: what the solver itself works on.
Judged by_model(Problem& problem, const std::vector<double>& x, Effort& effort);

/// Objective and constraints as exactly as the problem can be judged; multipliers stay.
Judged exactly(Problem& problem, Judged j);

/// Feasible before infeasible before undefined, then by objective, or by violation.
bool better(const Judged& a, const Judged& b, const Settings& s);

} // namespace finwright::optimizer
