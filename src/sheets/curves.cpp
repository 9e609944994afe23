#include "src/sheets/curves.hpp"

#include "src/sink/rating.hpp"
#include <algorithm>
#include <fmt/format.h>
#include <nlohmann/json.hpp>
#include <optional>

namespace finwright::sheets {

using job::Job;

namespace {

constexpr int points_on_a_curve = 20;
constexpr double least_power = 0.1, least_air = 0.25, most = 2.0;   // of the job's [-]
constexpr double usual_altitudes[] = {0.0, 1000.0, 2000.0, 3000.0}; // [m]

std::vector<double> altitudes_of(const Job& job) {
    std::vector<double> list{job.air.altitude};
    for (double altitude : usual_altitudes)
        if (altitude != job.air.altitude) list.push_back(altitude);
    return list;
}

void scale_air(job::StillAir&, double) {}
void scale_air(job::DuctedAir& air, double by) {
    if (air.velocity) *air.velocity *= by;
    if (air.flow) *air.flow *= by;
}
void scale_air(job::StreamAir& air, double by) {
    air.velocity *= by;
}
void scale_air(job::FanAir& air, double by) {
    for (job::Fan& fan : air.fans)
        fan.speed *= by;
}

std::optional<sink::Rating> covered(const Job& job, const sink::Geometry<double>& g) {
    try {
        return sink::rate(g, sink::duty_of(job));
    } catch (const sink::ColderThanAir&) {
        return std::nullopt;
    }
}

std::optional<CurvePoint> point(const char* curve, const Job& job, const sink::Geometry<double>& g,
                                double air) {
    const auto rating = covered(job, g);
    if (!rating) return std::nullopt;
    const auto* moving = std::get_if<sink::MovingAirView<double>>(&rating->view);
    return CurvePoint{curve,
                      job.air.altitude,
                      rating->power,
                      air,
                      moving ? moving->volume_flow : 0.0,
                      rating->pressure_drop,
                      rating->hottest_pad_rise,
                      rating->sink_resistance()};
}

std::optional<CurvePoint> at_power(Job job, const sink::Geometry<double>& g, double share) {
    for (job::Part& part : job.parts)
        part.power *= share;
    return point("power", job, g, 1.0);
}

std::optional<CurvePoint> at_air(Job job, const sink::Geometry<double>& g, double share) {
    std::visit([&](auto& air) { scale_air(air, share); }, job.air.state);
    return point("air", job, g, share);
}

} // namespace

std::vector<CurvePoint> curves(const Job& job, const sink::Geometry<double>& g) {
    const bool still = std::holds_alternative<job::StillAir>(job.air.state);
    const double least = still ? least_power : least_air;
    Job settled = job;
    settled.parts = sink::at_rated_powers(job.parts, sink::rate(g, sink::duty_of(job)));
    std::vector<CurvePoint> list;
    for (double altitude : altitudes_of(job)) {
        Job there = settled;
        there.air.altitude = altitude;
        for (int k = 0; k < points_on_a_curve; ++k) {
            const double share = least + (most - least) * k / (points_on_a_curve - 1);
            const auto at = still ? at_power(there, g, share) : at_air(there, g, share);
            if (at) list.push_back(*at);
        }
    }
    return list;
}

std::string curves_csv(const std::vector<CurvePoint>& points) {
    std::string out = "curve,altitude_m,power_W,air_over_stated,volume_flow_m3_s,pressure_drop_Pa,"
                      "hottest_pad_rise_K,sink_resistance_K_W\n";
    for (const CurvePoint& p : points)
        out += fmt::format("{},{},{},{},{},{},{},{}\n", p.curve, p.altitude, p.power, p.air,
                           p.volume_flow, p.pressure_drop, p.hottest_pad_rise, p.sink_resistance);
    return out;
}

std::string curves_json(const std::vector<CurvePoint>& points) {
    nlohmann::ordered_json list = nlohmann::ordered_json::array();
    for (const CurvePoint& p : points)
        list.push_back({{"curve", p.curve},
                        {"altitude_m", p.altitude},
                        {"power_W", p.power},
                        {"air_over_stated", p.air},
                        {"volume_flow_m3_s", p.volume_flow},
                        {"pressure_drop_Pa", p.pressure_drop},
                        {"hottest_pad_rise_K", p.hottest_pad_rise},
                        {"sink_resistance_K_W", p.sink_resistance}});
    return list.dump(2) + "\n";
}

} // namespace finwright::sheets
