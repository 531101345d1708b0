// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/ChoiceOptions.h"
#include "app/Commands.h"
#include "app/IndicationFile.h"
#include "app/RecordFile.h"
#include "app/ResultFile.h"
#include "app/TextApplication.h"
#include "core/session/WholeFile.h"
#include "core/base/Rounding.h"
#include "core/budget/ReadBackBudget.h"
#include "core/evaluate/Calibration.h"
#include "core/evaluate/evaluate.h"
#include "core/exchange/AddedColumns.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <algorithm>
#include <array>
#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec ownOptions[] = {{"--with"}, {"--to"}, {"--replace", OptionKind::Flag}, {"--phase"}, {"--repeats"},
                                     {"--indication"}, {"--decimal"}, {"--separator"}, {"--encoding"}, {"--missing"}};

/// The columns behind those of the table, under names that it does not use yet.
std::array<AddedColumn, 4> addedColumns(const Quantity& reference, const CsvRules& rules) {
    std::array<AddedColumn, 4> added{AddedColumn{reference.name.empty() ? "value" : reference.name, reference.unit}, AddedColumn{"U", reference.unit},
                                     AddedColumn{"k", {}}, AddedColumn{"remark", {}}};
    const auto used = [&](const std::string& name) {
        return std::any_of(rules.columns.begin(), rules.columns.end(), [&](const CsvColumn& column) { return column.name == name; });
    };
    for (AddedColumn& column : added) {
        const std::string name = column.name;
        for (int number = 2; used(column.name); ++number)
            column.name = name + ' ' + std::to_string(number);
    }
    return added;
}

std::string remark(const ReadValue& value) {
    std::string text = valueStateText(value.state).toStdString();
    if (value.state != ValueState::SeveralAnswers)
        return text;
    text += ": " + significantDigits(*value.reference, 6);
    for (const double other : value.others)
        text += ", " + significantDigits(other, 6);
    return text;
}

/// Value, U, k and what there is to say, one row of the table after the other.
class Conversion {
  public:
    Conversion(const Record& record, const PhaseEvaluation& phase, const DecimalColumn& indications)
        : record_(record), phase_(phase), indications_(indications) {}

    std::vector<AddedCell> cells(std::size_t row) {
        if (!indications_.has(row)) {
            ++blank_;
            return {{}, {}, {}, {"no indication", false}};
        }
        ++values_;
        const ReadValue value = readValue(record_, *phase_.fit, phase_.split ? &*phase_.split : nullptr, indications_.toDouble(row), record_.choices.repeats);
        without_ += value.state == ValueState::Sound ? 0 : 1;
        const StatedValue stated = statedValue(value, phase_.budget.readBack);
        return {{stated.value, true}, {stated.expanded, true}, {stated.coverageFactor, true}, {remark(value), false}};
    }

    [[nodiscard]] std::string summary(const std::string& to) const {
        const auto counted = [](const char* words, std::size_t n) { return QCoreApplication::translate("ConvertCommand", words, nullptr, static_cast<int>(n)); };
        QString text = counted("%n value(s) written to %1, from the readings %2", values_).arg(QString::fromStdString(to), phaseText(phase_.phase));
        if (without_ > 0)
            text += counted("; %n of them without an uncertainty, see the column remark", without_);
        if (blank_ > 0)
            text += counted("; %n row(s) without an indication", blank_);
        return text.toStdString() + '\n';
    }

  private:
    const Record& record_;
    const PhaseEvaluation& phase_;
    const DecimalColumn& indications_;
    std::size_t values_ = 0, without_ = 0, blank_ = 0;
};

/// One column has no separator: then it is the comma, unless the table has commas of its own.
CsvRules rulesOfResult(const LoadedIndications& indications, const Arguments& arguments) {
    CsvRules rules = indications.rules;
    if (rules.columns.size() == 1 && !arguments.has("--separator") && indications.file.bytes().find(',') == std::string_view::npos)
        rules.separator = ',';
    return rules;
}

