#pragma once
// What the engineer asks for, as plain values in SI: metres, watts, kelvin, pascals, kilograms.
// Absolute temperatures are in K; rises, margins and resistances are differences.

#include "src/job/power_table.hpp"
#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace finwright::job {

/// Where something stands in the job file, 1-based; line 0 when it was not written there.
struct Place {
    int line = 0;
    int column = 0;
};

/// A sink dimension as the job leaves it: fixed, bounded on either side, or free. [m, or 1 for the
/// fin count]
struct Range {
    std::optional<double> from;
    std::optional<double> to;
    Place place;

    bool fixed() const { return from && to && *from == *to; }
};

/// A coordinate on the base: metres from its edge, or a share of the base's side (0..1).
struct Coordinate {
    double value = 0.5;
    bool share_of_side = true;
};

/// A junction hotter than this is no semiconductor's: a slip of the unit, or a part that ran away.
inline constexpr double hottest_junction = 873.15; // 600 degC [K]

/// What a data sheet allows at 25 degC case: so much power brings the junction to its maximum.
struct CaseRating {
    double power = 0.0;        ///< [W]
    double junction_max = 0.0; ///< [K]
};

/// One power part bolted to the base.
struct Part {
    std::string name;
    double power = 0.0; ///< dissipated; of a table, what the part is sized for [W]
    std::optional<PowerTable> power_table; ///< power by junction temperature
    std::optional<double> junction_limit;  ///< absolute maximum [K]
    double junction_to_case = 0.0;         ///< [K/W]
    std::optional<CaseRating> rating;      ///< what R_jc was taken from, if it was
    double interface = 0.0;                ///< case to base [K/W]
    std::optional<double> contact_area;    ///< of the interface, where it is not the pad's [m2]
    std::optional<bool> insulated;         ///< tab from what is live inside, if stated
    double pad_across = 0.0;               ///< pad side along the width [m]
    double pad_along = 0.0;                ///< pad side along the length [m]
    std::optional<Coordinate>
        across; ///< pad centre from the left edge; empty: placed by the program
    std::optional<Coordinate>
        along; ///< pad centre from the inlet (lower) end; empty: placed by the program
    Place place;

    double pad_area() const { return pad_across * pad_along; } ///< [m2]
};

/// Which law gives the film coefficient inside still-air channels: this project's fit over
/// published limits, or one of the published laws. The default is chosen by evidence:
/// docs/validation.md.
enum class ChannelLaw { fin_channel, u_channel, parallel_plates, elenbaas };

/// A slow movement of the room's air past a sink in still air.
struct Drift {
    enum class Direction { assisting, opposing, crossing }; ///< up the fins, down them, across them
    double velocity = 0.0;                                  ///< [m/s]
    Direction direction = Direction::assisting;
};

struct StillAir {
    ChannelLaw channel_law = ChannelLaw::fin_channel;
    std::optional<Drift> drift;
};

/// How a sink in still air stands.
struct Mounting {
    double tilt = 0.0;                      ///< of the base from vertical, towards facing up [rad]
    bool fins_level = false;                ///< on an upright base: across gravity, not along it
    bool back_exposed = false;              ///< the parts' side sheds heat too, beside their pads
    std::optional<double> wall_conductance; ///< from the back into a wall [W/K]
    std::optional<double> wall_temperature; ///< of that wall [K]
};

struct Sun {
    double irradiance = 0.0;   ///< on the fins' side, square to the base [W/m2]
    double absorptivity = 0.0; ///< solar [-]
};

/// A sink underneath, whose warm air rises into this one.
struct SinkBelow {
    double power = 0.0;    ///< [W]
    double width = 0.0;    ///< across its fins [m]
    double distance = 0.0; ///< from its top to this sink's inlet [m]
};

/// What besides its air acts on a sink in still air.
struct Around {
    std::optional<double> radiating_temperature; ///< of what the surfaces see; default the air [K]
    std::optional<Sun> sun;
    std::optional<SinkBelow> sink_below;
};

/// Air led through the fins by a duct that fits them closely. Exactly one is given.
struct DuctedAir {
    std::optional<double>
        velocity;               ///< approach velocity in the duct section, width x fin height [m/s]
    std::optional<double> flow; ///< volume flow at inlet conditions [m3/s]
};

/// Space left around the fins inside the duct's walls.
struct Clearance {
    double above = 0.0;  ///< over the fins' tips [m]
    double beside = 0.0; ///< on each side [m]
};

