// What a job file becomes: SI values, catalogue data, the demo jobs.

#include "src/job/read_job.hpp"
#include "tests/near.hpp"
#include <cmath>
#include <string>

using namespace finwright::job;
using finwright::tests::near;

namespace {

const std::string metric = R"(job: Two ways of writing one job
air: {state: ducted, temperature: 40 degC, altitude: 304.8 m, velocity: 2.54 m/s}
parts:
  - name: bridge
    power: 120 W
    junction_limit: 150 degC
    junction_to_case: 0.2 K/W
    interface: {area_resistance: 0.64516 K cm2/W}
    pad: {across: 38.1 mm, along: 88.9 mm}
    place: {across: 50.8 mm, along: 40 %}
limits:
  margin: 25 K
  mass: 907.18474 g
  pressure_drop: 24.908891 Pa
  space: {width: 101.6 mm, height: 50.8 mm, length: 152.4 mm}
sink:
  process: extruded-moderate
  alloy: 6063-T5
  finish: bare-extruded
  fin_height: {to: 25.4 mm}
  fin_thickness: 1.524 mm
)";

const std::string customary = R"(job: Two ways of writing one job
air: {state: ducted, temperature: 104 degF, altitude: 1000 ft, velocity: 500 ft/min}
parts:
  - name: bridge
    power: 0.12 kW
    junction_limit: 302 degF
    junction_to_case: 0.36 degF/W
    interface: {area_resistance: 0.1 degC in2/W}
    pad: {across: 1.5 in, along: 3.5 in}
    place: {across: 2 in, along: 40 %}
limits:
  margin: 45 degF
  mass: 2 lb
  pressure_drop: 0.1 inH2O
  space: {width: 4 in, height: 2 in, length: 6 in}
sink:
  process: extruded-moderate
  alloy: 6063-T5
  finish: bare-extruded
  fin_height: {to: 1 in}
  fin_thickness: 60 mil
)";

std::string with(std::string text, const std::string& old, const std::string& now) {
    const auto at = text.find(old);
    REQUIRE(at != std::string::npos);
    return text.replace(at, old.size(), now);
}

Job read(const std::string& text) {
    return read_job_text(text, "job.yaml");
}

} // namespace

TEST_CASE("inches and millimetres give the same job") {
    const Job a = read(metric), b = read(customary);
    constexpr double same = 1e-12;
    const auto& duct_a = std::get<DuctedAir>(a.air.state);
    const auto& duct_b = std::get<DuctedAir>(b.air.state);
    CHECK(a.air.temperature == near(b.air.temperature, same));
    CHECK(a.air.altitude == near(b.air.altitude, same));
    CHECK(*duct_a.velocity == near(*duct_b.velocity, same));
    const Part &p = a.parts.at(0), &q = b.parts.at(0);
    CHECK(p.power == near(q.power, same));
    CHECK(*p.junction_limit == near(*q.junction_limit, same));
    CHECK(p.junction_to_case == near(q.junction_to_case, same));
    CHECK(p.interface == near(q.interface, same));
    CHECK(p.pad_across == near(q.pad_across, same));
    CHECK(p.pad_along == near(q.pad_along, same));
    CHECK(p.across->value == near(q.across->value, same));
    CHECK(a.limits.margin == near(b.limits.margin, same));
    CHECK(*a.limits.mass == near(*b.limits.mass, same));
    CHECK(*a.limits.pressure_drop == near(*b.limits.pressure_drop, same));
    CHECK(*a.limits.space.width == near(*b.limits.space.width, same));
    CHECK(*a.limits.space.height == near(*b.limits.space.height, same));
    CHECK(*a.limits.space.length == near(*b.limits.space.length, same));
    CHECK(*a.sink.fin_height.to == near(*b.sink.fin_height.to, same));
    CHECK(*a.sink.fin_thickness.from == near(*b.sink.fin_thickness.from, same));
}

