#pragma once
// Integer variables by enumeration: one continuous problem per combination, on as many threads as
// asked for.
//
// First every combination is solved once without moving its model's centre, to rough tolerances, in
// blocks: the first of a block from its own starts, each other from where the one before it ended,
// in place of its own first start. Then those that could still be best (within
// Settings::contender_margin of the best, or nearly feasible) are refined with re-centring, until
// the best is a refined one. It is solved again from its own starts and from its neighbours' ends,
// its neighbours from where it ended, and so on along the integers as long as that finds better.
// Where none keeps the limits, the least violation of each is sought before it is called
// infeasible. Who starts from whose end is fixed beforehand, so the result does not depend on the
// number of threads. A candidate that was not refined and is called limit_reached is one not looked
// into: the best one made it pointless.

#include "optimizer/minimise.hpp"
#include <functional>
#include <memory>

namespace finwright::optimizer {

struct IntegerRange {
    std::string name;
    int from = 0, to = 0;
};

/// The problem of one combination; nullptr where the combination is impossible from the start.
using Factory = std::function<std::unique_ptr<Problem>(std::span<const int>)>;

struct Candidate {
    std::vector<int> integers;
    Outcome outcome;
    bool refined = false;
};

struct MixedOutcome {
    /// The best one's, or at most feasible where time or a request to stop cut the search short;
    /// infeasible where every combination is.
    Verdict verdict = Verdict::infeasible;
    std::optional<std::size_t> best;   ///< index of the best candidate that keeps the limits
    std::vector<Candidate> candidates; ///< every possible combination, in order
};

MixedOutcome enumerate(std::span<const IntegerRange> ranges, const Factory& factory,
                       const Settings& settings, int threads = 1);

} // namespace finwright::optimizer
