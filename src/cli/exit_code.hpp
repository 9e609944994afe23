#pragma once
// What the program tells the shell; the table stands in DEVELOPERS.md and the manual.

namespace finwright::cli {

enum ExitCode : int {
    done = 0,
    internal_failure = 1,
    wrong_command_line = 2,
    wrong_job_file = 3,
    impossible_job = 4,
    unwritable_file = 5
};

} // namespace finwright::cli
