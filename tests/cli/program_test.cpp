// The program from outside: exit codes, errors on the right stream, JSON whole or not at all,
// numbers that agree.
#include "src/job/power_table.hpp"
#include "src/job/read_job.hpp"
#include "tests/cli/run_program.hpp"
#include "tests/near.hpp"
#include <algorithm>
#include <cmath>
#include <filesystem>
#include <nlohmann/json.hpp>

using finwright::tests::near;
using finwright::tests::run_program;
using finwright::tests::text_of;
namespace fs = std::filesystem;
using Json = nlohmann::json;

namespace {

/// A folder of its own for each test, gone afterwards.
struct Folder {
    fs::path path = fs::temp_directory_path() /
                    ("finwright_" + std::to_string(std::rand()) + "_" + std::to_string(::getpid()));
    Folder() { fs::create_directories(path); }
    ~Folder() { fs::remove_all(path); }
    std::string file(const std::string& name, const std::string& text) const {
        std::ofstream((path / name).string(), std::ios::binary) << text;
        return (path / name).string();
    }
};

std::string demo() {
    return text_of(std::string(SOURCE_DIR) + "/configs/jobs/pump_controller.yaml");
}

std::string replaced(std::string text, const std::string& from, const std::string& to) {
    const auto at = text.find(from);
    REQUIRE(at != std::string::npos);
    return text.replace(at, from.size(), to);
}

} // namespace

TEST_CASE("exit codes: 0 done, 2 command line, 3 job file, 4 impossible, 5 unwritable") {
    const Folder folder;
    CHECK(run_program("check configs/jobs/pump_controller.yaml").exit_code == 0);
    CHECK(run_program("--version").exit_code == 0);
    CHECK(run_program("--help").exit_code == 0);
    CHECK(run_program("").exit_code == 2);
    CHECK(run_program("size").exit_code == 2);
    CHECK(run_program("polish configs/jobs/pump_controller.yaml").exit_code == 2);
    CHECK(run_program("laws no_such_law").exit_code == 2);
    CHECK(run_program("laws elenbaas el=abc").exit_code == 2);
    CHECK(run_program("laws elenbaas").exit_code == 0);
    CHECK(run_program("size no_such_file.yaml").exit_code == 3);
    CHECK(run_program("size configs").exit_code == 3);
    const auto impossible = folder.file("a.yaml", replaced(demo(), "mass: 1.2 kg", "mass: 100 g"));
    CHECK(run_program("size " + impossible).exit_code == 4);
    CHECK(run_program("size configs/jobs/pump_controller.yaml --json /no/such/folder/a.json")
              .exit_code == 5);
    CHECK(run_program("size configs/jobs/pump_controller.yaml --json " + folder.path.string())
              .exit_code == 5);
}

TEST_CASE("a mistyped command is answered with the one meant") {
    CHECK(run_program("sise configs/jobs/pump_controller.yaml").errors.find("did you mean size?") !=
          std::string::npos);
    CHECK(run_program("polish").errors.find("did you mean") == std::string::npos);
}

TEST_CASE("rate: a stated sink outside its space, its shop and its budget is rated, and told so") {
    const Folder folder;
    auto text = text_of(std::string(SOURCE_DIR) + "/configs/jobs/drawer_sink.yaml");
    text = replaced(text, "fin_height: 27 mm", "fin_height: 70 mm");
    text = replaced(text, "fin_thickness: 1.8 mm", "fin_thickness: 0.5 mm");
    const auto run = run_program("rate " + folder.file("a.yaml", text));
    CHECK(run.exit_code == 0);
    CHECK(run.output.find("LIMIT BROKEN: overall height 74.5 mm is") != std::string::npos);
    CHECK(run.output.find("LIMIT BROKEN: fin thickness 0.5 mm is less than 1.5 mm") !=
          std::string::npos);
    CHECK(run_program("size " + folder.file("b.yaml", text)).exit_code == 3);
}

TEST_CASE("errors go to standard error, with place, excerpt, caret and suggestion") {
    const Folder folder;
    const auto bad = folder.file("a.yaml", replaced(demo(), "power: 16 W", "power: 16"));
    const auto run = run_program("size " + bad);
    CHECK(run.exit_code == 3);
    CHECK(run.output.empty());
    CHECK(run.errors.find("a.yaml:17:12: ") != std::string::npos);
    CHECK(run.errors.find('^') != std::string::npos);
    CHECK(run.errors.find("18 W") != std::string::npos);
}

