#include "src/sizing/spreading_model.hpp"

#include "src/sink/rating.hpp"
#include <algorithm>
#include <cmath>

namespace finwright::sizing {

namespace {

template <class T> std::array<T, 5> dimensions_of(const sink::Geometry<T>& g) {
    return {g.height, g.thickness, g.gap, g.base, g.length};
}

/// d f / d ln(dimension) with each dimension its own variable.
std::array<double, 5> log_slopes(const Dual5& f, const std::array<double, 5>& values) {
    std::array<double, 5> out;
    for (std::size_t k = 0; k < 5; ++k)
        out[k] = f.slope[k] * values[k];
    return out;
}

sink::Geometry<Dual5> independent(const sink::Geometry<double>& g) {
    return {g.fins,
            Dual5::variable(g.height, 0),
            Dual5::variable(g.thickness, 1),
            Dual5::variable(g.gap, 2),
            Dual5::variable(g.base, 3),
            Dual5::variable(g.length, 4),
            g.draft_tangent};
}

} // namespace

void SpreadingModel::centre(const sink::Geometry<double>& plain, const sink::Duty& duty) {
    const sink::Geometry<Dual5> g = independent(plain);
    const Dual5 base_rise = sink::balance(g, duty).base_rise;
    const std::vector<Dual5> rises = sink::pad_rises(g, duty, base_rise);
    const auto values = dimensions_of(plain);
    for (std::size_t k = 0; k < 5; ++k)
        log_centre_[k] = std::log(values[k]);
    pads_.clear();
    for (const Dual5& pad : rises) {
        const Dual5 rise = pad - base_rise;
        PadModel model{rise.value, log_slopes(rise, values), rise.value > 0.0};
        if (model.monomial)
            for (double& e : model.exponents)
                e /= rise.value;
        pads_.push_back(model);
    }
}

template <class T> T SpreadingModel::rise(std::size_t pad, const sink::Geometry<T>& g) const {
    using std::exp;
    using std::log;
    const PadModel& model = pads_[pad];
    const auto dimensions = dimensions_of(g);
    T sum(0.0);
    for (std::size_t k = 0; k < 5; ++k)
        sum += model.exponents[k] * (log(dimensions[k]) - log_centre_[k]);
    if (model.monomial) return model.rise * exp(sum);
    return model.rise + sum;
}

template double SpreadingModel::rise(std::size_t, const sink::Geometry<double>&) const;
template Dual5 SpreadingModel::rise(std::size_t, const sink::Geometry<Dual5>&) const;

} // namespace finwright::sizing
