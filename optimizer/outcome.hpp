#pragma once
// What a search found, what is known about the problem there, and why the search ended: three
// different things.

#include <vector>

namespace finwright::optimizer {

/// What is known about the problem at the returned point.
enum class Verdict {
    optimal, ///< feasible, and the KKT conditions hold: a local minimum as far as first order tells
    feasible,     ///< feasible, no proof of stationarity
    infeasible,   ///< the least violation, sought from several starts, stays above the tolerance.
                  ///< Local evidence: no proof
    limit_reached ///< no feasible point seen, and the effort allowed does not tell whether there is
                  ///< one
};

/// Why the search ended.
enum class Stop { converged, evaluations, time, asked };

struct Outcome {
    Verdict verdict = Verdict::limit_reached;
    Stop stop = Stop::converged;
    std::vector<double> x;
    double objective = 0.0;
    std::vector<double> constraints;
    double worst_violation = 0.0; ///< largest constraint, 0 when all hold
    double kkt_residual = 0.0;    ///< as in multipliers.hpp
    /// Lagrange multipliers: what the objective falls by per unit by which the constraint or bound
    /// is eased.
    std::vector<double> multipliers, lower_multipliers, upper_multipliers;
    int evaluations = 0; ///< of values with derivatives
    int undefined = 0;   ///< of these, how many found no numbers

    bool keeps_limits() const {
        return verdict == Verdict::optimal || verdict == Verdict::feasible;
    }
};

} // namespace finwright::optimizer
