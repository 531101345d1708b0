// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Dialogs.h"

#include <QCoreApplication>
#include <QDialog>
#include <QFileDialog>
#include <QFileInfo>
#include <QInputDialog>
#include <QKeyEvent>
#include <QMessageBox>
#include <QPushButton>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("Dialogs", text);
}

/// Text from files is text, never markup.
/// Answers to Alt with a letter, not to the letter alone, which may have been meant for another field.
class Question : public QMessageBox {
  public:
    using QMessageBox::QMessageBox;

  protected:
    void keyPressEvent(QKeyEvent* event) override {
        const bool plainLetter = !event->text().isEmpty() && event->text().front().isLetterOrNumber() &&
                                 !event->modifiers().testAnyFlags(Qt::AltModifier | Qt::ControlModifier | Qt::MetaModifier);
        if (!plainLetter)
            QMessageBox::keyPressEvent(event);
    }
};

QMessageBox* messageBox(QWidget* parent, const QString& title, const QString& text) {
    auto* box = new Question(parent);
    box->setWindowTitle(title);
    box->setTextFormat(Qt::PlainText);
    box->setText(title);
    box->setInformativeText(text);
    return box;
}

bool mayReplace(QWidget* parent, const QString& path) {
    QMessageBox* box = messageBox(parent, tr("Replace “%1”?").arg(QFileInfo(path).fileName()),
                                  tr("There is such a session already; what it holds is lost when it is replaced."));
    QPushButton* replace = box->addButton(tr("&Replace"), QMessageBox::DestructiveRole);
    box->setDefaultButton(box->addButton(tr("&Cancel"), QMessageBox::RejectRole));
    box->exec();
    const bool may = box->clickedButton() == replace;
    delete box;
    return may;
}

} // namespace

SaveAnswer ScreenDialogs::askSave(QWidget* parent, const QString& name) {
    QMessageBox* box = messageBox(parent, tr("Save the changes to “%1”?").arg(name),
                                  tr("What was entered since the last save is lost when it is not saved."));
    QPushButton* save = box->addButton(tr("&Save"), QMessageBox::AcceptRole);
    QPushButton* discard = box->addButton(tr("&Do not save"), QMessageBox::DestructiveRole);
    box->addButton(tr("&Cancel"), QMessageBox::RejectRole);
    box->setDefaultButton(save);
    box->exec();
    const SaveAnswer answer = box->clickedButton() == save      ? SaveAnswer::Save
                              : box->clickedButton() == discard ? SaveAnswer::Discard
                                                                : SaveAnswer::Cancel;
    delete box;
    return answer;
}

RecoveryAnswer ScreenDialogs::askRecovery(QWidget* parent, const QString& text) {
    QMessageBox* box = messageBox(parent, tr("The program was stopped before everything was saved"), text);
    QPushButton* takeUp = box->addButton(tr("&Take it up"), QMessageBox::AcceptRole);
    QPushButton* discard = box->addButton(tr("Thr&ow it away"), QMessageBox::DestructiveRole);
    QPushButton* later = box->addButton(tr("&Ask again later"), QMessageBox::RejectRole);
    box->setDefaultButton(takeUp);
    box->setEscapeButton(later);
    box->exec();
    const RecoveryAnswer answer = box->clickedButton() == takeUp    ? RecoveryAnswer::TakeUp
                                  : box->clickedButton() == discard ? RecoveryAnswer::Discard
                                                                    : RecoveryAnswer::Later;
    delete box;
    return answer;
}

QString ScreenDialogs::openPath(QWidget* parent, const QString& folder) {
    return QFileDialog::getOpenFileName(parent, tr("Open a session or a table of readings"), folder,
                                        tr("Sessions and tables (*.spanwright *.csv *.tsv *.txt *.dat);;Sessions (*.spanwright);;"
                                           "Tables of text (*.csv *.tsv *.txt *.dat);;All files (*)"));
}

QString ScreenDialogs::savePath(QWidget* parent, const QString& suggestion) {
    QFileDialog dialog(parent, tr("Save the session"), suggestion, tr("Sessions (*.spanwright)"));
    dialog.setAcceptMode(QFileDialog::AcceptSave);
    dialog.setDefaultSuffix(QStringLiteral("spanwright"));
    dialog.selectFile(suggestion);
    if (dialog.exec() != QDialog::Accepted)
        return {};
    // A session called table.csv would be opened as one.
    const QString path = dialog.selectedFiles().value(0), suffix = QStringLiteral(".spanwright");
    const QString named = path.isEmpty() || path.endsWith(suffix, Qt::CaseInsensitive) ? path : path + suffix;
    if (named != path && QFileInfo::exists(named) && !mayReplace(parent, named))
        return {};
    return named;
}

QString ScreenDialogs::pdfPath(QWidget* parent, const QString& suggestion) {
    return QFileDialog::getSaveFileName(parent, tr("Save the draft as PDF"), suggestion, tr("PDF (*.pdf)"));
}

void ScreenDialogs::tell(QWidget* parent, const QString& title, const QString& text) {
    QMessageBox* box = messageBox(parent, title, text);
    box->addButton(tr("&Close"), QMessageBox::AcceptRole);
    box->exec();
    delete box;
}

bool ScreenDialogs::confirm(QWidget* parent, const QString& title, const QString& text, const QString& yes) {
    QMessageBox* box = messageBox(parent, title, text);
    QPushButton* accept = box->addButton(yes, QMessageBox::AcceptRole);
    box->addButton(tr("&Cancel"), QMessageBox::RejectRole);
    box->setDefaultButton(accept);
    box->exec();
    const bool accepted = box->clickedButton() == accept;
    delete box;
    return accepted;
}

QString ScreenDialogs::askText(QWidget* parent, const QString& title, const QString& label, const QString& now) {
    bool accepted = false;
    const QString text = QInputDialog::getText(parent, title, label, QLineEdit::Normal, now, &accepted);
    return accepted ? (text.isNull() ? QStringLiteral("") : text) : QString();
}

bool ScreenDialogs::run(QDialog& dialog) {
    return dialog.exec() == QDialog::Accepted;
}

} // namespace spanwright
