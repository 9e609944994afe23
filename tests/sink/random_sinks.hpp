#pragma once
// Random sinks and duties of the kind the program is for, the same on every run.

#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include <cmath>
#include <random>

namespace finwright::tests {

class RandomSinks {
public:
    explicit RandomSinks(unsigned seed) : engine_(seed) {}

    double between(double low, double high) {
        return std::uniform_real_distribution<double>(low, high)(engine_);
    }
    double log_between(double low, double high) {
        return std::exp(between(std::log(low), std::log(high)));
    }
    int whole(int low, int high) { return std::uniform_int_distribution<int>(low, high)(engine_); }

    sink::Geometry<double> geometry() {
        sink::Geometry<double> g;
        g.fins = whole(2, 30);
        g.height = log_between(8e-3, 80e-3);
        g.thickness = log_between(0.8e-3, 4e-3);
        g.gap = log_between(2e-3, 15e-3);
        g.base = log_between(2e-3, 12e-3);
        g.length = log_between(40e-3, 300e-3);
        g.draft_tangent = whole(0, 1) * between(0.0, 0.3) * g.thickness / (2.0 * g.height);
        return g;
    }

    sink::Duty duty(const sink::Geometry<double>& g) {
        sink::Duty duty;
        duty.surroundings.air_temperature = between(263.0, 333.0);
        duty.surroundings.pressure = between(60e3, 102e3);
        duty.material = {between(90.0, 220.0), 2700.0, between(0.05, 0.95)};
        const int parts = whole(1, 3);
        for (int i = 0; i < parts; ++i) {
            job::Part part;
            part.name = "part " + std::to_string(i + 1);
            part.power = log_between(3.0, 60.0);
            part.pad_across = between(0.1, 0.9) * g.width() / parts;
            part.pad_along = between(0.05, 0.8) * g.length;
            duty.parts.push_back(part);
        }
        return duty;
    }

    /// Still air with everything a mounting and its surroundings can bring.
    sink::Duty mounted(const sink::Geometry<double>& g) {
        sink::Duty d = duty(g);
        sink::StillAir still;
        still.mounting.tilt = between(-1.5707, 1.5707) * whole(0, 1);
        still.mounting.fins_level = whole(0, 2) == 0;
        still.mounting.back_exposed = whole(0, 1) == 1;
        if (!still.mounting.back_exposed && whole(0, 1) == 1) {
            still.mounting.wall_conductance = log_between(0.01, 3.0);
            still.mounting.wall_temperature = d.surroundings.air_temperature + between(0.0, 3.0);
        }
        if (whole(0, 1) == 1)
            still.drift = job::Drift{log_between(0.02, 0.9), job::Drift::Direction(whole(0, 2))};
        if (whole(0, 1) == 1) still.sun = job::Sun{between(50.0, 1100.0), between(0.1, 0.95)};
        if (whole(0, 1) == 1)
            d.surroundings.radiating_temperature =
                d.surroundings.air_temperature + between(-3.0, 15.0);
        d.surroundings.air = still;
        return d;
    }

    sink::Duty ducted(const sink::Geometry<double>& g) {
        sink::Duty d = duty(g);
        d.surroundings.air = sink::DuctVelocity{log_between(0.5, 12.0)};
        return d;
    }

    /// A stream past the sink or a fan, with a bypass or without.
    sink::Duty driven(const sink::Geometry<double>& g) {
        sink::Duty d = duty(g);
        std::optional<job::Clearance> clearance;
        if (whole(0, 2) > 0) clearance = job::Clearance{between(1e-3, 0.04), between(0.0, 0.02)};
        if (whole(0, 1) == 0) {
            d.surroundings.air = sink::Stream{log_between(0.5, 12.0), clearance};
            return d;
        }
        job::Fan fan;
        fan.name = "fan";
        const double flow = log_between(2e-3, 5e-2), pressure = log_between(15.0, 200.0);
        fan.flows = {0.0, 0.4 * flow, 0.7 * flow, flow};
        fan.pressures = {pressure, 0.75 * pressure, 0.5 * pressure, 0.0};
        d.surroundings.air = sink::FanDriven{fan, clearance};
        return d;
    }

private:
    std::mt19937 engine_;
};

} // namespace finwright::tests
