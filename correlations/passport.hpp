#pragma once
// What a law says about itself: enough to check a number by hand and to know when not to trust it.

#include <limits>
#include <span>
#include <string_view>
#include <vector>

namespace finwright::correlations {

inline constexpr double no_bound = std::numeric_limits<double>::infinity();

/// One input: its range is where the source says the law holds.
struct Symbol {
    std::string_view symbol, unit, meaning;
    double lowest = -no_bound, highest = no_bound;
};

struct Quantity {
    std::string_view symbol, unit, meaning;
};

struct Passport {
    std::string_view name;  ///< short, for the command line
    std::string_view title; ///< what and whose
    std::string_view
        source_key; ///< entry of docs/references.bib, or "none" with the reason in the title
    std::string_view equation;
    Quantity result;
    std::vector<Symbol> inputs;
    std::string_view outside;      ///< what is done outside the range
    std::string_view stated_error; ///< in words
    bool from_memory = false;      ///< coefficients not read in the primary paper
    double (*evaluate)(std::span<const double>) = nullptr; ///< inputs in the order above, SI
    /// No published law was at hand: an estimate of this project, to be marked as such wherever it
    /// enters a result.
    bool estimate = false;
};

} // namespace finwright::correlations
