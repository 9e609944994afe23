#pragma once
// Between variables as they are and as they are searched.

#include "optimizer/problem.hpp"

namespace finwright::optimizer {

/// u = ln x, or (x - lower)/(upper - lower).
double to_scaled(const Variable& v, double x);
double from_scaled(const Variable& v, double u);
/// dx/du at x.
double stretch(const Variable& v, double x);

} // namespace finwright::optimizer
