// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/selftest/SelfTest.h"

#include <QDialog>
#include <QFutureWatcher>

#include <functional>
#include <memory>

class QLabel;
class QProgressBar;
class QPushButton;
class QTimer;
class QTreeWidget;

namespace spanwright {

/// Where to save a record as PDF; empty when given up. Tests answer in the user's place.
using PdfPathAsk = std::function<QString(QWidget* parent, const QString& suggestion)>;

/// The self-test in the window: runs beside it, shows how far it has come, then every figure with its source, those that differ first, and
/// saves the validation record.
class SelfTestDialog : public QDialog {
    Q_OBJECT

  public:
    explicit SelfTestDialog(PdfPathAsk ask, QWidget* parent = nullptr);
    ~SelfTestDialog() override;

  private:
    void showOutcome();
    void savePdf();

    PdfPathAsk ask_;
    std::shared_ptr<Progress> progress_;
    QFutureWatcher<SelfTestOutcome> running_;
    SelfTestOutcome outcome_;
    QLabel* verdict_;
    QProgressBar* bar_;
    QTimer* looks_;
    QTreeWidget* table_;
    QPushButton* save_;
};

} // namespace spanwright
