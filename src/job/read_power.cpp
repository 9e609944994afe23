#include "src/job/read_power.hpp"

#include "src/job/read_numbers.hpp"
#include <algorithm>
#include <fmt/format.h>

namespace finwright::job {

namespace {

// Beyond these a number is a slip of the unit, not a job (common practice, no source).
constexpr double largest_power = 2e4; // of one part [W]
constexpr std::size_t most_points = 100;
constexpr double least_stretch = 0.01; // between two points of a table [K]

constexpr const char* form =
    "write power: {at: [[25 degC, 10 W], [100 degC, 14 W], [150 degC, 20 W]]}";

void refuse_slip(const Document& d, Place place, double power) {
    if (power > largest_power)
        d.fail(place, fmt::format("{:.4g} kW in one part is beyond air cooling", power * 1e-3),
               "check the unit: mW, W or kW");
}

PowerTable::Point read_point(const Document& d, const TreeNode& node) {
    if (node.kind != TreeNode::Kind::sequence || node.items.size() != 2)
        d.fail(node.place, "a point of a power table is a junction temperature and a power", form);
    const PowerTable::Point point{
        quantity_of(d, node.items[0], "junction temperature", quantity::temperature),
        quantity_of(d, node.items[1], "power", quantity::power)};
    if (point.temperature > hottest_junction)
        d.fail(node.items[0].place,
               fmt::format("a junction at {:.0f} degC is no semiconductor's",
                           point.temperature - 273.15),
               "check the unit: degC, degF or K");
    if (point.power <= 0.0)
        d.fail(node.items[1].place, "the powers of a table must be above zero",
               "leave a point out where the part is off");
    refuse_slip(d, node.items[1].place, point.power);
    return point;
}

PowerTable read_table(const Document& d, const TreeNode& node) {
    if (node.kind != TreeNode::Kind::sequence || node.items.size() < 2)
        d.fail(node.place, "a power table is a list of at least two points",
               std::string(form) + ", or one power: 18 W");
    if (node.items.size() > most_points)
        d.fail(node.place, fmt::format("a power table of more than {} points", most_points),
               "straight lines run between the points: fewer will do");
    std::vector<PowerTable::Point> points;
    for (const TreeNode& item : node.items) {
        const PowerTable::Point point = read_point(d, item);
        if (!points.empty() && point.temperature < points.back().temperature + least_stretch)
            d.fail(item.place, "the temperatures of a power table must rise from point to point",
                   "put the points in order, each temperature once");
        points.push_back(point);
    }
    return PowerTable(std::move(points));
}

/// Nothing in the job is colder than this [K].
double coldest_surroundings(const Air& air) {
    return std::min({air.temperature, air.mounting.wall_temperature.value_or(air.temperature),
                     air.around.radiating_temperature.value_or(air.temperature)});
}

} // namespace

void read_power(const Document& d, Mapping& m, Part& part) {
    const TreeNode& node = m.required("power");
    if (node.kind == TreeNode::Kind::mapping) {
        Mapping table(d, node, "power");
        table.only({"at"});
        part.power_table = read_table(d, table.required("at"));
        return;
    }
    part.power = positive(d, m, "power", quantity::power);
    refuse_slip(d, m.place_of("power"), part.power);
}

void set_sizing_powers(Job& job) {
    const double coldest = coldest_surroundings(job.air);
    for (Part& part : job.parts) {
        if (!part.power_table) continue;
        const double hottest = part.junction_limit ? *part.junction_limit - job.limits.margin
                                                   : part.power_table->points().back().temperature;
        part.power = part.power_table->most_power(coldest, std::max(coldest, hottest));
    }
}

} // namespace finwright::job
