// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <QLineEdit>

namespace spanwright {

/// A field for one number with its unit inside. What is refused stays in the field, marked.
class NumberEdit : public QLineEdit {
    Q_OBJECT

  public:
    explicit NumberEdit(QWidget* parent = nullptr);
    void setUnit(const QString& unit);
    [[nodiscard]] const QString& unit() const { return unit_; }
    [[nodiscard]] Result<Decimal> number() const;
    /// Marks the field as refused; cleared by the next key.
    void setRefused(bool refused);
    [[nodiscard]] bool refused() const { return property("refused").toBool(); }

  protected:
    bool event(QEvent* event) override;
    void paintEvent(QPaintEvent* event) override;
    void changeEvent(QEvent* event) override;

  private:
    void makeRoom();
    QString unit_;
};

} // namespace spanwright