TEST_CASE("a failed write leaves nothing behind, and a good one no temporary") {
    const Folder folder;
    const auto target = (folder.path / "result.json").string();
    CHECK(run_program("size configs/jobs/pump_controller.yaml --json " + target).exit_code == 0);
    int files = 0;
    for (const auto& entry : fs::directory_iterator(folder.path)) {
        CHECK(entry.path().filename() == "result.json");
        ++files;
    }
    CHECK(files == 1);
}

TEST_CASE("a full disk is an error with its own exit code") {
    if (!fs::exists("/dev/full")) return;
    // The page itself cannot be written: the program must not say it succeeded.
    CHECK(run_program("laws > /dev/full").exit_code == 5);
}

TEST_CASE("JSON never replaces a device, a link or the job itself") {
    const Folder folder;
    const auto job = folder.file("job.yaml", demo());
    const auto before = text_of(job);
    CHECK(run_program("size " + job + " --json " + job).exit_code == 5);
    CHECK(text_of(job) == before);
    CHECK(run_program("size " + job + " --json /dev/null").exit_code == 5);
    const auto real = folder.file("real.json", "old");
    fs::create_symlink(real, folder.path / "link.json");
    CHECK(
        run_program("size " + job + " --json " + (folder.path / "link.json").string()).exit_code ==
        0);
    CHECK(fs::is_symlink(folder.path / "link.json"));
    CHECK(Json::parse(text_of(real)).contains("geometry"));
}

TEST_CASE("a law that gives no number says so") {
    const auto run = run_program("laws elenbaas el=-3");
    CHECK(run.exit_code == 2);
    CHECK(run.errors.find("no number") != std::string::npos);
}

TEST_CASE("JSON: SI numbers that agree with each other and with the page") {
    const Folder folder;
    const auto target = (folder.path / "r.json").string();
    const auto run = run_program("size configs/jobs/bench_supply.yaml --json " + target);
    REQUIRE(run.exit_code == 0);
    const Json j = Json::parse(text_of(target));
    const auto& g = j["geometry"];
    const auto& r = j["rating"];
    const double n = g["fins"], t = g["fin_thickness_root_m"], s = g["gap_root_m"];
    CHECK(g["width_m"].get<double>() == near(n * t + (n - 1.0) * s, 1e-12));
    const double section =
        g["width_m"].get<double>() * g["base_thickness_m"].get<double>() +
        n * g["fin_height_m"].get<double>() * 0.5 * (t + g["fin_thickness_tip_m"].get<double>());
    CHECK(g["section_area_m2"].get<double>() == near(section, 1e-12));
    CHECK(r["mass_kg"].get<double>() ==
          near(section * g["length_m"].get<double>() * j["job"]["density_kg_m3"].get<double>(),
               1e-12));
    double heat = 0.0;
    for (const auto& [path, watts] : r["heat_W"].items())
        heat += watts.get<double>();
    CHECK(heat == near(r["power_W"].get<double>(), 1e-9));
    const auto& part = r["parts"][0];
    CHECK(
        part["pad_temperature_K"].get<double>() ==
        near(r["air_temperature_K"].get<double>() + r["hottest_pad_rise_K"].get<double>(), 1e-12));
    CHECK(part["headroom_K"].get<double>() >= -1e-6);
    const std::string grams =
        std::to_string(int(std::lround(r["mass_kg"].get<double>() * 1e3))) + " g;";
    CHECK(run.output.find(grams) != std::string::npos);
}

// Dimensional consistency: the same job in inches, feet, degF and cfm gives the same sink to 1e-12.
TEST_CASE("a job in inches equals the same job in millimetres") {
    const auto metric =
        finwright::job::read_job(std::string(SOURCE_DIR) + "/tests/data/jobs/metric.yaml");
    const auto inches =
        finwright::job::read_job(std::string(SOURCE_DIR) + "/tests/data/jobs/inches.yaml");
    CHECK(inches.air.temperature == near(metric.air.temperature, 1e-12));
    CHECK(inches.air.altitude == near(metric.air.altitude, 1e-12));
    const Folder folder;
    const auto a = (folder.path / "a.json").string(), b = (folder.path / "b.json").string();
    REQUIRE(run_program("size tests/data/jobs/metric.yaml --json " + a).exit_code == 0);
    REQUIRE(run_program("size tests/data/jobs/inches.yaml --json " + b).exit_code == 0);
    const Json ja = Json::parse(text_of(a)), jb = Json::parse(text_of(b));
    CHECK(ja["rating"]["mass_kg"].get<double>() ==
          near(jb["rating"]["mass_kg"].get<double>(), 1e-12));
    CHECK(ja["rating"]["base_rise_K"].get<double>() ==
          near(jb["rating"]["base_rise_K"].get<double>(), 1e-10));
}

