#pragma once
// Powers that follow their junctions, in words: what a sink was sized for, where the powers settle
// and how far from running away, or that they run away.

#include "src/job/job.hpp"
#include "src/sink/rating.hpp"
#include <string>

namespace finwright::sheets {

/// What the search took each table for; empty without a table.
std::string sizing_powers(const job::Job& job);

/// Where the powers settle, or where they get away; empty without a table.
std::string settled_powers(const job::Job& job, const sink::Rating& rating);

} // namespace finwright::sheets
