#include "src/job/read_job.hpp"

#include "src/job/catalogue.hpp"
#include "src/job/check_job.hpp"
#include "src/job/document.hpp"
#include "src/job/nearest_word.hpp"
#include "src/job/read_air.hpp"
#include "src/job/read_numbers.hpp"
#include "src/job/read_power.hpp"
#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace finwright::job {

namespace {

constexpr double rating_case = 298.15; // case temperature data sheets rate power at [K]
constexpr int most_parts = 64;
constexpr int most_fins = 10000;

// Beyond these a number is a slip of the unit, not a job (common practice, no source).
constexpr double longest_space = 2.0;                                             // [m]
constexpr double longest_side = 2.0;                                              // [m]
constexpr double highest_fin = 1.0;                                               // [m]
constexpr double steepest_draft = 5.0 * std::numbers::pi / 180.0 * (1.0 + 1e-12); // [rad]

// ---- parts ----

/// The area a resistance times area stands for, where it is not the pad's.
double read_contact(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "contact");
    m.only({"across", "along"});
    return positive(d, m, "across", quantity::length) * positive(d, m, "along", quantity::length);
}

/// The one form an interface is stated in, as a resistance times area.
double read_area_resistance(const Document& d, Mapping& m) {
    if (m.has("area_resistance"))
        return not_negative(d, m, "area_resistance", quantity::area_resistance);
    const double layer = not_negative(d, m, "thickness", quantity::length) /
                         positive(d, m, "conductivity", quantity::conductivity);
    return layer +
           (m.has("contacts") ? not_negative(d, m, "contacts", quantity::area_resistance) : 0.0);
}

void read_interface(const Document& d, const TreeNode& node, Part& part) {
    Mapping m(d, node, "interface");
    m.only({"resistance", "area_resistance", "thickness", "conductivity", "contacts", "contact"});
    const int forms = int(m.has("resistance")) + int(m.has("area_resistance")) +
                      int(m.has("thickness") || m.has("conductivity"));
    if (forms != 1)
        d.fail(
            m.place(), "an interface is stated in exactly one form",
            "give resistance (K/W), or area_resistance (K cm2/W), or thickness with conductivity");
    if (m.has("contacts") && !m.has("thickness"))
        m.fail("contacts", "contacts go with thickness and conductivity", "leave the line out");
    if (m.has("contact") && m.has("resistance"))
        m.fail("contact", "a resistance in K/W asks for no area", "leave the contact out",
               m.place_of("resistance"));
    if (const TreeNode* contact = m.optional("contact"))
        part.contact_area = read_contact(d, *contact);
    part.interface = m.has("resistance")
                         ? not_negative(d, m, "resistance", quantity::resistance)
                         : read_area_resistance(d, m) / part.contact_area.value_or(part.pad_area());
}

Coordinate read_coordinate(const Document& d, Mapping& m, std::string_view key) {
    const TreeNode& node = m.required(key);
    const bool share = node.kind == TreeNode::Kind::scalar && is_share(node.text);
    const double value = share ? m.number(key, quantity::pure) : m.number(key, quantity::length);
    if (value <= 0.0 || (share && value >= 1.0))
        d.fail(node.place,
               fmt::format("{} puts the pad's centre on or over the edge of the base", key),
               "measure from the left edge and from the air's inlet end, or write a share such as "
               "50 %");
    return {value, share};
}

/// R_jc = (Tj,max - 25 degC)/P, common practice in data sheets.
void read_rating(const Document& d, const TreeNode& node, Part& part) {
    Mapping m(d, node, "rating");
    m.only({"power", "junction_max"});
    const CaseRating rating{positive(d, m, "power", quantity::power),
                            m.number("junction_max", quantity::temperature)};
    if (rating.junction_max <= rating_case)
        m.fail("junction_max", "a part rated at 25 degC case has its junction's maximum above that",
               "check the unit: degC, degF or K");
    part.rating = rating;
    part.junction_to_case = (rating.junction_max - rating_case) / rating.power;
}

void read_junction(const Document& d, Mapping& m, Part& part) {
    part.junction_limit = m.optional_number("junction_limit", quantity::temperature);
    if (part.junction_limit && *part.junction_limit > hottest_junction)
        m.fail("junction_limit",
               fmt::format("a junction at {:.0f} degC is no semiconductor's",
                           *part.junction_limit - 273.15),
               "check the unit: degC, degF or K");
    const bool direct = m.has("junction_to_case"), rated = m.has("rating");
    if (direct && rated)
        m.fail("rating", "junction_to_case and rating say the same thing twice", "keep one of them",
               m.place_of("junction_to_case"));
    if ((part.junction_limit || part.power_table) && !direct && !rated)
        d.fail(m.place(),
               fmt::format("'{}' has a {} but nothing between junction and case", part.name,
                           part.junction_limit ? "junction limit" : "power table"),
               "add junction_to_case: 0.8 K/W, or the data sheet's rating at 25 degC case: "
               "rating: {power: 150 W, junction_max: 150 degC}");
    if (direct)
        part.junction_to_case = not_negative(d, m, "junction_to_case", quantity::resistance);
    if (!rated) return;
    read_rating(d, m.required("rating"), part);
    if (part.junction_limit && *part.junction_limit > part.rating->junction_max * (1.0 + 1e-9))
        m.fail("junction_limit", "the junction limit lies above the maximum its rating goes with",
               "lower it, or check junction_max", m.place_of("rating"));
}

