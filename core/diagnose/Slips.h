// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <optional>
#include <vector>

namespace spanwright {

/// How a number may have gone wrong between the display and the cell.
enum class SlipKind {
    RowsExchanged,  ///< with the reading named by `other`: each fits in the other's place
    DigitsSwapped,  ///< two neighbouring digits
    DecimalShifted, ///< mark one or two places off
    UnitPrefix,     ///< mark three places off: milli for one, one for kilo
    SignLost,
    DigitDoubled, ///< one key twice
    DigitMissing,
    UnitFactor,           ///< read in another unit of the same quantity
    Unexplained,          ///< far from what the others say, and no slip of the hand explains it
    OutsideItemRange,     ///< beyond the stated range or output by more than a tenth of it
    OutsideStandardRange, ///< beyond the range of a reference standard
    OffResolution,        ///< not a multiple of the stated resolution, or more decimals than it has
    RepeatsRowBefore,     ///< both numbers as typed in the row before, where the plan has no repeats
    AgainstDirection,     ///< the reference moved against the direction of the run
    BeforeSettled,        ///< typed sooner after the row before than the planned wait
};

/// A question about one number. Nothing is ever replaced: the person chooses, and the choice is recorded.
struct Slip {
    ReadingId id = 0;
    NumberColumn column = NumberColumn::Indication;
    SlipKind kind = SlipKind::Unexplained;
    double distance = 0; ///< of the number typed from what is expected, in standard deviations; 0 where not known
    std::optional<double> expected;    ///< what the other readings lead to expect
    std::optional<Decimal> suggestion; ///< the number that would fit
    ReadingId other = 0;               ///< the partner of an exchange
    bool operator==(const Slip&) const = default;
};

/// What may be wrong with one reading as it is typed, judged by the other readings of its phase: the best explanation
/// first. `typed` may or may not stand in the record already.
[[nodiscard]] std::vector<Slip> slipsOf(const Record& record, const Reading& typed);

/// The same for all readings of a phase that are not excluded, in the order taken: for readings that were imported or
/// pasted.
[[nodiscard]] std::vector<Slip> slipsIn(const Record& record, Phase phase);

/// What a slip of the hand could have made of another number: the numbers from which `typed` follows by one slip, with
/// its kind. The usual count of decimals in the column tells whether a digit may be missing.
struct SlipCandidate {
    SlipKind kind = SlipKind::DigitsSwapped;
    Decimal value;
};
[[nodiscard]] std::vector<SlipCandidate> slipCandidates(const Decimal& typed, int usualDecimals,
                                                        const std::string& unit);

} // namespace spanwright