TEST_CASE("values arrive in SI, ranges open where nothing was said") {
    const Job job = read(metric);
    CHECK(job.title == "Two ways of writing one job");
    CHECK(job.file == "job.yaml");
    CHECK(job.text == metric);
    CHECK(job.air.temperature == near(313.15, 1e-12));
    CHECK(job.total_power() == near(120.0, 1e-12));
    CHECK_FALSE(job.parts.at(0).across->share_of_side);
    CHECK(job.parts.at(0).along->share_of_side);
    CHECK(job.parts.at(0).along->value == near(0.4, 1e-12));
    CHECK_FALSE(job.sink.fin_height.from);
    CHECK_FALSE(job.sink.fin_height.fixed());
    CHECK(job.sink.fin_thickness.fixed());
    CHECK_FALSE(job.sink.gap.from);
    CHECK_FALSE(job.sink.gap.to);
    CHECK(job.sink.aim == Aim::mass);
    CHECK(job.sink.alloy.conductivity == near(209.0, 1e-12)); // 6063-T5, the catalogue's
    CHECK(job.sink.process.name == "extruded-moderate");
}

TEST_CASE("interfaces: four ways of stating one, by definition of the quantities") {
    const std::string stated = "interface: {area_resistance: 0.64516 K cm2/W}";
    const double area = 38.1e-3 * 88.9e-3;
    CHECK(read(metric).parts[0].interface == near(0.64516e-4 / area, 1e-12));
    CHECK(read(with(metric, stated, "interface: {resistance: 0.03 K/W}")).parts[0].interface ==
          near(0.03, 1e-12));
    CHECK(read(with(metric, stated, "interface: {thickness: 0.1 mm, conductivity: 3 W/(m K)}"))
              .parts[0]
              .interface == near(1e-4 / (3.0 * area), 1e-12));
    CHECK(read(with(metric, stated,
                    "interface: {thickness: 0.1 mm, conductivity: 3 W/(m K), contacts: 0.2 K "
                    "cm2/W}"))
              .parts[0]
              .interface == near((1e-4 / 3.0 + 0.2e-4) / area, 1e-12));
    CHECK(read(with(metric, "    " + stated + "\n", "")).parts[0].interface == 0.0);
}

TEST_CASE("a 25 degC case rating: R_jc = (Tj,max - 25 degC) / P") {
    const auto rated = [](const std::string& rating) {
        return read(with(metric, "junction_to_case: 0.2 K/W", "rating: " + rating)).parts[0];
    };
    const Part part = rated("{power: 500 W, junction_max: 150 degC}");
    CHECK(part.junction_to_case == near(125.0 / 500.0, 1e-12));
    CHECK(part.rating->power == near(500.0, 1e-12));
    CHECK(part.rating->junction_max == near(423.15, 1e-12));
    // Common practice: derating by 2 W/degC from 25 degC case to nothing at 175 degC is 300 W at
    // 25 degC and 1/2 K/W, whatever the job allows the junction.
    const Part derated = rated("{power: 300 W, junction_max: 175 degC}");
    CHECK(derated.junction_to_case == near(0.5, 1e-12));
    CHECK(*derated.junction_limit == near(423.15, 1e-12));
}

TEST_CASE("count makes equal parts with names of their own") {
    std::string text =
        with(metric, "    place: {across: 50.8 mm, along: 40 %}\n", "    count: 2\n");
    const Job job = read(text);
    REQUIRE(job.parts.size() == 2);
    CHECK(job.parts[0].name == "bridge 1");
    CHECK(job.parts[1].name == "bridge 2");
    CHECK(job.parts[1].power == near(120.0, 1e-12));
    CHECK(job.total_power() == near(240.0, 1e-12));
}

TEST_CASE("the shop overrules the catalogue, and only where it says so") {
    const Job plain = read(metric);
    const Job job = read(metric + "shop:\n"
                                  "  smallest_gap: 2 mm\n"
                                  "  largest_height_to_gap: 11\n"
                                  "  largest_circle: 8 in\n"
                                  "  steps: {gap: 0.25 mm, length: 5 mm}\n");
    CHECK(job.sink.process.smallest_gap == near(2e-3, 1e-12));
    CHECK(job.sink.process.largest_height_to_gap == near(11.0, 1e-12));
    CHECK(*job.sink.process.largest_circle == near(0.2032, 1e-12));
    CHECK(job.sink.steps.gap == near(0.25e-3, 1e-12));
    CHECK(job.sink.steps.length == near(5e-3, 1e-12));
    CHECK(job.sink.process.smallest_thickness == plain.sink.process.smallest_thickness);
    CHECK(job.sink.steps.fin_height == plain.sink.steps.fin_height);
}

