#pragma once
// View factors of rectangles, for the openings of a channel.

#include <cmath>
#include <numbers>

namespace finwright::correlations {

/// Two aligned parallel rectangles a x b, a distance c apart [-]. Howell catalogue C-11.
template <class T>
T aligned_rectangles(const T& a, const T& b, const T& c) {
    using std::atan, std::log, std::sqrt;
    const T x = a / c, y = b / c;
    const T x2 = 1.0 + x * x, y2 = 1.0 + y * y;
    const T root_x = sqrt(x2), root_y = sqrt(y2);
    return 2.0 / (std::numbers::pi * x * y) *
           (0.5 * log(x2 * y2 / (x2 + y2 - 1.0)) + x * root_y * atan(x / root_y) +
            y * root_x * atan(y / root_x) - x * atan(x) - y * atan(y));
}

/// Two perpendicular rectangles with a common edge x: from the one of depth y to the one of height
/// z [-]. Howell catalogue C-14.
template <class T>
T perpendicular_rectangles(const T& z, const T& y, const T& x) {
    using std::atan, std::log, std::sqrt;
    const T h = z / x, w = y / x;
    const T h2 = h * h, w2 = w * w, sum = h2 + w2, diagonal = sqrt(sum);
    const T logs = log((1.0 + w2) * (1.0 + h2) / (1.0 + sum)) +
                   w2 * log(w2 * (1.0 + sum) / ((1.0 + w2) * sum)) +
                   h2 * log(h2 * (1.0 + sum) / ((1.0 + h2) * sum));
    return (w * atan(1.0 / w) + h * atan(1.0 / h) - diagonal * atan(1.0 / diagonal) + 0.25 * logs) /
           (std::numbers::pi * w);
}

} // namespace finwright::correlations
