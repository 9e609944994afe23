#include "correlations/registry.hpp"

#include <algorithm>

namespace finwright::correlations {

namespace {

std::vector<Passport> collected() {
    std::vector<Passport> all;
    for (auto family : {air_passports, natural_convection_passports, natural_inclined_passports,
                        forced_convection_passports, friction_passports, fin_passports,
                        radiation_passports, conduction_passports})
        for (const Passport& law : family())
            all.push_back(law);
    return all;
}

} // namespace

std::span<const Passport> registry() {
    static const std::vector<Passport> laws = collected();
    return laws;
}

const Passport* find_passport(std::string_view name) {
    const auto laws = registry();
    const auto found = std::find_if(laws.begin(), laws.end(),
                                    [&](const Passport& law) { return law.name == name; });
    return found == laws.end() ? nullptr : &*found;
}

} // namespace finwright::correlations
