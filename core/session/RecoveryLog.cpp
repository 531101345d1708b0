// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/RecoveryLog.h"

#include "core/session/JsonScanner.h"
#include "core/session/JsonText.h"
#include "core/session/Sha256.h"

#include <charconv>

namespace spanwright {

namespace {

constexpr std::string_view layoutName = "spanwright-recovery";

/// Takes a count and the blank after it from the front of the text.
std::optional<std::size_t> takeCount(std::string_view& text) {
    std::size_t count = 0;
    const auto [end, problem] = std::from_chars(text.data(), text.data() + text.size(), count);
    const auto used = static_cast<std::size_t>(end - text.data());
    if (problem != std::errc{} || used >= text.size() || text[used] != ' ')
        return std::nullopt;
    text.remove_prefix(used + 1);
    return count;
}

std::optional<RecoveryLog::Entry> takeEntry(std::string_view& rest) {
    const std::size_t lineEnd = rest.find('\n');
    if (!rest.starts_with('#') || lineEnd == std::string_view::npos)
        return std::nullopt;
    std::string_view line = rest.substr(1, lineEnd - 1);
    const auto bytes = takeCount(line);
    const auto readings = bytes ? takeCount(line) : std::nullopt;
    if (!readings || rest.size() - lineEnd - 1 < *bytes)
        return std::nullopt;
    const std::string_view payload = rest.substr(lineEnd + 1, *bytes);
    if (sha256(payload) != line)
        return std::nullopt;
    rest.remove_prefix(lineEnd + 1 + *bytes);
    if (rest.starts_with('\n'))
        rest.remove_prefix(1);
    return RecoveryLog::Entry{payload, *readings};
}

} // namespace

std::optional<RecoveryLog> RecoveryLog::parse(std::string_view bytes) {
    const std::size_t lineEnd = bytes.find('\n');
    if (lineEnd == std::string_view::npos)
        return std::nullopt;
    RecoveryLog log;
    bool known = false;
    JsonScanner scan(bytes.substr(0, lineEnd));
    if (scan.enterObject())
        while (const auto key = scan.nextKey()) {
            if (*key == "layout" && scan.atString())
                known = scan.string() == layoutName;
            else if (*key == "session" && scan.atString())
                log.sessionPath = scan.string();
            else
                scan.skip();
        }
    if (scan.failed() || !known)
        return std::nullopt;
    std::string_view rest = bytes.substr(lineEnd + 1);
    while (const auto entry = takeEntry(rest))
        log.entries.push_back(*entry);
    return log;
}

std::string RecoveryLog::heading(const std::string& sessionPath) {
    JsonText json;
    json.beginObject(JsonText::Layout::OneLine);
    json.key("layout").string(layoutName);
    json.key("version").raw("1");
    json.key("program").string(SPANWRIGHT_VERSION);
    json.key("session").string(sessionPath);
    json.endObject();
    return json.text() + "\n";
}

std::string RecoveryLog::entry(std::string_view payload, std::size_t readings) {
    std::string text = "#" + std::to_string(payload.size()) + " " + std::to_string(readings) + " " + sha256(payload) + "\n";
    text.reserve(text.size() + payload.size() + 1);
    text.append(payload).append("\n");
    return text;
}

} // namespace spanwright
