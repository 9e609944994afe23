#include "optimizer/scaling.hpp"

#include <algorithm>
#include <cmath>

namespace finwright::optimizer {

double to_scaled(const Variable& v, double x) {
    if (v.scale == Scale::logarithmic) return std::log(x);
    return v.upper > v.lower ? (x - v.lower) / (v.upper - v.lower) : 0.0;
}

double from_scaled(const Variable& v, double u) {
    const double x =
        v.scale == Scale::logarithmic ? std::exp(u) : v.lower + u * (v.upper - v.lower);
    return std::clamp(x, v.lower, v.upper);
}

double stretch(const Variable& v, double x) {
    return v.scale == Scale::logarithmic ? x : v.upper - v.lower;
}

} // namespace finwright::optimizer
