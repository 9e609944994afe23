// The catalogues are complete, sourced and plausible.

#include "src/job/catalogue.hpp"
#include "src/job/document.hpp"
#include "tests/near.hpp"
#include <algorithm>
#include <set>

using namespace finwright::job;
using finwright::tests::near;

namespace {

template <class Entry>
const Entry& named(const std::vector<Entry>& list, const char* name) {
    const auto found =
        std::find_if(list.begin(), list.end(), [&](const Entry& e) { return e.name == name; });
    REQUIRE(found != list.end());
    return *found;
}

template <class Entry>
void check_named_and_sourced(const std::vector<Entry>& list) {
    std::set<std::string> names;
    for (const Entry& entry : list) {
        CAPTURE(entry.name);
        CHECK(names.insert(entry.name).second);
        CHECK(entry.source.size() >= 10);
    }
}

} // namespace

TEST_CASE("every entry has its own name and a source") {
    check_named_and_sourced(alloys());
    check_named_and_sourced(finishes());
    check_named_and_sourced(processes());
}

TEST_CASE("every process of the shop table is there") {
    for (const char* name : {"extruded-easy", "extruded-moderate", "extruded-difficult", "milled",
                             "slit", "skived", "bonded", "die-cast"})
        named(processes(), name);
    CHECK(processes().size() == 8);
}

TEST_CASE("alloys lie where metals lie") {
    for (const Alloy& alloy : alloys()) {
        CAPTURE(alloy.name);
        CHECK(alloy.conductivity > 80.0);
        CHECK(alloy.conductivity < 410.0); // pure copper at 20 degC 401, from memory
        CHECK(alloy.density > 2500.0);
        CHECK(alloy.density < 9000.0);
        CHECK(alloy.specific_heat > 350.0);
        CHECK(alloy.specific_heat < 1000.0);
    }
}

TEST_CASE("alloys: values of the published tables") {
    // Aluminum Association typical values (secondary text).
    CHECK(named(alloys(), "6063-T5").conductivity == near(209.0, 1e-12));
    // Handbook table (secondary text).
    CHECK(named(alloys(), "6063-T6").conductivity == near(200.0, 1e-12));
    // Aluminum Association typical values, from memory.
    CHECK(named(alloys(), "6061-T6").conductivity == near(167.0, 1e-12));
    // Copper Development Association, Innovations, August 2001.
    CHECK(named(alloys(), "C11000").density == near(8920.0, 1e-12));
    CHECK(named(alloys(), "C11000").specific_heat == near(386.0, 1e-12));
}

TEST_CASE("finishes: bare metal near 0.05 to 0.1, films above 0.8 (handbook ranges)") {
    CHECK(named(finishes(), "bare-extruded").emissivity >= 0.05);
    CHECK(named(finishes(), "bare-extruded").emissivity <= 0.10);
    CHECK(named(finishes(), "clear-anodised").emissivity >= 0.80);
    CHECK(named(finishes(), "black-anodised").emissivity >= 0.80);
    for (const Finish& finish : finishes()) {
        CAPTURE(finish.name);
        CHECK(finish.emissivity > 0.0);
        CHECK(finish.emissivity < 1.0);
    }
}

TEST_CASE("processes take the cautious end of common practice (no source)") {
    const Process& moderate = named(processes(), "extruded-moderate");
    CHECK(moderate.smallest_thickness == near(1.4e-3, 1e-12));
    CHECK(moderate.smallest_gap == near(2.9e-3, 1e-12));
    CHECK(moderate.largest_height_to_gap == near(8.0, 1e-12));
    const Process& difficult = named(processes(), "extruded-difficult");
    CHECK(difficult.largest_height_to_gap == near(12.0, 1e-12));
    CHECK_FALSE(difficult.largest_height_to_thickness);
    CHECK_FALSE(named(processes(), "milled").largest_circle);
    CHECK(named(processes(), "bonded").smallest_base == near(8e-3, 1e-12));
}

TEST_CASE("the catalogue files built in are those in configs") {
    for (const char* name : {"alloys", "finishes", "processes"}) {
        const std::string file = std::string(CONFIGS_DIR) + "/" + name + ".yaml";
        const Document document = parse_document(file, read_text_file(file));
        Mapping catalogue(document, document.root, file);
        for (const char* key : {"description", "source", "date"})
            CHECK(catalogue.text(key).size() >= 10);
        const std::size_t entries = catalogue.required(name).items.size();
        CHECK(entries == (std::string(name) == "alloys"     ? alloys().size()
                          : std::string(name) == "finishes" ? finishes().size()
                                                            : processes().size()));
    }
}
