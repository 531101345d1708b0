// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/JournalText.h"

#include "core/record/Fields.h"
#include "ui/look/NumberText.h"
#include "ui/words/ChoiceText.h"
#include "ui/words/FieldNames.h"
#include "ui/words/Words.h"

#include <QCoreApplication>
#include <QRegularExpression>

#include <map>

namespace spanwright {

namespace {

struct Journal {
    Q_DECLARE_TR_FUNCTIONS(Journal)
};

QString tr(const char* text) {
    return Journal::tr(text);
}

QString whatText(const std::string& what) {
    static const std::pair<const char*, const char*> words[] = {
        {"reading-entered", QT_TRANSLATE_NOOP("Journal", "reading entered")},
        {"value-entered", QT_TRANSLATE_NOOP("Journal", "value entered")},
        {"value-amended", QT_TRANSLATE_NOOP("Journal", "value amended")},
        {"reading-placed", QT_TRANSLATE_NOOP("Journal", "reading placed")},
        {"readings-imported", QT_TRANSLATE_NOOP("Journal", "readings taken in")},
        {"excluded", QT_TRANSLATE_NOOP("Journal", "excluded")},
        {"readmitted", QT_TRANSLATE_NOOP("Journal", "readmitted")},
        {"changed", QT_TRANSLATE_NOOP("Journal", "changed")},
        {"undone", QT_TRANSLATE_NOOP("Journal", "undone")},
        {"redone", QT_TRANSLATE_NOOP("Journal", "redone")},
        {"seal-broken", QT_TRANSLATE_NOOP("Journal", "opened, changed outside the program")},
        {"journal-broken", QT_TRANSLATE_NOOP("Journal", "opened, an entry did not fit the one before")},
    };
    for (const auto& [code, word] : words)
        if (what == code)
            return tr(word);
    return QString::fromStdString(what);
}

QString numberText(const QString& text) {
    const Result<Decimal> number = Decimal::parse(text.toStdString());
    return number ? typedText(*number) : text;
}

/// Names of enumerations that are not the words of something else.
const char* plainCode(const std::string& path, const std::string& code) {
    static const std::map<std::pair<std::string, std::string>, const char*> words = {
        {{"standards.#.form", "absolute"}, QT_TRANSLATE_NOOP("Journal", "in the unit")},
        {{"standards.#.form", "percent-of-reading"}, QT_TRANSLATE_NOOP("Journal", "in % of reading")},
        {{"standards.#.correction_use", "none"}, QT_TRANSLATE_NOOP("Journal", "there is none")},
        {{"standards.#.correction_use", "apply"}, QT_TRANSLATE_NOOP("Journal", "apply it to the readings")},
        {{"standards.#.correction_use", "already-applied"}, QT_TRANSLATE_NOOP("Journal", "was applied before typing")},
        {{"plan.directions", "rising-then-falling"}, QT_TRANSLATE_NOOP("Journal", "rising, then falling")},
        {{"choices.covariance", "residuals"}, QT_TRANSLATE_NOOP("Journal", "from the residual spread")},
        {{"choices.covariance", "stated"}, QT_TRANSLATE_NOOP("Journal", "from the stated uncertainties as they are")},
        {{"choices.shared_error", "budget"}, QT_TRANSLATE_NOOP("Journal", "carried to the budget, not the fit")},
        {{"choices.shared_error", "fit"}, QT_TRANSLATE_NOOP("Journal", "in the fit")},
        {{"limits.rule", "simple"}, QT_TRANSLATE_NOOP("Journal", "simple acceptance")},
        {{"limits.rule", "guarded-u"}, QT_TRANSLATE_NOOP("Journal", "guarded by U")},
        {{"limits.rule", "guarded-fraction"}, QT_TRANSLATE_NOOP("Journal", "guarded by r \u00b7 U")},
        {{"limits.rule", "four-state"}, QT_TRANSLATE_NOOP("Journal", "four states, guarded by U")},
    };
    const auto found = words.find({path, code});
    return found == words.end() ? nullptr : found->second;
}

QString codeText(const std::string& path, const std::string& code) {
    if (path == "choices.function")
        if (const Result<FunctionChoice> function = parseFunctionName(code))
            return functionText(*function);
    if (path == "choices.weights")
        if (const auto weights = valueOf<Weights>(code))
            return weightsText(*weights);
    if (path == "choices.method")
        if (const auto method = valueOf<Method>(code))
            return methodText(*method);
    if (path == "budget.omitted.#.line")
        if (const auto line = valueOf<DerivedLine>(code))
            return derivedLineText(*line);
    if (path == "budget.lines.#.distribution")
        if (const auto distribution = valueOf<Distribution>(code))
            return distributionText(*distribution);
    if (const char* words = plainCode(path, code))
        return tr(words);
    // The others are English words with a hyphen: as-found, least-squares, lack-of-fit.
    return QString::fromStdString(code).replace(QLatin1Char('-'), QLatin1Char(' '));
}

/// "standards.1.due" as "standards.#.due", and the 2 that people count.
struct Path {
    std::string pattern;
    std::vector<int> numbers;
};

Path pathOf(const std::string& text) {
    Path path;
    for (const QString& piece : QString::fromStdString(text).split(QLatin1Char('.'))) {
        bool counts = false;
        const int number = piece.toInt(&counts);
        if (!path.pattern.empty())
            path.pattern += '.';
        path.pattern += counts ? "#" : piece.toStdString();
        if (counts)
            path.numbers.push_back(number + 1);
    }
    return path;
}

QString valueText(const std::string& where, const std::string& value) {
    const Path path = pathOf(where);
    const FieldName* field = fieldName(path.pattern);
    const QString text = QString::fromStdString(value);
    if (!field || value.empty())
        return text;
    switch (field->kind) {
    case FieldKind::Text: return text;
    case FieldKind::Number: return numberText(text);
    case FieldKind::YesNo: return value == "true" ? tr("yes") : tr("no");
    case FieldKind::Code: return codeText(path.pattern, value);
    }
    return text;
}

QString columnText(const QString& column) {
    static const std::pair<const char*, const char*> words[] = {
        {"set point", QT_TRANSLATE_NOOP("Journal", "set point")},
        {"reference", QT_TRANSLATE_NOOP("Journal", "reference")},
        {"indication", QT_TRANSLATE_NOOP("Journal", "indication")},
        {"u of reference", QT_TRANSLATE_NOOP("Journal", "u of reference")},
        {"u of indication", QT_TRANSLATE_NOOP("Journal", "u of indication")},
        {"covariance", QT_TRANSLATE_NOOP("Journal", "covariance")},
        {"place", QT_TRANSLATE_NOOP("Journal", "place in the plan")},
    };
    for (const auto& [name, word] : words)
        if (column == QLatin1String(name))
            return tr(word);
    return column;
}

/// One piece of "reference 2.0001, as-found, run 1, rising".
QString readingPiece(const QString& piece) {
    if (const auto phase = valueOf<Phase>(piece.toStdString()))
        return phaseText(*phase);
    if (const auto direction = valueOf<Direction>(piece.toStdString()))
        return directionText(*direction);
    const auto last = piece.lastIndexOf(QLatin1Char(' '));
    const QString name = piece.left(last), number = piece.mid(last + 1);
    if (last < 0 || !Decimal::parse(number.toStdString()))
        return piece;
    return (name == QLatin1String("run") ? tr("run") : columnText(name)) + QLatin1Char(' ') + numberText(number);
}

/// What a reading was or became: a number, a whole reading, why it is excluded.
QString readingText(const std::string& value) {
    const QString text = QString::fromStdString(value);
    const QString code = text.section(QLatin1String(": "), 0, 0);
    if (const auto reason = valueOf<ExclusionReason>(code.toStdString()))
        return reasonText(*reason) + text.mid(code.size());
    if (Decimal::parse(value))
        return numberText(text);
    QStringList pieces;
    for (const QString& piece : text.split(QLatin1String(", ")))
        pieces << readingPiece(piece);
    return pieces.join(QLatin1String(", "));
}

QString importedText(const std::string& value) {
    static const QRegularExpression form(QStringLiteral("^(\\d+) readings from (.*)$"), QRegularExpression::DotMatchesEverythingOption);
    const QRegularExpressionMatch match = form.match(QString::fromStdString(value));
    return match.hasMatch() ? Journal::tr("%n reading(s) from %1", nullptr, match.captured(1).toInt()).arg(match.captured(2))
                            : QString::fromStdString(value);
}

/// The words of a place that is no field; empty for another one.
QString placeWords(const QString& where) {
    static const QRegularExpression reading(QStringLiteral("^reading (\\d+)(?: (.+))?$"));
    static const QRegularExpression several(QStringLiteral("^readings (\\d+) to (\\d+)$"));
    static const QRegularExpression entry(QStringLiteral("^journal entry (\\d+)$"));
    if (const auto match = reading.match(where); match.hasMatch())
        return match.captured(2).isEmpty() ? tr("reading %1").arg(match.captured(1))
                                           : tr("reading %1, %2").arg(match.captured(1), columnText(match.captured(2)));
    if (const auto match = several.match(where); match.hasMatch())
        return tr("readings %1 to %2").arg(match.captured(1), match.captured(2));
    if (const auto match = entry.match(where); match.hasMatch())
        return tr("entry %1 of the journal").arg(match.captured(1));
    return where == QLatin1String("session") ? tr("session") : QString();
}

} // namespace

QString fieldText(const std::string& path) {
    const Path split = pathOf(path);
    const FieldName* field = fieldName(split.pattern);
    if (!field)
        return {};
    QString words = QCoreApplication::translate("FieldNames", field->words);
    for (const int number : split.numbers)
        words = words.arg(number);
    return words;
}

JournalWords journalWords(const JournalEntry& entry) {
    JournalWords words;
    words.what = whatText(entry.what);
    words.reason = QString::fromStdString(entry.reason);
    std::string kind = entry.what;
    // The reason of what was undone begins with the code of what it was.
    if (kind == "undone" || kind == "redone") {
        kind = words.reason.section(QLatin1String(": "), 0, 0).toStdString();
        words.what += QLatin1String(": ") + whatText(kind);
        words.reason = words.reason.section(QLatin1String(": "), 1);
    }
    const QString where = QString::fromStdString(entry.where);
    const QString field = fieldText(entry.where), place = placeWords(where);
    words.where = !field.isEmpty() ? field : !place.isEmpty() ? place : where;
    const auto value = [&](const std::string& text) {
        if (text.empty())
            return QString();
        if (kind == "readings-imported")
            return importedText(text);
        return field.isEmpty() ? readingText(text) : valueText(entry.where, text);
    };
    words.before = value(entry.before);
    words.after = value(entry.after);
    return words;
}

} // namespace spanwright
