#include "src/job/input_error.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace finwright::job {

namespace {

constexpr std::size_t longest_excerpt = 160;
constexpr std::size_t longest_reason = 400;

bool continues_character(char c) {
    return (static_cast<unsigned char>(c) & 0xc0) == 0x80;
}

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

/// At most `longest` bytes, whole characters only. Control characters would move the caret or the
/// terminal: each is shown as a space.
std::string printable(std::string_view text, std::size_t longest) {
    std::size_t end = std::min(longest, text.size());
    while (end < text.size() && end > 0 && continues_character(text[end]))
        --end;
    std::string out(text.substr(0, end));
    for (char& c : out)
        if (static_cast<unsigned char>(c) < 0x20 || c == 0x7f) c = ' ';
    return out;
}

/// How many characters stand before this byte column.
std::size_t characters_before(std::string_view line, int column) {
    const std::size_t bytes = std::min(line.size(), std::size_t(std::max(column - 1, 0)));
    std::size_t count = std::size_t(std::max(column - 1, 0)) - bytes;
    for (const char c : line.substr(0, bytes))
        if (!continues_character(c)) ++count;
    return count;
}

std::string position(const std::string& file, std::string_view text, Place place) {
    if (place.line <= 0) return file;
    return fmt::format("{}:{}:{}", file, place.line,
                       characters_before(line_of(text, place.line), place.column) + 1);
}

std::string excerpt(std::string_view text, Place place) {
    if (place.line <= 0) return {};
    const std::string_view line = line_of(text, place.line);
    if (line.empty()) return {};
    const std::string shown = printable(line, longest_excerpt);
    const std::size_t before = characters_before(line, place.column);
    if (before > shown.size()) return fmt::format("\n    {}", shown);
    return fmt::format("\n    {}\n    {}^", shown, std::string(before, ' '));
}

std::string message(const std::string& file, std::string_view text, Place place,
                    const std::string& reason, const std::string& suggestion, Place against) {
    std::string out =
        fmt::format("{}: {}{}", position(file, text, place), reason, excerpt(text, place));
    if (against.line > 0)
        out += fmt::format("\n{}: it clashes with this line{}", position(file, text, against),
                           excerpt(text, against));
    if (!suggestion.empty()) out += fmt::format("\n{}", printable(suggestion, longest_reason));
    return out;
}

} // namespace

InputError::InputError(const std::string& file, std::string_view text, Place place,
                       const std::string& reason, const std::string& suggestion, Place against)
    : std::runtime_error(
          message(file, text, place, printable(reason, longest_reason), suggestion, against)),
      place_(place), against_(against), reason_(printable(reason, longest_reason)) {}

} // namespace finwright::job
