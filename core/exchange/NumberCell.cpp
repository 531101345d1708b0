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
    add(PlainNumber{nullptr, number.mantissa, static_cast<std::uint8_t>(number.decimals)});
}

DecimalColumn NumberColumnBuilder::finish() && {
    const int scale = most_;
    if (least_ == most_) // already on one grid, as loggers write
        return withAside(DecimalColumn::fromGrid(std::move(mantissas_), std::move(decimals_), scale));
    std::int64_t factors[LargestScale + 1] = {1};
    for (int i = 1; i <= LargestScale; ++i)
        factors[i] = factors[i - 1] * 10;
    std::int64_t largest[LargestScale + 1];
    for (int d = 0; d <= scale; ++d)
        largest[d] = LargestOnGrid / factors[scale - d];

    const auto fits = [&](std::size_t i) {
        return decimals_[i] == DecimalColumn::Missing ||
               (mantissas_[i] <= largest[decimals_[i]] && mantissas_[i] >= -largest[decimals_[i]]);
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
    return withAside(DecimalColumn::fromGrid(std::move(mantissas_), std::move(decimals_), scale));
}

DecimalColumn NumberColumnBuilder::withAside(DecimalColumn column) const {
    for (const auto& [row, number] : aside_)
        column.set(row, number);
    return column;
}

} // namespace spanwright
