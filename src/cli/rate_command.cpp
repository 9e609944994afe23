#include "src/cli/commands.hpp"
#include "src/cli/exit_code.hpp"
#include "src/cli/whole_file.hpp"
#include "src/job/read_job.hpp"
#include "src/sheets/curves.hpp"
#include "src/sheets/page.hpp"
#include "src/sheets/results_json.hpp"
#include "src/sizing/stated_sink.hpp"
#include <filesystem>
#include <fmt/format.h>

namespace finwright::cli {

namespace {

/// As JSON where the name says so, else as comma-separated values.
void write_curves(const std::string& file, const std::vector<sheets::CurvePoint>& points) {
    const bool json = std::filesystem::path(file).extension() == ".json";
    write_whole(file, json ? sheets::curves_json(points) : sheets::curves_csv(points));
}

} // namespace

int rate_command(const JobCommand& command) {
    if (command.json_file) refuse_same_file(*command.json_file, command.job_file);
    if (command.curves_file) refuse_same_file(*command.curves_file, command.job_file);
    const job::Job job = job::read_rated_job(command.job_file);
    const auto g = sizing::stated_sink(job);
    const sink::Rating rating = sink::rate(g, sink::duty_of(job));
    if (command.json_file) write_whole(*command.json_file, sheets::results_json(job, rating));
    if (command.curves_file) write_curves(*command.curves_file, sheets::curves(job, g));
    fmt::print("{}", sheets::rate_page(job, rating));
    return rating.runs_away() ? impossible_job : done;
}

} // namespace finwright::cli
