#include "src/sheets/text_table.hpp"

#include <algorithm>
#include <sstream>

namespace finwright::sheets {

std::size_t columns_of(const std::string& text) {
    return std::size_t(std::count_if(text.begin(), text.end(), [](char c) {
        return (static_cast<unsigned char>(c) & 0xC0u) != 0x80u;
    }));
}

std::string TextTable::text() const {
    std::vector<std::size_t> widths;
    for (const auto& row : rows_) {
        widths.resize(std::max(widths.size(), row.size()), 0);
        for (std::size_t i = 0; i < row.size(); ++i)
            widths[i] = std::max(widths[i], columns_of(row[i]));
    }
    std::string out;
    for (const auto& row : rows_) {
        std::string line = " ";
        for (std::size_t i = 0; i < row.size(); ++i) {
            const std::string padding(widths[i] - columns_of(row[i]), ' ');
            const bool left = std::find(left_.begin(), left_.end(), i) != left_.end();
            line += (i == 0 ? " " : "  ") + (left ? row[i] + padding : padding + row[i]);
        }
        line.erase(line.find_last_not_of(' ') + 1);
        out += line + "\n";
    }
    return out;
}

std::string wrapped(const std::string& text, std::size_t width, const std::string& first,
                    const std::string& later) {
    std::istringstream words(text);
    std::string out = first, word;
    std::size_t used = columns_of(first);
    bool line_start = true;
    while (words >> word) {
        const std::size_t needed = columns_of(word) + (line_start ? 0 : 1);
        if (!line_start && used + needed > width) {
            out += "\n" + later;
            used = columns_of(later);
            line_start = true;
        }
        out += (line_start ? "" : " ") + word;
        used += columns_of(word) + (line_start ? 0 : 1);
        line_start = false;
    }
    return out + "\n";
}

} // namespace finwright::sheets
