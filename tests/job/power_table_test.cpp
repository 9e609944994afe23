// Powers by junction temperature: straight lines, by hand.
#include "src/job/power_table.hpp"
#include "src/job/read_job.hpp"
#include "tests/near.hpp"

using namespace finwright::job;
using finwright::tests::near;

namespace {

const PowerTable rising({{300.0, 10.0}, {400.0, 14.0}, {450.0, 20.0}});
const PowerTable humped({{300.0, 10.0}, {350.0, 30.0}, {400.0, 20.0}});

const std::string job_text = R"(job: Two switches
air: {state: still, temperature: 40 degC}
parts:
  - name: switch
    power: {at: [[25 degC, 10 W], [212 degF, 14000 mW], [150 degC, 20 W]]}
    junction_limit: 150 degC
    junction_to_case: 0.5 K/W
    interface: {area_resistance: 0.5 K cm2/W}
    pad: {across: 16 mm, along: 20 mm}
limits:
  margin: 25 K
  space: {width: 120 mm, height: 50 mm, length: 100 mm}
sink: {process: extruded-easy, alloy: 6063-T5, finish: black-anodised}
)";

std::string with(std::string text, const std::string& old, const std::string& now) {
    const auto at = text.find(old);
    REQUIRE(at != std::string::npos);
    return text.replace(at, old.size(), now);
}

Part part_of(const std::string& text) {
    return read_job_text(text, "job.yaml").parts.at(0);
}

} // namespace

TEST_CASE("between points a straight line, below them the first power, above them the last slope") {
    CHECK(rising.power_at(250.0) == near(10.0, 1e-15));
    CHECK(rising.power_at(300.0) == near(10.0, 1e-15));
    CHECK(rising.power_at(325.0) == near(11.0, 1e-15));
    CHECK(rising.power_at(400.0) == near(14.0, 1e-15));
    CHECK(rising.power_at(425.0) == near(17.0, 1e-15));
    CHECK(rising.power_at(500.0) == near(26.0, 1e-15)); // 0.12 W/K goes on
}

TEST_CASE("above a last slope that falls the power stays level: the hot side") {
    CHECK(humped.power_at(375.0) == near(25.0, 1e-15));
    CHECK(humped.power_at(900.0) == near(20.0, 1e-15));
}

TEST_CASE("pieces meet: each ends where the next begins, with the same power") {
    for (const PowerTable* table : {&rising, &humped}) {
        const auto& pieces = table->pieces();
        REQUIRE(pieces.size() == table->points().size() + 1);
        for (std::size_t i = 1; i < pieces.size(); ++i) {
            CHECK(pieces[i - 1].to == pieces[i].from);
            CHECK(pieces[i - 1].power_at(pieces[i].from) ==
                  near(pieces[i].power_at(pieces[i].from), 1e-14));
            CHECK(table->piece_at(pieces[i].from) == i);
        }
    }
}

TEST_CASE("the most between two temperatures: at an end, or at a point between") {
    CHECK(rising.most_power(290.0, 425.0) == near(17.0, 1e-15));
    CHECK(humped.most_power(310.0, 390.0) == near(30.0, 1e-15));
    CHECK(humped.most_power(360.0, 390.0) == near(28.0, 1e-15));
}

TEST_CASE("a job's table arrives in SI and is sized at the junction allowed") {
    const Part part = part_of(job_text);
    REQUIRE(part.power_table);
    const auto& points = part.power_table->points();
    REQUIRE(points.size() == 3);
    CHECK(points[1].temperature == near(373.15, 1e-12));
    CHECK(points[1].power == near(14.0, 1e-12));
    CHECK(part.power == near(17.0, 1e-12)); // 125 degC lies halfway from 14 to 20 W
}

TEST_CASE("a falling table is sized at the most in reach: at the air, or at a colder wall") {
    const std::string text =
        with(job_text, "[[25 degC, 10 W], [212 degF, 14000 mW], [150 degC, 20 W]]",
             "[[0 degC, 20 W], [100 degC, 10 W]]");
    CHECK(part_of(text).power == near(16.0, 1e-12)); // 40 degC
    CHECK(
        part_of(text + "mounting: {wall: {conductance: 0.1 W/K, temperature: 20 degC}}\n").power ==
        near(18.0, 1e-12));
}

TEST_CASE("an area-resistance holds over the contact, where one is stated") {
    const std::string stated = "{area_resistance: 0.5 K cm2/W}";
    CHECK(part_of(job_text).interface == near(0.5 / 3.2, 1e-12));
    const Part part = part_of(with(
        job_text, stated, "{area_resistance: 0.5 K cm2/W, contact: {across: 10 mm, along: 8 mm}}"));
    CHECK(part.interface == near(0.5 / 0.8, 1e-12));
    CHECK(*part.contact_area == near(0.8e-4, 1e-12));
    CHECK(part.pad_area() == near(3.2e-4, 1e-12));
    CHECK(part_of(with(job_text, stated,
                       "{thickness: 0.1 mm, conductivity: 2 W/(m K), contacts: 0.1 K cm2/W, "
                       "contact: {across: 10 mm, along: 8 mm}}"))
              .interface == near((0.5 + 0.1) / 0.8, 1e-12));
}

TEST_CASE("insulated: yes, no, or nothing said") {
    const auto said = [](const char* line) {
        return part_of(with(job_text, "    pad:", line + std::string("    pad:"))).insulated;
    };
    CHECK(said("    insulated: yes\n") == true);
    CHECK(said("    insulated: no\n") == false);
    CHECK_FALSE(said(""));
}
