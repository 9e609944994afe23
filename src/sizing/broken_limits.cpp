#include "src/sizing/broken_limits.hpp"

#include <cmath>
#include <fmt/format.h>
#include <optional>

namespace finwright::sizing {

namespace {

constexpr double hair = 1e-9; // relative; what rounding of the file's own numbers may leave

class Breaches {
public:
    void at_most(const char* name, double value, const std::optional<double>& bound, double factor,
                 const char* unit) {
        if (bound && value > *bound * (1.0 + hair)) say(name, value, "more", *bound, factor, unit);
    }
    void at_least(const char* name, double value, double bound, double factor, const char* unit) {
        if (value < bound * (1.0 - hair)) say(name, value, "less", bound, factor, unit);
    }
    std::vector<std::string> sentences;

private:
    void say(const char* name, double value, const char* sense, double bound, double factor,
             const char* unit) {
        sentences.push_back(fmt::format("{} {:.4g}{} is {} than {:.4g}{}", name, value * factor,
                                        unit, sense, bound * factor, unit));
    }
};

} // namespace

std::vector<std::string> broken_limits(const job::Job& job, const sink::Rating& rating) {
    const auto& g = rating.geometry;
    const job::Limits& limits = job.limits;
    const job::Process& shop = job.sink.process;
    Breaches b;
    const auto within = [&](const char* name, double value, const job::Range& range) {
        b.at_most(name, value, range.to, 1e3, " mm");
        if (range.from) b.at_least(name, value, *range.from, 1e3, " mm");
    };
    within("width", g.width(), job.sink.width);
    if (!g.plate()) {
        within("gap", g.gap, job.sink.gap);
        within("fin thickness", g.tip_thickness(), job.sink.fin_thickness);
    }
    b.at_most("width", g.width(), limits.space.width, 1e3, " mm");
    b.at_most("overall height", g.overall_height(), limits.space.height, 1e3, " mm");
    b.at_most("length", g.length, limits.space.length, 1e3, " mm");
    b.at_most("mass", rating.mass, limits.mass, 1e3, " g");
    b.at_most("pressure drop", rating.pressure_drop, limits.pressure_drop, 1.0, " Pa");
    b.at_most("sink resistance", rating.sink_resistance(), limits.sink_resistance, 1.0, " °C/W");
    if (g.plate()) return b.sentences;
    b.at_least("fin thickness", g.tip_thickness(), shop.smallest_thickness, 1e3, " mm");
    b.at_least("gap", g.gap, shop.smallest_gap, 1e3, " mm");
    b.at_least("base thickness", g.base, shop.smallest_base, 1e3, " mm");
    b.at_least("base thickness / fin thickness", g.base / g.thickness,
               shop.smallest_base_to_thickness, 1.0, "");
    b.at_most("fin height", g.height, shop.largest_height, 1e3, " mm");
    b.at_most("fin height / gap", g.height / g.gap, shop.largest_height_to_gap, 1.0, "");
    b.at_most("fin height / thickness", g.height / g.tip_thickness(),
              shop.largest_height_to_thickness, 1.0, "");
    b.at_most("circumscribing circle", std::hypot(g.width(), g.overall_height()),
              shop.largest_circle, 1e3, " mm");
    return b.sentences;
}

} // namespace finwright::sizing
