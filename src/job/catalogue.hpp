#pragma once
// What the program knows without being told: alloys, finishes and shop processes, each value with
// its source. The files stand in configs/ and are built into the program.

#include "src/job/job.hpp"
#include <vector>

namespace finwright::job {

const std::vector<Alloy>& alloys();
const std::vector<Finish>& finishes();
const std::vector<Process>& processes();

} // namespace finwright::job
