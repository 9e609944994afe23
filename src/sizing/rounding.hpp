#pragma once
// From the optimum of one fin count to a part the shop can be asked for.
//
// Every free dimension becomes a multiple of the shop's step. All combinations within `reach` steps
// of the optimum are put in the order of the aim, and the first that keeps every limit, recomputed
// at its rounded dimensions with the exact model, is taken. Dimensions the job fixes stay as
// stated.

#include "src/sizing/search_problem.hpp"
#include <optional>
#include <vector>

namespace finwright::sizing {

struct Rounded {
    sink::Geometry<double> geometry;
    double objective; ///< ln(aim), as the search counts it
};

/// The best rounded design near x with an objective below `below`; empty when there is none in
/// reach.
std::optional<Rounded> round_design(SearchProblem& problem, std::span<const double> x,
                                    double below);

} // namespace finwright::sizing
