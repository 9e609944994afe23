#pragma once
// Quantities as people write them: a number and a unit, read into SI. Levels and differences of
// temperature are kept apart; inside a compound unit a degree is always a difference.

#include <array>
#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace finwright::job {

/// Exponents of length, mass, time, temperature, angle.
using Exponents = std::array<int, 5>;

/// What a number in the job file is expected to be.
struct QuantityKind {
    std::string_view name; ///< "a length"
    Exponents exponents;
    bool level;               ///< an absolute temperature
    std::string_view example; ///< "40 mm"
};

namespace quantity {
inline constexpr QuantityKind length{"a length", {1, 0, 0, 0, 0}, false, "40 mm"};
inline constexpr QuantityKind temperature{"a temperature", {0, 0, 0, 1, 0}, true, "45 degC"};
inline constexpr QuantityKind difference{
    "a temperature difference", {0, 0, 0, 1, 0}, false, "25 K"};
inline constexpr QuantityKind power{"a power", {2, 1, -3, 0, 0}, false, "18 W"};
inline constexpr QuantityKind resistance{
    "a thermal resistance", {-2, -1, 3, 1, 0}, false, "0.8 K/W"};
inline constexpr QuantityKind area_resistance{
    "a resistance times area", {0, -1, 3, 1, 0}, false, "0.6 K cm2/W"};
inline constexpr QuantityKind conductivity{
    "a thermal conductivity", {1, 1, -3, -1, 0}, false, "3 W/(m K)"};
inline constexpr QuantityKind velocity{"a velocity", {1, 0, -1, 0, 0}, false, "3 m/s"};
inline constexpr QuantityKind volume_flow{"a volume flow", {3, 0, -1, 0, 0}, false, "40 m3/h"};
inline constexpr QuantityKind pressure{"a pressure", {-1, 1, -2, 0, 0}, false, "30 Pa"};
inline constexpr QuantityKind mass{"a mass", {0, 1, 0, 0, 0}, false, "500 g"};
inline constexpr QuantityKind density{"a density", {-3, 1, 0, 0, 0}, false, "2700 kg/m3"};
inline constexpr QuantityKind specific_heat{
    "a specific heat", {2, 0, -2, -1, 0}, false, "900 J/(kg K)"};
inline constexpr QuantityKind conductance{
    "a thermal conductance", {2, 1, -3, -1, 0}, false, "2 W/K"};
inline constexpr QuantityKind irradiance{"an irradiance", {0, 1, -3, 0, 0}, false, "900 W/m2"};
inline constexpr QuantityKind angle{"an angle", {0, 0, 0, 0, 1}, false, "0.5 deg"};
inline constexpr QuantityKind pure{"a pure number", {0, 0, 0, 0, 0}, false, "0.85"};
} // namespace quantity

/// Why a text is no quantity of the kind expected, and what to write.
struct UnitError : std::runtime_error {
    UnitError(const std::string& reason, std::string suggestion_)
        : std::runtime_error(reason), suggestion(std::move(suggestion_)) {}
    std::string suggestion;
};

/// "1.13 degC in2/W" as an area resistance -> 7.29e-4 m2 K/W. Throws UnitError.
double read_quantity(std::string_view text, const QuantityKind& kind);

/// Whether the text, less a leading number, is the percent sign.
bool is_share(std::string_view text);

/// Every unit name known, for suggestions and tests.
std::vector<std::string> unit_names();

} // namespace finwright::job
