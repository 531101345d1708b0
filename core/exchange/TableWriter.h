// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <optional>
#include <string>
#include <string_view>

namespace spanwright {

/// Writes a table as text, UTF-8, lines ended by LF. A cell is quoted only where it must be. Doubles are the shortest text that
/// reads back as the same double; decimals stand as typed.
class TableWriter {
  public:
    explicit TableWriter(char separator = ',', DecimalMark mark = DecimalMark::Point) : separator_(separator), mark_(mark) {}

    TableWriter& text(std::string_view cell);
    TableWriter& number(double value); ///< NaN: an empty cell
    TableWriter& number(const std::optional<Decimal>& value);
    TableWriter& number(long long value);
    TableWriter& endRow();

    [[nodiscard]] const std::string& written() const { return written_; }

  private:
    void startCell();
    void decimalText(std::string_view digits);

    char separator_;
    DecimalMark mark_;
    bool rowStarted_ = false;
    std::string written_;
};

} // namespace spanwright
