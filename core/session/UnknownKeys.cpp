// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/UnknownKeys.h"

namespace spanwright {

namespace {

std::string keyOf(std::string_view token) {
    std::string key;
    for (std::size_t i = 0; i < token.size(); ++i) {
        if (token[i] != '~') {
            key += token[i];
            continue;
        }
        ++i;
        key += i < token.size() && token[i] == '1' ? '/' : '~';
    }
    return key;
}

} // namespace

std::string childPointer(std::string_view pointer, std::string_view key) {
    std::string child(pointer);
    child += '/';
    for (const char c : key) {
        if (c == '~')
            child += "~0";
        else if (c == '/')
            child += "~1";
        else
            child += c;
    }
    return child;
}

std::string childPointer(std::string_view pointer, std::size_t index) {
    return childPointer(pointer, std::to_string(index));
}

void keepUnknown(JsonScanner& scan, Record& record, const std::string& pointer) {
    record.unknown.insert_or_assign(pointer, std::string(scan.skip()));
}

void writeUnknown(JsonText& json, const Record& record, std::string_view pointer) {
    if (record.unknown.empty())
        return;
    const std::string below = std::string(pointer) + "/";
    for (auto at = record.unknown.lower_bound(below); at != record.unknown.end() && at->first.starts_with(below); ++at) {
        const std::string_view token = std::string_view(at->first).substr(below.size());
        if (token.find('/') == std::string_view::npos)
            json.key(keyOf(token)).raw(at->second);
    }
}

void forgetUnknown(Record& record, const std::string& pointer) {
    auto at = record.unknown.lower_bound(pointer);
    while (at != record.unknown.end() && at->first.starts_with(pointer)) {
        const bool below = at->first.size() == pointer.size() || at->first[pointer.size()] == '/';
        at = below ? record.unknown.erase(at) : std::next(at);
    }
}

} // namespace spanwright
