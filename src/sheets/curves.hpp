#pragma once
// How a sink does away from its duty point, as data ready for plotting: against power in still air,
// against the air's flow in moving air, and at other altitudes.

#include "src/job/job.hpp"
#include "src/sink/geometry.hpp"
#include <string>
#include <vector>

namespace finwright::sheets {

/// One point of one curve, SI.
struct CurvePoint {
    std::string curve;       ///< "power" or "air"
    double altitude;         ///< [m]
    double power;            ///< of all parts [W]
    double air;              ///< stated velocity, flow or fan speed over the job's; 1 in still air
    double volume_flow;      ///< 0 in still air [m3/s]
    double pressure_drop;    ///< 0 in still air [Pa]
    double hottest_pad_rise; ///< over the inlet air [K]
    double sink_resistance;  ///< [K/W]
};

/// Still air: power from a tenth to twice the job's. Moving air: the air from a quarter to twice
/// the job's. Each at the job's altitude and at sea level, 1000, 2000 and 3000 m. Powers by table
/// are held where they settle.
/// Points at which a wall or surroundings would hold the base colder than its air are left out.
std::vector<CurvePoint> curves(const job::Job& job, const sink::Geometry<double>& g);

std::string curves_csv(const std::vector<CurvePoint>& points);
std::string curves_json(const std::vector<CurvePoint>& points);

} // namespace finwright::sheets
