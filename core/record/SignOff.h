// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>

namespace spanwright {

enum class SignOffRole { Performed, Checked, Authorised };

/// A person's name under the record. A draft stays a draft until all three are there, and is never called valid.
struct SignOff {
    SignOffRole role = SignOffRole::Performed;
    std::string name;
    std::string position;
    std::string date;
    bool operator==(const SignOff&) const = default;
};

} // namespace spanwright
