#include "src/job/read_air.hpp"

#include "src/job/read_numbers.hpp"
#include <fmt/format.h>
#include <numbers>

namespace finwright::job {

namespace {

// Beyond these a number is a slip of the unit, not a job (common practice, no source).
constexpr double fastest_air = 100.0;                            // [m/s]
constexpr double largest_flow = 10.0;                            // [m3/s]
constexpr double fastest_drift = 1.0;                            // faster air is a stream [m/s]
constexpr double brightest_sun = 1500.0;                         // [W/m2]
constexpr double most_upright = 80.0 * std::numbers::pi / 180.0; // [rad]
constexpr double least_distance = 20e-3;                         // between stacked sinks [m]
constexpr double least_clearance = 1e-4;           // tighter is a duct that closes [m]
constexpr double quarter = 0.5 * std::numbers::pi; // [rad]

double air_temperature(Mapping& m, std::string_view key) {
    const double value = m.number(key, quantity::temperature);
    if (value < 223.149 || value > 473.151)
        m.fail(key, "the air temperature lies outside -50 to 200 degC",
               "check the unit: degC, degF or K");
    return value;
}

ChannelLaw read_channel_law(Mapping& m) {
    static const std::vector<std::pair<std::string, ChannelLaw>> laws{
        {"fin_channel", ChannelLaw::fin_channel},
        {"u_channel", ChannelLaw::u_channel},
        {"parallel_plates", ChannelLaw::parallel_plates},
        {"elenbaas", ChannelLaw::elenbaas}};
    const std::string text = m.optional_text("channel_law").value_or("fin_channel");
    for (const auto& [name, law] : laws)
        if (name == text) return law;
    m.fail("channel_law", fmt::format("there is no channel law '{}'", text),
           "write fin_channel, u_channel, parallel_plates or elenbaas");
}

std::optional<Drift> read_drift(const Document& d, Mapping& air) {
    const TreeNode* node = air.optional("drift");
    if (!node) return std::nullopt;
    Mapping m(d, *node, "drift");
    m.only({"velocity", "direction"});
    Drift drift;
    drift.velocity = positive(d, m, "velocity", quantity::velocity);
    if (drift.velocity > fastest_drift)
        m.fail("velocity", fmt::format("{:.3g} m/s is no drift but a stream", drift.velocity),
               "write state: stream with its velocity, or check the unit");
    const std::string direction = m.text("direction");
    if (direction == "assisting")
        drift.direction = Drift::Direction::assisting;
    else if (direction == "opposing")
        drift.direction = Drift::Direction::opposing;
    else if (direction == "crossing")
        drift.direction = Drift::Direction::crossing;
    else
        m.fail("direction", fmt::format("a drift has no direction '{}'", direction),
               "write assisting (up the fins), opposing (down them) or crossing");
    return drift;
}

/// The base's tilt from vertical, by name or as an angle.
double read_tilt(Mapping& m) {
    if (m.has("base") && m.has("tilt"))
        m.fail("tilt", "base and tilt say the same thing twice", "keep one of them",
               m.place_of("base"));
    if (m.has("tilt")) {
        const double tilt = m.number("tilt", quantity::angle);
        if (std::abs(tilt) > quarter * (1.0 + 1e-9))
            m.fail("tilt", "a base tilts from -90 deg (fins down) to 90 deg (fins up)",
                   "0 deg is upright");
        return tilt;
    }
    const std::string base = m.optional_text("base").value_or("upright");
    if (base == "upright") return 0.0;
    if (base == "facing_up") return quarter;
    if (base == "facing_down") return -quarter;
    m.fail("base", fmt::format("a base does not stand '{}'", base),
           "write upright, facing_up or facing_down, or give tilt: 30 deg instead");
}

bool read_one_of(Mapping& m, const char* key, const char* no, const char* yes) {
    const std::string text = m.optional_text(key).value_or(no);
    if (text != no && text != yes)
        m.fail(key, fmt::format("{} cannot be '{}'", key, text),
               fmt::format("write {} or {}", no, yes));
    return text == yes;
}

Mounting read_mounting(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "mounting");
    m.only({"base", "tilt", "fins", "back", "wall"});
    Mounting mounting;
    mounting.tilt = read_tilt(m);
    mounting.fins_level = read_one_of(m, "fins", "upright", "level");
    mounting.back_exposed = read_one_of(m, "back", "covered", "exposed");
    if (const TreeNode* wall = m.optional("wall")) {
        if (mounting.back_exposed)
            m.fail("wall", "a back on a wall is not exposed", "keep one of them",
                   m.place_of("back"));
        Mapping w(d, *wall, "wall");
        w.only({"conductance", "temperature"});
        mounting.wall_conductance = positive(d, w, "conductance", quantity::conductance);
        mounting.wall_temperature = w.number("temperature", quantity::temperature);
    }
    return mounting;
}

Sun read_sun(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "sun");
    m.only({"irradiance", "absorptivity"});
    Sun sun;
    sun.irradiance = positive(d, m, "irradiance", quantity::irradiance);
    if (sun.irradiance > brightest_sun)
        m.fail("irradiance", "no sun is that bright", "full sun is about 1000 W/m2");
    sun.absorptivity = positive(d, m, "absorptivity", quantity::pure);
    if (sun.absorptivity > 1.0)
        m.fail("absorptivity", "an absorptivity is at most 1", "write for example 0.6, or 60 %");
    return sun;
}

