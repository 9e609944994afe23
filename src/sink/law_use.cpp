#include "src/sink/law_use.hpp"

#include "correlations/registry.hpp"
#include <fmt/format.h>
#include <stdexcept>

namespace finwright::sink {

std::vector<std::string> LawUse::ranges_left() const {
    const correlations::Passport* law = correlations::find_passport(passport);
    if (!law || law->inputs.size() != inputs.size())
        throw std::logic_error("no passport fits the use of " + passport);
    std::vector<std::string> sentences;
    for (std::size_t i = 0; i < inputs.size(); ++i) {
        const correlations::Symbol& symbol = law->inputs[i];
        if (inputs[i] >= symbol.lowest && inputs[i] <= symbol.highest) continue;
        sentences.push_back(fmt::format("{}: {} = {:.4g} {} is outside {:g} to {:g} ({}). {}", role,
                                        symbol.symbol, inputs[i], symbol.unit, symbol.lowest,
                                        symbol.highest, law->title, law->outside));
    }
    return sentences;
}

} // namespace finwright::sink
