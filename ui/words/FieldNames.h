// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>

namespace spanwright {

enum class FieldKind {
    Text,   ///< shown as it is
    Number, ///< with the decimal mark of the place
    YesNo,
    Code, ///< a name of an enumeration
};

/// A field of the record as the journal names it, and what people call it.
struct FieldName {
    const char* path;  ///< with # for a number that counts
    const char* words; ///< of context "FieldNames"; %1 is that number, from 1
    FieldKind kind = FieldKind::Text;
};

/// The name of a path whose numbers are written as #; null for one that the record does not have.
const FieldName* fieldName(std::string_view path);

} // namespace spanwright