SinkBelow read_sink_below(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "sink_below");
    m.only({"power", "width", "distance"});
    const SinkBelow below{positive(d, m, "power", quantity::power),
                          positive(d, m, "width", quantity::length),
                          positive(d, m, "distance", quantity::length)};
    if (below.distance < least_distance)
        m.fail("distance", "a sink that close below is the same sink",
               "leave 20 mm or more between them, or size both as one");
    return below;
}

Around read_around(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "around");
    m.only({"radiating_temperature", "sun", "sink_below"});
    Around around;
    if (m.has("radiating_temperature"))
        around.radiating_temperature = m.number("radiating_temperature", quantity::temperature);
    if (const TreeNode* sun = m.optional("sun")) around.sun = read_sun(d, *sun);
    if (const TreeNode* below = m.optional("sink_below"))
        around.sink_below = read_sink_below(d, *below);
    return around;
}

/// Up the fins and down them needs fins that stand.
void refuse_drift_without_up(Mapping& air, const StillAir& still, const Mounting& mounting) {
    const bool stands = !mounting.fins_level && std::abs(mounting.tilt) < most_upright;
    if (!still.drift || stands || still.drift->direction == Drift::Direction::crossing) return;
    air.fail("drift", "lying or level fins have no up for a drift to assist or oppose",
             "write direction: crossing");
}

void refuse_for_moving_air(const Document& d, const TreeNode* group, const char* name,
                           Place state) {
    if (group)
        d.fail(group->place, fmt::format("{} goes with still air", name),
               "write air state: still, or leave the group out", state);
}

StillAir read_still(const Document& d, Mapping& m) {
    for (const char* key : {"velocity", "flow"})
        if (m.has(key))
            m.fail(key,
                   fmt::format("still air cannot have a {}; 'state: still' stands in line {}", key,
                               m.place_of("state").line),
                   "write state: ducted, or leave this line out", m.place_of("state"));
    return {read_channel_law(m), read_drift(d, m)};
}

void refuse_still_keys(Mapping& m) {
    if (m.has("channel_law"))
        m.fail("channel_law", "a channel law is chosen for still air only", "leave the line out",
               m.place_of("state"));
    if (m.has("drift"))
        m.fail("drift", "a drift goes with still air", "leave the line out", m.place_of("state"));
}

