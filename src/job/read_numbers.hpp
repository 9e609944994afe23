#pragma once
// Numbers of a mapping that must not be negative, or must be above zero.

#include "src/job/document.hpp"
#include "src/job/units.hpp"
#include <optional>

namespace finwright::job {

double positive(const Document& d, Mapping& m, std::string_view key, const QuantityKind& kind);
std::optional<double> optional_positive(const Document& d, Mapping& m, std::string_view key,
                                        const QuantityKind& kind);
double not_negative(const Document& d, Mapping& m, std::string_view key, const QuantityKind& kind);

int whole_number(const Document& d, const TreeNode& node, const std::string& what);

} // namespace finwright::job
