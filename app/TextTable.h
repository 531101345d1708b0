// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QStringList>

#include <vector>

namespace spanwright {

/// Rows of cells as aligned plain text: the first column to the left, all others to the right, two blanks between columns. The
/// first row is the head.
class TextTable {
  public:
    explicit TextTable(QStringList head) { rows_.push_back(std::move(head)); }
    void add(QStringList row) { rows_.push_back(std::move(row)); }
    [[nodiscard]] bool empty() const { return rows_.size() < 2; }
    /// Every line indented by two blanks but the head, and ended; nothing when there is only the head.
    [[nodiscard]] QString text() const;

  private:
    std::vector<QStringList> rows_;
};

} // namespace spanwright