std::optional<bool> read_insulated(Mapping& m) {
    const auto text = m.optional_text("insulated");
    if (!text) return std::nullopt;
    if (*text != "yes" && *text != "no")
        m.fail("insulated", fmt::format("insulated cannot be '{}'", *text),
               "write yes where the tab is insulated inside the part, no where it is live");
    return *text == "yes";
}

Part read_part(const Document& d, const TreeNode& node, int& count) {
    Mapping m(d, node, "a part");
    m.only({"name", "power", "junction_limit", "junction_to_case", "rating", "interface",
            "insulated", "pad", "place", "count"});
    Part part;
    part.place = m.place();
    part.name = m.text("name");
    read_power(d, m, part);
    Mapping pad(d, m.required("pad"), "pad");
    pad.only({"across", "along"});
    part.pad_across = positive(d, pad, "across", quantity::length);
    part.pad_along = positive(d, pad, "along", quantity::length);
    read_junction(d, m, part);
    if (const TreeNode* interface = m.optional("interface")) read_interface(d, *interface, part);
    part.insulated = read_insulated(m);
    if (const TreeNode* place = m.optional("place")) {
        Mapping p(d, *place, "place");
        p.only({"across", "along"});
        part.across = read_coordinate(d, p, "across");
        part.along = read_coordinate(d, p, "along");
    }
    count = 1;
    if (const TreeNode* n = m.optional("count")) {
        count = whole_number(d, *n, "count");
        if (count < 1 || count > most_parts)
            m.fail("count", fmt::format("count must be 1 to {}", most_parts),
                   "write for example count: 3");
        if (count > 1 && m.has("place"))
            m.fail("place", "several equal parts cannot stand in one place",
                   "list them one by one, or leave place out");
    }
    return part;
}

void refuse_second(const Document& d, const std::vector<Part>& parts, const Part& part) {
    for (const Part& other : parts)
        if (other.name == part.name)
            d.fail(part.place, fmt::format("there are two parts named '{}'", part.name),
                   "give each its own name", other.place);
}

std::vector<Part> read_parts(const Document& d, const TreeNode& node) {
    if (node.kind != TreeNode::Kind::sequence || node.items.empty())
        d.fail(node.place, "parts must be a list of at least one part",
               "write '- name: ...' lines below it");
    std::vector<Part> parts;
    for (const TreeNode& item : node.items) {
        int count = 1;
        const Part part = read_part(d, item, count);
        for (int i = 1; i <= count; ++i) {
            Part one = part;
            if (count > 1) one.name = fmt::format("{} {}", part.name, i);
            refuse_second(d, parts, one);
            parts.push_back(std::move(one));
        }
        if (parts.size() > most_parts)
            d.fail(part.place, fmt::format("more than {} parts", most_parts),
                   "put parts that share a pad area together");
    }
    return parts;
}

// ---- limits ----

Space read_space(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "space");
    m.only({"width", "height", "length"});
    const auto side = [&](const char* key) {
        const auto value = optional_positive(d, m, key, quantity::length);
        if (value && *value > longest_space)
            m.fail(key, "a space of more than 2 m is not for a plate-fin sink",
                   "check the unit: mm, in or m");
        return value;
    };
    if (node.entries.empty())
        d.fail(node.place, "the space has no side",
               "give at least one of width, height and length");
    return {side("width"), side("height"), side("length")};
}

Limits read_limits(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "limits");
    m.only({"margin", "sink_resistance", "mass", "pressure_drop", "space"});
    Limits limits;
    if (m.has("margin")) limits.margin = not_negative(d, m, "margin", quantity::difference);
    limits.sink_resistance = optional_positive(d, m, "sink_resistance", quantity::resistance);
    limits.mass = optional_positive(d, m, "mass", quantity::mass);
    limits.pressure_drop = optional_positive(d, m, "pressure_drop", quantity::pressure);
    limits.space = read_space(d, m.required("space"));
    return limits;
}

// ---- sink ----

