// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/FitHelp.h"

#include <QTest>

#include <charconv>

namespace spanwright::test {

std::vector<std::string> typed(const std::vector<double>& values) {
    std::vector<std::string> texts;
    for (const double value : values) {
        char text[64];
        const auto end = std::to_chars(text, text + sizeof text, value);
        texts.emplace_back(text, end.ptr);
    }
    return texts;
}

Record recordOf(const TypedReadings& readings) {
    PublishedSet set;
    set.id = "typed in the test";
    set.columns = {"x", "y", "ux", "uy"};
    const auto at = [](const std::vector<std::string>& column, std::size_t i) {
        return column.empty() ? std::string{} : column[i];
    };
    for (std::size_t i = 0; i < readings.indication.size(); ++i)
        set.rows.push_back({at(readings.reference, i), readings.indication[i], at(readings.uReference, i),
                            at(readings.uIndication, i)});
    Record record = recordOf(set, {"x", "y", "", "ux", "uy"});
    for (std::size_t i = 0; i < readings.uCovariance.size(); ++i)
        record.readings.edit().setNumber(i, NumberColumn::UCovariance, *Decimal::parse(readings.uCovariance[i]));
    return record;
}

FitOutcome fitted(Record& record, const char* function) {
    record.choices.function = *parseFunctionName(function);
    auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
    if (!outcome)
        qFatal("%s is not fitted: code %d", function, static_cast<int>(outcome.error().code));
    return std::move(outcome).value();
}

Error refused(Record& record, const char* function) {
    record.choices.function = *parseFunctionName(function);
    auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
    if (outcome)
        qFatal("%s is fitted", function);
    return outcome.error();
}

} // namespace spanwright::test
