// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/DecimalColumn.h"

#include <cstdint>
#include <string>
#include <vector>

namespace spanwright {

/// Before or after adjustment (ISO/IEC 17025:2017, 7.8.4.1 d). A property of every reading; a fit never mixes phases.
enum class Phase : std::uint8_t { AsFound, AsLeft };
inline constexpr Phase bothPhases[] = {Phase::AsFound, Phase::AsLeft};

/// How the set point was approached.
enum class Direction : std::uint8_t { Unknown, Rising, Falling };

using ReadingId = std::int64_t;

/// One reading as a row, for typing, pasting and undo. A value that has not been typed yet is missing.
struct Reading {
    ReadingId id = 0;
    Phase phase = Phase::AsFound;
    int run = 0; ///< one pass of set points, from 1; 0 when not known
    Direction direction = Direction::Unknown;
    std::optional<Decimal> setPoint;
    std::optional<Decimal> reference;
    std::optional<Decimal> indication;
    std::optional<Decimal> uReference;  ///< standard uncertainty, unit of the reference
    std::optional<Decimal> uIndication; ///< standard uncertainty, unit of the indication
    std::optional<Decimal> uCovariance; ///< covariance of the errors of reference and indication, unit of their product
    std::int64_t enteredAt = 0;         ///< ms since 1970-01-01 UTC; 0 when not known
    std::string enteredBy;              ///< initials

    bool operator==(const Reading&) const = default;
};

/// The columns of numbers of a reading, for commands that change one cell.
enum class NumberColumn { SetPoint, Reference, Indication, UReference, UIndication, UCovariance };
inline constexpr NumberColumn numberColumns[] = {NumberColumn::SetPoint,   NumberColumn::Reference,
                                                 NumberColumn::Indication, NumberColumn::UReference,
                                                 NumberColumn::UIndication, NumberColumn::UCovariance};

/// All readings as columns of equal length, in the order in which they were taken. Ids are stable, rise strictly, and are never
/// used twice within a record.
class ReadingColumns {
  public:
    [[nodiscard]] std::size_t size() const { return ids_.size(); }
    [[nodiscard]] bool empty() const { return ids_.empty(); }
    void reserve(std::size_t n);

    /// Appends a row; its id must be greater than every id so far.
    void append(const Reading& reading);
    /// Puts a row back where its id belongs in the order (undo of a removal).
    void restore(const Reading& reading);
    void remove(ReadingId id);
    [[nodiscard]] Reading row(std::size_t index) const;
    /// Row that holds the id; size() when there is none. O(log n).
    [[nodiscard]] std::size_t indexOf(ReadingId id) const;
    void setNumber(std::size_t row, NumberColumn column, const std::optional<Decimal>& value);
    void setPlace(std::size_t row, Phase phase, int run, Direction direction);
    void setEntry(std::size_t row, std::int64_t enteredAt, const std::string& enteredBy);

    [[nodiscard]] const std::vector<ReadingId>& ids() const { return ids_; }
    [[nodiscard]] const std::vector<Phase>& phases() const { return phases_; }
    [[nodiscard]] const std::vector<std::int32_t>& runs() const { return runs_; }
    [[nodiscard]] const std::vector<Direction>& directions() const { return directions_; }
    [[nodiscard]] const DecimalColumn& number(NumberColumn column) const;
    [[nodiscard]] const DecimalColumn& setPoint() const { return setPoint_; }
    [[nodiscard]] const DecimalColumn& reference() const { return reference_; }
    [[nodiscard]] const DecimalColumn& indication() const { return indication_; }
    [[nodiscard]] const DecimalColumn& uReference() const { return uReference_; }
    [[nodiscard]] const DecimalColumn& uIndication() const { return uIndication_; }
    [[nodiscard]] const DecimalColumn& uCovariance() const { return uCovariance_; }
    [[nodiscard]] const std::vector<std::int64_t>& enteredAt() const { return enteredAt_; }
    [[nodiscard]] const std::string& enteredBy(std::size_t row) const { return people_[enteredBy_[row]]; }

    /// Whether any reading is of the phase.
    [[nodiscard]] bool anyIn(Phase phase) const;
    /// Whether reference and indication are both there.
    [[nodiscard]] bool complete(std::size_t row) const { return reference_.has(row) && indication_.has(row); }

    /// Whole columns as an importer read them; each must have `n` rows or be empty, when the default fills it.
    struct Block {
        std::size_t n = 0;
        Phase phase = Phase::AsFound;
        std::vector<std::int32_t> runs;
        std::vector<Direction> directions;
        DecimalColumn setPoint, reference, indication, uReference, uIndication, uCovariance;
        std::vector<std::int64_t> enteredAt; ///< empty: all 0
        std::string enteredBy;
    };
    /// Appends a block with ids firstId, firstId+1, …
    void appendBlock(Block block, ReadingId firstId);
    /// Every column at once, as a file was read: all have as many rows as `ids`, which rise strictly; `enteredBy` counts in
    /// `people`.
    struct Whole {
        std::vector<ReadingId> ids;
        std::vector<Phase> phases;
        std::vector<std::int32_t> runs;
        std::vector<Direction> directions;
        DecimalColumn setPoint, reference, indication, uReference, uIndication, uCovariance;
        std::vector<std::int64_t> enteredAt;
        std::vector<std::uint16_t> enteredBy;
        std::vector<std::string> people{std::string{}};
    };
    static ReadingColumns fromWhole(Whole whole);
    /// Removes the rows with firstId ≤ id < firstId + n (undo of appendBlock).
    void removeBlock(ReadingId firstId, std::size_t n);

    /// Equal rows in equal order, as typed.
    friend bool operator==(const ReadingColumns& a, const ReadingColumns& b);

  private:
    std::uint16_t person(const std::string& initials);

    std::vector<ReadingId> ids_;
    std::vector<Phase> phases_;
    std::vector<std::int32_t> runs_;
    std::vector<Direction> directions_;
    DecimalColumn setPoint_, reference_, indication_, uReference_, uIndication_, uCovariance_;
    std::vector<std::int64_t> enteredAt_;
    std::vector<std::uint16_t> enteredBy_;
    std::vector<std::string> people_{std::string{}};
};

} // namespace spanwright
