#pragma once
// SI values as the page shows them: the unit an engineer reads, the digits that carry meaning.

#include <string>

namespace finwright::sheets {

std::string millimetres(double metres, int decimals = 1); ///< "45.0"
std::string celsius(double kelvin, int decimals = 1);     ///< level, "81.3"
std::string fixed(double value, int decimals);            ///< never "-0.0"
std::string significant(double value, int digits);        ///< plain decimal, no exponent
std::string grams(double kilograms);                      ///< three digits or the whole gram
std::string percent(double share, int decimals = 0);      ///< "34"

/// A dimension in millimetres with the decimals its step asks for, or up to three where it is no
/// multiple.
std::string dimension(double metres, double step_metres);

/// Decimals a dimension needs so that a multiple of the shop's step prints exactly, 1 to 4 [-]
int decimals_for_step(double step_metres);

} // namespace finwright::sheets
