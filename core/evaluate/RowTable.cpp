// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/RowTable.h"

#include "core/diagnose/Influence.h"

#include <limits>

namespace spanwright {

namespace {

constexpr double missing = std::numeric_limits<double>::quiet_NaN();

/// Rows of the phase as they were read: one entry a reading, complete or not.
std::vector<std::size_t> fillAsRead(RowFigures& table, const Record& record, Phase phase) {
    const ReadingColumns& readings = *record.readings;
    std::vector<std::size_t> rows;
    for (std::size_t row = 0; row < readings.size(); ++row)
        if (readings.phases()[row] == phase)
            rows.push_back(row);
    for (const std::size_t row : rows) {
        table.ids.push_back(readings.ids()[row]);
        table.setPoint.push_back(readings.setPoint().toDouble(row));
        table.reference.push_back(readings.reference().toDouble(row));
        table.indication.push_back(readings.indication().toDouble(row));
        table.runs.push_back(readings.runs()[row]);
        table.directions.push_back(readings.directions()[row]);
    }
    const std::size_t n = rows.size();
    table.excluded.assign(n, 0);
    for (std::vector<double>* column :
         {&table.fitted, &table.residual, &table.standardised, &table.studentised, &table.leverage, &table.cook})
        column->assign(n, missing);
    auto next = record.exclusions->all().begin();
    const auto end = record.exclusions->all().end();
    for (std::size_t i = 0; i < n; ++i) {
        while (next != end && next->id < table.ids[i])
            ++next;
        table.excluded[i] = next != end && next->id == table.ids[i] ? 1 : 0;
    }
    return rows;
}

} // namespace

RowFigures rowTable(const RowSources& sources) {
    RowFigures table;
    const std::vector<std::size_t> rows = fillAsRead(table, sources.record, sources.phase);
    const bool forward = sources.fit == nullptr || sources.fit->direction == FitDirection::Indication;
    const Influence figures =
        sources.fit != nullptr ? influence(*sources.residuals, static_cast<int>(sources.fit->terms())) : Influence();
    std::size_t inAll = 0, inUsed = 0;
    for (std::size_t at = 0; at < rows.size(); ++at) {
        if (inAll == sources.all.size() || sources.all.rows[inAll] != rows[at])
            continue; // incomplete: nothing follows for it
        const std::size_t i = inAll++;
        if (sources.record.readings->reference().has(rows[at]))
            table.reference[at] = sources.all.reference.high[i];
        table.indication[at] = sources.all.indication.high[i];
        const bool counts = inUsed < sources.used.size() && sources.used.rows[inUsed] == rows[at];
        const std::size_t u = counts ? inUsed++ : 0;
        if (sources.fit == nullptr)
            continue;
        if (counts) {
            table.fitted[at] = sources.residuals->fitted[u];
            table.residual[at] = sources.residuals->e.high[u];
            table.leverage[at] = sources.residuals->leverage[u];
            table.standardised[at] = figures.standardised[u];
            table.studentised[at] = figures.studentised[u];
            table.cook[at] = figures.cook[u];
        } else {
            const double x = forward ? sources.all.reference.high[i] : sources.all.indication.high[i];
            const DoubleDouble y = forward ? sources.all.indication[i] : sources.all.reference[i];
            table.fitted[at] = sources.fit->curve->value(x);
            table.residual[at] = toDouble(y - table.fitted[at]);
        }
    }
    return table;
}

} // namespace spanwright
