#pragma once
// min |A y - b| over y >= 0 (Lawson & Hanson 1974, algorithm NNLS).

#include <span>
#include <vector>

namespace finwright::optimizer {

/// `a` holds the columns of A one after the other, each as long as b.
std::vector<double> non_negative_least_squares(std::span<const double> a,
                                               std::span<const double> b);

} // namespace finwright::optimizer
