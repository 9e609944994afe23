#pragma once
// A row of forced_cfd.csv as the sink model sees it.

#include "src/sink/moving_air.hpp"
#include "tests/reference_rows.hpp"

namespace finwright::tests {

/// Very many thin fins of a perfect conductor on a base held 40 K above the air: what the reference
/// solutions assume.
struct ForcedReference {
    sink::Geometry<double> g;
    sink::Duty duty;

    explicit ForcedReference(const Row& row) {
        g.fins = 201;
        g.gap = number(row, "S_mm") * 1e-3;
        g.thickness = 1e-7;
        g.height = number(row, "H_mm") * 1e-3;
        g.length = number(row, "L_mm") * 1e-3;
        g.base = 5e-3;
        duty.surroundings.air_temperature = number(row, "T_film_K") - 0.5 * number(row, "dT_K");
        duty.material = {1e9, 2700.0, 0.1};
        const double clearance = number(row, "clearance_mm") * 1e-3;
        job::StreamAir stream{number(row, "V_approach_m_s"), std::nullopt};
        if (clearance > 0.0) stream.clearance = job::Clearance{clearance, 0.0};
        duty.surroundings.air = stream;
        if (clearance == 0.0) duty.surroundings.air = sink::DuctVelocity{stream.velocity};
    }
};

} // namespace finwright::tests