template <class Entry>
Entry from_catalogue(const Document& d, Mapping& m, const char* key,
                     const std::vector<Entry>& list) {
    const std::string name = m.text(key);
    std::vector<std::string> names;
    std::string all;
    for (const Entry& entry : list) {
        if (entry.name == name) return entry;
        names.push_back(entry.name);
        all += (all.empty() ? "" : ", ") + entry.name;
    }
    const std::string meant = nearest_word(name, names);
    d.fail(m.place_of(key), fmt::format("there is no {} '{}' in the catalogue", key, name),
           meant.empty() ? "known: " + all : fmt::format("did you mean {}? Known: {}", meant, all));
}

Range read_range(const Document& d, Mapping& m, std::string_view key,
                 const std::function<double(const TreeNode&, const std::string&)>& value) {
    Range range;
    range.place = m.place();
    const TreeNode* node = m.optional(key);
    if (!node) return range;
    range.place = node->place;
    if (node->kind == TreeNode::Kind::scalar) {
        range.from = range.to = value(*node, std::string(key));
    } else {
        Mapping ends(d, *node, std::string(key));
        ends.only({"from", "to"});
        if (const TreeNode* from = ends.optional("from")) range.from = value(*from, "from");
        if (const TreeNode* to = ends.optional("to")) range.to = value(*to, "to");
        if (!range.from && !range.to)
            d.fail(node->place, fmt::format("{} states neither from nor to", key),
                   "leave the key out to free it");
    }
    if (range.from && range.to && *range.from > *range.to)
        d.fail(range.place, fmt::format("{} runs from more to less", key), "swap from and to");
    return range;
}

Range length_range(const Document& d, Mapping& m, std::string_view key, double longest) {
    return read_range(d, m, key, [&](const TreeNode& node, const std::string& what) {
        const double value = quantity_of(d, node, what, quantity::length);
        if (value <= 0.0)
            d.fail(node.place, fmt::format("{} must be above zero", key),
                   "leave the key out to free it");
        if (value > longest)
            d.fail(node.place,
                   fmt::format("{} of {:.4g} m is not for a plate-fin sink", key, value),
                   "check the unit: mm, in or m");
        return value;
    });
}

Aim read_aim(Mapping& m) {
    static const std::vector<std::pair<std::string, Aim>> aims{
        {"mass", Aim::mass},
        {"volume", Aim::volume},
        {"height", Aim::height},
        {"footprint", Aim::footprint},
        {"resistance", Aim::resistance},
        {"pressure_drop", Aim::pressure_drop}};
    const std::string text = m.optional_text("aim").value_or("mass");
    for (const auto& [name, aim] : aims)
        if (name == text) return aim;
    m.fail("aim", fmt::format("there is no aim '{}'", text),
           "write mass, volume, height, footprint, resistance or pressure_drop");
}

FinDetails read_details(const Document& d, Mapping& m) {
    FinDetails details;
    const std::string tips = m.optional_text("tips").value_or("square");
    if (tips != "square" && tips != "round")
        m.fail("tips", fmt::format("fin tips cannot be '{}'", tips),
               "write square, or round for a full radius");
    details.round_tips = tips == "round";
    if (m.has("flange")) details.flange = not_negative(d, m, "flange", quantity::length);
    if (m.has("fin_free_length"))
        details.fin_free = not_negative(d, m, "fin_free_length", quantity::length);
    if (m.has("fin_joint"))
        details.joint = not_negative(d, m, "fin_joint", quantity::area_resistance);
    details.area_factor = m.optional_number("area_factor", quantity::pure).value_or(1.0);
    if (details.area_factor < 1.0 || details.area_factor > 3.0)
        m.fail("area_factor", "serrated faces have one to three times the area of smooth ones",
               "write for example area_factor: 1.15, as your shop states it");
    return details;
}

