#pragma once
// Feasibility restoration: from a point that breaks a constraint by little to one that keeps it.

#include "optimizer/judged.hpp"

namespace finwright::optimizer {

/// Newton's method on the broken constraints: repeatedly the least step, scaled, after which every
/// constraint would hold if it were linear (a least-distance problem, Lawson & Hanson 1974, ch.
/// 23), values as judge() has them. Ends where constraints hold to Settings::strict_tolerance, or
/// at the least broken point reached; the objective is not looked at.
Judged restored(Problem& problem, Judged from, const Settings& settings, Effort& effort);

} // namespace finwright::optimizer
