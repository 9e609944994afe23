#pragma once
// Heat shed in still air, base and fins vertical, at a stated rise of the channel walls over the
// air.
//
// Model. The base is isothermal (spreading is added elsewhere); its back carries the parts and
// sheds nothing. Inner channels follow a vertical-channel law (duty.hpp), every other face the
// laminar vertical-plate law on the length L: the outer faces by right, tips, end faces and the rim
// because the same rising film bathes them. Radiation: channels as grey one-zone cavities through
// their exact openings, outer surfaces with view factor 1. A fin is conducted with convection and
// radiation together, its tip and end faces added to its conductance and half its thickness to its
// height (Harper & Brown). Properties at the film temperature of the channel wall. Its mean rise is
// what everything is stated by: the films follow from it, the fins' efficiency from the films, and
// the base's rise from the efficiency, with nothing to iterate.

#include "correlations/natural_channel.hpp"
#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include "src/sink/heat_paths.hpp"

namespace finwright::sink {

/// What the laws saw, for range checks and for the reader.
template <class T>
struct StillAirView {
    T wall_rise = T(0.0);         ///< mean over the channel walls [K]
    T base_rise = T(0.0);         ///< at the fins' roots [K]
    T film_temperature = T(0.0);  ///< [K]
    T elenbaas = T(0.0);          ///< channel number on the gap [-]
    T rayleigh_radius = T(0.0);   ///< channel number on the hydraulic radius [-]
    T rayleigh_length = T(0.0);   ///< outer faces, on L [-]
    T prandtl = T(0.0);           ///< [-]
    T plate = T(0.0);             ///< Nusselt number of the outer faces, on L [-]
    T channel_film = T(0.0);      ///< convection in the channels [W/(m2 K)]
    T channel_radiation = T(0.0); ///< radiation per wetted channel area [W/(m2 K)]
    T outer_film = T(0.0);        ///< convection on outer faces [W/(m2 K)]
    T outer_radiation = T(0.0);   ///< radiation on outer faces [W/(m2 K)]
    T inner_efficiency = T(1.0);  ///< fin between two channels [-]
    T outer_efficiency = T(1.0);  ///< first and last fin [-]
};

template <class T>
class StillAirSink {
public:
    /// About d ln(heat)/d ln(rise), where a search for the balance begins.
    static constexpr double heat_exponent = 1.25;

    StillAirSink(const Geometry<T>& geometry, const Surroundings& surroundings,
                 const Material& material, ChannelLaw law);

    /// What the laws see at a mean rise of the channel walls over the air [K].
    StillAirView<T> view(const T& wall_rise) const;

    /// Heat by path [W].
    HeatPaths<T> heat(const StillAirView<T>& v) const;

    /// Nothing drives the air but its own heat [Pa].
    T pressure_drop(const StillAirView<T>&) const { return T(0.0); }

private:
    T channel_coefficient(const StillAirView<T>& v, const T& conductivity) const;
    void conduct(StillAirView<T>& v) const;

    Geometry<T> g_;
    correlations::FinChannel<T> fin_channel_;
    Surroundings surroundings_;
    Material material_;
    ChannelLaw law_;
    T wetted_;    ///< one channel: two fin faces and the base strip [m2]
    T exchange_;  ///< one channel: radiation conductance [m2]
    T fin_shape_; ///< height / (k * section) of a fin, tip-corrected, taper allowed for [1/(W/K)]
    T edges_;     ///< one fin: its two end faces [m2]
    T tip_;       ///< one fin: its tip [m2]
    T rim_;       ///< four sides of the base [m2]
};

} // namespace finwright::sink
