// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Commands.h"
#include "app/RecordFile.h"
#include "app/TextApplication.h"
#include "core/evaluate/evaluate.h"
#include "core/exchange/TableWriter.h"
#include "core/interval/ReadBack.h"

#include <QSaveFile>

#include <cmath>
#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec ownOptions[] = {{"--with"}, {"--to"}, {"--indication"}, {"--decimal"}, {"--separator"}, {"--encoding"}, {"--missing"}};

/// The phase whose function is used: the readings as left describe the item as it is now.
const PhaseEvaluation* newestFit(const Evaluation& evaluation) {
    for (const Phase phase : {Phase::AsLeft, Phase::AsFound})
        if (const PhaseEvaluation* found = evaluation.phase(phase); found != nullptr && found->fit)
            return found;
    return nullptr;
}

std::string heading(const char* what, const Quantity& quantity) {
    const std::string name = quantity.name.empty() ? what : quantity.name;
    return quantity.unit.empty() ? name : name + " / " + quantity.unit;
}

struct Conversion {
    std::string table;
    std::size_t values = 0, without = 0; ///< without: outside the calibrated range, or without one answer
};

/// One line an indication: as typed, the value, its expanded uncertainty (of the budget for a value read back, the largest in
/// the range) and k. A value outside the calibrated range stands without an uncertainty, and says so.
Conversion convert(const DecimalColumn& indications, const PhaseEvaluation& phase, const Item& item) {
    Conversion conversion;
    TableWriter table;
    const std::string unit = item.reference.unit.empty() ? std::string() : " / " + item.reference.unit;
    table.text(heading("indication", item.indication)).text(heading("reference", item.reference)).text("U" + unit).text("k").text("note").endRow();
    for (std::size_t row = 0; row < indications.size(); ++row) {
        if (!indications.has(row))
            continue;
        const double y = indications.toDouble(row);
        const ReadBackAnswer answer = readBack(*phase.fit, y, 1);
        const bool sound = answer.reference && answer.insideRange && answer.others.empty() && phase.budget.readBack;
        table.number(indications.at(row)).number(answer.reference.value_or(std::nan("")));
        table.number(sound ? phase.budget.readBack->expandedReference : std::nan(""));
        table.number(sound ? phase.budget.readBack->coverageFactor : std::nan(""));
        table.text(sound               ? ""
                   : !answer.reference ? "no value in the calibrated range"
                   : !answer.insideRange ? "outside the calibrated range"
                   : !answer.others.empty() ? "several values"
                                            : "no uncertainty budget");
        table.endRow();
        conversion.values += 1;
        conversion.without += sound ? 0 : 1;
    }
    conversion.table = table.written();
    return conversion;
}

Result<void> writeWhole(const std::string& path, const std::string& bytes) {
    QSaveFile file(QString::fromStdString(path));
    const auto failed = [&](ErrorCode code) { return Error(code, {{"file", path}, {"reason", file.errorString().toStdString()}}); };
    if (!file.open(QIODevice::WriteOnly))
        return failed(ErrorCode::FileNotWritable);
    if (file.write(bytes.data(), static_cast<qint64>(bytes.size())) != static_cast<qint64>(bytes.size()) || !file.commit())
        return failed(ErrorCode::FileWriteFailed);
    return {};
}

} // namespace

int convertCommand(const Words& words, Console console) {
    const TextApplication application;
    const auto arguments = parseArguments(words, ownOptions);
    if (!arguments)
        return refuse(console, arguments.error());
    if (arguments->files.size() != 1)
        return refuse(console, Error(ErrorCode::UsageNoFile, {{"command", "convert"}}));
    for (const char* option : {"--with", "--to"})
        if (arguments->value(option).value_or("").empty())
            return refuse(console, Error(ErrorCode::UsageValueMissing, {{"option", option}}));

    const std::string with = *arguments->value("--with");
    const auto session = loadSessionFile(with);
    if (!session)
        return refuse(console, session.error());
    if (!session->broken.empty())
        return refuseFile(console, with, session->broken);
    Progress progress;
    const auto evaluation = evaluate(session->record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", with));
    const PhaseEvaluation* phase = newestFit(*evaluation);
    if (phase == nullptr)
        return refuse(console, Error(ErrorCode::NoReadings, {{"file", with}}));

    const auto readings = loadIndications(arguments->files.front(), *arguments);
    if (!readings)
        return refuse(console, readings.error());
    for (const std::string& note : readings->notes)
        console.err << "spanwright: " << note << '\n';
    const Conversion conversion = convert(readings->record.readings->indication(), *phase, session->record.item);
    const auto written = writeWhole(*arguments->value("--to"), conversion.table);
    if (!written)
        return refuse(console, written.error());
    console.out << conversion.values << " values written to " << *arguments->value("--to");
    if (conversion.without > 0)
        console.out << "; " << conversion.without << " of them without an uncertainty, see the column note";
    console.out << '\n';
    return Done;
}

} // namespace spanwright
