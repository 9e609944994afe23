#include "src/job/read_numbers.hpp"

#include <fmt/format.h>

namespace finwright::job {

double positive(const Document& d, Mapping& m, std::string_view key, const QuantityKind& kind) {
    const double value = m.number(key, kind);
    if (value <= 0.0)
        d.fail(m.place_of(key), fmt::format("{} must be above zero", key),
               fmt::format("write for example {}: {}", key, kind.example));
    return value;
}

std::optional<double> optional_positive(const Document& d, Mapping& m, std::string_view key,
                                        const QuantityKind& kind) {
    return m.has(key) ? std::optional(positive(d, m, key, kind)) : std::nullopt;
}

double not_negative(const Document& d, Mapping& m, std::string_view key, const QuantityKind& kind) {
    const double value = m.number(key, kind);
    if (value < 0.0)
        d.fail(m.place_of(key), fmt::format("{} is negative", key),
               fmt::format("write for example {}: {}", key, kind.example));
    return value;
}

} // namespace finwright::job
