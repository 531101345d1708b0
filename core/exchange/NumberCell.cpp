// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/NumberCell.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr int LargestScale = 18;
constexpr std::int64_t LargestOnGrid = 999'999'999'999'999'999;

} // namespace

void NumberColumnBuilder::add(const Decimal& number) {
    if (number.isWide() || number.decimals < 0 || number.decimals > LargestScale) {
        aside_.emplace(mantissas_.size(), number);
        addMissing();
        return;
    }
    mantissas_.push_back(number.mantissa);
    decimals_.push_back(static_cast<std::uint8_t>(number.decimals));
}

DecimalColumn NumberColumnBuilder::finish() && {
    int scale = 0;
    for (const std::uint8_t d : decimals_)
        scale = std::max(scale, d == DecimalColumn::Missing ? 0 : static_cast<int>(d));
    std::int64_t factors[LargestScale + 1] = {1};
    for (int i = 1; i <= LargestScale; ++i)
        factors[i] = factors[i - 1] * 10;

    const auto fits = [&](std::size_t i) {
        if (decimals_[i] == DecimalColumn::Missing)
            return true;
        const std::int64_t most = LargestOnGrid / factors[scale - decimals_[i]];
        return mantissas_[i] <= most && mantissas_[i] >= -most;
    };
    bool oneGrid = true;
    for (std::size_t i = 0; i < mantissas_.size() && oneGrid; ++i)
        oneGrid = fits(i);
    if (!oneGrid) {
        DecimalColumn column;
        column.reserve(mantissas_.size());
        for (std::size_t i = 0; i < mantissas_.size(); ++i) {
            if (const auto found = aside_.find(i); found != aside_.end())
                column.push_back(found->second);
            else if (decimals_[i] == DecimalColumn::Missing)
                column.push_back(std::nullopt);
            else
                column.push_back(Decimal{mantissas_[i], decimals_[i], {}});
        }
        return column;
    }
    for (std::size_t i = 0; i < mantissas_.size(); ++i)
        if (decimals_[i] != DecimalColumn::Missing)
            mantissas_[i] *= factors[scale - decimals_[i]];
    DecimalColumn column = DecimalColumn::fromGrid(std::move(mantissas_), std::move(decimals_), scale);
    for (const auto& [row, number] : aside_)
        column.set(row, number);
    return column;
}

} // namespace spanwright
