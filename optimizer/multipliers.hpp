#pragma once
// Lagrange multipliers and the KKT residual at a point, by non-negative least squares over the
// constraints and bounds that are active there (Lawson & Hanson 1974).

#include "optimizer/problem.hpp"

namespace finwright::optimizer {

struct Multipliers {
    std::vector<double> constraints, lower, upper; ///< >= 0, per unit of constraint or variable
    /// What is left of the scaled gradient, over the larger of its norm and the objective.
    double residual = 0.0;
};

Multipliers multipliers_at(const std::vector<Variable>& variables, std::span<const double> x,
                           const Evaluation& at);

} // namespace finwright::optimizer
