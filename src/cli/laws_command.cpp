#include "correlations/registry.hpp"
#include "src/cli/commands.hpp"
#include "src/cli/exit_code.hpp"
#include "src/sheets/laws_page.hpp"
#include <fmt/format.h>

namespace finwright::cli {

int laws_command(const std::string& name, const std::vector<std::string>& values) {
    if (name.empty()) {
        fmt::print("{}", sheets::laws_list());
        return done;
    }
    const correlations::Passport& law = sheets::law_named(name);
    fmt::print("{}", values.empty() ? sheets::law_page(law) : sheets::law_evaluated(law, values));
    return done;
}

} // namespace finwright::cli