namespace {

std::string warm() {
    return text_of(std::string(SOURCE_DIR) + "/configs/jobs/warm_switches.yaml");
}

/// The same switches on a sink that is far too small.
std::string hopeless() {
    return replaced(replaced(warm(), "length: 80 mm", "length: 25 mm"), "fin_height: 30 mm",
                    "fin_height: 6 mm");
}

} // namespace

TEST_CASE("rate: powers by table settle, and JSON says how far from running away") {
    const Folder folder;
    const auto target = (folder.path / "r.json").string();
    const auto run = run_program("rate configs/jobs/warm_switches.yaml --json " + target);
    CHECK(run.exit_code == 0);
    CHECK(run.output.find("Powers by table settle at") != std::string::npos);
    const Json j = Json::parse(text_of(target));
    CHECK(j["result"] == "rated");
    const auto& feedback = j["rating"]["feedback"];
    CHECK(feedback["runaway"].is_null());
    CHECK(feedback["loop_gain"].get<double>() > 0.0);
    CHECK(feedback["loop_gain"].get<double>() < 1.0);
    for (std::size_t i = 0; i < 2; ++i) {
        const auto& part = j["rating"]["parts"][i];
        const auto& points = j["job"]["parts"][i]["power_by_junction_K_W"];
        std::vector<finwright::job::PowerTable::Point> table;
        for (const auto& point : points)
            table.push_back({point[0], point[1]});
        CHECK(
            part["power_W"].get<double>() ==
            near(finwright::job::PowerTable(table).power_at(part["junction_temperature_K"]), 1e-9));
    }
}

TEST_CASE("rate: a sink on which the parts run away is a result with its own words, exit 4") {
    const Folder folder;
    const auto target = (folder.path / "r.json").string();
    const auto run = run_program("rate " + folder.file("a.yaml", hopeless()) + " --json " + target);
    CHECK(run.exit_code == 4);
    CHECK(run.errors.empty());
    CHECK(run.output.find("THERMAL RUNAWAY") != std::string::npos);
    CHECK(run.output.find("is nearest to what it is allowed") == std::string::npos);
    const Json j = Json::parse(text_of(target));
    CHECK(j["result"] == "runs away");
    const auto& away = j["rating"]["feedback"]["runaway"];
    CHECK(away["part"] == "high switch"); // the steeper table
    CHECK(away["loop_gain"].get<double>() >= 1.0);
    CHECK(away["junction_temperature_K"].get<double>() < 873.15);
}

TEST_CASE("size: a power table is sized at the junction allowed, and the page says so") {
    const Folder folder;
    auto text = warm();
    text.erase(text.find("  fins: 10"));
    const auto target = (folder.path / "r.json").string();
    const auto run = run_program("size " + folder.file("a.yaml", text) + " --json " + target);
    CHECK(run.exit_code == 0);
    CHECK(run.output.find("Sized for the most each power table says") != std::string::npos);
    CHECK(run.output.find("high switch 13.2 W") != std::string::npos); // 125 degC, by hand
    CHECK(run.output.find("Powers by table settle at") != std::string::npos);
    for (const auto& part : Json::parse(text_of(target))["rating"]["parts"])
        CHECK(part["headroom_K"].get<double>() >= 0.0);
}

TEST_CASE("what is said of the tabs decides how the caution reads") {
    const Folder folder;
    const auto caution = [&](const std::string& high, const std::string& low) {
        auto text = replaced(warm(), "    insulated: no\n", high);
        return run_program("rate " +
                           folder.file("a.yaml", replaced(text, "    insulated: yes\n", low)))
            .output;
    };
    CHECK(caution("", "").find("Tabs and leads may be live: check creepage") != std::string::npos);
    const std::string yes = "    insulated: yes\n", no = "    insulated: no\n";
    CHECK(caution("", yes).find("Tabs and leads may be live: check creepage") != std::string::npos);
    CHECK(caution(yes, yes).find("stated to be insulated inside") != std::string::npos);
    CHECK(caution(no, yes).find("Stated as live: the tab of high switch.") != std::string::npos);
    CHECK(caution(no, no).find("Stated as live: the tab of high switch, low switch.") !=
          std::string::npos);
}

