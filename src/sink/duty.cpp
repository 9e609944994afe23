#include "src/sink/duty.hpp"

#include "correlations/air.hpp"
#include "correlations/atmosphere.hpp"
#include "correlations/natural_inclined.hpp"

namespace finwright::sink {

double Duty::power() const {
    double sum = 0.0;
    for (const job::Part& part : parts)
        sum += part.power;
    return sum;
}

namespace {

decltype(Surroundings::air) air_of(const job::Air& air) {
    if (const auto* still = std::get_if<job::StillAir>(&air.state))
        return StillAir{still->channel_law, air.mounting, still->drift, air.around.sun};
    if (const auto* stream = std::get_if<job::StreamAir>(&air.state)) return *stream;
    if (const auto* driven = std::get_if<job::FanAir>(&air.state))
        return FanDriven{driven->fans.front(), driven->clearance};
    const auto& duct = std::get<job::DuctedAir>(air.state);
    if (duct.velocity) return DuctVelocity{*duct.velocity};
    return DuctFlow{duct.flow.value()};
}

/// The plume of a sink below, with what its law is given.
std::vector<LawUse> inlet_laws(const job::Job& job) {
    const auto& below = job.air.around.sink_below;
    if (!below) return {};
    const auto air = correlations::air_at(job.air.temperature,
                                          correlations::pressure_at_altitude(job.air.altitude));
    return {{"plume_rise",
             "inlet air above the sink below",
             {below->power / below->width, below->distance, air.expansion, air.density,
              air.viscosity, air.specific_heat}}};
}

} // namespace

double inlet_temperature(const job::Job& job) {
    const auto laws = inlet_laws(job);
    if (laws.empty()) return job.air.temperature;
    const std::vector<double>& x = laws.front().inputs;
    return job.air.temperature + correlations::plume_rise(x[0], x[1], x[2], x[3], x[4], x[5]);
}

Duty duty_of(const job::Job& job) {
    Duty duty;
    duty.surroundings.air_temperature = inlet_temperature(job);
    duty.surroundings.radiating_temperature = job.air.around.radiating_temperature;
    duty.surroundings.pressure = correlations::pressure_at_altitude(job.air.altitude);
    duty.surroundings.air = air_of(job.air);
    duty.material = {job.sink.alloy.conductivity, job.sink.alloy.density,
                     job.sink.finish.emissivity};
    duty.parts = job.parts;
    duty.inlet_laws = inlet_laws(job);
    duty.margin = job.limits.margin;
    return duty;
}

} // namespace finwright::sink
