// The pages as they are read. FINWRIGHT_COLLECT=1 rewrites the golden files; read the diff before
// committing. The first line of each golden file's job gives its command; every example job is
// executed here.
#include "tests/cli/run_program.hpp"
#include <cstdlib>
#include <doctest/doctest.h>

using finwright::tests::run_program;
using finwright::tests::text_of;

namespace {

void check_golden(const std::string& arguments, const std::string& file) {
    const auto run = run_program(arguments);
    CHECK(run.exit_code == 0);
    CHECK(run.errors.empty());
    const std::string path = std::string(TEST_DATA_DIR) + "/golden/" + file;
    if (std::getenv("FINWRIGHT_COLLECT")) {
        std::ofstream(path, std::ios::binary) << run.output;
        return;
    }
    CAPTURE(path);
    CHECK(run.output == text_of(path));
}

} // namespace

TEST_CASE("size: the demo jobs") {
    check_golden("size configs/jobs/pump_controller.yaml", "size_pump_controller.txt");
    check_golden("size configs/jobs/bench_supply.yaml", "size_bench_supply.txt");
    check_golden("size configs/jobs/seed_dryer.yaml", "size_seed_dryer.txt");
}

TEST_CASE("size and rate: a tilted sink with all that acts on it, a plate without fins") {
    check_golden("size tests/data/jobs/tilted_lamp.yaml", "size_tilted_lamp.txt");
    check_golden("rate tests/data/jobs/plate.yaml", "rate_plate.txt");
}

TEST_CASE("rate: the sink already in the drawer") {
    check_golden("rate configs/jobs/drawer_sink.yaml", "rate_drawer_sink.txt");
}

TEST_CASE("rate: parts whose power follows their junction") {
    check_golden("rate configs/jobs/warm_switches.yaml", "rate_warm_switches.txt");
    check_golden("check configs/jobs/warm_switches.yaml", "check_warm_switches.txt");
}

TEST_CASE("check: what was understood") {
    check_golden("check configs/jobs/pump_controller.yaml", "check_pump_controller.txt");
}

TEST_CASE("laws: the list, a passport, a value") {
    check_golden("laws", "laws.txt");
    check_golden("laws u_channel", "laws_u_channel.txt");
    check_golden("laws elenbaas el=54.3", "laws_elenbaas_value.txt");
}
