#include "src/job/nearest_word.hpp"
#include <doctest/doctest.h>

using finwright::job::nearest_word;

TEST_CASE("nearest word: fewest edits, capitals and dashes aside") {
    const std::vector<std::string> words{"power", "pad", "place", "junction_limit", "mm", "m"};
    CHECK(nearest_word("powr", words) == "power");
    CHECK(nearest_word("Junction-Limit", words) == "junction_limit");
    CHECK(nearest_word("plaec", words) == "place");
    CHECK(nearest_word("plac", words) == "place");
    CHECK(nearest_word("MM", words) == "mm");
    CHECK(nearest_word("x", words).empty());
    CHECK(nearest_word("", words).empty());
    CHECK(nearest_word("colour", words).empty());
}
