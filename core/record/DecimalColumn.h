// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <cstdint>
#include <map>
#include <optional>
#include <span>
#include <vector>

namespace spanwright {

/// A column of numbers as typed, some of which may be missing. Every value that fits is held as a 64-bit integer on one decimal
/// grid (value = integer · 10^(−scale)) beside its own count of decimals, so differences are exact and 100.10 stays 100.10.
/// Values that fit no common grid of 18 digits are kept aside as typed; then `exact()` is false.
class DecimalColumn {
  public:
    [[nodiscard]] std::size_t size() const { return grid_.size(); }
    [[nodiscard]] bool empty() const { return grid_.empty(); }
    void reserve(std::size_t n);
    void push_back(const std::optional<Decimal>& value);
    void set(std::size_t row, const std::optional<Decimal>& value);
    void insert(std::size_t row, const std::optional<Decimal>& value);
    void erase(std::size_t row);
    void resize(std::size_t n);

    [[nodiscard]] bool has(std::size_t row) const { return decimals_[row] != Missing; }
    [[nodiscard]] std::optional<Decimal> at(std::size_t row) const;
    [[nodiscard]] double toDouble(std::size_t row) const;           ///< NaN when missing
    [[nodiscard]] DoubleDouble toDoubleDouble(std::size_t row) const; ///< must not be missing

    /// Digits after the mark of the grid.
    [[nodiscard]] int scale() const { return scale_; }
    /// The integers on the grid; 0 where the value is missing or kept aside.
    [[nodiscard]] std::span<const std::int64_t> grid() const { return grid_; }
    /// Digits after the mark of each value as typed; Missing, or KeptAside where only at() gives the value.
    [[nodiscard]] std::span<const std::uint8_t> decimals() const { return decimals_; }
    /// Whether every value that is present lies on the grid; a zero kept aside for its minus sign does.
    [[nodiscard]] bool exact() const;
    /// Number of rows without a value.
    [[nodiscard]] std::size_t missing() const { return missing_; }

    /// A column taken over as it was read: integers on the grid 10^(−scale) and the decimals of each as typed.
    static DecimalColumn fromGrid(std::vector<std::int64_t> grid, std::vector<std::uint8_t> decimals, int scale);

    /// Marks a row without a value in the decimals given to fromGrid().
    static constexpr std::uint8_t Missing = 255;
    static constexpr std::uint8_t KeptAside = 254;

    /// Equal as typed.
    friend bool operator==(const DecimalColumn& a, const DecimalColumn& b);

  private:
    bool widenGrid(int scale);
    void place(std::size_t row, const std::optional<Decimal>& value);

    std::vector<std::int64_t> grid_;
    std::vector<std::uint8_t> decimals_;
    std::map<std::size_t, Decimal> aside_;
    int scale_ = 0;
    std::size_t missing_ = 0;
};

} // namespace spanwright
