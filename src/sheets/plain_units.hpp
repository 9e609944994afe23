#pragma once
// Limits, aims and prices in the words and units of the bench.

#include "src/job/job.hpp"
#include "src/sizing/sizing.hpp"
#include <string>

namespace finwright::sheets {

std::string aim_name(job::Aim aim);                    ///< "mass"
std::string aim_text(job::Aim aim, double value);      ///< "412 g"
std::string bound_text(const sizing::BindingLimit& l); ///< "at most 60.0 mm (space)"
/// "1 mm more saves 14 g"; for a refused job the saving is in kelvin.
std::string price_text(const sizing::BindingLimit& l, job::Aim aim);
std::string price_in_kelvin(const sizing::BindingLimit& l);

} // namespace finwright::sheets