Sink read_sink(const Document& d, const TreeNode& node) {
    Mapping m(d, node, "sink");
    m.only({"process", "alloy", "finish", "emissivity", "aim", "fins", "fin_height",
            "fin_thickness", "fin_draft", "gap", "base_thickness", "width", "length", "tips",
            "flange", "fin_free_length", "fin_joint", "area_factor"});
    Sink sink;
    sink.process = from_catalogue(d, m, "process", processes());
    sink.alloy = from_catalogue(d, m, "alloy", alloys());
    sink.finish = from_catalogue(d, m, "finish", finishes());
    if (const auto stated = m.optional_number("emissivity", quantity::pure)) {
        if (*stated <= 0.0 || *stated > 1.0)
            m.fail("emissivity", "an emissivity lies above 0 and up to 1",
                   "bare aluminium 0.05 to 0.1, anodised 0.8 to 0.9");
        sink.finish.emissivity = *stated;
        sink.finish.source = "job";
    }
    sink.aim = read_aim(m);
    sink.fins = read_range(d, m, "fins", [&](const TreeNode& n, const std::string& what) {
        return double(whole_number(d, n, what));
    });
    const bool plate = sink.fins.fixed() && *sink.fins.from == 0.0;
    if (!plate &&
        ((sink.fins.from && *sink.fins.from < 2.0) || (sink.fins.to && *sink.fins.to < 2.0)))
        d.fail(
            sink.fins.place, "a plate-fin sink has at least two fins",
            "write for example fins: 12, fins: 0 for a plain plate to be rated, or leave the key "
            "out");
    if ((sink.fins.from && *sink.fins.from > most_fins) ||
        (sink.fins.to && *sink.fins.to > most_fins))
        d.fail(sink.fins.place, fmt::format("more than {} fins", most_fins),
               "write for example fins: 12, or leave the key out");
    sink.fin_height = length_range(d, m, "fin_height", highest_fin);
    sink.fin_thickness = length_range(d, m, "fin_thickness", highest_fin);
    sink.gap = length_range(d, m, "gap", highest_fin);
    sink.base_thickness = length_range(d, m, "base_thickness", highest_fin);
    sink.width = length_range(d, m, "width", longest_side);
    sink.length = length_range(d, m, "length", longest_side);
    if (const auto draft = m.optional_number("fin_draft", quantity::angle)) {
        if (*draft < 0.0 || *draft > steepest_draft)
            m.fail("fin_draft", "the draft of a fin face lies between 0 and 5 deg",
                   "write for example fin_draft: 0.5 deg");
        sink.fin_draft = *draft;
    }
    sink.details = read_details(d, m);
    return sink;
}

void read_shop(const Document& d, const TreeNode& node, Sink& sink) {
    Mapping m(d, node, "shop");
    m.only({"smallest_thickness", "smallest_gap", "largest_height_to_gap",
            "largest_height_to_thickness", "largest_height", "smallest_base",
            "smallest_base_to_thickness", "largest_circle", "steps"});
    Process& p = sink.process;
    const auto length = [&](const char* key) {
        return optional_positive(d, m, key, quantity::length);
    };
    const auto pure = [&](const char* key) { return optional_positive(d, m, key, quantity::pure); };
    if (const auto v = length("smallest_thickness")) p.smallest_thickness = *v;
    if (const auto v = length("smallest_gap")) p.smallest_gap = *v;
    if (const auto v = pure("largest_height_to_gap")) p.largest_height_to_gap = *v;
    if (const auto v = pure("largest_height_to_thickness")) p.largest_height_to_thickness = *v;
    if (const auto v = length("largest_height")) p.largest_height = *v;
    if (const auto v = length("smallest_base")) p.smallest_base = *v;
    if (const auto v = pure("smallest_base_to_thickness")) p.smallest_base_to_thickness = *v;
    if (const auto v = length("largest_circle")) p.largest_circle = *v;
    const TreeNode* steps_node = m.optional("steps");
    if (!steps_node) return;
    Mapping steps(d, *steps_node, "steps");
    steps.only({"fin_height", "fin_thickness", "gap", "base_thickness", "length"});
    const auto step = [&](const char* key, double& target) {
        if (const auto v = optional_positive(d, steps, key, quantity::length)) target = *v;
    };
    step("fin_height", sink.steps.fin_height);
    step("fin_thickness", sink.steps.fin_thickness);
    step("gap", sink.steps.gap);
    step("base_thickness", sink.steps.base_thickness);
    step("length", sink.steps.length);
}

Job read_document(const Document& d) {
    Mapping m(d, d.root, "the job file");
    m.only({"job", "air", "mounting", "around", "parts", "limits", "sink", "shop"});
    Job job;
    job.file = d.file;
    job.text = d.text;
    job.title = m.text("job");
    job.air = read_air(d, m.required("air"), m.optional("mounting"), m.optional("around"));
    job.parts = read_parts(d, m.required("parts"));
    job.limits = read_limits(d, m.required("limits"));
    job.sink = read_sink(d, m.required("sink"));
    if (const TreeNode* shop = m.optional("shop")) read_shop(d, *shop, job.sink);
    set_sizing_powers(job);
    return job;
}

} // namespace

Job read_job_text(std::string text, std::string file_name) {
    const Document d = parse_document(std::move(file_name), std::move(text));
    Job job = read_document(d);
    check_sized_job(job, d);
    return job;
}

Job read_job(const std::filesystem::path& path) {
    return read_job_text(read_text_file(path), path.string());
}

Job read_rated_job(const std::filesystem::path& path) {
    const Document d = parse_document(path.string(), read_text_file(path));
    Job job = read_document(d);
    check_rated_job(job, d);
    return job;
}

} // namespace finwright::job
