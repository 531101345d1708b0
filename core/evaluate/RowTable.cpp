// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/RowTable.h"

#include <algorithm>
#include <limits>

namespace spanwright {

namespace {

constexpr double missing = std::numeric_limits<double>::quiet_NaN();

/// Rows of the phase in the order taken, complete or not.
std::vector<std::size_t> rowsOf(const ReadingColumns& readings, Phase phase) {
    std::vector<std::size_t> rows;
    for (std::size_t row = 0; row < readings.size(); ++row)
        if (readings.phases()[row] == phase)
            rows.push_back(row);
    return rows;
}

/// Whether every reading of the record counts, so that the columns of the sample are those of the table.
bool everyReadingCounts(const RowSources& sources) {
    return !sources.all && sources.used.size() == sources.record.readings->size() &&
           sources.record.readings->reference().missing() == 0;
}

RowFigures takenOver(RowSources sources, RowFigures table) {
    table.excluded.assign(table.size(), 0);
    table.reference = std::move(sources.used.reference.high);
    table.indication = std::move(sources.used.indication.high);
    if (sources.fit != nullptr) {
        table.fitted = std::move(sources.residuals->fitted);
        table.residual = std::move(sources.residuals->e.high);
        table.leverage = std::move(sources.residuals->leverage);
        table.weight = std::move(sources.residuals->weight.high);
    } else {
        for (std::vector<double>* column : {&table.fitted, &table.residual, &table.leverage})
            column->assign(table.size(), missing);
    }
    return table;
}

/// Rows as they were read: one entry a reading, complete or not.
RowFigures asRead(const Record& record, const std::vector<std::size_t>& rows, RowFigures table) {
    const ReadingColumns& readings = *record.readings;
    for (const std::size_t row : rows) {
        table.reference.push_back(readings.reference().toDouble(row));
        table.indication.push_back(readings.indication().toDouble(row));
    }
    table.excluded.assign(rows.size(), 0);
    for (std::vector<double>* column : {&table.fitted, &table.residual, &table.leverage})
        column->assign(rows.size(), missing);
    auto next = record.exclusions->all().begin();
    const auto end = record.exclusions->all().end();
    for (std::size_t i = 0; i < rows.size(); ++i) {
        while (next != end && next->id < table.ids[i])
            ++next;
        table.excluded[i] = next != end && next->id == table.ids[i] ? 1 : 0;
    }
    return table;
}

/// Puts what follows for the complete readings to their rows.
void place(const RowSources& sources, const std::vector<std::size_t>& rows, RowFigures& table) {
    const Sample& all = sources.all ? *sources.all : sources.used;
    const bool forward = sources.fit == nullptr || sources.fit->direction == FitDirection::Indication;
    const bool weighted = sources.fit != nullptr && !sources.residuals->weight.empty();
    if (weighted)
        table.weight.assign(rows.size(), missing);
    std::size_t inAll = 0, inUsed = 0;
    for (std::size_t at = 0; at < rows.size(); ++at) {
        if (inAll == all.size() || all.rows[inAll] != rows[at])
            continue; // incomplete: nothing follows for it
        const std::size_t i = inAll++;
        if (sources.record.readings->reference().has(rows[at]))
            table.reference[at] = all.reference.high[i];
        table.indication[at] = all.indication.high[i];
        const bool counts = inUsed < sources.used.size() && sources.used.rows[inUsed] == rows[at];
        const std::size_t u = counts ? inUsed++ : 0;
        if (sources.fit == nullptr)
            continue;
        if (counts) {
            table.fitted[at] = sources.residuals->fitted[u];
            table.residual[at] = sources.residuals->e.high[u];
            table.leverage[at] = sources.residuals->leverage[u];
            if (weighted)
                table.weight[at] = sources.residuals->weight.high[u];
        } else {
            const double x = forward ? all.reference.high[i] : all.indication.high[i];
            const DoubleDouble y = forward ? all.indication[i] : all.reference[i];
            table.fitted[at] = sources.fit->curve->value(x);
            table.residual[at] = toDouble(y - table.fitted[at]);
        }
    }
}

} // namespace

RowFigures namedRows(const ReadingColumns& readings, Phase phase) {
    RowFigures table;
    if (!readings.anyIn(phase == Phase::AsFound ? Phase::AsLeft : Phase::AsFound)) {
        table.ids = readings.ids();
        table.runs = readings.runs();
        table.directions = readings.directions();
        return table;
    }
    for (const std::size_t row : rowsOf(readings, phase)) {
        table.ids.push_back(readings.ids()[row]);
        table.runs.push_back(readings.runs()[row]);
        table.directions.push_back(readings.directions()[row]);
    }
    return table;
}

RowFigures rowTable(RowSources sources, RowFigures named) {
    // The figures of influence are those of independent readings.
    const Influence influence = sources.fit != nullptr && !sources.fit->correlated
                                    ? Influence(*sources.residuals, static_cast<int>(sources.fit->terms()))
                                    : Influence();
    RowFigures table;
    if (everyReadingCounts(sources)) {
        table = takenOver(std::move(sources), std::move(named));
    } else {
        const std::vector<std::size_t> rows = rowsOf(*sources.record.readings, sources.phase);
        table = asRead(sources.record, rows, std::move(named));
        place(sources, rows, table);
    }
    table.influence = influence;
    return table;
}

} // namespace spanwright
