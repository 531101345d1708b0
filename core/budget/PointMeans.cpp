// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/PointMeans.h"

#include "core/base/ClassSums.h"

#include <algorithm>
#include <cmath>
#include <set>

namespace spanwright {

namespace {

/// Sums of the readings of one set point approached in one direction.
struct Cell {
    std::size_t n = 0;
    DoubleDouble reference = 0.0, indication = 0.0;
    std::set<std::int32_t> runs;
    std::int32_t lastRun = 0; ///< readings of a run follow each other

    void add(const Sample& sample, std::size_t i) {
        ++n;
        reference += sample.reference[i];
        indication += sample.indication[i];
        if (!sample.run.empty() && (runs.empty() || sample.run[i] != lastRun)) {
            lastRun = sample.run[i];
            runs.insert(lastRun);
        }
    }
    void add(const Cell& other) {
        n += other.n;
        reference += other.reference;
        indication += other.indication;
        runs.insert(other.runs.begin(), other.runs.end());
    }
    [[nodiscard]] double meanReference() const { return toDouble(reference / static_cast<double>(n)); }
    [[nodiscard]] double meanIndication() const { return toDouble(indication / static_cast<double>(n)); }
};

struct Cells {
    Cell unknown, rising, falling;

    [[nodiscard]] Cell& from(Direction direction) { return direction == Direction::Rising ? rising : direction == Direction::Falling ? falling : unknown; }
};

/// Very many readings of no run, held as plain numbers: sums of the distances from the first of each set point, which are
/// short numbers, so that plain sums lose nothing that shows.
std::vector<Cells> cellsOfMany(const Sample& sample) {
    struct Distances {
        double fromReference = 0, fromIndication = 0, reference = 0, indication = 0, n = 0;
        void operator+=(const Distances& other) {
            if (!(n > 0)) {
                *this = other;
                return;
            }
            reference += other.reference + other.n * (other.fromReference - fromReference);
            indication += other.indication + other.n * (other.fromIndication - fromIndication);
            n += other.n;
        }
    };
    const std::size_t directions = 3;
    const auto sums = classSums<Distances>(sample.size(), directions * sample.groupValue.size(), [&](std::vector<Distances>& of, std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i) {
            const auto direction = sample.direction.empty() ? std::size_t{0} : static_cast<std::size_t>(sample.direction[i]);
            Distances& at = of[directions * static_cast<std::size_t>(sample.group[i]) + direction];
            if (!(at.n > 0)) {
                at.fromReference = sample.reference.high[i];
                at.fromIndication = sample.indication.high[i];
            }
            at.n += 1;
            at.reference += sample.reference.high[i] - at.fromReference;
            at.indication += sample.indication.high[i] - at.fromIndication;
        }
    });
    std::vector<Cells> cells(sample.groupValue.size());
    for (std::size_t g = 0; g < cells.size(); ++g) {
        for (const Direction direction : {Direction::Unknown, Direction::Rising, Direction::Falling}) {
            const Distances& at = sums[directions * g + static_cast<std::size_t>(direction)];
            Cell& cell = cells[g].from(direction);
            cell.n = static_cast<std::size_t>(at.n);
            cell.reference = DoubleDouble(at.fromReference) * at.n + at.reference;
            cell.indication = DoubleDouble(at.fromIndication) * at.n + at.indication;
        }
    }
    return cells;
}

std::vector<Cells> cellsOf(const Sample& sample) {
    if (sample.reference.low.empty() && sample.indication.low.empty() && sample.run.empty())
        return cellsOfMany(sample);
    std::vector<Cells> cells(sample.groupValue.size());
    for (std::size_t i = 0; i < sample.size(); ++i)
        cells[static_cast<std::size_t>(sample.group[i])].from(sample.direction.empty() ? Direction::Unknown : sample.direction[i]).add(sample, i);
    return cells;
}

PointMeans meansOf(const Cell& cell, double setPoint, Direction direction) {
    PointMeans point;
    point.setPoint = setPoint;
    point.direction = direction;
    point.n = cell.n;
    point.runs = std::max<std::size_t>(cell.runs.size(), 1);
    point.reference = cell.meanReference();
    point.indication = cell.meanIndication();
    if (direction == Direction::Rising)
        point.rising = point.indication;
    if (direction == Direction::Falling)
        point.falling = point.indication;
    return point;
}

/// A set point stated as one result.
PointMeans together(const Cells& cells, double setPoint, const Item& item, const Fit* fit) {
    Cell all = cells.unknown;
    all.add(cells.rising);
    all.add(cells.falling);
    PointMeans point = meansOf(all, setPoint, Direction::Unknown);
    if (cells.rising.n > 0)
        point.rising = cells.rising.meanIndication();
    if (cells.falling.n > 0)
        point.falling = cells.falling.meanIndication();
    if (!point.rising || !point.falling)
        return point;
    const double up = cells.rising.meanReference(), down = cells.falling.meanReference();
    if (cells.unknown.n == 0) {
        point.reference = (up + down) / 2;
        point.indication = (*point.rising + *point.falling) / 2;
    }
    const double slope = sensitivityAt(item, fit, point.reference, point.indication);
    point.gap = (*point.rising - *point.falling) - slope * (up - down);
    return point;
}

} // namespace

std::vector<PointMeans> pointMeans(const Record& record, const Sample& sample, const Fit* fit) {
    if (sample.groupValue.size() > MostStatedPoints)
        return {};
    std::vector<Cells> cells = cellsOf(sample);
    std::vector<PointMeans> points;
    for (std::size_t g = 0; g < cells.size(); ++g) {
        Cells& at = cells[g];
        const double setPoint = sample.groupValue[g];
        if (!record.choices.separateDirections) {
            if (at.unknown.n + at.rising.n + at.falling.n > 0)
                points.push_back(together(at, setPoint, record.item, fit));
            continue;
        }
        for (const Direction direction : {Direction::Unknown, Direction::Rising, Direction::Falling})
            if (const Cell& cell = at.from(direction); cell.n > 0)
                points.push_back(meansOf(cell, setPoint, direction));
    }
    return points;
}

std::optional<double> idealIndication(const Item& item, double reference) {
    const auto& low = item.rangeLow;
    const auto& high = item.rangeHigh;
    if (low && high && item.outputLow && item.outputHigh && compareValue(*low, *high) != 0) {
        const double from = item.outputLow->toDouble();
        const double slope = (item.outputHigh->toDouble() - from) / (high->toDouble() - low->toDouble());
        return from + slope * (reference - low->toDouble());
    }
    if (!item.outputLow && !item.outputHigh && !item.reference.unit.empty() && item.reference.unit == item.indication.unit)
        return reference;
    return std::nullopt;
}

double sensitivityAt(const Item& item, const Fit* fit, double reference, double indication) {
    if (fit != nullptr && fit->curve != nullptr && fit->function.family != FunctionFamily::Constant) {
        const bool forward = fit->direction == FitDirection::Indication;
        const double derivative = fit->curve->derivative(forward ? reference : indication);
        const double slope = forward ? derivative : 1 / derivative;
        if (std::isfinite(slope) && slope != 0)
            return slope;
    }
    const auto here = idealIndication(item, reference), beyond = idealIndication(item, reference + 1);
    if (here && beyond && *here != *beyond)
        return *beyond - *here;
    return 1;
}

} // namespace spanwright
