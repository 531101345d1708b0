// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Sample.h"

#include "core/base/AllSame.h"
#include "core/base/Parallel.h"
#include "core/fit/SetPoints.h"
#include "core/fit/StatedCovariance.h"
#include "core/fit/StreamKernel.h"

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

void warnInexact(Sample& sample, const DecimalColumn& column, const char* name) {
    if (!column.exact())
        sample.warnings.push_back({WarningCode::ColumnNotExact, {{"column", name}}});
}

/// A stated uncertainty of every reading, or an empty column.
PairColumn statedFor(const DecimalColumn& column, const RowList& rows) {
    PairColumn stated;
    if (column.missing() == column.size())
        return stated;
    for (const std::size_t row : rows)
        stated.push_back(column.has(row) ? column.toDoubleDouble(row) : DoubleDouble::_nan);
    return stated;
}

struct Chosen {
    RowList rows;
    std::size_t excluded = 0, incomplete = 0;
};

/// Whether any differs from `value`.
template <class T>
bool anyOther(const std::vector<T>& values, T value) {
    return !values.empty() && (values.front() != value || !allSame(values));
}

Chosen chooseRows(const Record& record, Phase phase, Take take) {
    const ReadingColumns& readings = *record.readings;
    const bool needsReference = record.choices.function.family != FunctionFamily::Constant;
    const bool allComplete =
        readings.indication().missing() == 0 && (!needsReference || readings.reference().missing() == 0);
    const auto& excluded = record.exclusions->all();
    Chosen chosen;
    if (allComplete && (excluded.empty() || take == Take::ExcludedToo) && !anyOther(readings.phases(), phase)) {
        chosen.rows = RowList::all(readings.size());
        return chosen;
    }
    chosen.rows.reserve(readings.size());
    auto next = excluded.begin();
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

/// A column of `rows` on its grid: the column itself when every row counts, else kept in `kept`.
std::span<const std::int64_t> gridOf(const DecimalColumn& column, const RowList& rows,
                                     std::vector<std::int64_t>& kept) {
    if (rows.size() == column.size())
        return column.grid();
    kept.reserve(rows.size());
    for (const std::size_t row : rows)
        kept.push_back(column.grid()[row]);
    return kept;
}

PairColumn plainValues(std::span<const std::int64_t> grid, int scale) {
    // Both exact below 2^53 and 10^22, so that the quotient is the nearest double; beyond, within one unit of the last
    // place.
    const double divisor = toDouble(powerOfTen(scale));
    PairColumn column;
    column.high.resize(grid.size());
    const std::size_t whole = grid.size() - grid.size() % 4;
    const bool narrow = (streamKernel().quotients(asLong(grid.data()), whole, divisor, column.high.data()) >> 52) == 0;
    for (std::size_t i = narrow ? whole : 0; i < grid.size(); ++i)
        column.high[i] = static_cast<double>(grid[i]) / divisor;
    return column;
}

/// Very many readings on exact grids: plain doubles beside them, set points by their integers.
void fillMany(Sample& sample, const Record& record) {
    const ReadingColumns& readings = *record.readings;
    auto grids = std::make_shared<ExactGrids>();
    grids->columns = record.readings;
    grids->referenceScale = readings.reference().scale();
    grids->indicationScale = readings.indication().scale();
    grids->reference = gridOf(readings.reference(), sample.rows, grids->keptReference);
    grids->indication = gridOf(readings.indication(), sample.rows, grids->keptIndication);
    auto plain = beside(sample.size(), [&] {
        sample.reference = plainValues(grids->reference, grids->referenceScale);
        sample.indication = plainValues(grids->indication, grids->indicationScale);
    });
    std::vector<std::int64_t> kept;
    const bool stated = readings.setPoint().missing() < readings.setPoint().size();
    const bool onGrid = !stated || (readings.setPoint().missing() == 0 && readings.setPoint().exact());
    if (onGrid) {
        const auto [grid, scale] = stated ? std::pair(gridOf(readings.setPoint(), sample.rows, kept), readings.setPoint().scale())
                                          : std::pair(grids->reference, grids->referenceScale);
        groupByGrid(sample, grid, scale);
    }
    plain.get();
    if (!onGrid) {
        PairColumn setPoint;
        for (std::size_t i = 0; i < sample.size(); ++i)
            setPoint.push_back(readings.setPoint().has(sample.rows[i])
                                   ? readings.setPoint().toDoubleDouble(sample.rows[i])
                                   : sample.reference[i]);
        groupByValue(sample, setPoint);
    }
    sample.grids = std::move(grids);
}

void fillFew(Sample& sample, const Record& record, const CorrectionTable& referenceTable,
             const CorrectionTable& indicationTable) {
    const ReadingColumns& readings = *record.readings;
    PairColumn setPoint;
    for (const std::size_t row : sample.rows) {
        const DoubleDouble reference = readings.reference().has(row)
                                           ? referenceTable.corrected(readings.reference().toDoubleDouble(row))
                                           : DoubleDouble(0.0);
        sample.reference.push_back(reference);
        sample.indication.push_back(indicationTable.corrected(readings.indication().toDoubleDouble(row)));
        setPoint.push_back(readings.setPoint().has(row) ? readings.setPoint().toDoubleDouble(row) : reference);
    }
    groupByValue(sample, setPoint);
}

void fillPlaces(Sample& sample, const ReadingColumns& readings) {
    // Of many readings mostly none has a run or a direction, which is seen soonest in the whole column.
    const auto take = [&](const auto& column, auto unknown, auto& taken) {
        if (!anyOther(column, unknown))
            return;
        bool known = false;
        for (const std::size_t row : sample.rows) {
            taken.push_back(column[row]);
            known = known || column[row] != unknown;
        }
        if (!known)
            taken.clear();
    };
    take(readings.runs(), std::int32_t{0}, sample.run);
    take(readings.directions(), Direction::Unknown, sample.direction);
}

Sample sampleOf(const Record& record, Phase phase, Take take) {
    const ReadingColumns& readings = *record.readings;
    Chosen chosen = chooseRows(record, phase, take);
    Sample sample;
    sample.rows = std::move(chosen.rows);
    sample.excluded = chosen.excluded;
    sample.incomplete = chosen.incomplete;
    sample.referenceUnit = record.item.reference.unit;
    sample.indicationUnit = record.item.indication.unit;
    const CorrectionTable referenceTable = tableOf(record.standards, StandardRole::Reference);
    const CorrectionTable indicationTable = tableOf(record.standards, StandardRole::Indication);
    const bool onGrids = readings.reference().exact() && readings.indication().exact() &&
                         readings.reference().missing() == 0 && referenceTable.at.empty() && indicationTable.at.empty();
    if (sample.size() >= ManyReadings && onGrids)
        fillMany(sample, record);
    else
        fillFew(sample, record, referenceTable, indicationTable);
    sample.uReference = statedFor(readings.uReference(), sample.rows);
    sample.uIndication = statedFor(readings.uIndication(), sample.rows);
    sample.uCovariance = statedFor(readings.uCovariance(), sample.rows);
    sample.shared = sharedTerms(record.standards);
    if (!record.uncertaintyMatrix.empty()) {
        std::vector<ReadingId> ids;
        for (const std::size_t row : sample.rows)
            ids.push_back(readings.ids()[row]);
        sample.matrix = sampleMatrix(record.uncertaintyMatrix, ids);
    }
    fillPlaces(sample, readings);

    if (chosen.incomplete > 0)
        sample.warnings.push_back({WarningCode::IncompleteReadings, {{"count", std::to_string(chosen.incomplete)}}});
    warnInexact(sample, readings.reference(), "reference");
    warnInexact(sample, readings.indication(), "indication");
    return sample;
}

} // namespace

Sample makeSample(const Record& record, Phase phase) {
    return sampleOf(record, phase, Take::Counting);
}

Sample makeSampleWithExcluded(const Record& record, Phase phase) {
    return sampleOf(record, phase, Take::ExcludedToo);
}

Sample withExactColumns(const Sample& sample) {
    Sample exact = sample;
    if (!exact.grids)
        return exact;
    const auto columnOf = [](std::span<const std::int64_t> grid, int scale) {
        PairColumn column;
        const DoubleDouble divisor = powerOfTen(scale);
        for (const std::int64_t integer : grid)
            column.push_back(toDoubleDouble(integer) / divisor);
        return column;
    };
    exact.reference = columnOf(sample.grids->reference, sample.grids->referenceScale);
    exact.indication = columnOf(sample.grids->indication, sample.grids->indicationScale);
    exact.grids = nullptr;
    return exact;
}

} // namespace spanwright
