#pragma once
// One continuous problem, solved by sequential quadratic programming (Kraft 1994, as NLopt's SLSQP)
// in scaled variables from every start, with restarts, repair and a derivative-free fallback. The
// solver's return code is never believed: the verdict is recomputed at the returned point.
//
// Variables or starts that make no sense (bounds crossed, not finite, not positive on a logarithmic
// scale, of the wrong number) throw std::invalid_argument with the variable's name.

#include "optimizer/outcome.hpp"
#include "optimizer/problem.hpp"
#include "optimizer/settings.hpp"

namespace finwright::optimizer {

Outcome minimise(Problem& problem, const Settings& settings);

/// Minimises the largest constraint: how far an infeasible problem is from a feasible one. The
/// objective of the outcome is that largest constraint; it is not pursued once every constraint
/// holds with room to spare. Multipliers say how much each constraint holds it up.
Outcome least_violation(Problem& problem, const Settings& settings);

} // namespace finwright::optimizer
