#pragma once
// What the part is asked to do, and the air it does it in. Everything here is fixed while
// dimensions vary.

#include "src/job/job.hpp"
#include "src/sink/law_use.hpp"
#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace finwright::sink {

using ChannelLaw = job::ChannelLaw;

/// Room air at rest, or drifting slowly.
struct StillAir {
    ChannelLaw channel_law = ChannelLaw::fin_channel;
    job::Mounting mounting;
    std::optional<job::Drift> drift;
    std::optional<job::Sun> sun;
};

/// The air stated for a duct that fits the fins closely: its velocity before the fins, or its
/// volume flow.
struct DuctVelocity {
    double approach = 0.0; ///< over the duct section, width x fin height [m/s]
};
struct DuctFlow {
    double volume = 0.0; ///< at inlet temperature and pressure [m3/s]
};

/// A stream past the sink, or a fan that drives one.
using Stream = job::StreamAir;
struct FanDriven {
    job::Fan fan;
    std::optional<job::Clearance> clearance;
};

struct Surroundings {
    double air_temperature = 298.15;             ///< at the inlet [K]
    std::optional<double> radiating_temperature; ///< of what the surfaces see; default the air [K]
    double pressure = 101325.0;                  ///< [Pa]
    std::variant<StillAir, DuctVelocity, DuctFlow, Stream, FanDriven> air;

    bool still() const { return std::holds_alternative<StillAir>(air); }
};

struct Material {
    double conductivity = 0.0; ///< [W/(m K)]
    double density = 0.0;      ///< [kg/m3]
    double emissivity = 0.0;   ///< of every outer surface [-]
};

struct Duty {
    Surroundings surroundings;
    Material material;
    std::vector<job::Part> parts;
    double margin = 0.0;            ///< kept below every junction limit [K]
    std::vector<LawUse> inlet_laws; ///< what the inlet temperature rests on

    double power() const;
};

/// Temperature of the air entering the fins: the stated air, warmed by a sink below if there is one
/// [K].
double inlet_temperature(const job::Job& job);

/// The duty a job states. Pressure follows from the altitude.
Duty duty_of(const job::Job& job);

/// Where air properties stop following the temperature, so that the balance of a hopeless sink
/// still settles [K].
inline constexpr double coldest_film = 150.0, hottest_film = 1000.0;

} // namespace finwright::sink