TEST_CASE("laws: a value worked by hand") {
    // Elenbaas 1942: (54.3/24)(1 - exp(-35/54.3))^(3/4)
    const double by_hand = 54.3 / 24.0 * std::pow(1.0 - std::exp(-35.0 / 54.3), 0.75);
    const auto run = run_program("laws elenbaas el=54.3");
    const auto at = run.output.rfind("Nu = ");
    REQUIRE(at != std::string::npos);
    CHECK(std::strtod(run.output.c_str() + at + 5, nullptr) == near(by_hand, 1e-8));
}

TEST_CASE("rate --curves: through the rated point, monotone, as CSV and as JSON") {
    const Folder folder;
    const auto csv = (folder.path / "c.csv").string(), json = (folder.path / "c.json").string();
    REQUIRE(run_program("rate configs/jobs/drawer_sink.yaml --curves " + csv).exit_code == 0);
    REQUIRE(run_program("rate configs/jobs/drawer_sink.yaml --curves " + json).exit_code == 0);
    const auto lines = text_of(csv);
    const Json points = Json::parse(text_of(json));
    CHECK(std::count(lines.begin(), lines.end(), '\n') == long(points.size()) + 1);
    double before = 0.0, resistance = 1e9;
    for (const auto& p : points) {
        if (p["altitude_m"].get<double>() != 0.0) break;
        CHECK(p["hottest_pad_rise_K"].get<double>() > before);
        CHECK(p["sink_resistance_K_W"].get<double>() < resistance);
        before = p["hottest_pad_rise_K"].get<double>();
        resistance = p["sink_resistance_K_W"].get<double>();
    }
}

TEST_CASE("JSON: the base map's hottest place is no cooler than any pad") {
    const Folder folder;
    const auto file = (folder.path / "r.json").string();
    REQUIRE(run_program("rate configs/jobs/drawer_sink.yaml --json " + file).exit_code == 0);
    const Json j = Json::parse(text_of(file));
    const auto& map = j["base_map"];
    CHECK(map["rise_over_inlet_K"].size() == map["along_m"].size());
    CHECK(map["rise_over_inlet_K"][0].size() == map["across_m"].size());
    CHECK(map["hottest"]["rise_K"].get<double>() >=
          j["rating"]["hottest_pad_rise_K"].get<double>() - 0.05);
}

TEST_CASE("curves and base map of parts with a power table rest on the powers that settle") {
    const Folder folder;
    const auto result = (folder.path / "r.json").string(),
               curves = (folder.path / "c.json").string();
    REQUIRE(
        run_program("rate configs/jobs/warm_switches.yaml --json " + result + " --curves " + curves)
            .exit_code == 0);
    const Json rated = Json::parse(text_of(result)), points = Json::parse(text_of(curves));
    const double power = rated["rating"]["power_W"];
    CHECK(points[0]["power_W"].get<double>() == near(0.1 * power, 1e-9));
    CHECK(points[19]["power_W"].get<double>() == near(2.0 * power, 1e-9));
    CHECK(rated["base_map"]["hottest"]["rise_K"].get<double>() ==
          near(rated["rating"]["hottest_pad_rise_K"].get<double>(), 0.02));
}

TEST_CASE(
    "cold surroundings: an answer stands though a larger plate or less power is not covered") {
    const Folder folder;
    const auto sized = run_program("size tests/data/jobs/cold_sky.yaml");
    CHECK(sized.exit_code == 0);
    CHECK(sized.output.find("Are fins needed?") == std::string::npos);
    auto drawer = text_of(std::string(SOURCE_DIR) + "/configs/jobs/drawer_sink.yaml");
    drawer = replaced(drawer, "parts:", "around: {radiating_temperature: 10 degC}\nparts:");
    const auto csv = (folder.path / "c.csv").string();
    CHECK(run_program("rate " + folder.file("b.yaml", drawer) + " --curves " + csv).exit_code == 0);
    const auto lines = text_of(csv);
    const auto rows = std::count(lines.begin(), lines.end(), '\n') - 1;
    CHECK(rows > 40);
    CHECK(rows < 80);
}
