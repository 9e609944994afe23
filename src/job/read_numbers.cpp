#include "src/job/read_numbers.hpp"

#include <charconv>
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

int whole_number(const Document& d, const TreeNode& node, const std::string& what) {
    int value = 0;
    const auto* begin = node.text.data();
    const auto* end = begin + node.text.size();
    const auto [stop, error] = std::from_chars(begin, end, value);
    if (node.kind != TreeNode::Kind::scalar || error != std::errc{} || stop != end)
        d.fail(node.place, fmt::format("{} must be a whole number", what),
               fmt::format("write for example {}: 12", what));
    return value;
}

} // namespace finwright::job
