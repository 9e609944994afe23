#pragma once
// Contradictions no single line shows: budgets spent before the sink, dimensions outside the space
// or the shop, pads that overlap or hang over the edge.

#include "src/job/document.hpp"
#include "src/job/job.hpp"

namespace finwright::job {

/// For a sink still to be found. Throws InputError at the first contradiction.
void check_sized_job(const Job& job, const Document& document);

/// For a sink that is stated: what it breaks of limits, space and shop is for its rating to say.
void check_rated_job(const Job& job, const Document& document);

} // namespace finwright::job
