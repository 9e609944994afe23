#pragma once
// The greater and the lesser of two positive quantities without a kink: power 8, at most 9 % off,
// where both are equal.

#include <algorithm>
#include <cmath>

namespace finwright::correlations {

/// (a^8 + b^8)^(1/8)
template <class T>
T greater_of(const T& a, const T& b) {
    using std::max, std::sqrt;
    const T top = max(a, b);
    const auto eighth = [&](const T& v) {
        const T x = v / top, x2 = x * x, x4 = x2 * x2;
        return T(x4 * x4);
    };
    return top * sqrt(sqrt(sqrt(eighth(a) + eighth(b))));
}

/// (a^-8 + b^-8)^(-1/8)
template <class T>
T lesser_of(const T& a, const T& b) {
    return 1.0 / greater_of(T(1.0 / a), T(1.0 / b));
}

} // namespace finwright::correlations
