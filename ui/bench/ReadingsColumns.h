// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <map>

class QTableView;

namespace spanwright {

class ReadingsModel;

/// Which columns of the readings are seen and how wide: numbers are always seen whole, the set point and the state give way where
/// there is no room, columns of stated uncertainties are there where any reading states one or they were asked for.
class ReadingsColumns {
  public:
    ReadingsColumns(QTableView& table, const ReadingsModel& model) : table_(table), model_(model) {}
    /// Columns of stated uncertainties, to type in what no reading has yet.
    void showStated(bool shown);
    [[nodiscard]] bool statedShown() const;
    /// Anew, when heads or numbers changed.
    void measure();
    /// When only the room changed.
    void fit();
    /// The last column that a block of values may reach which ends before `row`: what is not shown is not pasted into.
    [[nodiscard]] int lastTyped(int row) const;

  private:
    [[nodiscard]] int widthOfNumbers(int column) const;

    QTableView& table_;
    const ReadingsModel& model_;
    std::map<int, int> needed_; ///< by column of numbers, px
    bool statedWanted_ = false;
};

} // namespace spanwright
