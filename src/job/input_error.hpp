#pragma once
// What is wrong with a job file: place, line, caret, reason, suggestion.
//
//   pump.yaml:14:12: power has no unit
//       power: 18
//              ^
//   write for example power: 18 W

#include "src/job/job.hpp"
#include <stdexcept>
#include <string>
#include <string_view>

namespace finwright::job {

class InputError : public std::runtime_error {
public:
    /// `text` is the whole file; the excerpt is taken from it. A place with line 0 gives no
    /// excerpt.
    InputError(std::string file, std::string_view text, Place place, std::string reason,
               std::string suggestion);

    const Place& place() const { return place_; }
    const std::string& reason() const { return reason_; }

private:
    Place place_;
    std::string reason_;
};

} // namespace finwright::job
