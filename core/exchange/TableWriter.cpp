// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/TableWriter.h"

#include <charconv>
#include <cmath>

namespace spanwright {

void TableWriter::startCell() {
    if (rowStarted_)
        written_ += separator_;
    rowStarted_ = true;
}

TableWriter& TableWriter::text(std::string_view cell) {
    startCell();
    const bool blankEnd = !cell.empty() && (cell.front() == ' ' || cell.back() == ' ');
    if (!blankEnd && cell.find_first_of("\"\n\r") == std::string_view::npos && cell.find(separator_) == std::string_view::npos) {
        written_ += cell;
        return *this;
    }
    written_ += '"';
    for (const char c : cell) {
        if (c == '"')
            written_ += '"';
        written_ += c;
    }
    written_ += '"';
    return *this;
}

void TableWriter::decimalText(std::string_view digits) {
    startCell();
    const std::size_t from = written_.size();
    written_ += digits;
    if (mark_ == DecimalMark::Comma)
        if (const std::size_t point = written_.find('.', from); point != std::string::npos)
            written_[point] = ',';
}

TableWriter& TableWriter::number(double value) {
    if (std::isnan(value))
        return text({});
    char digits[32];
    const auto [end, problem] = std::to_chars(digits, digits + sizeof digits, value);
    decimalText({digits, static_cast<std::size_t>(end - digits)});
    return *this;
}

TableWriter& TableWriter::number(const std::optional<Decimal>& value) {
    decimalText(value ? value->text() : std::string{});
    return *this;
}

TableWriter& TableWriter::number(long long value) {
    decimalText(std::to_string(value));
    return *this;
}

TableWriter& TableWriter::endRow() {
    written_ += '\n';
    rowStarted_ = false;
    return *this;
}

} // namespace spanwright
