#pragma once
// Contradictions no single line shows: budgets spent before the sink, dimensions outside the space
// or the shop, pads that overlap or hang over the edge.

#include "src/job/document.hpp"
#include "src/job/job.hpp"

namespace finwright::job {

/// Throws InputError at the first contradiction.
void check_job(const Job& job, const Document& document);

} // namespace finwright::job
