// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QDialog>

class QComboBox;

namespace spanwright {

/// Asks why a value that stands in the record is changed; the value before stays in the journal (ISO/IEC 17025:2017, 7.5.2).
class AmendDialog : public QDialog {
    Q_OBJECT

  public:
    AmendDialog(const QString& what, const QString& before, const QString& after, QWidget* parent = nullptr);
    [[nodiscard]] QString reason() const;

  private:
    QComboBox* reason_;
};

} // namespace spanwright
