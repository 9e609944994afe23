#pragma once
// The base rise at which the sink sheds exactly the power put in.

#include "correlations/numbers/dual.hpp"
#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include "src/sink/heat_paths.hpp"

namespace finwright::sink {

/// The sink in balance with its duty, before spreading.
template <class T>
struct Balance {
    T base_rise = T(0.0);     ///< mean of the base over the inlet air [K]
    T pressure_drop = T(0.0); ///< 0 in still air [Pa]
    /// The rise the air side is stated by: the channel walls' in still air, the base's in a duct
    /// [K].
    T driving_rise = T(0.0);
    /// Heat shed per kelvin of the base's rise, beyond what flows at no rise [W/K].
    T conductance = T(0.0);
};

inline constexpr double first_guess = 40.0; ///< [K]

/// Solves shed(driving rise) = power + sun. The heat grows with the rise without end, so there is
/// one root; Newton in logarithms reaches |shed/power - 1| < 1e-12. Derivatives by the implicit
/// function theorem. Throws std::domain_error if the geometry has no room for air (gap or fin tip
/// not positive). `guess` is where the search for the root begins [K]; it moves the last digit at
/// most.
Balance<double> balance(const Geometry<double>& g, const Duty& duty, double guess = first_guess);
Balance<correlations::Dual<5>> balance(const Geometry<correlations::Dual<5>>& g, const Duty& duty,
                                       double guess = first_guess);

/// Heat by path at a driving rise [W].
HeatPaths<double> shed(const Geometry<double>& g, const Duty& duty, double driving_rise);

} // namespace finwright::sink
