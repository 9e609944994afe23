#pragma once
// What can hurt people or parts, said for the case at hand. Never a verdict on a standard: local
// codes and licensed practice decide.

#include "src/job/job.hpp"
#include "src/sink/rating.hpp"
#include <string>
#include <vector>

namespace finwright::sheets {

/// One sentence or two per caution that applies, most urgent first.
std::vector<std::string> cautions(const job::Job& job, const sink::Rating& rating);

} // namespace finwright::sheets
