// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/ColumnEvidence.h"

#include "core/exchange/CsvSample.h"
#include "core/exchange/Words.h"

#include <algorithm>

namespace spanwright {

void ColumnEvidence::add(const std::string& cell) {
    const CellLook look = lookOf(cell);
    if (look == CellLook::Blank)
        return;
    if (isUsualMissingWord(cell)) {
        if (std::find(words_.begin(), words_.end(), cell) == words_.end())
            words_.push_back(cell);
        return;
    }
    ++filled_;
    if (look == CellLook::Time) {
        ++times_;
        dayFirst_ += parseTime(cell, DateOrder::DayMonthYear) ? 1 : 0;
        monthFirst_ += parseTime(cell, DateOrder::MonthDayYear) ? 1 : 0;
        yearFirst_ += parseTime(cell, DateOrder::YearMonthDay) ? 1 : 0;
        slashes_ += cell.find('/') != std::string::npos ? 1 : 0;
        halves_ += lowerCase(cell).ends_with("m") ? 1 : 0;
        if (example_.empty())
            example_ = cell;
        return;
    }
    if (look == CellLook::Text) {
        ++texts_;
        return;
    }
    if (look != CellLook::Number)
        return;
    ++numbers_;
    const bool hasPoint = cell.find('.') != std::string::npos;
    const bool hasComma = cell.find(',') != std::string::npos;
    wholes_ += !hasPoint && !hasComma ? 1 : 0;
    const auto count = [&](Mark& mark, DecimalMark sign) {
        ++mark.cells;
        mark.read += Decimal::parse(cell, sign) ? 1 : 0;
        if (couldBeGroups(cell, static_cast<char>(sign))) {
            ++mark.grouped;
            if (example_.empty())
                example_ = cell;
        }
    };
    if (hasPoint)
        count(point_, DecimalMark::Point);
    if (hasComma)
        count(comma_, DecimalMark::Comma);
}

bool ColumnEvidence::couldBeGroups(std::string_view cell, char mark) {
    if (cell.starts_with('-') || cell.starts_with('+'))
        cell.remove_prefix(1);
    std::size_t group = cell.find(mark);
    if (group == 0 || group > 3 || cell.front() == '0')
        return false;
    for (cell.remove_prefix(group); !cell.empty(); cell.remove_prefix(4)) {
        if (cell.front() != mark || cell.size() < 4)
            return false;
        for (std::size_t i = 1; i < 4; ++i)
            if (cell[i] < '0' || cell[i] > '9')
                return false;
    }
    return true;
}

ColumnKind ColumnEvidence::kind() const {
    if (filled_ == 0)
        return ColumnKind::Empty;
    if (times_ > numbers_ && times_ >= texts_)
        return ColumnKind::Time;
    return numbers_ >= texts_ && numbers_ > 0 ? ColumnKind::Number : ColumnKind::Text;
}

std::optional<DecimalMark> ColumnEvidence::clearMark() const {
    const bool point = point_.read > point_.grouped;
    const bool comma = comma_.read > comma_.grouped;
    if (point && comma)
        return point_.read >= comma_.read ? DecimalMark::Point : DecimalMark::Comma;
    if (point)
        return DecimalMark::Point;
    if (comma)
        return DecimalMark::Comma;
    return std::nullopt;
}

DecimalMark ColumnEvidence::mark(std::optional<DecimalMark> ofFile) const {
    if (const auto clear = clearMark())
        return *clear;
    if (ofFile)
        return *ofFile;
    return comma_.cells > 0 && point_.cells == 0 ? DecimalMark::Comma : DecimalMark::Point;
}

bool ColumnEvidence::markUnclear(std::optional<DecimalMark> ofFile, char separator) const {
    if (clearMark())
        return false;
    if (ofFile)
        return (*ofFile == DecimalMark::Point ? comma_ : point_).cells > 0;
    if (comma_.cells > 0)
        return true;
    // Three places after a point are common; they are in doubt only beside whole numbers and where commas separate nothing.
    return point_.grouped > 0 && wholes_ > 0 && separator != ',';
}

DateOrder ColumnEvidence::dateOrder() const {
    if (yearFirst_ == times_)
        return DateOrder::YearMonthDay;
    if (monthFirst_ > dayFirst_ || (monthFirst_ == dayFirst_ && halves_ > 0))
        return DateOrder::MonthDayYear;
    return DateOrder::DayMonthYear;
}

bool ColumnEvidence::dateOrderUnclear() const {
    return yearFirst_ != times_ && dayFirst_ == monthFirst_ && slashes_ > 0;
}

std::vector<std::string> ColumnEvidence::missingWords() const {
    const ColumnKind which = kind();
    return which == ColumnKind::Number || which == ColumnKind::Time ? words_ : std::vector<std::string>{};
}

} // namespace spanwright
