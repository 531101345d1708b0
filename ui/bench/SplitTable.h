// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/VarianceSplit.h"

#include <QDialog>

namespace spanwright {

/// One source of the spread as it stands in the table.
struct SplitLine {
    QString source, sumOfSquares, degreesOfFreedom, meanSquare, f, p, share;
    int level = 0; ///< how far the source is indented
};
std::vector<SplitLine> splitLines(const VarianceSplit& split);
/// The table for a spreadsheet, with a heading.
QString splitTableText(const VarianceSplit& split, const QString& unit);

/// The figures behind the split picture, to be copied.
class SplitTable : public QDialog {
    Q_OBJECT

  public:
    SplitTable(const VarianceSplit& split, const QString& unit, QWidget* parent = nullptr);
};

} // namespace spanwright
