#include "src/sheets/results_json.hpp"

#include "correlations/registry.hpp"
#include "src/sheets/cautions.hpp"
#include "src/sheets/plain_units.hpp"
#include "src/sizing/broken_limits.hpp"
#include <cmath>
#include <nlohmann/json.hpp>

namespace finwright::sheets {

using Json = nlohmann::ordered_json;

namespace {

constexpr int indent = 2;

Json geometry_json(const sink::Geometry<double>& g) {
    return {{"fins", g.fins},
            {"fin_height_m", g.height},
            {"fin_thickness_tip_m", g.tip_thickness()},
            {"fin_thickness_root_m", g.thickness},
            {"gap_root_m", g.gap},
            {"pitch_m", g.pitch()},
            {"base_thickness_m", g.base},
            {"width_m", g.width()},
            {"length_m", g.length},
            {"overall_height_m", g.overall_height()},
            {"circumscribing_circle_m", std::hypot(g.width(), g.overall_height())},
            {"flange_m", g.details.flange},
            {"fin_free_length_m", g.details.fin_free},
            {"round_tips", g.details.round_tips},
            {"fin_joint_m2K_W", g.details.joint},
            {"area_factor", g.details.area_factor},
            {"section_area_m2", g.section()}};
}

Json optional_json(const std::optional<double>& value) {
    return value ? Json(*value) : Json(nullptr);
}

Json part_json(const sink::PartRating& part) {
    return {{"name", part.name},
            {"power_W", part.power},
            {"junction_temperature_K", part.junction_temperature},
            {"case_temperature_K", part.case_temperature},
            {"pad_temperature_K", part.pad_temperature},
            {"junction_allowed_K", optional_json(part.junction_allowed)},
            {"headroom_K", optional_json(part.headroom())}};
}

Json view_json(const sink::StillAirView<double>& v) {
    return {{"air", "still"},
            {"channel_wall_rise_K", v.wall_rise},
            {"film_temperature_K", v.film_temperature},
            {"elenbaas_number", v.elenbaas},
            {"channel_film_W_m2K", v.channel_film},
            {"channel_radiation_W_m2K", v.channel_radiation},
            {"outer_film_W_m2K", v.outer_film},
            {"edge_film_W_m2K", v.edge_film},
            {"back_film_W_m2K", v.back_film},
            {"outer_radiation_W_m2K", v.outer_radiation},
            {"inner_fin_efficiency", v.inner_efficiency},
            {"outer_fin_efficiency", v.outer_efficiency}};
}

Json view_json(const sink::MovingAirView<double>& v) {
    return {{"air", "moving"},
            {"film_temperature_K", v.film_temperature},
            {"approach_velocity_m_s", v.approach_velocity},
            {"channel_velocity_m_s", v.channel_velocity},
            {"bypass_velocity_m_s", v.bypass_velocity},
            {"flow_entering_channels_m3_s", v.entering_flow},
            {"flow_leaving_channels_m3_s", v.exit_flow},
            {"air_power_W", v.pressure_drop * v.volume_flow},
            {"outer_film_W_m2K", v.outer_film},
            {"volume_flow_m3_s", v.volume_flow},
            {"hydraulic_diameter_m", v.hydraulic_diameter},
            {"reynolds", v.reynolds},
            {"film_W_m2K", v.film},
            {"inner_fin_efficiency", v.inner_efficiency},
            {"outer_fin_efficiency", v.outer_efficiency},
            {"capacity_flow_W_K", v.capacity_flow},
            {"transfer_units", v.transfer_units}};
}

/// Inputs as "symbol unit": value, in the order of the passport.
Json inputs_json(const sink::LawUse& use) {
    const auto* law = correlations::find_passport(use.passport);
    Json inputs = Json::object();
    for (std::size_t i = 0; i < use.inputs.size(); ++i)
        inputs[std::string(law->inputs[i].symbol) + " " + std::string(law->inputs[i].unit)] =
            use.inputs[i];
    return inputs;
}

Json laws_json(const std::vector<sink::LawUse>& laws) {
    Json list = Json::array();
    for (const auto& use : laws)
        list.push_back({{"law", use.passport},
                        {"role", use.role},
                        {"inputs", inputs_json(use)},
                        {"estimate", correlations::find_passport(use.passport)->estimate},
                        {"outside_range", use.ranges_left()}});
    return list;
}

/// The base's temperature place by place: values[j][i] at (x[i], y[j]).
Json base_map_json(const job::Job& job, const sink::Rating& r) {
    auto duty = sink::duty_of(job);
    duty.parts = sink::at_rated_powers(duty.parts, r);
    const auto field = sink::base_field(sink::base_map(r.geometry, duty, r));
    Json x = Json::array(), y = Json::array(), rises = Json::array();
    for (int i = 0; i < field.across.cells(); ++i)
        x.push_back(field.across.centre(i));
    for (int j = 0; j < field.along.cells(); ++j) {
        y.push_back(field.along.centre(j));
        Json row = Json::array();
        for (int i = 0; i < field.across.cells(); ++i)
            row.push_back(std::round(field.rise(i, j) * 1e4) * 1e-4);
        rises.push_back(std::move(row));
    }
    return {{"across_m", x},
            {"along_m", y},
            {"rise_over_inlet_K", rises},
            {"hottest",
             {{"across_m", field.hottest.x},
              {"along_m", field.hottest.y},
              {"rise_K", field.hottest.rise}}}};
}

/// How powers by table settle; null without a table.
Json feedback_json(const std::optional<sink::Feedback>& feedback) {
    if (!feedback) return nullptr;
    Json runaway = nullptr;
    if (const auto& away = feedback->runaway)
        runaway = {{"part", away->part},
                   {"junction_temperature_K", away->junction},
                   {"loop_gain", away->loop_gain}};
    return {{"loop_gain", feedback->loop_gain},
            {"inlet_air_left_K", optional_json(feedback->air_left)},
            {"runaway", runaway}};
}

Json rating_json(const sink::Rating& r) {
    Json parts = Json::array();
    for (const auto& part : r.parts)
        parts.push_back(part_json(part));
    return {{"power_W", r.power},
            {"air_temperature_K", r.air_temperature},
            {"mass_kg", r.mass},
            {"base_rise_K", r.base_rise},
            {"hottest_pad_rise_K", r.hottest_pad_rise},
            {"sink_resistance_K_W", r.sink_resistance()},
            {"base_resistance_K_W", r.base_resistance()},
            {"pressure_drop_Pa", r.pressure_drop},
            {"outlet_temperature_K", optional_json(r.outlet_temperature())},
            {"heat_W",
             {{"channels", r.heat.channels},
              {"outer_faces", r.heat.outer_faces},
              {"tips_edges", r.heat.tips_edges},
              {"rim", r.heat.rim},
              {"bare_base", r.heat.bare},
              {"back", r.heat.back},
              {"radiation", r.heat.radiation},
              {"wall", r.heat.wall}}},
            {"sun_W", r.sun},
            {"parts", parts},
            {"feedback", feedback_json(r.feedback)},
            {"films", std::visit([](const auto& v) { return view_json(v); }, r.view)},
            {"laws", laws_json(r.laws)}};
}

const char* si_unit(sizing::Measure measure) {
    switch (measure) {
    case sizing::Measure::length:
        return "m";
    case sizing::Measure::ratio:
        return "1";
    case sizing::Measure::mass:
        return "kg";
    case sizing::Measure::pressure:
        return "Pa";
    case sizing::Measure::velocity:
        return "m/s";
    case sizing::Measure::rise:
        return "K";
    }
    return "";
}

const char* si_unit(job::Aim aim) {
    switch (aim) {
    case job::Aim::mass:
        return "kg";
    case job::Aim::volume:
        return "m3";
    case job::Aim::height:
        return "m";
    case job::Aim::footprint:
        return "m2";
    case job::Aim::resistance:
        return "K/W";
    case job::Aim::pressure_drop:
        return "Pa";
    }
    return "";
}

/// [junction in K, power in W], null where the power is one number.
Json table_json(const std::optional<job::PowerTable>& table) {
    if (!table) return nullptr;
    Json points = Json::array();
    for (const auto& point : table->points())
        points.push_back({point.temperature, point.power});
    return points;
}

Json case_rating_json(const std::optional<job::CaseRating>& rating) {
    if (!rating) return nullptr;
    return {{"power_W", rating->power}, {"junction_max_K", rating->junction_max}};
}

Json parts_json(const job::Job& job) {
    Json list = Json::array();
    for (const job::Part& part : job.parts)
        list.push_back({{"name", part.name},
                        {"power_W", part.power},
                        {"power_by_junction_K_W", table_json(part.power_table)},
                        {"junction_limit_K", optional_json(part.junction_limit)},
                        {"junction_to_case_K_W", part.junction_to_case},
                        {"rating_at_25_degC_case", case_rating_json(part.rating)},
                        {"interface_K_W", part.interface},
                        {"contact_area_m2", optional_json(part.contact_area)},
                        {"insulated", part.insulated ? Json(*part.insulated) : Json(nullptr)},
                        {"pad_across_m", part.pad_across},
                        {"pad_along_m", part.pad_along}});
    return list;
}

Json limits_json(const job::Limits& limits) {
    return {{"sink_resistance_K_W", optional_json(limits.sink_resistance)},
            {"mass_kg", optional_json(limits.mass)},
            {"pressure_drop_Pa", optional_json(limits.pressure_drop)},
            {"space_width_m", optional_json(limits.space.width)},
            {"space_height_m", optional_json(limits.space.height)},
            {"space_length_m", optional_json(limits.space.length)}};
}

Json job_json(const job::Job& job) {
    return {{"title", job.title},
            {"file", job.file},
            {"air_temperature_K", job.air.temperature},
            {"inlet_temperature_K", sink::inlet_temperature(job)},
            {"tilt_rad", job.air.mounting.tilt},
            {"fins_level", job.air.mounting.fins_level},
            {"altitude_m", job.air.altitude},
            {"pressure_Pa", sink::duty_of(job).surroundings.pressure},
            {"power_W", job.total_power()},
            {"margin_K", job.limits.margin},
            {"process", job.sink.process.name},
            {"alloy", job.sink.alloy.name},
            {"conductivity_W_mK", job.sink.alloy.conductivity},
            {"density_kg_m3", job.sink.alloy.density},
            {"finish", job.sink.finish.name},
            {"emissivity", job.sink.finish.emissivity},
            {"aim", aim_name(job.sink.aim)},
            {"aim_unit", si_unit(job.sink.aim)},
            {"parts", parts_json(job)},
            {"limits", limits_json(job.limits)}};
}

Json binding_json(const std::vector<sizing::BindingLimit>& binding, const char* worth_key) {
    Json list = Json::array();
    for (const auto& b : binding)
        list.push_back({{"name", b.name},
                        {"reason", b.reason},
                        {"sense", b.sense == sizing::Sense::at_most ? "at most" : "at least"},
                        {"bound", b.bound},
                        {"bound_unit", si_unit(b.measure)},
                        {worth_key, b.worth}});
    return list;
}

Json design_json(const sizing::Design& d) {
    return {{"rounded", geometry_json(d.rounded)},
            {"rounded_aim_SI", d.rounded_aim},
            {"before_rounding", geometry_json(d.optimum)},
            {"before_rounding_aim_SI", d.optimum_aim}};
}

std::string finished(const Json& json) {
    return json.dump(indent) + "\n";
}

} // namespace

std::string results_json(const job::Job& job, const sizing::Answer& answer) {
    Json alternatives = Json::array();
    for (const auto& d : answer.alternatives)
        alternatives.push_back(design_json(d));
    return finished(
        {{"result", "sized"},
         {"job", job_json(job)},
         {"geometry", geometry_json(answer.rating.geometry)},
         {"rating", rating_json(answer.rating)},
         {"base_map", base_map_json(job, answer.rating)},
         {"design", design_json(answer.design)},
         {"binding_limits", binding_json(answer.binding, "aim_saved_SI_per_SI_unit_eased")},
         {"least_aim_before_rounding_SI", answer.least_aim},
         {"alternatives", alternatives},
         {"fin_counts_tried", answer.fin_counts_tried},
         {"cautions", cautions(job, answer.rating)}});
}

std::string results_json(const job::Job& job, const sink::Rating& rating) {
    return finished({{"result", rating.runs_away() ? "runs away" : "rated"},
                     {"broken_limits", sizing::broken_limits(job, rating)},
                     {"job", job_json(job)},
                     {"geometry", geometry_json(rating.geometry)},
                     {"rating", rating_json(rating)},
                     {"base_map", base_map_json(job, rating)},
                     {"cautions", cautions(job, rating)}});
}

std::string results_json(const job::Job& job, const sizing::Refusal& refusal) {
    Json json{{"result", "impossible"},
              {"job", job_json(job)},
              {"reason", refusal.reason},
              {"part", refusal.part},
              {"shortfall_K", refusal.shortfall},
              {"possible_power_W", refusal.possible_power},
              {"binding_limits", binding_json(refusal.binding, "kelvin_gained_per_SI_unit_eased")}};
    if (refusal.closest) {
        json["closest_geometry"] = geometry_json(refusal.closest->geometry);
        json["closest_rating"] = rating_json(*refusal.closest);
    }
    return finished(json);
}

} // namespace finwright::sheets
