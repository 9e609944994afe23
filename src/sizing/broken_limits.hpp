#pragma once
// Which limits of a job a rated sink breaks. (Junctions stand in the rating itself.)

#include "src/job/job.hpp"
#include "src/sink/rating.hpp"
#include <string>
#include <vector>

namespace finwright::sizing {

/// One sentence per limit broken: of space, mass, pressure drop, target resistance and the shop.
std::vector<std::string> broken_limits(const job::Job& job, const sink::Rating& rating);

} // namespace finwright::sizing
