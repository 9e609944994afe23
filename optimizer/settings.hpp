#pragma once
// How hard a search tries, how closely it keeps limits and when it stops.

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
    /// Where a constraint is broken by more than this, the point is moved until it keeps it this
    /// closely, if that can be done nearby (restore.hpp).
    double strict_tolerance = 1e-9;
    double residual_tolerance = 1e-3; ///< KKT residual (multipliers.hpp) that counts as stationary
    int evaluations = 500;            ///< per solve
    int recentres = 8;                ///< at most, per start
    /// Whether a point that breaks a constraint is restored, or searched for by way of the least
    /// violation. Without it no problem is called infeasible.
    bool repair = true;
    int random_starts = 0;  ///< besides the problem's own
    std::uint64_t seed = 1; ///< of the random starts
    /// A start that ends feasible above this objective ends the search: nothing better is looked
    /// for.
    double hopeless_above = std::numeric_limits<double>::infinity();
    /// Enumeration: how far (in the objective) above the best a candidate may lie and still be
    /// refined, and from where on it is not even started a second time.
    double contender_margin = 0.03;
    double hopeless_margin = std::numeric_limits<double>::infinity();
    std::optional<std::chrono::duration<double>> time; ///< for the whole call
    std::stop_token stop;
};

} // namespace finwright::optimizer
