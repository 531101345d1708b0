// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/VarianceSplit.h"
#include "ui/bench/FiguresTable.h"

#include <QDialog>

class QLabel;

namespace spanwright {

class Workbench;

/// The variance split as rows of a table: source, sum of squares, degrees of freedom, mean square, F, p, share. Lack of fit stands
/// there up to three times, each test by its name.
QStringList splitHeadings(const QString& unit);
std::vector<FiguresRow> splitRows(const VarianceSplit& split);

/// The figures behind the split picture, to be copied and, when wanted, printed on the certificate.
class SplitTable : public QDialog {
    Q_OBJECT

  public:
    explicit SplitTable(Workbench& workbench, QWidget* parent = nullptr);

  private:
    void refresh();

    Workbench& workbench_;
    FiguresTable* table_;
    QLabel* note_;
};

} // namespace spanwright
