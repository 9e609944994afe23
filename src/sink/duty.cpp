#include "src/sink/duty.hpp"

#include "correlations/atmosphere.hpp"

namespace finwright::sink {

double Duty::power() const {
    double sum = 0.0;
    for (const job::Part& part : parts)
        sum += part.power;
    return sum;
}

namespace {

std::variant<StillAir, DuctVelocity, DuctFlow> air_of(const job::Air& air) {
    const auto* duct = std::get_if<job::DuctedAir>(&air.state);
    if (!duct) return StillAir{std::get<job::StillAir>(air.state).channel_law};
    if (duct->velocity) return DuctVelocity{*duct->velocity};
    return DuctFlow{duct->flow.value()};
}

} // namespace

Duty duty_of(const job::Job& job) {
    Duty duty;
    duty.surroundings.air_temperature = job.air.temperature;
    duty.surroundings.pressure = correlations::pressure_at_altitude(job.air.altitude);
    duty.surroundings.air = air_of(job.air);
    duty.material = {job.sink.alloy.conductivity, job.sink.alloy.density,
                     job.sink.finish.emissivity};
    duty.parts = job.parts;
    duty.margin = job.limits.margin;
    return duty;
}

} // namespace finwright::sink
