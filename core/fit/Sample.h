// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"
#include "core/base/Warning.h"
#include "core/record/Record.h"

#include <algorithm>
#include <cstdint>
#include <memory>
#include <span>
#include <string>
#include <vector>

namespace spanwright {

/// Numbers in double-double as two columns; `low` is empty when the numbers are plain doubles (very many readings,
/// where the exact grid is used instead).
struct PairColumn {
    std::vector<double> high, low;

    [[nodiscard]] std::size_t size() const { return high.size(); }
    [[nodiscard]] bool empty() const { return high.empty(); }
    [[nodiscard]] DoubleDouble operator[](std::size_t i) const {
        return low.empty() ? DoubleDouble(high[i]) : DoubleDouble(high[i], low[i]);
    }
    void push_back(const DoubleDouble& value) {
        high.push_back(value.x[0]);
        low.push_back(value.x[1]);
    }
};

/// From this many readings on they are held as plain doubles beside their exact grids, and fitted in streams.
inline constexpr std::size_t ManyReadings = 200'000;

/// The numbers of very many readings as integers on their decimal grids, value = integer · 10^(−scale).
struct ExactGrids {
    std::span<const std::int64_t> reference, indication;
    int referenceScale = 0, indicationScale = 0;
    Shared<ReadingColumns> columns;                          ///< keeps what the spans look at,
    std::vector<std::int64_t> keptReference, keptIndication; ///< or these do, where not every row counts
};

/// Covariances between the readings of a sample, as a matrix stated them: of the indications, or of all references followed by
/// all indications.
struct SampleMatrix {
    enum class Extent { Indications, Both };
    Extent extent = Extent::Indications;
    std::vector<DoubleDouble> values;    ///< n × n or 2n × 2n, row by row
    std::vector<std::size_t> row;        ///< of the record's matrix, from 0, of each of these rows
    std::vector<std::size_t> unknown;    ///< readings of the sample that have no row; then `values` is empty
};

/// An error that all readings of a standard share, with the standard uncertainty u, or u·|value| where it is relative.
struct SharedTerm {
    enum class Form { Absolute, Relative };
    Side side = Side::Reference;
    Form form = Form::Absolute;
    DoubleDouble u = 0.0;
};

/// Rows of readings in ReadingColumns, rising: all of them, which takes no memory, or those listed.
class RowList {
  public:
    static RowList all(std::size_t rows) {
        RowList list;
        list.all_ = rows;
        return list;
    }
    [[nodiscard]] std::size_t size() const { return listed_.empty() ? all_ : listed_.size(); }
    [[nodiscard]] std::size_t operator[](std::size_t i) const { return listed_.empty() ? i : listed_[i]; }
    /// Reading in that row; size() when there is none. O(log n).
    [[nodiscard]] std::size_t indexOf(std::size_t row) const {
        if (listed_.empty())
            return row < all_ ? row : all_;
        const auto found = std::lower_bound(listed_.begin(), listed_.end(), row);
        return found != listed_.end() && *found == row ? static_cast<std::size_t>(found - listed_.begin()) : listed_.size();
    }
    /// One after the other, for loops.
    struct Step {
        const RowList* list;
        std::size_t i;
        std::size_t operator*() const { return (*list)[i]; }
        Step& operator++() {
            ++i;
            return *this;
        }
        bool operator==(const Step&) const = default;
    };
    [[nodiscard]] Step begin() const { return {this, 0}; }
    [[nodiscard]] Step end() const { return {this, size()}; }
    void reserve(std::size_t rows) { listed_.reserve(rows); }
    void push_back(std::size_t row) { listed_.push_back(row); }

  private:
    std::size_t all_ = 0;
    std::vector<std::size_t> listed_;
};

/// The readings of one phase that count (complete and not excluded), in the order taken, with the standard's correction
/// applied to the reference where its table is to be applied.
struct Sample {
    RowList rows;
    PairColumn reference, indication;
    PairColumn uReference, uIndication;      ///< stated standard uncertainties; empty when none are stated
    PairColumn uCovariance;                  ///< stated covariance of both errors of a reading; empty when none are stated
    std::shared_ptr<const SampleMatrix> matrix; ///< null where no covariances between readings are stated
    std::vector<SharedTerm> shared;
    std::vector<std::int32_t> group;         ///< set point, an index into groupValue
    std::vector<double> groupValue;          ///< set points in rising order: the stated one, else the reference itself
    std::vector<std::int32_t> run;           ///< empty when no run is known
    std::vector<Direction> direction;        ///< empty when no direction is known
    std::shared_ptr<const ExactGrids> grids; ///< with ManyReadings on exact grids and no correction to apply
    std::string referenceUnit, indicationUnit;
    std::size_t excluded = 0;      ///< complete readings of the phase that were left out
    std::size_t incomplete = 0;    ///< readings of the phase without one of the two numbers
    std::vector<Warning> warnings; ///< ColumnNotExact, IncompleteReadings, …

    [[nodiscard]] std::size_t size() const { return rows.size(); }
};

/// The readings of a phase that count. A constant function needs no reference: then a reading without one counts too,
/// with a reference of 0. Corrections are interpolated linearly in the standard's table and constant beyond its ends.
Sample makeSample(const Record& record, Phase phase);
/// The same with the excluded readings among them, to show what excluding did.
Sample makeSampleWithExcluded(const Record& record, Phase phase);

/// The same readings reading by reading in double-double, where they were held on their grids.
Sample withExactColumns(const Sample& sample);

/// Residuals e = y − ŷ of the readings of a sample, unit of the ordinate, with the weights w of the fit (empty: all 1).
struct Residuals {
    PairColumn e;
    PairColumn weight;
    std::vector<double> fitted;
    std::vector<double> leverage; ///< h_ii
};

} // namespace spanwright
