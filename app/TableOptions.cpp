// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/TableOptions.h"

#include "app/RecordFile.h"

namespace spanwright {

namespace {

Error ofOption(const Error& error, const char* option, const std::string& text) {
    return Error(error.code == ErrorCode::UsageValueBad ? error.code : ErrorCode::UsageValueBad, {{"option", option}, {"text", text}});
}

std::string separatorWord(char separator) {
    switch (separator) {
    case ',': return "comma";
    case ';': return "semicolon";
    case '\t': return "tab";
    case CsvRules::Blanks: return "blanks";
    default: return std::string(1, separator);
    }
}

std::string columnNote(const char* use, const CsvRules& rules, std::optional<std::size_t> column) {
    if (!column)
        return {};
    const std::string& name = rules.columns[*column].name;
    return std::string(", ") + use + " from column " + std::to_string(*column + 1) + (name.empty() ? "" : " \"" + name + "\"");
}

} // namespace

Result<CsvWishes> wishesOf(const Arguments& arguments) {
    CsvWishes wishes;
    if (const auto text = arguments.value("--encoding")) {
        const auto encoding = parseEncodingName(*text);
        if (!encoding)
            return ofOption(encoding.error(), "--encoding", *text);
        wishes.encoding = *encoding;
    }
    if (const auto text = arguments.value("--separator")) {
        const auto separator = parseSeparatorName(*text);
        if (!separator)
            return ofOption(separator.error(), "--separator", *text);
        wishes.separator = *separator;
    }
    for (const auto& [option, text] : arguments.options)
        if (option == "--missing")
            wishes.missingWords.push_back(text);
    if (arguments.has("--decimal")) {
        const auto mark = decimalMark(arguments);
        if (!mark)
            return mark.error();
        wishes.decimal = *mark;
    }
    return wishes;
}

std::optional<std::size_t> firstNumbersBut(const CsvRules& rules, std::optional<std::size_t> other) {
    for (const bool anyKind : {false, true})
        for (std::size_t i = 0; i < rules.columns.size(); ++i)
            if (i != other && (anyKind || rules.columns[i].kind == ColumnKind::Number))
                return i;
    return std::nullopt;
}

const Error* doubtToRefuse(const CsvRules& rules, const ImportMapping& mapping) {
    for (const Error& doubt : rules.doubts) {
        if (doubt.code == ErrorCode::HeaderShort)
            return &doubt;
        if (doubt.code != ErrorCode::DecimalMarkUnclear)
            continue;
        for (const auto& column : {mapping.reference, mapping.indication, mapping.setPoint, mapping.uReference, mapping.uIndication, mapping.uCovariance})
            if (column && doubt.fact("column") == columnLabel(rules, *column))
                return &doubt;
    }
    return nullptr;
}

std::string understood(const std::string& path, const CsvRules& rules, const ImportMapping& mapping) {
    const bool comma = rules.columns[*mapping.indication].decimal == DecimalMark::Comma;
    std::string note = path + ": read with separator " + separatorWord(rules.separator) + ", decimal " + (comma ? "comma" : "point") +
                       ", encoding " + std::string(encodingName(rules.encoding)) + ", " + std::to_string(rules.headerRows) +
                       " header line" + (rules.headerRows == 1 ? "" : "s");
    note += columnNote("reference", rules, mapping.reference) + columnNote("indication", rules, mapping.indication);
    note += columnNote("set point", rules, mapping.setPoint) + columnNote("direction", rules, mapping.direction);
    note += columnNote("run", rules, mapping.run) + columnNote("u of reference", rules, mapping.uReference);
    note += columnNote("u of indication", rules, mapping.uIndication) + columnNote("covariance", rules, mapping.uCovariance) + columnNote("time", rules, mapping.time);
    return note;
}

} // namespace spanwright
