#pragma once
// Rows of the reference tables in tests/data/reference (see the README there).

#include <cstdlib>
#include <fstream>
#include <map>
#include <sstream>
#include <stdexcept>
#include <string>
#include <vector>

namespace finwright::tests {

using Row = std::map<std::string, std::string>;

/// Splits one CSV line; quoted cells may hold commas.
inline std::vector<std::string> cells_of(const std::string& line) {
    std::vector<std::string> cells{""};
    bool quoted = false;
    for (char c : line) {
        if (c == '"')
            quoted = !quoted;
        else if (c == ',' && !quoted)
            cells.emplace_back();
        else if (c != '\r')
            cells.back() += c;
    }
    return cells;
}

/// A table by its file name; comment lines (#) may stand above its head.
inline std::vector<Row> rows_of(const std::string& file) {
    std::ifstream in(std::string(TEST_DATA_DIR) + "/reference/" + file);
    if (!in) throw std::runtime_error("no reference table " + file);
    std::string line;
    while (std::getline(in, line) && line.starts_with('#')) {
    }
    const auto names = cells_of(line);
    std::vector<Row> rows;
    while (std::getline(in, line)) {
        const auto cells = cells_of(line);
        if (cells.size() != names.size())
            throw std::runtime_error("odd row in " + file + ": " + line);
        Row row;
        for (std::size_t i = 0; i < names.size(); ++i)
            row[names[i]] = cells[i];
        rows.push_back(row);
    }
    return rows;
}

inline double number(const Row& row, const std::string& column) {
    return std::strtod(row.at(column).c_str(), nullptr);
}

/// One row of check_values.csv by its id: inputs by name, values in order.
struct CheckValue {
    std::map<std::string, double> in;
    std::vector<double> values;
    std::string source;

    double operator[](const std::string& name) const { return in.at(name); }
    double value() const { return values.at(0); }
};

inline CheckValue check_value(const std::string& id) {
    for (const Row& row : rows_of("check_values.csv")) {
        if (row.at("id") != id) continue;
        CheckValue check;
        check.source = row.at("source");
        std::stringstream inputs(row.at("inputs"));
        for (std::string item; std::getline(inputs, item, ';');)
            if (const auto equals = item.find('='); equals != std::string::npos)
                check.in[item.substr(0, equals)] = std::strtod(item.c_str() + equals + 1, nullptr);
        std::stringstream values(row.at("value"));
        for (std::string item; std::getline(values, item, ';');)
            check.values.push_back(std::strtod(item.c_str(), nullptr));
        return check;
    }
    throw std::runtime_error("no check value " + id);
}

} // namespace finwright::tests
