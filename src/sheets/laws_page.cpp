#include "src/sheets/laws_page.hpp"

#include "correlations/registry.hpp"
#include "src/job/nearest_word.hpp"
#include "src/sheets/numbers_text.hpp"
#include "src/sheets/text_table.hpp"
#include <charconv>
#include <cmath>
#include <fmt/format.h>
#include <optional>

namespace finwright::sheets {

using correlations::Passport;
using correlations::Symbol;

namespace {

constexpr std::size_t page_width = 100;

std::string range_of(const Symbol& symbol) {
    const auto end = [](double v) {
        return std::isfinite(v) ? fmt::format("{:g}", v) : "no bound";
    };
    return fmt::format("{} to {}", end(symbol.lowest), end(symbol.highest));
}

std::string notes_of(const Passport& law) {
    std::string notes;
    if (law.estimate) notes = "ESTIMATE of this project: no published law was at hand";
    if (law.from_memory)
        notes += std::string(notes.empty() ? "" : "; ") +
                 "coefficients from memory, the paper was not opened";
    return notes;
}

double number(const std::string& text, const std::string& whole) {
    double value = 0.0;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
    if (error != std::errc{} || end != text.data() + text.size() || !std::isfinite(value))
        throw WrongLawInput(fmt::format("'{}': '{}' is not a number; write for example {}", whole,
                                        text, whole.substr(0, whole.find('=')) + "=54.3"));
    return value;
}

std::string symbols_of(const Passport& law) {
    std::string text;
    for (const Symbol& s : law.inputs)
        text += (text.empty() ? "" : " ") + std::string(s.symbol) + "=...";
    return text;
}

std::vector<double> inputs_of(const Passport& law, const std::vector<std::string>& values) {
    std::vector<std::optional<double>> found(law.inputs.size());
    for (const std::string& text : values) {
        const auto equals = text.find('=');
        const std::string symbol = text.substr(0, equals);
        std::size_t i = 0;
        while (i < law.inputs.size() && symbol != law.inputs[i].symbol)
            ++i;
        if (equals == std::string::npos || i == law.inputs.size())
            throw WrongLawInput(
                fmt::format("{} takes no '{}'; it takes {}", law.name, text, symbols_of(law)));
        if (found[i]) throw WrongLawInput(fmt::format("'{}' is given twice", symbol));
        found[i] = number(text.substr(equals + 1), text);
    }
    std::vector<double> inputs;
    for (std::size_t i = 0; i < found.size(); ++i) {
        if (!found[i])
            throw WrongLawInput(fmt::format("{} needs {} as well; it takes {}", law.name,
                                            law.inputs[i].symbol, symbols_of(law)));
        inputs.push_back(*found[i]);
    }
    return inputs;
}

} // namespace

std::string laws_list() {
    TextTable table;
    table.left(1);
    table.left(2);
    for (const Passport& law : correlations::registry())
        table.row({std::string(law.name), std::string(law.title),
                   law.estimate ? "estimate" : std::string(law.source_key)});
    return "Laws (finwright laws NAME shows the passport; finwright laws NAME symbol=value ... "
           "evaluates)\n" +
           table.text();
}

const Passport& law_named(const std::string& name) {
    if (const Passport* law = correlations::find_passport(name)) return *law;
    std::vector<std::string> names;
    for (const Passport& law : correlations::registry())
        names.emplace_back(law.name);
    const std::string meant = job::nearest_word(name, names);
    throw WrongLawInput(fmt::format("there is no law '{}'{}; finwright laws lists them", name,
                                    meant.empty() ? "" : ", did you mean '" + meant + "'?"));
}

std::string law_page(const Passport& law) {
    TextTable inputs;
    inputs.left(1);
    inputs.left(2);
    inputs.left(3);
    for (const Symbol& s : law.inputs)
        inputs.row(
            {std::string(s.symbol), std::string(s.unit), std::string(s.meaning), range_of(s)});
    std::string out = fmt::format("{}: {}\n", law.name, law.title);
    const auto say = [&](const char* what, const std::string& text) {
        if (!text.empty())
            out += wrapped(text, page_width, fmt::format("  {:<10}", what), "            ");
    };
    say("source", std::string(law.source_key));
    say("equation", std::string(law.equation));
    say("gives",
        fmt::format("{} [{}], {}", law.result.symbol, law.result.unit, law.result.meaning));
    say("error", std::string(law.stated_error));
    say("outside", std::string(law.outside));
    say("note", notes_of(law));
    return out + "  inputs, with the range stated\n" + inputs.text();
}

std::string law_evaluated(const Passport& law, const std::vector<std::string>& values) {
    const std::vector<double> inputs = inputs_of(law, values);
    std::string out = law_page(law) + "\n";
    for (std::size_t i = 0; i < inputs.size(); ++i) {
        const Symbol& s = law.inputs[i];
        const bool outside = inputs[i] < s.lowest || inputs[i] > s.highest;
        out += fmt::format("  {} = {} {}{}\n", s.symbol, inputs[i], s.unit,
                           outside ? "   ! outside " + range_of(s) : "");
    }
    const double value = law.evaluate(inputs);
    if (!std::isfinite(value))
        throw WrongLawInput(fmt::format("{} gives no number for these inputs; its ranges stand in "
                                        "finwright laws {}",
                                        law.name, law.name));
    return out + fmt::format("  {} = {:.9g} {}\n", law.result.symbol, value, law.result.unit);
}

} // namespace finwright::sheets
