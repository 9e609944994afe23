#include "src/cli/commands.hpp"
#include "src/cli/exit_code.hpp"
#include "src/job/read_job.hpp"
#include "src/sheets/page.hpp"
#include <fmt/format.h>

namespace finwright::cli {

int check_command(const JobCommand& command) {
    fmt::print("{}", sheets::check_page(job::read_job(command.job_file)));
    return done;
}

} // namespace finwright::cli
