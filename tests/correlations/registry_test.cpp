// The registry: every law findable, sourced, and evaluable over its stated range.
#include "correlations/registry.hpp"
#include "tests/near.hpp"
#include <algorithm>
#include <cmath>
#include <fstream>
#include <set>
#include <sstream>
#include <string>

using namespace finwright::correlations;

namespace {

std::string bibliography() {
    std::ifstream in(std::string(CONFIGS_DIR) + "/../docs/references.bib");
    std::stringstream text;
    text << in.rdbuf();
    return text.str();
}

/// A finite value inside the symbol's range: its ends, or something of order one where there is
/// none.
double corner(const Symbol& s, bool high) {
    if (high) return s.highest < no_bound ? s.highest : std::max(10.0, 2.0 * s.lowest);
    return s.lowest > -no_bound ? s.lowest : -10.0;
}

} // namespace

TEST_CASE("names are unique and found again") {
    std::set<std::string_view> names;
    for (const Passport& law : registry()) {
        CHECK(names.insert(law.name).second);
        CHECK(find_passport(law.name) == &law);
    }
    CHECK(find_passport("no such law") == nullptr);
    CHECK(registry().size() >= 50);
}

TEST_CASE("every law is complete, and its source stands in docs/references.bib") {
    const std::string bib = bibliography();
    REQUIRE(bib.size() > 1000);
    for (const Passport& law : registry()) {
        CAPTURE(law.name);
        CHECK_FALSE(law.title.empty());
        CHECK_FALSE(law.equation.empty());
        CHECK_FALSE(law.outside.empty());
        CHECK_FALSE(law.stated_error.empty());
        CHECK_FALSE(law.result.unit.empty());
        CHECK(bool(law.evaluate));
        if (law.source_key == "none")
            CHECK((law.estimate || law.title.find("common practice") != std::string_view::npos));
        else
            CHECK(bib.find("{" + std::string(law.source_key) + ",") != std::string::npos);
        for (const Symbol& s : law.inputs) {
            CHECK_FALSE(s.unit.empty());
            CHECK_FALSE(s.meaning.empty());
            CHECK(s.lowest < s.highest);
        }
    }
}

TEST_CASE("every law gives a finite number in the corners of its range") {
    for (const Passport& law : registry()) {
        if (law.name == "spreading_series" || law.name == "fin_trapezoidal")
            continue; // corners are not all shapes
        CAPTURE(law.name);
        const std::size_t n = law.inputs.size();
        for (std::size_t mask = 0; mask < (std::size_t(1) << n); ++mask) {
            std::vector<double> x;
            for (std::size_t i = 0; i < n; ++i)
                x.push_back(corner(law.inputs[i], (mask >> i & 1) != 0));
            const double value = law.evaluate(x);
            const bool defined =
                std::isfinite(value) || law.name == "log_mean_to_inlet"; // 0/0 without flow
            CHECK(defined);
        }
    }
}