TEST_CASE("a stated emissivity overrules the finish and says whose it is") {
    const Job job = read(metric + "  emissivity: 0.31\n");
    CHECK(job.sink.finish.emissivity == near(0.31, 1e-12));
    CHECK(job.sink.finish.name == "bare-extruded");
    CHECK(job.sink.finish.source == "job");
}

TEST_CASE("at the edge of what is allowed") {
    CHECK_NOTHROW(read(with(metric, "altitude: 304.8 m", "altitude: 11000 m")));
    CHECK_NOTHROW(read(with(metric, "altitude: 304.8 m", "altitude: -430 m")));
    CHECK_NOTHROW(read(metric + "  fin_draft: 5 deg\n"));
    CHECK_NOTHROW(read(metric + "  width: 4 in\n")); // the space, to the last bit
    CHECK_NOTHROW(read(metric + "  emissivity: 1\n"));
}

TEST_CASE("fins, gaps and width that add up are taken") {
    // 10 x 1.524 + 9 x 5 = 60.24
    const std::string centred = with(metric, "across: 50.8 mm, along", "across: 50 %, along");
    CHECK_NOTHROW(read(centred + "  fins: 10\n  gap: 5 mm\n  width: 60.24 mm\n"));
    // Each face leans by 1 deg over 20 mm: 0.6982 mm more at the root of each fin.
    std::string tapered = with(centred, "fin_height: {to: 25.4 mm}", "fin_height: 20 mm");
    const double width = 60.24 + 10.0 * 40.0 * std::tan(std::acos(-1.0) / 180.0);
    CHECK_NOTHROW(read(tapered + "  fins: 10\n  gap: 5 mm\n  fin_draft: 1 deg\n  width: " +
                       std::to_string(width) + " mm\n"));
}

TEST_CASE("without a junction limit a part needs only its pad and a limit on the sink") {
    std::string text =
        with(metric, "    junction_limit: 150 degC\n    junction_to_case: 0.2 K/W\n", "");
    text = with(text, "  margin: 25 K\n", "  sink_resistance: 0.3 K/W\n");
    const Job job = read(text);
    CHECK_FALSE(job.parts[0].junction_limit);
    CHECK(job.parts[0].junction_to_case == 0.0);
    CHECK(*job.limits.sink_resistance == near(0.3, 1e-12));
}

TEST_CASE("a spent budget says by how much") {
    // 150 W through 0.8 K/W is 120 K; 150 - 25 - 40 degC leaves 85 K; 35 K are missing.
    const std::string text =
        with(with(metric, "    interface: {area_resistance: 0.64516 K cm2/W}\n", ""),
             "power: 120 W\n    junction_limit: 150 degC\n    junction_to_case: 0.2 K/W",
             "power: 150 W\n    junction_limit: 150 degC\n    junction_to_case: 0.8 K/W");
    CHECK_THROWS_WITH_AS(read(text),
                         doctest::Contains("120.0 K from junction to base, 85.0 K allowed, "
                                           "35.0 K short"),
                         InputError);
}

TEST_CASE("the demo jobs read as their files say") {
    const std::string folder = std::string(CONFIGS_DIR) + "/jobs/";
    const Job pump = read_job(folder + "pump_controller.yaml");
    CHECK(std::holds_alternative<StillAir>(pump.air.state));
    CHECK(pump.air.altitude == near(2100.0, 1e-12));
    CHECK(pump.parts.size() == 3);
    CHECK(pump.total_power() == near(55.0, 1e-12));
    const Job bench = read_job(folder + "bench_supply.yaml");
    CHECK(*std::get<DuctedAir>(bench.air.state).velocity == near(2.54, 1e-12));
    CHECK(*bench.limits.pressure_drop == near(24.908891, 1e-12));
    for (const Job* job : {&pump, &bench})
        CHECK(job->text.substr(0, 30).find("# Run:  finwright size configs") == 0);
}
