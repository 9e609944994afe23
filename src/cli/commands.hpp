#pragma once
// The commands, one file each. Each prints its page to standard output and returns an ExitCode.

#include <optional>
#include <string>
#include <vector>

namespace finwright::cli {

struct JobCommand {
    std::string job_file;
    std::optional<std::string> json_file;
    std::optional<std::string> curves_file; ///< of rate
};

int size_command(const JobCommand& command);
int rate_command(const JobCommand& command);
int check_command(const JobCommand& command);

/// Lists the laws; with a name shows one passport; with key=value arguments evaluates it.
int laws_command(const std::string& name, const std::vector<std::string>& values);

} // namespace finwright::cli
