#pragma once
// The one comparison the tests use: relative, so that 1.8e-5 never passes for 2.8e-5.

#include <algorithm>
#include <cmath>
#include <doctest/doctest.h>
#include <ostream>

namespace finwright::tests {

/// |a - b| / max(|a|, |b|), 0 when both are 0. [-]
inline double relative_difference(double a, double b) {
    const double scale = std::max(std::abs(a), std::abs(b));
    return scale == 0.0 ? 0.0 : std::abs(a - b) / scale;
}

/// `actual == near(expected, 1e-6)`: within a relative tolerance.
struct near {
    double expected;
    double tolerance;
    near(double expected_, double relative_tolerance)
        : expected(expected_), tolerance(relative_tolerance) {}
};

inline bool operator==(double actual, const near& n) {
    return relative_difference(actual, n.expected) <= n.tolerance;
}

inline std::ostream& operator<<(std::ostream& out, const near& n) {
    return out << n.expected << " within " << n.tolerance * 100.0 << " %";
}

} // namespace finwright::tests
