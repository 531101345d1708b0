// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

class QDialog;
class QWidget;

namespace spanwright {

enum class SaveAnswer { Save, Discard, Cancel };
enum class RecoveryAnswer { TakeUp, Later, Discard };

/// Everything that stops and asks. Tests answer in the user's place.
class Dialogs {
  public:
    virtual ~Dialogs() = default;
    virtual SaveAnswer askSave(QWidget* parent, const QString& name) = 0;
    virtual RecoveryAnswer askRecovery(QWidget* parent, const QString& text) = 0;
    /// Empty when given up.
    virtual QString openPath(QWidget* parent, const QString& folder) = 0;
    virtual QString savePath(QWidget* parent, const QString& suggestion) = 0;
    virtual QString pdfPath(QWidget* parent, const QString& suggestion) = 0;
    virtual void tell(QWidget* parent, const QString& title, const QString& text) = 0;
    virtual bool confirm(QWidget* parent, const QString& title, const QString& text, const QString& yes) = 0;
    /// A line of text; null when given up.
    virtual QString askText(QWidget* parent, const QString& title, const QString& label, const QString& now) = 0;
    /// Shows a dialog until it is accepted (true) or given up.
    virtual bool run(QDialog& dialog) = 0;
};

/// The real ones.
class ScreenDialogs : public Dialogs {
  public:
    SaveAnswer askSave(QWidget* parent, const QString& name) override;
    RecoveryAnswer askRecovery(QWidget* parent, const QString& text) override;
    QString openPath(QWidget* parent, const QString& folder) override;
    QString savePath(QWidget* parent, const QString& suggestion) override;
    QString pdfPath(QWidget* parent, const QString& suggestion) override;
    void tell(QWidget* parent, const QString& title, const QString& text) override;
    bool confirm(QWidget* parent, const QString& title, const QString& text, const QString& yes) override;
    QString askText(QWidget* parent, const QString& title, const QString& label, const QString& now) override;
    bool run(QDialog& dialog) override;
};

} // namespace spanwright
