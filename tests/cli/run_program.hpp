#pragma once
// Runs the built program as a user would, from the project's folder.

#include <array>
#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <sstream>
#include <stdexcept>
#include <string>
#include <sys/wait.h>
#include <unistd.h>

namespace finwright::tests {

struct Run {
    int exit_code = -1;
    std::string output; ///< standard output
    std::string errors; ///< standard error
};

inline std::string text_of(const std::string& path) {
    std::ifstream in(path, std::ios::binary);
    std::stringstream text;
    text << in.rdbuf();
    return text.str();
}

inline Run run_program(const std::string& arguments) {
    char name[] = "/tmp/finwright_errors_XXXXXX";
    close(mkstemp(name));
    const std::string errors = name;
    const std::string command = std::string("cd '") + SOURCE_DIR + "' && '" + PROGRAM + "' " +
                                arguments + " 2>'" + errors + "'";
    std::FILE* pipe = popen(command.c_str(), "r");
    if (!pipe) throw std::runtime_error("cannot run " + command);
    Run run;
    std::array<char, 4096> buffer;
    while (const std::size_t n = std::fread(buffer.data(), 1, buffer.size(), pipe))
        run.output.append(buffer.data(), n);
    run.exit_code = WEXITSTATUS(pclose(pipe));
    run.errors = text_of(errors);
    std::remove(errors.c_str());
    return run;
}

} // namespace finwright::tests
