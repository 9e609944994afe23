#pragma once
// The whole result for other programs: SI, the unit in every key, the law behind every film
// coefficient.

#include "src/job/job.hpp"
#include "src/sink/rating.hpp"
#include "src/sizing/sizing.hpp"
#include <string>

namespace finwright::sheets {

std::string results_json(const job::Job& job, const sizing::Answer& answer);
std::string results_json(const job::Job& job, const sink::Rating& rating);
std::string results_json(const job::Job& job, const sizing::Refusal& refusal);

} // namespace finwright::sheets
