#include "src/sink/fan_curve.hpp"

#include <algorithm>
#include <cmath>
#include <math.h> // the interpolator expects isnan in the global namespace
//
#include <boost/math/interpolators/pchip.hpp>

namespace finwright::sink {

using boost::math::interpolators::pchip;

namespace {

/// The interpolation needs four points; between them straight parts are divided.
void thicken(std::vector<double>& flows, std::vector<double>& pressures) {
    while (flows.size() < 4) {
        std::size_t widest = 1;
        for (std::size_t i = 1; i < flows.size(); ++i)
            if (flows[i] - flows[i - 1] > flows[widest] - flows[widest - 1]) widest = i;
        const auto at = std::ptrdiff_t(widest);
        flows.insert(flows.begin() + at, 0.5 * (flows[widest] + flows[widest - 1]));
        pressures.insert(pressures.begin() + at, 0.5 * (pressures[widest] + pressures[widest - 1]));
    }
}

} // namespace

struct FanCurve::Points {
    std::vector<double> flows, pressures;
    pchip<std::vector<double>> between;
    double free_delivery;

    explicit Points(const job::Fan& fan)
        : flows(fan.flows), pressures(fan.pressures), between(thickened()) {
        const double last = flows.back();
        free_delivery = pressures.back() > 0.0 ? last - pressures.back() / end_slope() : last;
    }

    pchip<std::vector<double>> thickened() const {
        auto x = flows, y = pressures;
        thicken(x, y);
        return pchip<std::vector<double>>(std::move(x), std::move(y));
    }

    /// Of the last stretch, which is stated to fall [Pa s/m3].
    double end_slope() const {
        const std::size_t n = flows.size();
        return (pressures[n - 1] - pressures[n - 2]) / (flows[n - 1] - flows[n - 2]);
    }

    double pressure(double flow) const {
        if (flow >= flows.back()) return pressures.back() + end_slope() * (flow - flows.back());
        return between(std::max(flow, flows.front()));
    }

    double slope(double flow) const {
        if (flow >= flows.back()) return end_slope();
        return flow <= flows.front() ? 0.0 : between.prime(flow);
    }
};

FanCurve::FanCurve(const job::Fan& fan, double density)
    : points_(std::make_shared<Points>(fan)),
      flow_scale_(fan.speed * (fan.in_series ? 1.0 : double(fan.count))),
      pressure_scale_(fan.speed * fan.speed * density / fan.density *
                      (fan.in_series ? double(fan.count) : 1.0)),
      falls_(std::is_sorted(fan.pressures.rbegin(), fan.pressures.rend())) {}

double FanCurve::pressure(double flow) const {
    return pressure_scale_ * points_->pressure(flow / flow_scale_);
}

double FanCurve::slope(double flow) const {
    return pressure_scale_ / flow_scale_ * points_->slope(flow / flow_scale_);
}

double FanCurve::last_stated_flow() const {
    return flow_scale_ * points_->flows.back();
}

double FanCurve::free_delivery() const {
    return flow_scale_ * points_->free_delivery;
}

double relative_sound(const job::Fan& fan) {
    return 50.0 * std::log10(fan.speed) + 10.0 * std::log10(double(fan.count));
}

} // namespace finwright::sink
