#pragma once
// Static pressure a fan, or several alike, gives at a flow: a monotone interpolation of stated
// points (Fritsch & Carlson 1980), moved by the similarity laws to another speed and density, and
// added up in series (pressures) or in parallel (flows). Beyond free delivery the last slope goes
// on, so that every sink has an operating point.

#include "correlations/numbers/dual.hpp"
#include "src/job/job.hpp"
#include <memory>

namespace finwright::sink {

class FanCurve {
public:
    /// `density` of the air the fan moves [kg/m3].
    FanCurve(const job::Fan& fan, double density);

    /// Static pressure of the whole group at its total flow [Pa]; flow in m3/s.
    double pressure(double flow) const;

    template <std::size_t N>
    correlations::Dual<N> pressure(const correlations::Dual<N>& flow) const {
        return chain(flow, pressure(flow.value), slope(flow.value));
    }

    /// Total flow against no pressure [m3/s].
    double free_delivery() const;
    /// Where the stated points end [m3/s].
    double last_stated_flow() const;
    /// Pressure against no flow [Pa].
    double shut_off() const { return pressure(0.0); }
    /// Whether the pressure falls all the way, so that every sink has one operating point.
    bool falls() const { return falls_; }

private:
    struct Points;
    double slope(double flow) const;

    std::shared_ptr<const Points> points_;
    double flow_scale_;     ///< of one fan's curve to the group's flow [-]
    double pressure_scale_; ///< of one fan's curve to the group's pressure [-]
    bool falls_;
};

/// Sound power of the group against one fan at the speed of its curve [dB]: 50 lg(speed) + 10
/// lg(number); from memory, common practice. Relative only.
double relative_sound(const job::Fan& fan);

} // namespace finwright::sink
