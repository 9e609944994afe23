#include "src/sheets/numbers_text.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace finwright::sheets {

std::string fixed(double value, int decimals) {
    std::string text = fmt::format("{:.{}f}", value, decimals);
    const bool zero = text.find_first_of("123456789") == std::string::npos;
    if (zero && text.front() == '-') text.erase(0, 1);
    return text;
}

std::string millimetres(double metres, int decimals) {
    return fixed(metres * 1e3, decimals);
}

std::string celsius(double kelvin, int decimals) {
    return fixed(kelvin - 273.15, decimals);
}

std::string significant(double value, int digits) {
    if (value == 0.0 || !std::isfinite(value)) return fmt::format("{}", value);
    const int before_point = int(std::floor(std::log10(std::abs(value)))) + 1;
    return fixed(value, std::clamp(digits - before_point, 0, 9));
}

std::string grams(double kilograms) {
    return kilograms < 0.1 ? significant(kilograms * 1e3, 3) : fixed(kilograms * 1e3, 0);
}

std::string percent(double share, int decimals) {
    return fixed(share * 100.0, decimals);
}

std::string dimension(double metres, double step_metres) {
    constexpr double printed_exactly = 5e-8; // [mm]
    int decimals = decimals_for_step(step_metres);
    for (; decimals < 3; ++decimals) {
        const double scale = std::pow(10.0, decimals);
        if (std::abs(std::round(metres * 1e3 * scale) / scale - metres * 1e3) < printed_exactly)
            break;
    }
    return millimetres(metres, decimals);
}

int decimals_for_step(double step_metres) {
    for (int decimals = 1; decimals < 4; ++decimals) {
        const double scaled = step_metres * 1e3 * std::pow(10.0, decimals);
        if (std::abs(scaled - std::round(scaled)) < 1e-6) return decimals;
    }
    return 4;
}

} // namespace finwright::sheets
