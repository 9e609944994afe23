#pragma once
// Heat shed and pressure lost when a duct leads stated air through the fins.
//
// Model. The duct fits the fins closely: its section is width x fin height, its lid touches the
// tips, its sides the outer faces, and the base lies outside it. Heat leaves through the channels
// only (fin faces and base strips); radiation into the duct is left out, on the safe side. Film
// coefficients are on the log-mean difference (all flow regimes joined continuously), so the air
// heats along L and Q = m cp (1 - exp(-UA/(m cp))) theta_base. Gas properties for the film at inlet
// + half the base rise; density for the pressure drop at the bulk mean.

#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include "src/sink/heat_paths.hpp"

namespace finwright::sink {

template <class T>
struct DuctedAirView {
    T base_rise = T(0.0);          ///< at the fins' roots [K]
    T film_temperature = T(0.0);   ///< [K]
    T approach_velocity = T(0.0);  ///< before the fins, inlet density [m/s]
    T channel_velocity = T(0.0);   ///< between the fins, inlet density [m/s]
    T volume_flow = T(0.0);        ///< at the inlet [m3/s]
    T hydraulic_diameter = T(0.0); ///< [m]
    T reynolds = T(0.0);           ///< on the hydraulic diameter [-]
    T prandtl = T(0.0);            ///< [-]
    T aspect = T(0.0);             ///< short side / long side of a channel [-]
    T free_area_ratio = T(0.0);    ///< [-]
    T film = T(0.0);               ///< log-mean film coefficient [W/(m2 K)]
    T inner_efficiency = T(1.0);   ///< [-]
    T outer_efficiency = T(1.0);   ///< [-]
    T capacity_flow = T(0.0);      ///< m cp [W/K]
    T transfer_units = T(0.0);     ///< UA/(m cp) [-]
};

/// Stated flow over the area free between the fins, at inlet density [m/s].
template <class T>
T channel_velocity(const Geometry<T>& g, const Surroundings& surroundings);

template <class T>
class DuctedSink {
public:
    /// About d ln(heat)/d ln(rise), where a search for the balance begins.
    static constexpr double heat_exponent = 1.0;

    DuctedSink(const Geometry<T>& geometry, const Duty& duty);

    /// What the laws see at a base rise over the inlet air [K].
    DuctedAirView<T> view(const T& base_rise) const;

    /// Heat by path [W].
    HeatPaths<T> heat(const DuctedAirView<T>& v) const;

    /// Heat the surfaces take up besides the parts' [W].
    T load() const { return T(0.0); }

    /// Static pressure the flow loses from before the fins to behind them [Pa].
    T pressure_drop(const DuctedAirView<T>& v) const;

private:
    Geometry<T> g_;
    Surroundings surroundings_;
    Material material_;
    T fin_shape_;
    T volume_flow_; ///< [m3/s]
    T mass_flow_;   ///< [kg/s]
};

} // namespace finwright::sink
