#pragma once
// Every law of this floor, in one list.

#include "correlations/passport.hpp"
#include <span>
#include <string_view>

namespace finwright::correlations {

std::span<const Passport> registry();

/// The law of that short name, nullptr if there is none.
const Passport* find_passport(std::string_view name);

/// The families the registry is made of, one .cpp each.
std::vector<Passport> air_passports();
std::vector<Passport> natural_convection_passports();
std::vector<Passport> natural_inclined_passports();
std::vector<Passport> forced_convection_passports();
std::vector<Passport> friction_passports();
std::vector<Passport> fin_passports();
std::vector<Passport> radiation_passports();
std::vector<Passport> conduction_passports();

} // namespace finwright::correlations