DuctedAir read_duct(const Document& d, Mapping& m) {
    const bool velocity = m.has("velocity"), flow = m.has("flow");
    if (velocity && flow)
        m.fail("flow", "ducted air has a velocity and a flow; one follows from the other",
               "keep one of them", m.place_of("velocity"));
    if (!velocity && !flow)
        m.fail("state", "ducted air needs its velocity or its flow",
               "add velocity: 3 m/s or flow: 40 m3/h");
    DuctedAir duct;
    duct.velocity = optional_positive(d, m, "velocity", quantity::velocity);
    duct.flow = optional_positive(d, m, "flow", quantity::volume_flow);
    if (duct.velocity && *duct.velocity > fastest_air)
        m.fail("velocity", fmt::format("{:.0f} m/s is beyond any fan", *duct.velocity),
               "is it ft/min (196.85 of them are 1 m/s)?");
    if (duct.flow && *duct.flow > largest_flow)
        m.fail("flow", fmt::format("{:.4g} m3/s is beyond any sink's fan", *duct.flow),
               "is it m3/h, L/s or cfm?");
    return duct;
}

Clearance read_clearance(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "clearance");
    m.only({"above", "beside"});
    Clearance c;
    if (m.has("above")) c.above = not_negative(d, m, "above", quantity::length);
    if (m.has("beside")) c.beside = not_negative(d, m, "beside", quantity::length);
    if (c.above + c.beside < least_clearance)
        d.fail(node.place, "a clearance leaves at least 0.1 mm above or beside the fins",
               "write state: ducted where the duct closes around them");
    return c;
}

std::optional<Clearance> optional_clearance(const Document& d, Mapping& m) {
    const TreeNode* node = m.optional("clearance");
    return node ? std::optional(read_clearance(d, *node)) : std::nullopt;
}

StreamAir read_stream(const Document& d, Mapping& m) {
    if (m.has("flow"))
        m.fail("flow", "a stream is stated by its velocity", "write velocity: 2 m/s");
    StreamAir stream;
    stream.velocity = positive(d, m, "velocity", quantity::velocity);
    if (stream.velocity > fastest_air)
        m.fail("velocity", fmt::format("{:.0f} m/s is beyond any fan", stream.velocity),
               "is it ft/min (196.85 of them are 1 m/s)?");
    stream.clearance = optional_clearance(d, m);
    return stream;
}

/// [flow, pressure] pairs.
void read_curve(const Document& d, const TreeNode& node, Fan& fan) {
    constexpr const char* form =
        "write curve: [[0 m3/h, 60 Pa], [30 m3/h, 42 Pa], [55 m3/h, 0 Pa]]";
    if (node.kind != TreeNode::Kind::sequence || node.items.size() < 2)
        d.fail(node.place, "a fan curve is a list of at least two points", form);
    for (const TreeNode& point : node.items) {
        if (point.kind != TreeNode::Kind::sequence || point.items.size() != 2)
            d.fail(point.place, "a point of a fan curve is a flow and a pressure", form);
        const double flow = quantity_of(d, point.items[0], "flow", quantity::volume_flow);
        const double pressure = quantity_of(d, point.items[1], "pressure", quantity::pressure);
        if (flow < 0.0 || pressure < 0.0)
            d.fail(point.place, "flow and pressure of a fan are not negative", form);
        if (flow > largest_flow)
            d.fail(point.items[0].place, fmt::format("{:.4g} m3/s is beyond any sink's fan", flow),
                   "is it m3/h, L/s or cfm?");
        if (!fan.flows.empty() && flow <= fan.flows.back())
            d.fail(point.place, "the flows of a fan curve must rise from point to point",
                   "put the points in order");
        fan.flows.push_back(flow);
        fan.pressures.push_back(pressure);
    }
    if (fan.flows.front() > 0.0)
        d.fail(node.items.front().place, "a fan curve begins at no flow",
               "add the shut-off pressure: [0 m3/h, 60 Pa]");
    const std::size_t n = fan.pressures.size();
    if (fan.pressures[n - 1] >= fan.pressures[n - 2])
        d.fail(node.items.back().place,
               "the last stretch of a fan curve must fall: towards free delivery pressure goes",
               "check the last two points");
    if (fan.pressures.front() <= 0.0)
        d.fail(node.items.front().place, "a fan gives pressure against no flow",
               "check the first point");
}

