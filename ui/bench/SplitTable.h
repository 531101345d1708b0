// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/SheetDialog.h"

class QLabel;

namespace spanwright {

class FiguresTable;
class Workbench;

/// The figures behind the split picture: source, sum of squares, degrees of freedom, mean square, F, p, shares. To be copied and, when
/// wanted, printed on the certificate.
class SplitTable : public SheetDialog {
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
