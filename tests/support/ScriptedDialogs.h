// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/shell/Dialogs.h"

#include <QDialog>
#include <QList>
#include <QPair>
#include <QStringList>

#include <functional>

namespace spanwright::test {

/// Answers in the user's place, and remembers what was asked and told.
class ScriptedDialogs : public Dialogs {
  public:
    SaveAnswer save = SaveAnswer::Cancel;
    RecoveryAnswer recovery = RecoveryAnswer::Later;
    QString open, savedAs, pdf, typed;
    bool yes = true;
    /// What is done in a dialog; true accepts it.
    std::function<bool(QDialog&)> inDialog;
    QStringList asked; ///< names and titles of questions
    QList<QPair<QString, QString>> told;

    SaveAnswer askSave(QWidget*, const QString& name) override {
        asked << name;
        return save;
    }
    RecoveryAnswer askRecovery(QWidget*, const QString& text) override {
        asked << text;
        return recovery;
    }
    QString openPath(QWidget*, const QString&) override { return open; }
    QString savePath(QWidget*, const QString& suggestion) override {
        asked << suggestion;
        return savedAs;
    }
    QString pdfPath(QWidget*, const QString& suggestion) override {
        asked << suggestion;
        return pdf;
    }
    void tell(QWidget*, const QString& title, const QString& text) override { told.append({title, text}); }
    bool confirm(QWidget*, const QString& title, const QString& text, const QString&) override {
        asked << title + QLatin1Char('\n') + text;
        return yes;
    }
    QString askText(QWidget*, const QString& title, const QString&, const QString&) override {
        asked << title;
        return typed;
    }
    bool run(QDialog& dialog) override {
        dialog.show();
        return inDialog && inDialog(dialog);
    }
};

} // namespace spanwright::test
