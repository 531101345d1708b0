// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/ResultFile.h"

#include "core/exchange/FieldScanner.h"
#include "core/exchange/FileBytes.h"
#include "core/session/TextMark.h"

#include <filesystem>

namespace spanwright {

namespace {

constexpr std::string_view ByteOrderMark = "\xEF\xBB\xBF";

bool isSession(const std::string& path, std::string_view bytes) {
    constexpr std::size_t beginning = 4096;
    return path.ends_with(".spanwright") || bytes.substr(0, beginning).find("\"spanwright-session\"") != std::string_view::npos;
}

/// Text as it stands in the dictionary of a PDF: UTF-16, big-endian, behind its byte order mark.
std::string inDictionary(std::string_view key, std::string_view text) {
    std::string entry = "/" + std::string(key) + " (\xFE\xFF";
    for (const char c : text)
        entry.append(1, '\0').append(1, c);
    return entry;
}

std::string_view withoutByteOrderMark(std::string_view text) {
    return text.starts_with(ByteOrderMark) ? text.substr(ByteOrderMark.size()) : text;
}

/// The lines down to the last one of the header, with its end.
std::string_view headOf(std::string_view table, const CsvRules& rules) {
    FieldScanner scan(table, rules.separator, rules.quote);
    for (std::size_t row = 0; row < rules.headerRows; ++row) {
        if (!scan.toNextRow())
            return {};
        while (scan.next().after == FieldScanner::After::Separator) {
        }
    }
    return {table.data(), static_cast<std::size_t>(scan.position() - table.data())};
}

} // namespace

Result<void> resultFree(const std::string& path, const std::vector<std::string>& inputs, const Arguments& arguments, const OwnResult& own) {
    std::error_code unknown;
    for (const std::string& input : inputs)
        if (std::filesystem::equivalent(path, input, unknown))
            return Error(ErrorCode::FileIsInput, {{"file", path}});
    if (!std::filesystem::exists(path, unknown))
        return {};
    // A device or a pipe would be replaced by a file.
    if (!std::filesystem::is_regular_file(path, unknown))
        return Error(ErrorCode::FileNotWritable, {{"file", path}, {"reason", "not a regular file"}});
    if (std::filesystem::file_size(path, unknown) == 0)
        return {};
    const auto there = FileBytes::read(path);
    if (there && isSession(path, there->bytes()))
        return Error(ErrorCode::FileIsSession, {{"file", path}});
    const bool replaced = arguments.has("--replace") || (there && own(there->bytes()));
    return replaced ? Result<void>() : Error(ErrorCode::FileExists, {{"file", path}});
}

Result<std::string> documentName(const Arguments& arguments, const char* option) {
    const std::string name = arguments.value(option).value_or(std::string());
    if (name.empty())
        return Error(ErrorCode::UsageValueMissing, {{"option", option}});
    if (name == StandardOutput)
        return Error(ErrorCode::UsageValueBad, {{"option", option}, {"text", name}});
    return name;
}

bool isOwnPdf(std::string_view bytes, std::string_view title) {
    if (!bytes.starts_with("%PDF-"))
        return false;
    for (const std::string& entry : {inDictionary("Title", title), inDictionary("Creator", "Spanwright "), inDictionary("Producer", "Qt ")})
        if (bytes.find(entry) == std::string_view::npos)
            return false;
    // Whatever is added to a PDF, such as a signature, comes with a table of references of its own.
    constexpr std::string_view references = "startxref";
    return (bytes.ends_with("%%EOF\n") || bytes.ends_with("%%EOF")) && bytes.find(references) != std::string_view::npos && bytes.find(references) == bytes.rfind(references);
}

bool isOwnCertificate(std::string_view bytes) {
    return isOwnPdf(bytes, "Calibration certificate ");
}

bool isOwnValidationRecord(std::string_view bytes) {
    return isOwnPdf(bytes, "Validation record");
}

bool isOwnCertificateXml(std::string_view bytes) {
    return bytes.starts_with("<?xml") && bearsMark(bytes);
}

bool isOwnCoefficients(std::string_view bytes) {
    return !bytes.starts_with('<') && bearsMark(bytes);
}

bool isOwnTable(std::string_view bytes, std::string_view table, const CsvRules& rules) {
    if (bytes == table)
        return true;
    const std::string_view head = headOf(withoutByteOrderMark(table), rules);
    return rules.namesRow && !head.empty() && withoutByteOrderMark(bytes).starts_with(head);
}

} // namespace spanwright
