// What a rating, its derivatives, the spreading series, a base map and a whole search cost. Run it
// with
//   --benchmark_repetitions=9 --benchmark_report_aggregates_only=true
// and quote medians; the table in docs/performance.md is made that way.
#include "src/job/read_job.hpp"
#include "src/sink/base_map.hpp"
#include "src/sink/rating.hpp"
#include "src/sizing/sizing.hpp"
#include "src/sizing/spreading_model.hpp"
#include "tests/sizing/random_jobs.hpp"
#include <algorithm>
#include <benchmark/benchmark.h>
#include <chrono>

using namespace finwright;
using D5 = correlations::Dual<5>;

namespace {

job::Job demo(const char* name) {
    return job::read_job(std::string(CONFIGS_DIR) + "/jobs/" + name + ".yaml");
}

const char* pump = "pump_controller";
const char* bench = "bench_supply";

sink::Geometry<double> typical() {
    return {15, 30e-3, 1.4e-3, 8e-3, 4e-3, 0.12, 0.0};
}

sink::Geometry<D5> seeded(const sink::Geometry<double>& g) {
    return {g.fins,
            D5::variable(g.height, 0),
            D5::variable(g.thickness, 1),
            D5::variable(g.gap, 2),
            D5::variable(g.base, 3),
            D5::variable(g.length, 4),
            0.0};
}

void balance(benchmark::State& state, const char* name) {
    const auto duty = sink::duty_of(demo(name));
    auto g = typical();
    for (auto _ : state) {
        g.height += 1e-12; // not the same question twice
        benchmark::DoNotOptimize(sink::balance(g, duty));
    }
}

job::Job with_fan_and_bypass() {
    auto job = demo("bench_supply");
    job::Fan fan;
    fan.name = "fan";
    fan.flows = {0.0, 4e-3, 7e-3, 1e-2};
    fan.pressures = {45.0, 30.0, 18.0, 0.0};
    job.air.state = job::FanAir{{fan}, job::Clearance{5e-3, 3e-3}};
    return job;
}

void balance_fan(benchmark::State& state) {
    const auto duty = sink::duty_of(with_fan_and_bypass());
    auto g = typical();
    for (auto _ : state) {
        g.height += 1e-12;
        benchmark::DoNotOptimize(sink::balance(g, duty));
    }
}

void balance_fan_with_slopes(benchmark::State& state) {
    const auto duty = sink::duty_of(with_fan_and_bypass());
    auto g = typical();
    for (auto _ : state) {
        g.height += 1e-12;
        benchmark::DoNotOptimize(sink::balance(seeded(g), duty));
    }
}

void balance_with_slopes(benchmark::State& state, const char* name) {
    const auto duty = sink::duty_of(demo(name));
    auto g = typical();
    for (auto _ : state) {
        g.height += 1e-12;
        benchmark::DoNotOptimize(sink::balance(seeded(g), duty));
    }
}

void spreading_series(benchmark::State& state, const char* name) {
    const auto duty = sink::duty_of(demo(name));
    const auto g = typical();
    auto balance = sink::balance(g, duty);
    for (auto _ : state) {
        balance.conductance += 1e-9;
        benchmark::DoNotOptimize(sink::pad_rises(g, duty, balance));
    }
}

void spreading_in_search(benchmark::State& state, const char* name) {
    const auto duty = sink::duty_of(demo(name));
    const auto g = typical();
    sizing::SpreadingModel model;
    model.centre(g, duty);
    const auto s = seeded(g);
    auto balance = sink::balance(s, duty);
    for (auto _ : state) {
        balance.conductance.value += 1e-9;
        benchmark::DoNotOptimize(model.pad_rises(s, duty, balance));
    }
}

void whole_rating(benchmark::State& state, const char* name) {
    const auto duty = sink::duty_of(demo(name));
    const auto g = typical();
    for (auto _ : state)
        benchmark::DoNotOptimize(sink::rate(g, duty));
}

void base_map(benchmark::State& state, const char* name) {
    const auto duty = sink::duty_of(demo(name));
    const auto g = typical();
    const auto map = sink::base_map(g, duty, sink::rate(g, duty));
    for (auto _ : state)
        benchmark::DoNotOptimize(sink::base_field(map));
    const auto field = sink::base_field(map);
    state.counters["across"] = field.across.cells();
    state.counters["along"] = field.along.cells();
}

void size_demo(benchmark::State& state, const char* name) {
    const auto job = demo(name);
    for (auto _ : state)
        benchmark::DoNotOptimize(sizing::size(job));
}

/// The search over all fin counts alone on fifty feasible random jobs; the counters are over the
/// jobs.
void search_random(benchmark::State& state, job::Job (tests::RandomJobs::*make)()) {
    tests::RandomJobs random(101);
    std::vector<job::Job> jobs;
    while (jobs.size() < 50) {
        auto job = (random.*make)();
        if (sizing::search(job)) jobs.push_back(job);
    }
    std::vector<double> milliseconds;
    for (auto _ : state)
        for (const auto& job : jobs) {
            const auto begun = std::chrono::steady_clock::now();
            benchmark::DoNotOptimize(sizing::search(job));
            milliseconds.push_back(
                std::chrono::duration<double, std::milli>(std::chrono::steady_clock::now() - begun)
                    .count());
        }
    std::sort(milliseconds.begin(), milliseconds.end());
    const auto at = [&](double share) {
        return milliseconds[std::size_t(share * double(milliseconds.size() - 1))];
    };
    state.counters["job_median_ms"] = at(0.5);
    state.counters["job_nine_of_ten_ms"] = at(0.9);
    state.counters["job_worst_ms"] = at(1.0);
}

} // namespace

BENCHMARK_CAPTURE(balance, still, pump)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(balance, ducted, bench)->Unit(benchmark::kMicrosecond);
BENCHMARK(balance_fan)->Unit(benchmark::kMicrosecond);
BENCHMARK(balance_fan_with_slopes)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(balance_with_slopes, still, pump)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(balance_with_slopes, ducted, bench)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(spreading_series, three_pads, pump)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(spreading_series, one_pad, bench)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(spreading_in_search, three_pads, pump)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(spreading_in_search, one_pad, bench)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(whole_rating, still, pump)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(whole_rating, ducted, bench)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(base_map, still_three_pads, pump)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(base_map, ducted_one_pad, bench)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(size_demo, pump_controller, pump)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(size_demo, bench_supply, bench)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(search_random, still, &tests::RandomJobs::still)
    ->Unit(benchmark::kMillisecond)
    ->Iterations(3);
BENCHMARK_CAPTURE(search_random, ducted, &tests::RandomJobs::ducted)
    ->Unit(benchmark::kMillisecond)
    ->Iterations(3);

BENCHMARK_MAIN();
