#include "src/cli/commands.hpp"
#include "src/cli/exit_code.hpp"
#include "src/cli/whole_file.hpp"
#include "src/job/read_job.hpp"
#include "src/sheets/page.hpp"
#include "src/sheets/results_json.hpp"
#include "src/sizing/stated_sink.hpp"
#include <fmt/format.h>

namespace finwright::cli {

int rate_command(const JobCommand& command) {
    if (command.json_file) refuse_same_file(*command.json_file, command.job_file);
    const job::Job job = job::read_rated_job(command.job_file);
    const sink::Rating rating = sink::rate(sizing::stated_sink(job), sink::duty_of(job));
    if (command.json_file) write_whole(*command.json_file, sheets::results_json(job, rating));
    fmt::print("{}", sheets::rate_page(job, rating));
    return done;
}

} // namespace finwright::cli
