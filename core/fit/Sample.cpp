// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Sample.h"

#include <algorithm>
#include <numeric>

namespace spanwright {

namespace {

enum class Take { Counting, ExcludedToo };

/// The correction table of a standard in double-double, in rising order.
struct CorrectionTable {
    std::vector<DoubleDouble> at, correction;

    [[nodiscard]] DoubleDouble corrected(const DoubleDouble& x) const {
        if (at.empty())
            return x;
        const auto above = std::upper_bound(at.begin(), at.end(), x);
        const auto i = static_cast<std::size_t>(above - at.begin());
        if (i == 0 || i == at.size())
            return x + (i == 0 ? correction.front() : correction.back());
        const DoubleDouble share = (x - at[i - 1]) / (at[i] - at[i - 1]);
        return x + correction[i - 1] + share * (correction[i] - correction[i - 1]);
    }
};

CorrectionTable tableOf(const std::vector<Standard>& standards, StandardRole role) {
    CorrectionTable table;
    for (const Standard& standard : standards) {
        if (standard.role != role || standard.correctionUse != CorrectionUse::Apply)
            continue;
        std::vector<std::pair<DoubleDouble, DoubleDouble>> points;
        for (const CorrectionPoint& point : standard.corrections)
            if (point.at && point.correction)
                points.emplace_back(point.at->toDoubleDouble(), point.correction->toDoubleDouble());
        std::stable_sort(points.begin(), points.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
        for (const auto& [at, correction] : points) {
            if (!table.at.empty() && table.at.back() == at)
                continue;
            table.at.push_back(at);
            table.correction.push_back(correction);
        }
        if (!table.at.empty())
            break;
    }
    return table;
}

/// Set points: equal values share a group, groups in rising order.
void groupByValue(Sample& sample, const PairColumn& value) {
    std::vector<std::uint32_t> order(value.size());
    std::iota(order.begin(), order.end(), 0u);
    std::sort(order.begin(), order.end(), [&](std::uint32_t a, std::uint32_t b) { return value[a] < value[b]; });
    sample.group.resize(value.size());
    for (std::size_t i = 0; i < order.size(); ++i) {
        if (i == 0 || value[order[i]] != value[order[i - 1]])
            sample.groupValue.push_back(value.high[order[i]]);
        sample.group[order[i]] = static_cast<std::int32_t>(sample.groupValue.size()) - 1;
    }
}

void warnInexact(Sample& sample, const DecimalColumn& column, const char* name) {
    if (!column.exact())
        sample.warnings.push_back({WarningCode::ColumnNotExact, {{"column", name}}});
}

/// A stated uncertainty of every reading, or an empty column.
PairColumn statedFor(const DecimalColumn& column, const std::vector<std::size_t>& rows) {
    PairColumn stated;
    if (column.missing() == column.size())
        return stated;
    for (const std::size_t row : rows)
        stated.push_back(column.has(row) ? column.toDoubleDouble(row) : DoubleDouble::_nan);
    return stated;
}

struct Chosen {
    std::vector<std::size_t> rows;
    std::size_t excluded = 0, incomplete = 0;
};

Chosen chooseRows(const Record& record, Phase phase, Take take) {
    const ReadingColumns& readings = *record.readings;
    const bool needsReference = record.choices.function.family != FunctionFamily::Constant;
    const auto& excluded = record.exclusions->all();
    auto next = excluded.begin();
    Chosen chosen;
    for (std::size_t row = 0; row < readings.size(); ++row) {
        while (next != excluded.end() && next->id < readings.ids()[row])
            ++next;
        if (readings.phases()[row] != phase)
            continue;
        if (!readings.indication().has(row) || (needsReference && !readings.reference().has(row))) {
            chosen.incomplete += 1;
            continue;
        }
        if (next != excluded.end() && next->id == readings.ids()[row] && take == Take::Counting)
            chosen.excluded += 1;
        else
            chosen.rows.push_back(row);
    }
    return chosen;
}

Sample sampleOf(const Record& record, Phase phase, Take take) {
    const ReadingColumns& readings = *record.readings;
    Chosen chosen = chooseRows(record, phase, take);
    Sample sample;
    sample.rows = std::move(chosen.rows);
    sample.excluded = chosen.excluded;
    sample.referenceUnit = record.item.reference.unit;
    sample.indicationUnit = record.item.indication.unit;
    const CorrectionTable referenceTable = tableOf(record.standards, StandardRole::Reference);
    const CorrectionTable indicationTable = tableOf(record.standards, StandardRole::Indication);

    PairColumn setPoint;
    bool runKnown = false, directionKnown = false;
    for (const std::size_t row : sample.rows) {
        const DoubleDouble reference = readings.reference().has(row)
                                           ? referenceTable.corrected(readings.reference().toDoubleDouble(row))
                                           : DoubleDouble(0.0);
        sample.reference.push_back(reference);
        sample.indication.push_back(indicationTable.corrected(readings.indication().toDoubleDouble(row)));
        setPoint.push_back(readings.setPoint().has(row) ? readings.setPoint().toDoubleDouble(row) : reference);
        runKnown = runKnown || readings.runs()[row] != 0;
        directionKnown = directionKnown || readings.directions()[row] != Direction::Unknown;
    }
    sample.uReference = statedFor(readings.uReference(), sample.rows);
    sample.uIndication = statedFor(readings.uIndication(), sample.rows);
    groupByValue(sample, setPoint);
    if (runKnown)
        for (const std::size_t row : sample.rows)
            sample.run.push_back(readings.runs()[row]);
    if (directionKnown)
        for (const std::size_t row : sample.rows)
            sample.direction.push_back(readings.directions()[row]);

    if (chosen.incomplete > 0)
        sample.warnings.push_back({WarningCode::IncompleteReadings, {{"count", std::to_string(chosen.incomplete)}}});
    warnInexact(sample, readings.reference(), "reference");
    warnInexact(sample, readings.indication(), "indication");
    return sample;
}

} // namespace

Sample makeSample(const Record& record, Phase phase) { return sampleOf(record, phase, Take::Counting); }

Sample makeSampleWithExcluded(const Record& record, Phase phase) { return sampleOf(record, phase, Take::ExcludedToo); }

} // namespace spanwright
