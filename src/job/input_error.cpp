#include "src/job/input_error.hpp"

#include <fmt/format.h>

namespace finwright::job {

namespace {

constexpr std::size_t longest_excerpt = 160;

std::string_view line_of(std::string_view text, int line) {
    std::size_t begin = 0;
    for (int i = 1; i < line; ++i) {
        const std::size_t end = text.find('\n', begin);
        if (end == std::string_view::npos) return {};
        begin = end + 1;
    }
    std::string_view found = text.substr(begin, text.find('\n', begin) - begin);
    if (!found.empty() && found.back() == '\r') found.remove_suffix(1);
    return found;
}

/// Control characters would move the caret or the terminal: each is shown as a space.
std::string printable(std::string_view line) {
    std::string out(line.substr(0, longest_excerpt));
    for (char& c : out)
        if (static_cast<unsigned char>(c) < 0x20 || c == 0x7f) c = ' ';
    return out;
}

std::string message(const std::string& file, std::string_view text, Place place,
                    const std::string& reason, const std::string& suggestion) {
    std::string out = file;
    if (place.line > 0) out += fmt::format(":{}:{}", place.line, place.column);
    out += ": " + reason;
    const std::string excerpt = place.line > 0 ? printable(line_of(text, place.line)) : "";
    if (!excerpt.empty()) {
        out += "\n    " + excerpt;
        if (std::size_t(place.column) <= longest_excerpt)
            out += "\n    " +
                   std::string(std::size_t(place.column > 0 ? place.column - 1 : 0), ' ') + "^";
    }
    if (!suggestion.empty()) out += "\n  " + suggestion;
    return out;
}

} // namespace

InputError::InputError(std::string file, std::string_view text, Place place, std::string reason,
                       std::string suggestion)
    : std::runtime_error(message(file, text, place, reason, suggestion)), place_(place),
      reason_(std::move(reason)) {}

} // namespace finwright::job
