#pragma once
// The sink a job states in full, for rating it.

#include "src/job/job.hpp"
#include "src/sink/geometry.hpp"

namespace finwright::sizing {

/// The geometry, when fins, fin height, fin thickness, base thickness, length and either gap or
/// width are fixed. Throws job::InputError naming what is still open.
sink::Geometry<double> stated_sink(const job::Job& job);

} // namespace finwright::sizing