Result<Arguments> argumentsOf(const Words& words) {
    auto arguments = parseArguments(words, ownOptions);
    if (!arguments)
        return arguments;
    if (const auto only = onlyFile(*arguments, "convert"); !only)
        return only.error();
    for (const char* option : {"--with", "--to"})
        if (arguments->value(option).value_or("").empty())
            return Error(ErrorCode::UsageValueMissing, {{"option", option}});
    return arguments;
}

/// What there is to say about the function and the table before the values are used.
void tell(Console console, const std::string& with, const Record& record, const Evaluation& evaluation, const PhaseEvaluation& phase) {
    const PhaseEvaluation* asLeft = evaluation.phase(Phase::AsLeft);
    if (phase.phase == Phase::AsFound && asLeft != nullptr && asLeft->fit)
        console.err << "spanwright: " << with << ": there are readings as left too; --phase as-left takes their function\n";
    if (record.choices.repeats != 1 && !repeatableShare(*phase.fit, phase.split ? &*phase.split : nullptr))
        console.err << "spanwright: " << with
                    << ": no reading was repeated under the same conditions, so nothing tells which part of the scatter averages out: U is that of one reading\n";
}

/// The table with its values, to a file or to standard output.
int writeTable(Console console, const Arguments& arguments, const LoadedIndications& indications, const Record& record, const PhaseEvaluation& phase) {
    const std::string& from = arguments.files.front();
    const std::string with = *arguments.value("--with"), to = *arguments.value("--to");
    Conversion conversion(record, phase, indications.values);
    const CsvRules rules = rulesOfResult(indications, arguments);
    const DecimalMark mark = rules.columns[indications.column].decimal;
    const auto table = withAddedColumns(indications.file.bytes(), rules, mark, addedColumns(record.item.reference, rules),
                                        [&](std::size_t row) { return conversion.cells(row); });
    if (!table)
        return refuse(console, table.error().with("file", from));
    if (to == StandardOutput) {
        console.err << "spanwright: " << conversion.summary("standard output");
        return print(console, *table);
    }
    const OwnResult own = [&](std::string_view bytes) { return isOwnTable(bytes, *table, rules); };
    if (const auto free = resultFree(to, {from, with}, arguments, own); !free)
        return refuse(console, free.error());
    if (const auto written = writeWhole(to, *table); !written)
        return refuse(console, written.error());
    console.out << conversion.summary(to);
    return Done;
}

} // namespace

int convertCommand(const Words& words, Console console) {
    const TextApplication application;
    const auto arguments = argumentsOf(words);
    if (!arguments)
        return refuse(console, arguments.error());
    const std::string& from = arguments->files.front();
    const std::string with = *arguments->value("--with"), to = *arguments->value("--to");
    // Whether a table that stands there may be replaced is seen when there is one to compare; an input never is.
    if (to != StandardOutput)
        if (const auto free = resultFree(to, {from, with}, *arguments, [](std::string_view) { return true; }); !free)
            return refuse(console, free.error());

    auto session = loadSessionFile(with);
    if (!session)
        return refuse(console, session.error());
    if (!session->broken.empty())
        return refuseFile(console, with, session->broken);
    Record& record = session->record;
    const auto choices = withOptions(record.choices, *arguments, DecimalMark::Point);
    if (!choices)
        return refuse(console, choices.error());
    record.choices.phase = choices->phase;
    record.choices.repeats = arguments->has("--repeats") ? choices->repeats : 1;
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", with));
    const PhaseEvaluation* phase = calibrationOf(*evaluation, record.choices.phase);
    if (phase == nullptr)
        return refuse(console, Error(ErrorCode::NoReadings, {{"file", with}}));
    if (arguments->has("--phase") && phase->phase != record.choices.phase)
        return refuse(console, noReadingsOf(record.choices.phase).with("file", with));

    const auto indications = loadIndications(from, *arguments, record.item);
    if (!indications)
        return refuse(console, indications.error());
    for (const std::string& note : indications->notes)
        console.err << "spanwright: " << note << '\n';
    tell(console, with, record, *evaluation, *phase);
    return writeTable(console, *arguments, *indications, record, *phase);
}

} // namespace spanwright
