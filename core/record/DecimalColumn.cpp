// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/DecimalColumn.h"

#include <algorithm>
#include <cassert>
#include <limits>

namespace spanwright {

namespace {

constexpr int LargestScale = 18;
constexpr std::int64_t LargestOnGrid = 999'999'999'999'999'999;

/// integer · 10^exponent, empty when it has more than 18 digits.
std::optional<std::int64_t> shifted(std::int64_t integer, int exponent) {
    if (integer == 0)
        return 0;
    for (int i = 0; i < exponent; ++i) {
        if (integer > LargestOnGrid / 10 || integer < -LargestOnGrid / 10)
            return std::nullopt;
        integer *= 10;
    }
    return integer;
}

} // namespace

void DecimalColumn::reserve(std::size_t n) {
    grid_.reserve(n);
    decimals_.reserve(n);
}

void DecimalColumn::push_back(const std::optional<Decimal>& value) {
    grid_.push_back(0);
    decimals_.push_back(Missing);
    ++missing_;
    place(grid_.size() - 1, value);
}

void DecimalColumn::set(std::size_t row, const std::optional<Decimal>& value) {
    if (decimals_[row] == KeptAside)
        aside_.erase(row);
    if (decimals_[row] != Missing)
        ++missing_;
    grid_[row] = 0;
    decimals_[row] = Missing;
    place(row, value);
}

void DecimalColumn::insert(std::size_t row, const std::optional<Decimal>& value) {
    grid_.insert(grid_.begin() + static_cast<std::ptrdiff_t>(row), 0);
    decimals_.insert(decimals_.begin() + static_cast<std::ptrdiff_t>(row), Missing);
    ++missing_;
    std::map<std::size_t, Decimal> moved;
    for (auto& [at, number] : aside_)
        moved.emplace(at >= row ? at + 1 : at, std::move(number));
    aside_ = std::move(moved);
    place(row, value);
}

void DecimalColumn::erase(std::size_t row) {
    set(row, std::nullopt);
    grid_.erase(grid_.begin() + static_cast<std::ptrdiff_t>(row));
    decimals_.erase(decimals_.begin() + static_cast<std::ptrdiff_t>(row));
    --missing_;
    std::map<std::size_t, Decimal> moved;
    for (auto& [at, number] : aside_)
        moved.emplace(at > row ? at - 1 : at, std::move(number));
    aside_ = std::move(moved);
}

void DecimalColumn::resize(std::size_t n) {
    if (n < size()) {
        const auto from = decimals_.begin() + static_cast<std::ptrdiff_t>(n);
        missing_ -= static_cast<std::size_t>(std::count(from, decimals_.end(), Missing));
        aside_.erase(aside_.lower_bound(n), aside_.end());
    } else {
        missing_ += n - size();
    }
    grid_.resize(n, 0);
    decimals_.resize(n, Missing);
}

std::optional<Decimal> DecimalColumn::at(std::size_t row) const {
    if (decimals_[row] == Missing)
        return std::nullopt;
    if (decimals_[row] == KeptAside)
        return aside_.at(row);
    std::int64_t mantissa = grid_[row];
    for (int i = decimals_[row]; i < scale_; ++i)
        mantissa /= 10;
    return Decimal{mantissa, decimals_[row], {}};
}

double DecimalColumn::toDouble(std::size_t row) const {
    if (decimals_[row] == Missing)
        return std::numeric_limits<double>::quiet_NaN();
    constexpr std::int64_t exactInDouble = std::int64_t{1} << 53;
    const std::int64_t integer = grid_[row];
    if (decimals_[row] != KeptAside && integer < exactInDouble && integer > -exactInDouble) {
        static constexpr double powers[] = {1e0,  1e1,  1e2,  1e3,  1e4,  1e5,  1e6,  1e7,  1e8, 1e9,
                                            1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18};
        return static_cast<double>(integer) / powers[scale_]; // both exact, so the quotient is the nearest double
    }
    return at(row)->toDouble();
}

DoubleDouble DecimalColumn::toDoubleDouble(std::size_t row) const {
    assert(has(row));
    if (decimals_[row] == KeptAside)
        return aside_.at(row).toDoubleDouble();
    return spanwright::toDoubleDouble(grid_[row]) / powerOfTen(scale_);
}

bool DecimalColumn::exact() const {
    return std::all_of(aside_.begin(), aside_.end(), [](const auto& kept) { return kept.second.toDouble() == 0.0; });
}

DecimalColumn DecimalColumn::fromGrid(std::vector<std::int64_t> grid, std::vector<std::uint8_t> decimals, int scale) {
    assert(grid.size() == decimals.size() && scale <= LargestScale);
    DecimalColumn column;
    column.grid_ = std::move(grid);
    column.decimals_ = std::move(decimals);
    column.scale_ = scale;
    for (const std::uint8_t d : column.decimals_)
        column.missing_ += d == Missing ? 1 : 0;
    return column;
}

bool DecimalColumn::widenGrid(int scale) {
    if (scale > LargestScale)
        return false;
    for (const std::int64_t integer : grid_)
        if (!shifted(integer, scale - scale_))
            return false;
    for (std::int64_t& integer : grid_)
        integer = *shifted(integer, scale - scale_);
    scale_ = scale;
    return true;
}

void DecimalColumn::place(std::size_t row, const std::optional<Decimal>& value) {
    if (!value)
        return;
    --missing_;
    const bool plain = !value->isWide() && value->decimals >= 0;
    if (plain && (value->decimals <= scale_ || widenGrid(value->decimals))) {
        if (const auto integer = shifted(value->mantissa, scale_ - value->decimals)) {
            grid_[row] = *integer;
            decimals_[row] = static_cast<std::uint8_t>(value->decimals);
            return;
        }
    }
    decimals_[row] = KeptAside;
    aside_.insert_or_assign(row, *value);
}

bool operator==(const DecimalColumn& a, const DecimalColumn& b) {
    if (a.scale_ == b.scale_)
        return a.decimals_ == b.decimals_ && a.grid_ == b.grid_ && a.aside_ == b.aside_;
    if (a.decimals_ != b.decimals_ && a.aside_.empty() && b.aside_.empty())
        return false;
    for (std::size_t i = 0; i < a.size() || i < b.size(); ++i)
        if (i >= a.size() || i >= b.size() || a.at(i) != b.at(i))
            return false;
    return true;
}

} // namespace spanwright
