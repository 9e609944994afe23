#include "src/sink/balance.hpp"

#include "src/sink/moving_air.hpp"
#include "src/sink/still_air.hpp"
#include <boost/math/tools/toms748_solve.hpp>
#include <cmath>
#include <cstdint>
#include <stdexcept>

namespace finwright::sink {

using correlations::Dual;

namespace {

constexpr double balance_tolerance = 1e-12;
constexpr int balance_steps = 20;
constexpr double least_rise = 1e-3; // [K]

template <class T, class Visitor>
auto with_model(const Geometry<T>& g, const Duty& duty, Visitor&& visit) {
    if (duty.surroundings.still()) return visit(StillAirSink<T>(g, duty));
    return visit(MovingAirSink<T>(g, duty));
}

/// ln(heat/shed), continued in a straight line where a warm wall or surroundings leave too little
/// heat for a logarithm.
double log_share(double share) {
    constexpr double least = 0.1;
    return share > least ? std::log(share) : std::log(least) + share / least - 1.0;
}

/// Between the least and the greatest rise looked at, by TOMS 748. A sink that its wall or its
/// surroundings hold at or below its air's temperature counts as just above it.
template <class Shortfall>
double bracketed_rise(const Shortfall& log_heat) {
    constexpr double hottest = 1e6; // [K]
    const double low = std::log(least_rise), high = std::log(hottest);
    if (log_heat(low) >= 0.0) return least_rise;
    if (log_heat(high) < 0.0) throw std::domain_error("the heat balance does not settle");
    std::uintmax_t steps = 200;
    const auto close = [](double a, double b) {
        return std::abs(b - a) < 1e-13 * (1.0 + std::abs(a));
    };
    const auto [from, to] = boost::math::tools::toms748_solve(log_heat, low, high, close, steps);
    return std::exp(0.5 * (from + to));
}

/// Secant in (log rise, log heat): the curve is almost a straight line there, but for walls and
/// surroundings off the air's temperature. The rise is the one the model's view is stated by.
template <class Model>
double balanced_rise(const Model& model, double power, double guess) {
    const double shed = power + model.load();
    const auto log_heat = [&](double log_rise) {
        return log_share(model.heat(model.view(std::exp(log_rise))).total() / shed);
    };
    double x0 = std::log(guess), f0 = log_heat(x0);
    double x1 = x0 - f0 / Model::heat_exponent, f1 = log_heat(x1);
    for (int step = 0; step < balance_steps; ++step) {
        if (std::abs(f1) < balance_tolerance || x1 == x0) return std::exp(x1);
        const double secant = (f1 - f0) / (x1 - x0);
        const double slope =
            std::isfinite(secant) ? std::clamp(secant, 0.5, 2.0) : Model::heat_exponent;
        x0 = x1;
        f0 = f1;
        x1 -= f1 / slope;
        f1 = log_heat(x1);
    }
    return std::abs(f1) < 1e-10 ? std::exp(x1) : bracketed_rise(log_heat);
}

void require_room(const Geometry<double>& g) {
    if (g.plate() && g.gap > 0 && g.base > 0 && g.length > 0) return;
    const bool sound = g.gap > 0 && g.height > 0 && g.thickness > 0 && g.tip_thickness() > 0 &&
                       g.base > 0 && g.fin_length() > 0 && g.fins >= 2;
    if (!sound)
        throw std::domain_error(
            "a sink has no fins or at least two, and every dimension above zero");
}

Geometry<Dual<6>> widened(const Geometry<Dual<5>>& g) {
    const auto widen = [](const Dual<5>& a) {
        Dual<6> b(a.value);
        for (std::size_t i = 0; i < 5; ++i)
            b.slope[i] = a.slope[i];
        return b;
    };
    return {g.fins,        widen(g.height), widen(g.thickness), widen(g.gap),
            widen(g.base), widen(g.length), g.draft_tangent,    g.details};
}

/// f(x, rise) with rise = rise(x): total slopes.
Dual<5> along(const Dual<6>& f, const Dual<5>& rise) {
    Dual<5> out(f.value);
    for (std::size_t i = 0; i < 5; ++i)
        out.slope[i] = f.slope[i] + f.slope[5] * rise.slope[i];
    return out;
}

} // namespace

template <class T>
Geometry<double> plain(const Geometry<T>& g) {
    using correlations::value_of;
    return {g.fins,           value_of(g.height), value_of(g.thickness), value_of(g.gap),
            value_of(g.base), value_of(g.length), g.draft_tangent,       g.details};
}
template Geometry<double> plain(const Geometry<double>&);
template Geometry<double> plain(const Geometry<Dual<5>>&);
template Geometry<double> plain(const Geometry<Dual<6>>&);

HeatPaths<double> shed(const Geometry<double>& g, const Duty& duty, double driving_rise) {
    require_room(g);
    return with_model(g, duty,
                      [&](const auto& model) { return model.heat(model.view(driving_rise)); });
}

Balance<double> balance(const Geometry<double>& g, const Duty& duty, double guess) {
    require_room(g);
    return with_model(g, duty, [&](const auto& model) {
        const double rise = balanced_rise(model, duty.power(), guess);
        const auto view = model.view(rise);
        const auto heat = model.heat(view);
        return Balance<double>{view.base_rise, model.pressure_drop(view), rise,
                               (heat.total() - heat.fixed) / view.base_rise};
    });
}

Balance<Dual<5>> balance(const Geometry<Dual<5>>& g, const Duty& duty, double guess) {
    const double rise = balance(plain(g), duty, guess).driving_rise;
    return with_model(widened(g), duty, [&](const auto& model) {
        const auto view = model.view(Dual<6>::variable(rise, 5));
        const HeatPaths<Dual<6>> paths = model.heat(view);
        const Dual<6> heat = paths.total() - model.load();
        Dual<5> implicit(rise);
        for (std::size_t i = 0; i < 5; ++i)
            implicit.slope[i] = -heat.slope[i] / heat.slope[5];
        return Balance<Dual<5>>{along(view.base_rise, implicit),
                                along(model.pressure_drop(view), implicit), implicit,
                                along((paths.total() - paths.fixed) / view.base_rise, implicit)};
    });
}

} // namespace finwright::sink
