#include "src/job/catalogue.hpp"

#include "src/job/document.hpp"

namespace finwright::job {

/// The catalogue files as they stood in configs/ when the program was built.
extern const char* const alloys_file;
extern const char* const finishes_file;
extern const char* const processes_file;

namespace {

template <class Entry, class Read>
std::vector<Entry> read_catalogue(const char* text, const char* file, const char* list,
                                  Read&& read) {
    const Document d = parse_document(file, text);
    Mapping m(d, d.root, file);
    m.only({"description", "source", "date", list});
    for (const char* key : {"description", "source", "date"})
        m.text(key);
    std::vector<Entry> entries;
    for (const TreeNode& node : m.required(list).items) {
        Mapping entry(d, node, list);
        entries.push_back(read(entry));
    }
    return entries;
}

Alloy read_alloy(Mapping& m) {
    m.only({"name", "conductivity", "density", "specific_heat", "source"});
    return {m.text("name"), m.number("conductivity", quantity::conductivity),
            m.number("density", quantity::density),
            m.number("specific_heat", quantity::specific_heat), m.text("source")};
}

Finish read_finish(Mapping& m) {
    m.only({"name", "emissivity", "source"});
    return {m.text("name"), m.number("emissivity", quantity::pure), m.text("source")};
}

Process read_process(Mapping& m) {
    m.only({"name", "smallest_thickness", "smallest_gap", "largest_height_to_gap",
            "largest_height_to_thickness", "largest_height", "smallest_base",
            "smallest_base_to_thickness", "largest_circle", "source"});
    Process p;
    p.name = m.text("name");
    p.smallest_thickness = m.number("smallest_thickness", quantity::length);
    p.smallest_gap = m.number("smallest_gap", quantity::length);
    p.largest_height_to_gap = m.number("largest_height_to_gap", quantity::pure);
    p.largest_height_to_thickness =
        m.optional_number("largest_height_to_thickness", quantity::pure);
    p.largest_height = m.optional_number("largest_height", quantity::length);
    p.smallest_base = m.number("smallest_base", quantity::length);
    p.smallest_base_to_thickness =
        m.optional_number("smallest_base_to_thickness", quantity::pure).value_or(0.0);
    p.largest_circle = m.optional_number("largest_circle", quantity::length);
    p.source = m.text("source");
    return p;
}

} // namespace

const std::vector<Alloy>& alloys() {
    static const auto list =
        read_catalogue<Alloy>(alloys_file, "configs/alloys.yaml", "alloys", read_alloy);
    return list;
}

const std::vector<Finish>& finishes() {
    static const auto list =
        read_catalogue<Finish>(finishes_file, "configs/finishes.yaml", "finishes", read_finish);
    return list;
}

const std::vector<Process>& processes() {
    static const auto list = read_catalogue<Process>(processes_file, "configs/processes.yaml",
                                                     "processes", read_process);
    return list;
}

} // namespace finwright::job
