// finwright: one thin command each, errors turned into a message and an exit code.

#include "src/cli/commands.hpp"
#include "src/cli/exit_code.hpp"
#include "src/cli/whole_file.hpp"
#include "src/job/input_error.hpp"
#include "src/job/nearest_word.hpp"
#include "src/sheets/laws_page.hpp"
#include "src/sink/rating.hpp"
#include <CLI/CLI.hpp>
#include <cstdio>
#include <fmt/format.h>
#include <system_error>

namespace {

using namespace finwright;

CLI::App* job_command(CLI::App& app, const char* name, const char* what, cli::JobCommand& command) {
    CLI::App* sub = app.add_subcommand(name, what);
    sub->add_option("JOB", command.job_file, "job file (YAML, a unit on every number)")->required();
    return sub;
}

void add_json(CLI::App* sub, cli::JobCommand& command) {
    sub->add_option("--json", command.json_file, "write the whole result to FILE, in SI")
        ->type_name("FILE");
}

/// The command meant, where the first word names none.
std::string command_meant(const CLI::App& app, int argc, char** argv) {
    if (argc < 2 || argv[1][0] == '-') return "";
    std::vector<std::string> names;
    for (const CLI::App* sub : app.get_subcommands({}))
        names.push_back(sub->get_name());
    return job::nearest_word(argv[1], names);
}

int guarded(const std::function<int()>& run) {
    try {
        const int code = run();
        if (std::fflush(stdout) != 0) throw cli::UnwritableFile("the page cannot be written");
        return code;
    } catch (const job::InputError& error) {
        fmt::print(stderr, "{}\n", error.what());
        return cli::wrong_job_file;
    } catch (const sheets::WrongLawInput& error) {
        fmt::print(stderr, "finwright: {}\n", error.what());
        return cli::wrong_command_line;
    } catch (const sink::ColderThanAir& error) {
        fmt::print(stderr, "finwright: {}\n", error.what());
        return cli::impossible_job;
    } catch (const cli::UnwritableFile& error) {
        fmt::print(stderr, "finwright: {}\n", error.what());
        return cli::unwritable_file;
    } catch (const std::system_error& error) {
        fmt::print(stderr, "finwright: the page cannot be written: {}\n", error.what());
        return cli::unwritable_file;
    } catch (const std::exception& error) {
        fmt::print(stderr, "finwright: internal failure: {}\n", error.what());
        return cli::internal_failure;
    }
}

/// The whole program; throws what guarded() turns into an exit code.
int run(int argc, char** argv) {
    CLI::App app{"finwright sizes custom plate-fin heat sinks.", "finwright"};
    app.set_version_flag("--version", FINWRIGHT_VERSION);
    app.require_subcommand(1);
    cli::JobCommand command;
    std::string law;
    std::vector<std::string> values;

    CLI::App* size = job_command(app, "size", "find the sink that serves a job best", command);
    CLI::App* rate = job_command(app, "rate", "say how the sink stated in a job does", command);
    CLI::App* check = job_command(app, "check", "read a job and say what was understood", command);
    add_json(size, command);
    add_json(rate, command);
    rate->add_option("--curves", command.curves_file,
                     "write °C/W over power, air and altitude to FILE (.csv or .json)")
        ->type_name("FILE");
    CLI::App* laws = app.add_subcommand("laws", "list the laws, show one, or evaluate it by hand");
    laws->add_option("NAME", law, "a law's short name");
    laws->add_option("values", values, "its inputs in SI, as symbol=number");

    try {
        app.parse(argc, argv);
    } catch (const CLI::ParseError& error) {
        const std::string meant = command_meant(app, argc, argv);
        if (!meant.empty() && meant != argv[1])
            fmt::print(stderr, "finwright: no command {}; did you mean {}?\n", argv[1], meant);
        return app.exit(error) == 0 ? cli::done : cli::wrong_command_line;
    }
    if (*size) return cli::size_command(command);
    if (*rate) return cli::rate_command(command);
    if (*check) return cli::check_command(command);
    return cli::laws_command(law, values);
}

} // namespace

// Only printing the message itself could still throw.
int main(int argc, char** argv) { // NOLINT(bugprone-exception-escape)
    return guarded([&] { return run(argc, argv); });
}
