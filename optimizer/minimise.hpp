#pragma once
// One continuous problem, solved by sequential quadratic programming (Kraft 1994, as NLopt's SLSQP)
// in scaled variables from every start, with restarts, repair and a derivative-free fallback. The
// solver's return code is never believed: the verdict is recomputed at the returned point.

#include "optimizer/problem.hpp"
#include <chrono>
#include <cstdint>
#include <limits>
#include <optional>
#include <stop_token>

namespace finwright::optimizer {

struct Settings {
    double objective_tolerance = 1e-9;  ///< absolute, of the objective
    double step_tolerance = 1e-8;       ///< absolute, of the scaled variables
    double constraint_tolerance = 1e-8; ///< a constraint holds up to this
    double residual_tolerance = 1e-3; ///< KKT residual (multipliers.hpp) that counts as stationary
    int evaluations = 500;            ///< per solve
    int recentres = 8;                ///< at most, per start
    int repairs = 1;        ///< tries by way of the least violation, where no start ends feasible
    int random_starts = 0;  ///< besides the problem's own
    std::uint64_t seed = 1; ///< of the random starts
    /// A start that ends feasible above this objective ends the search: nothing better is looked
    /// for.
    double hopeless_above = std::numeric_limits<double>::infinity();
    /// Enumeration: how far (in the objective) above the best a candidate may lie and still be
    /// refined, and from where on it is not even started a second time.
    double contender_margin = 0.03;
    double hopeless_margin = std::numeric_limits<double>::infinity();
    std::optional<std::chrono::duration<double>> time;
    std::stop_token stop;
};

/// What is known about the problem at the returned point.
enum class Verdict {
    optimal, ///< feasible, and the KKT conditions hold: a local minimum as far as first order tells
    feasible,     ///< feasible, no proof of stationarity
    infeasible,   ///< the least violation found from every start is above the tolerance (local
                  ///< evidence)
    limit_reached ///< stopped early with no feasible point
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
    int evaluations = 0;

    bool keeps_limits() const {
        return verdict == Verdict::optimal || verdict == Verdict::feasible;
    }
};

Outcome minimise(Problem& problem, const Settings& settings);

/// Minimises the largest constraint: how far an infeasible problem is from a feasible one. The
/// objective of the outcome is that largest constraint.
Outcome least_violation(Problem& problem, const Settings& settings);

} // namespace finwright::optimizer
