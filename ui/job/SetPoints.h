// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Job.h"

#include <QString>

#include <vector>

namespace spanwright {

/// Numbers in a row as people write them: parted by semicolons, by blanks, line ends or commas. A decimal point or a comma is
/// understood in each; a comma parts numbers where it cannot be a decimal mark, because a blank follows it, because there is more than
/// one in a piece, or a point beside it: "0,25,50,75,100" are five numbers, "0; 2,5; 5" are three.
/// Errors: those of parseTyped(); ThousandsSeparator for "1,250,500", which could be one number or three.
Result<std::vector<Decimal>> parseNumberList(const QString& text);

/// The same as set points: in rising order, each once. With a % sign behind every number or behind the last, they are shares of the
/// range, unless % is the unit of the reference. Error besides: CellOutOfRange (facts: text), where shares are typed and no range is stated.
Result<std::vector<Decimal>> parseSetPoints(const QString& text, const Item& item);

/// "0; 2,5; 5" with the decimal mark of the place.
QString numberListText(const std::vector<Decimal>& numbers);

/// `count` set points at equal distances, the ends as typed. At least two.
std::vector<Decimal> evenSetPoints(const Decimal& from, const Decimal& to, int count);

} // namespace spanwright
