#pragma once
// The readable page: what an engineer reads, checks by hand and signs.

#include "src/job/job.hpp"
#include "src/sink/rating.hpp"
#include "src/sizing/sizing.hpp"
#include <string>

namespace finwright::sheets {

/// The sink found: budget, dimensions, heat split, binding limits, alternatives, laws, cautions.
std::string size_page(const job::Job& job, const sizing::Answer& answer);

/// How a stated sink does on its job.
std::string rate_page(const job::Job& job, const sink::Rating& rating);

/// Why a job cannot be done as stated, by how many kelvin, and what is left to try.
std::string refusal_page(const job::Job& job, const sizing::Refusal& refusal);

/// What was understood of a job file.
std::string check_page(const job::Job& job);

} // namespace finwright::sheets
