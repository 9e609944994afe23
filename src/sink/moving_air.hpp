#pragma once
// Heat shed to moving air at a stated rise of the base over the inlet air, and what drives the air.
//
// Model. Air passes between the fins and, where a clearance is left, above and beside them. It
// enters both ways with one velocity and leaves the channels along the fins, because both have the
// same static pressure where they open to each other; at the exit that pressure gives, with
// conservation of mass, what is left in the channels:
//     entry + 4 f L/D of the mean + exit head  =  the same of the bypass, without entry.
// Films and friction are worked with the mean of entry and exit. In a free stream the air beside
// the fins keeps its velocity. A fan gives what its curve says at the whole flow. Heat: channels by
// the log mean, their air warming along the length while part of it leaves; outer fin faces and
// tips as flat plates in the bypass, at inlet air. Properties at the film temperature (half the
// base's rise), density of the pressure drop at the channels' bulk mean. In a duct that closes
// around the fins all heat leaves through the channels; radiation is left out.

#include "src/sink/duty.hpp"
#include "src/sink/fan_curve.hpp"
#include "src/sink/geometry.hpp"
#include "src/sink/heat_paths.hpp"
#include <memory>
#include <optional>

namespace finwright::sink {

template <class T>
struct MovingAirView {
    T base_rise = T(0.0);          ///< at the fins' roots [K]
    T film_temperature = T(0.0);   ///< [K]
    T approach_velocity = T(0.0);  ///< before the fins, over the duct's section [m/s]
    T channel_velocity = T(0.0);   ///< between the fins, mean along them, inlet density [m/s]
    T bypass_velocity = T(0.0);    ///< past the fins, likewise; 0 without a bypass [m/s]
    T volume_flow = T(0.0);        ///< of all the air, at the inlet [m3/s]
    T channel_flow = T(0.0);       ///< of that between the fins, mean along them [m3/s]
    T entering_flow = T(0.0);      ///< of that between the fins at their entry [m3/s]
    T exit_flow = T(0.0);          ///< of that between the fins at their exit [m3/s]
    T bypass_exit_flow = T(0.0);   ///< past them there [m3/s]
    T hydraulic_diameter = T(0.0); ///< of a channel [m]
    T reynolds = T(0.0);           ///< on the hydraulic diameter [-]
    T bypass_reynolds = T(0.0);    ///< on the bypass's hydraulic diameter [-]
    T outer_reynolds = T(0.0);     ///< of the outer faces, on L [-]
    T prandtl = T(0.0);            ///< [-]
    T aspect = T(0.0);             ///< short side / long side of a channel [-]
    T free_area_ratio = T(0.0);    ///< between the fins [-]
    T film = T(0.0);               ///< log-mean film coefficient [W/(m2 K)]
    T outer_film = T(0.0);         ///< on outer faces and tips [W/(m2 K)]
    T inner_efficiency = T(1.0);   ///< [-]
    T outer_efficiency = T(1.0);   ///< [-]
    T capacity_flow = T(0.0);      ///< m cp of the air entering the channels [W/K]
    T leaving_share = T(0.0);      ///< of it, that leaves along the fins [-]
    T transfer_units = T(0.0);     ///< UA/(m cp) [-]
    T channel_loss = T(0.0);       ///< from the approach's total to the exit's static pressure [Pa]
    T bypass_loss = T(0.0);        ///< the same past the fins [Pa]
    T pressure_drop = T(0.0);      ///< static, from before the fins to behind them [Pa]

    /// Air goes past the fins without walls around it.
    bool free_stream() const { return bypass_velocity > 0.0 && bypass_exit_flow == 0.0; }
};

/// Velocity between the fins at a stated flow in a closed duct, at inlet density; 0 where the flow
/// depends on the sink [m/s].
template <class T>
T channel_velocity(const Geometry<T>& g, const Surroundings& surroundings);

template <class T>
class MovingAirSink {
public:
    /// About d ln(heat)/d ln(rise), where a search for the balance begins.
    static constexpr double heat_exponent = 1.0;

    MovingAirSink(const Geometry<T>& geometry, const Duty& duty);

    /// What the laws see at a base rise over the inlet air [K].
    MovingAirView<T> view(const T& base_rise) const;

    /// Heat by path [W].
    HeatPaths<T> heat(const MovingAirView<T>& v) const;

    /// Heat the surfaces take up besides the parts' [W].
    T load() const { return T(0.0); }

    T pressure_drop(const MovingAirView<T>& v) const { return v.pressure_drop; }

private:
    /// Between the fins, beside them, and all [m3/s]; at the exit's plane where it is solved for.
    struct Flow {
        T channel, beside, total;
    };
    /// In the logarithms of channel over beside, and of all.
    struct Step {
        T split, total;
    };
    struct Imbalance {
        T paths, drive;
    };
    struct Slopes {
        double paths_by_split, paths_by_total, drive_by_split, drive_by_total;
    };

    Flow stated_flow() const;
    Flow mean_flow(const Flow& exit) const;
    T entering_flow(const MovingAirView<T>& v) const;
    MovingAirView<T> passing(const Flow& flow, const T& base_rise) const;
    void convect(MovingAirView<T>& v) const;
    void lose_pressure(MovingAirView<T>& v) const;
    T bypass_loss(const MovingAirView<T>& v) const;
    Imbalance imbalance(const MovingAirView<T>& v) const;
    Flow moved(const Flow& flow, const Step& step) const;
    Slopes slopes(const Flow& flow, const T& base_rise) const;
    Step step(const Slopes& s, const Imbalance& r) const;
    Flow solved(const T& base_rise) const;
    Flow guessed(double total) const;
    Flow divided(double total) const;
    Flow first_flow() const;

    template <class>
    friend class MovingAirSink;

    Geometry<T> g_;
    Surroundings surroundings_;
    Material material_;
    std::optional<FanCurve> fan_;
    std::shared_ptr<const MovingAirSink<double>> plain_; ///< solves the flow for a T with slopes
    double power_;                                       ///< [W]
    double inlet_density_;
    bool decided_; ///< the flow follows from the job alone
    bool closed_;  ///< the duct leaves no room beside the fins
    bool free_;    ///< a stream without walls
    T fin_shape_;
    T channels_area_;   ///< free between the fins [m2]
    T bypass_area_;     ///< beside them, 0 in a closed duct [m2]
    T bypass_diameter_; ///< hydraulic [m]
    T duct_area_;       ///< of the whole section [m2]
    /// Where the flow was last found, and the slopes there: where it is next looked for.
    struct Last {
        Flow flow;
        Slopes slopes;
    };
    mutable Last last_{};
};

} // namespace finwright::sink
