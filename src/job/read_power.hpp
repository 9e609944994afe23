#pragma once
// What a part dissipates: one power, or a table by junction temperature.

#include "src/job/document.hpp"
#include "src/job/job.hpp"

namespace finwright::job {

/// Reads `power` of a part.
void read_power(const Document& d, Mapping& m, Part& part);

/// Sets the power a part with a table is sized for: the most the table says from the coldest
/// surroundings to the junction allowed, or to its last point where there is no limit.
void set_sizing_powers(Job& job);

} // namespace finwright::job
