#pragma once
// Heat shed in still air at a stated rise of the channel walls over the air.
//
// Model. The base is isothermal (spreading is added elsewhere); its back carries the parts and
// sheds nothing unless the mounting says so. Inner channels follow a channel law (duty.hpp) with
// the share of gravity along them, and the horizontal-array law with the share away from them; the
// outer fin faces are single plates; tips, end faces and rim follow the plate the fins' front
// makes, because the same rising film bathes them. A drift adds its own film to each. Radiation:
// channels as grey cavities through their exact openings, zoned (channel_radiation.hpp); outer
// surfaces with view factor 1. A fin is conducted with convection and radiation together, its tip
// and end faces added to its conductance and half its thickness to its height (Harper & Brown).
// Properties at the film temperature of the channel wall. Its mean rise is what everything is
// stated by: the films follow from it, the fins' efficiency from the films, and the base's rise
// from the efficiency, with nothing to iterate.

#include "correlations/natural_channel.hpp"
#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include "src/sink/heat_paths.hpp"

namespace finwright::sink {

/// What the laws saw, for range checks and for the reader.
template <class T>
struct StillAirView {
    T wall_rise = T(0.0);           ///< mean over the channel walls [K]
    T base_rise = T(0.0);           ///< at the fins' roots [K]
    T film_temperature = T(0.0);    ///< [K]
    T grashof_unit = T(0.0);        ///< g beta dT/(nu alpha) [1/m3]
    T elenbaas = T(0.0);            ///< channel number on the gap, gravity along the channel [-]
    T rayleigh_radius = T(0.0);     ///< channel number on the hydraulic radius, the same [-]
    T rayleigh_length = T(0.0);     ///< on L, gravity along it [-]
    T prandtl = T(0.0);             ///< [-]
    T plate = T(0.0);               ///< Nusselt number of an upright plate at rayleigh_length [-]
    T channel_film = T(0.0);        ///< convection in the channels [W/(m2 K)]
    T channel_radiation = T(0.0);   ///< radiation per wetted channel area [W/(m2 K)]
    T outer_film = T(0.0);          ///< convection on the outer fin faces [W/(m2 K)]
    T edge_film = T(0.0);           ///< convection on tips, end faces and rim [W/(m2 K)]
    T back_film = T(0.0);           ///< convection on the back, 0 where it is covered [W/(m2 K)]
    T forced_film = T(0.0);         ///< of a drift in the channels alone [W/(m2 K)]
    T natural_film = T(0.0);        ///< without that drift [W/(m2 K)]
    T kinematic_viscosity = T(0.0); ///< where a drift needs it [m2/s]
    T outer_radiation = T(0.0);     ///< radiation on outer surfaces [W/(m2 K)]
    T inner_efficiency = T(1.0);    ///< fin between two channels [-]
    T outer_efficiency = T(1.0);    ///< first and last fin [-]
};

template <class T>
class StillAirSink {
public:
    /// About d ln(heat)/d ln(rise), where a search for the balance begins.
    static constexpr double heat_exponent = 1.25;

    StillAirSink(const Geometry<T>& geometry, const Duty& duty);

    /// What the laws see at a mean rise of the channel walls over the air [K].
    StillAirView<T> view(const T& wall_rise) const;

    /// Heat by path [W].
    HeatPaths<T> heat(const StillAirView<T>& v) const;

    /// Heat the surfaces take up besides the parts' [W].
    T load() const { return sun_; }

    /// Nothing drives the air but its own heat [Pa].
    T pressure_drop(const StillAirView<T>&) const { return T(0.0); }

private:
    struct AirFilm;
    AirFilm film_at(StillAirView<T>& v, const T& rise) const;
    void convect(StillAirView<T>& v, const AirFilm& air) const;
    void drift(StillAirView<T>& v, const AirFilm& air) const;
    T along_channel(const StillAirView<T>& v, const T& conductivity) const;
    T channel_coefficient(const StillAirView<T>& v, const T& conductivity) const;
    T outer_coefficient(const StillAirView<T>& v) const;
    T front_coefficient(const StillAirView<T>& v, double tilt) const;
    void conduct(StillAirView<T>& v) const;
    StillAirView<T> plate_view(const T& rise) const;
    T channel_area(const StillAirView<T>& v) const;
    T outer_area(const StillAirView<T>& v) const;
    T ends_area(const StillAirView<T>& v) const;

    Geometry<T> g_;
    correlations::FinChannel<T> fin_channel_;
    Surroundings surroundings_;
    Material material_;
    StillAir state_;
    double radiating_; ///< temperature of what the surfaces see [K]
    double along_;     ///< share of gravity along the slope of the base [-]
    double away_;      ///< share of gravity square to the base [-]
    T wetted_;         ///< one channel: two fin faces and the base strip [m2]
    T exchange_;       ///< one channel: radiation conductance [m2]
    T fin_shape_; ///< height / (k * section) of a fin, tip-corrected, taper allowed for [1/(W/K)]
    T edges_;     ///< one fin: its two end faces [m2]
    T tip_;       ///< one fin: its tip [m2]
    T rim_;       ///< four sides of the base [m2]
    T bare_;      ///< base that looks past the fins [m2]
    T back_;      ///< of the base, beside the pads; 0 where covered [m2]
    T sun_;       ///< heat taken up [W]
};

/// Solar heat a sink takes up [W]: the light falls square on the base; of what enters a channel's
/// front a grey cavity keeps 1/(1 + (1/alpha - 1) S/(S + 2 H)), the tips keep alpha.
template <class T>
T sun_taken(const Geometry<T>& g, const Surroundings& surroundings);

} // namespace finwright::sink