Fan read_fan(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "a fan");
    m.only({"name", "curve", "density", "speed", "count", "arrangement", "efficiency"});
    Fan fan;
    fan.name = m.text("name");
    read_curve(d, m.required("curve"), fan);
    fan.density = optional_positive(d, m, "density", quantity::density).value_or(fan.density);
    fan.speed = optional_positive(d, m, "speed", quantity::pure).value_or(1.0);
    if (fan.speed > 2.0)
        m.fail("speed", "a fan at more than twice the speed of its curve is another fan",
               "write for example speed: 80 %");
    if (m.has("count")) fan.count = whole_number(d, m.required("count"), "count");
    if (fan.count < 1 || fan.count > 16)
        m.fail("count", "count must be 1 to 16", "write for example count: 2");
    fan.in_series = read_one_of(m, "arrangement", "parallel", "series");
    fan.efficiency = optional_positive(d, m, "efficiency", quantity::pure);
    if (fan.efficiency && *fan.efficiency > 0.9)
        m.fail("efficiency", "no small fan turns more than nine tenths into air power",
               "write for example efficiency: 25 %");
    return fan;
}

FanAir read_fans(const Document& d, Mapping& m) {
    for (const char* key : {"velocity", "flow"})
        if (m.has(key))
            m.fail(key, fmt::format("the fan decides the {}", key),
                   "leave the line out, or write state: ducted", m.place_of("state"));
    const TreeNode& list = m.required("fans");
    if (list.kind != TreeNode::Kind::sequence || list.items.empty())
        d.fail(list.place, "fans must be a list of at least one fan",
               "write '- name: ...' lines below it");
    FanAir air;
    for (const TreeNode& item : list.items) {
        air.fans.push_back(read_fan(d, item));
        for (std::size_t i = 0; i + 1 < air.fans.size(); ++i)
            if (air.fans[i].name == air.fans.back().name)
                d.fail(item.place, fmt::format("there are two fans named '{}'", air.fans[i].name),
                       "give each its own name");
    }
    air.clearance = optional_clearance(d, m);
    return air;
}

void refuse_keys(Mapping& m, std::initializer_list<const char*> keys, const char* state) {
    for (const char* key : keys)
        if (m.has(key))
            m.fail(key, fmt::format("{} does not go with air state {}", key, state),
                   "leave the line out, or change the state", m.place_of("state"));
}

} // namespace

Air read_air(const Document& d, const TreeNode& node, const TreeNode* mounting,
             const TreeNode* around) {
    Mapping m(d, node, "air");
    m.only({"state", "temperature", "altitude", "velocity", "flow", "channel_law", "drift",
            "clearance", "fans"});
    Air air;
    air.temperature = air_temperature(m, "temperature");
    air.altitude = m.optional_number("altitude", quantity::length).value_or(0.0);
    if (air.altitude < -430.0 || air.altitude > 11000.0)
        m.fail("altitude", "the altitude lies outside -430 to 11 000 m", "check the unit: m or ft");
    const std::string state = m.text("state");
    if (state == "still") {
        refuse_keys(m, {"clearance", "fans"}, "still");
        air.state = read_still(d, m);
        if (mounting) air.mounting = read_mounting(d, *mounting);
        refuse_drift_without_up(m, std::get<StillAir>(air.state), air.mounting);
        if (around) air.around = read_around(d, *around);
        return air;
    }
    refuse_still_keys(m);
    refuse_for_moving_air(d, mounting, "mounting", m.place_of("state"));
    refuse_for_moving_air(d, around, "around", m.place_of("state"));
    if (state == "ducted") {
        refuse_keys(m, {"clearance", "fans"}, "ducted, which closes around the fins");
        air.state = read_duct(d, m);
    } else if (state == "stream") {
        refuse_keys(m, {"fans"}, "stream");
        air.state = read_stream(d, m);
    } else if (state == "fan") {
        air.state = read_fans(d, m);
    } else {
        m.fail("state", fmt::format("air state '{}' is not known", state),
               "write still, ducted, stream or fan");
    }
    return air;
}

} // namespace finwright::job
