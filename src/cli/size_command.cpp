#include "src/cli/commands.hpp"
#include "src/cli/exit_code.hpp"
#include "src/cli/whole_file.hpp"
#include "src/job/read_job.hpp"
#include "src/sheets/page.hpp"
#include "src/sheets/results_json.hpp"
#include "src/sizing/sizing.hpp"
#include <fmt/format.h>

namespace finwright::cli {

int size_command(const JobCommand& command) {
    if (command.json_file) refuse_same_file(*command.json_file, command.job_file);
    const job::Job job = job::read_job(command.job_file);
    const sizing::Sizing sizing = sizing::size(job);
    if (const auto* refusal = std::get_if<sizing::Refusal>(&sizing)) {
        if (command.json_file) write_whole(*command.json_file, sheets::results_json(job, *refusal));
        fmt::print("{}", sheets::refusal_page(job, *refusal));
        return impossible_job;
    }
    const auto& answer = std::get<sizing::Answer>(sizing);
    const job::Job answered = sizing::as_answered(job, answer);
    if (command.json_file) write_whole(*command.json_file, sheets::results_json(answered, answer));
    fmt::print("{}", sheets::size_page(answered, answer));
    return answer.rating.runs_away() ? impossible_job : done;
}

} // namespace finwright::cli
