#pragma once
// What is wrong with a job file: place, line, caret, reason, suggestion. Where two lines contradict
// each other the second is shown as well.
//
//   pump.yaml:14:12: power: 18 has no unit
//       power: 18
//              ^
//   write a power with its unit, for example 18 W

#include "src/job/job.hpp"
#include <stdexcept>
#include <string>
#include <string_view>

namespace finwright::job {

class InputError : public std::runtime_error {
public:
    /// `text` is the whole file; the excerpts are taken from it. A place with line 0 gives none.
    /// `against` is the line this one contradicts, if there is one. Columns count bytes, as the
    /// file is stored; the message counts characters.
    InputError(const std::string& file, std::string_view text, Place place,
               const std::string& reason, const std::string& suggestion, Place against = {});

    const Place& place() const { return place_; }
    const Place& against() const { return against_; }
    const std::string& reason() const { return reason_; }

private:
    Place place_;
    Place against_;
    std::string reason_;
};

} // namespace finwright::job
