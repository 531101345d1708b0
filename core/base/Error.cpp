// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Error.h"

#include <algorithm>

namespace spanwright {

Error Error::with(std::string name, std::string value) const {
    Error more = *this;
    more.facts.push_back({std::move(name), std::move(value)});
    return more;
}

std::string_view Error::fact(std::string_view name) const {
    const auto found = std::find_if(facts.begin(), facts.end(), [&](const Fact& f) { return f.name == name; });
    return found == facts.end() ? std::string_view{} : std::string_view{found->value};
}

} // namespace spanwright
