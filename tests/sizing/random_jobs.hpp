#pragma once
// Random jobs of the kind the program is for, the same on every run.

#include "src/job/catalogue.hpp"
#include "src/job/job.hpp"
#include <cmath>
#include <random>
#include <string>

namespace finwright::tests {

class RandomJobs {
public:
    explicit RandomJobs(unsigned seed) : engine_(seed) {}

    job::Job still() {
        job::Job job = common();
        job.air.state = job::StillAir{};
        return job;
    }

    job::Job ducted() {
        job::Job job = common();
        job.air.state = job::DuctedAir{log_between(1.0, 8.0), std::nullopt};
        job.limits.pressure_drop = log_between(10.0, 200.0);
        for (job::Part& part : job.parts)
            part.power *= 4.0;
        return job;
    }

    /// Still air in some mounting, with what may act on it.
    job::Job mounted() {
        job::Job job = common();
        job::StillAir still;
        if (whole(0, 2) == 0)
            still.drift = job::Drift{log_between(0.05, 0.5), job::Drift::Direction(whole(0, 2))};
        job.air.state = still;
        job.air.mounting.tilt = whole(0, 1) * between(-1.57, 1.57);
        job.air.mounting.fins_level = whole(0, 3) == 0;
        job.air.mounting.back_exposed = whole(0, 1) == 1;
        if (whole(0, 1) == 1) job.air.around.sun = job::Sun{between(100.0, 900.0), 0.5};
        if (whole(0, 2) == 0) job.sink.details.flange = between(1e-3, 10e-3);
        if (whole(0, 2) == 0) job.sink.details.fin_free = between(5e-3, 20e-3);
        for (job::Part& part : job.parts)
            part.power *= 0.4;
        return job;
    }

    /// A stream or one or two fans, mostly with room beside the fins.
    job::Job driven() {
        job::Job job = common();
        std::optional<job::Clearance> clearance;
        if (whole(0, 3) > 0) clearance = job::Clearance{between(1e-3, 15e-3), between(0.0, 8e-3)};
        if (whole(0, 1) == 0) {
            job.air.state = job::StreamAir{log_between(0.8, 8.0), clearance};
        } else {
            job::FanAir air{{fan("first")}, clearance};
            if (whole(0, 1) == 0) air.fans.push_back(fan("second"));
            job.air.state = air;
        }
        for (job::Part& part : job.parts)
            part.power *= 2.0;
        return job;
    }

private:
    job::Fan fan(const char* name) {
        const double flow = log_between(3e-3, 3e-2), pressure = log_between(15.0, 120.0);
        job::Fan fan;
        fan.name = name;
        fan.flows = {0.0, 0.4 * flow, 0.7 * flow, flow};
        fan.pressures = {pressure, 0.75 * pressure, 0.5 * pressure, 0.0};
        return fan;
    }

    double between(double low, double high) {
        return std::uniform_real_distribution<double>(low, high)(engine_);
    }
    double log_between(double low, double high) {
        return std::exp(between(std::log(low), std::log(high)));
    }
    int whole(int low, int high) { return std::uniform_int_distribution<int>(low, high)(engine_); }

    job::Job common() {
        job::Job job;
        job.title = "random job";
        job.air.temperature = between(283.0, 328.0);
        job.air.altitude = between(0.0, 3000.0);
        job.limits.margin = between(10.0, 30.0);
        job.limits.space = {between(0.08, 0.25), between(0.03, 0.08), between(0.08, 0.25)};
        const int parts = whole(1, 3);
        for (int i = 0; i < parts; ++i)
            job.parts.push_back(part(i));
        const auto& processes = job::processes();
        job.sink.process = processes[std::size_t(whole(0, int(processes.size()) - 1))];
        job.sink.alloy = job::alloys()[std::size_t(whole(0, 3))];
        job.sink.finish.emissivity = between(0.05, 0.95);
        job.sink.finish.name = "random";
        return job;
    }

    job::Part part(int i) {
        job::Part p;
        p.name = "part " + std::to_string(i + 1);
        p.power = log_between(4.0, 40.0);
        p.junction_limit = between(398.0, 448.0);
        p.junction_to_case = between(0.1, 1.0);
        p.interface = between(0.05, 0.5);
        p.pad_across = between(0.01, 0.025);
        p.pad_along = between(0.01, 0.03);
        return p;
    }

    std::mt19937 engine_;
};

} // namespace finwright::tests