/// Air moving past a sink with room to pass beside it; without a clearance there are no walls.
struct StreamAir {
    double velocity = 0.0; ///< before the sink, over the duct's section [m/s]
    std::optional<Clearance> clearance;
};

/// A fan's points and how it is run.
struct Fan {
    std::string name;
    std::vector<double> flows;     ///< rising [m3/s]
    std::vector<double> pressures; ///< static, one for each flow; the last stretch falls [Pa]
    double density = 1.2;          ///< of the air the curve was measured in [kg/m3]
    double speed = 1.0;            ///< over that of the curve [-]
    int count = 1;
    bool in_series = false;           ///< else in parallel
    std::optional<double> efficiency; ///< air power over electric power [-]
};

/// Air driven by a fan through a duct that closes around the fins, or leaves a clearance. Of
/// several fans the search chooses one.
struct FanAir {
    std::vector<Fan> fans;
    std::optional<Clearance> clearance;
};

struct Air {
    double temperature = 298.15; ///< at the sink's inlet [K]
    double altitude = 0.0;       ///< [m]
    Mounting mounting;           ///< still air
    Around around;               ///< still air
    std::variant<StillAir, DuctedAir, StreamAir, FanAir> state;
};

struct Space {
    std::optional<double> width, height,
        length; ///< overall, across the fins / off the mounting face / along the flow [m]
};

struct Limits {
    double margin = 0.0; ///< kept below every junction limit [K]
    std::optional<double>
        sink_resistance;                 ///< hottest pad's rise over inlet air / total power [K/W]
    std::optional<double> mass;          ///< [kg]
    std::optional<double> pressure_drop; ///< [Pa]
    Space space;
};

struct Alloy {
    std::string name;
    double conductivity = 0.0;  ///< [W/(m K)]
    double density = 0.0;       ///< [kg/m3]
    double specific_heat = 0.0; ///< [J/(kg K)]
    std::string source;
};

struct Finish {
    std::string name;
    double emissivity = 0.0; ///< total hemispherical [-]
    std::string source;
};

/// What a way of making the part can do. Defaults from the catalogue; the job may overrule each.
struct Process {
    std::string name;
    double smallest_thickness = 0.0;                   ///< thinnest point of a fin [m]
    double smallest_gap = 0.0;                         ///< narrowest point of a gap [m]
    double largest_height_to_gap = 0.0;                ///< [-]
    std::optional<double> largest_height_to_thickness; ///< [-]
    std::optional<double> largest_height;              ///< fin height [m]
    double smallest_base = 0.0;                        ///< base thickness [m]
    double smallest_base_to_thickness =
        0.0;                              ///< base thickness / fin thickness, 0 = no such rule [-]
    std::optional<double> largest_circle; ///< circumscribing circle of the section [m]
    std::string source;
};

/// The shop's increments: the drawing carries multiples of these. [m]
struct Steps {
    double fin_height = 0.5e-3;
    double fin_thickness = 0.1e-3;
    double gap = 0.1e-3;
    double base_thickness = 0.5e-3;
    double length = 1e-3;
};

/// What the search makes smallest.
enum class Aim { mass, volume, height, footprint, resistance, pressure_drop };

/// What a drawing adds to N, H, t, S, tb and L.
struct FinDetails {
    double flange = 0.0;      ///< of the base, beyond the fins on each side [m]
    double fin_free = 0.0;    ///< of the length, cleared of fins for mounting [m]
    double joint = 0.0;       ///< of a bonded fin in its groove, over the root's section [m2 K/W]
    double area_factor = 1.0; ///< of serrated fin faces over smooth ones, in moving air [-]
    bool round_tips = false;  ///< full radius instead of square
};

struct Sink {
    Process process;
    Alloy alloy;
    Finish finish; ///< emissivity already overruled by the job where it says so
    Aim aim = Aim::mass;
    Range fins, fin_height, fin_thickness, gap, base_thickness, width, length;
    FinDetails details;
    double fin_draft = 0.0; ///< taper of each fin face from root to tip [rad]
    Steps steps;
};

struct Job {
    std::string title;
    std::string file; ///< as named by the caller
    std::string text; ///< the whole job file, for errors found later
    Air air;
    std::vector<Part> parts;
    Limits limits;
    Sink sink;

    bool has_power_table() const {
        for (const Part& part : parts)
            if (part.power_table) return true;
        return false;
    }

    /// Parts with a table at what they are sized for [W].
    double total_power() const {
        double sum = 0.0;
        for (const Part& part : parts)
            sum += part.power;
        return sum;
    }
};

} // namespace finwright::job
