// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/Dismissals.h"

#include "core/diagnose/FindingName.h"

#include <charconv>

namespace spanwright {

std::string figuresKey(const Finding& finding) {
    std::string key;
    for (const Figure& figure : finding.figures) {
        char digits[40];
        const auto end = std::to_chars(digits, digits + sizeof digits, figure.value).ptr;
        key += figure.name + "=" + std::string(digits, end) + " ";
    }
    for (const ReadingId id : finding.rows)
        key += std::to_string(id) + " ";
    if (!key.empty())
        key.pop_back();
    return key;
}

const Dismissal* dismissalOf(const Finding& finding, const Record& record) {
    const std::string name(findingName(finding.code)), figures = figuresKey(finding);
    for (const Dismissal& dismissal : record.dismissals)
        if (dismissal.finding == name && dismissal.figures == figures)
            return &dismissal;
    return nullptr;
}

} // namespace spanwright
