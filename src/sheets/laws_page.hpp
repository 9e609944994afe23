#pragma once
// The laws and their passports as text, and one law worked by hand.

#include "correlations/passport.hpp"
#include <stdexcept>
#include <string>
#include <vector>

namespace finwright::sheets {

/// A law or one of its inputs was named wrongly; what() says which and what was meant.
struct WrongLawInput : std::runtime_error {
    using std::runtime_error::runtime_error;
};

std::string laws_list();
const correlations::Passport& law_named(const std::string& name);
std::string law_page(const correlations::Passport& law);

/// Inputs as "symbol=number" in the passport's units (SI); all are needed, each once.
std::string law_evaluated(const correlations::Passport& law,
                          const std::vector<std::string>& values);

} // namespace finwright::sheets
