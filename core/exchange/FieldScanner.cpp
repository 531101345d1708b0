// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/FieldScanner.h"

#include <algorithm>

namespace spanwright {

FieldScanner::After FieldScanner::passTo(const char* fieldEnd) {
    at_ = fieldEnd;
    if (separator_ == ' ')
        skipSeparatorBlanks();
    if (at_ == end_)
        return After::TextEnd;
    if (*at_ == '\n' || *at_ == '\r') {
        at_ += *at_ == '\r' && at_ + 1 != end_ && at_[1] == '\n' ? 2 : 1;
        ++line_;
        return After::LineEnd;
    }
    if (separator_ != ' ')
        ++at_;
    return After::Separator;
}

void FieldScanner::skipSeparatorBlanks() {
    while (at_ != end_ && (*at_ == ' ' || *at_ == '\t'))
        ++at_;
}

bool FieldScanner::toNextRow() {
    for (;;) {
        const char* p = at_;
        while (p != end_ && (*p == ' ' || *p == '\t' || *p == separator_))
            ++p;
        if (p == end_) {
            at_ = end_;
            return false;
        }
        if (*p != '\n' && *p != '\r') {
            if (separator_ == ' ')
                at_ = p;
            return true;
        }
        passTo(p);
    }
}

FieldScanner::Field FieldScanner::next() {
    const char* p = at_;
    while (p != end_ && *p == ' ' && separator_ != ' ')
        ++p;
    if (p != end_ && *p == quote_) {
        at_ = p;
        return quotedField();
    }
    const char* fieldEnd = std::find_if(at_, end_, [this](char c) {
        return c == separator_ || c == '\n' || c == '\r' || (separator_ == ' ' && c == '\t');
    });
    Field field;
    field.text = std::string_view(at_, static_cast<std::size_t>(fieldEnd - at_));
    field.after = passTo(fieldEnd);
    return field;
}

FieldScanner::Field FieldScanner::quotedField() {
    const std::size_t opened = line_;
    scratch_.clear();
    const char* p = at_ + 1;
    for (;; ++p) {
        if (p == end_) {
            unclosedQuote_ = opened;
            break;
        }
        if (*p == quote_) {
            if (p + 1 == end_ || p[1] != quote_) {
                ++p;
                break;
            }
            ++p;
        } else if (*p == '\n' || (*p == '\r' && (p + 1 == end_ || p[1] != '\n'))) {
            ++line_;
        }
        scratch_ += *p;
    }
    // What stands between a closing quote and the separator belongs to the field, so that nothing is lost.
    const char* fieldEnd = std::find_if(p, end_, [this](char c) {
        return c == separator_ || c == '\n' || c == '\r' || (separator_ == ' ' && c == '\t');
    });
    const std::string_view tail(p, static_cast<std::size_t>(fieldEnd - p));
    if (tail.find_first_not_of(" \t") != std::string_view::npos)
        scratch_ += tail;
    Field field;
    field.quoted = true;
    field.after = passTo(fieldEnd);
    field.text = scratch_;
    return field;
}

} // namespace spanwright
