#pragma once
// Integer variables by enumeration: one continuous problem per combination, on as many threads as
// asked for.
//
// First every combination is solved once without moving its model's centre; then those that could
// still be best (within Settings::contender_margin of the best, or nearly feasible) are refined
// with re-centring, until the best is a refined one. Each combination is solved on its own, so the
// result does not depend on the number of threads.

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
    Verdict verdict = Verdict::infeasible;
    std::optional<std::size_t> best;   ///< index of the best candidate that keeps the limits
    std::vector<Candidate> candidates; ///< every possible combination, in order
};

MixedOutcome enumerate(std::span<const IntegerRange> ranges, const Factory& factory,
                       const Settings& settings, int threads = 1);

} // namespace finwright::optimizer
