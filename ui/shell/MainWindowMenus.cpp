// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/MainWindow.h"

#include "ui/selftest/SelfTestDialog.h"
#include "ui/shell/HelpDialogs.h"
#include "ui/shell/JournalDialog.h"
#include "ui/shell/PageStack.h"

#include <QApplication>
#include <QFileInfo>
#include <QMenu>
#include <QMenuBar>
#include <QStackedWidget>

namespace spanwright {

void MainWindow::makeFileMenu() {
    QMenu* menu = menuBar()->addMenu(tr("&File"));
    menu->setObjectName(QStringLiteral("menu.file"));
    const auto add = [&](const ActionSpec& spec, auto&& doIt) {
        connect(actions_.add(menu, spec), &QAction::triggered, this, [this, doIt] {
            commitEditing();
            doIt();
        });
    };
    add({"file.new", tr("&New session"), QKeySequence(QStringLiteral("Ctrl+N"))}, [this] { files_.newSession(); });
    add({"file.window", tr("New &window"), QKeySequence(QStringLiteral("Ctrl+Shift+N"))}, [this] { emit newWindowWanted(); });
    add({"file.open", tr("&Open\u2026"), QKeySequence(QStringLiteral("Ctrl+O"))}, [this] { files_.open(); });
    QMenu* recent = menu->addMenu(tr("Open &recent"));
    recent->setObjectName(QStringLiteral("menu.recent"));
    connect(&files_, &FileDesk::recentChanged, this, [this, recent] { fillRecent(recent); });
    fillRecent(recent);
    menu->addSeparator();
    add({"file.save", tr("&Save"), QKeySequence(QStringLiteral("Ctrl+S"))}, [this] { files_.save(); });
    add({"file.save-as", tr("Save &as\u2026"), QKeySequence(QStringLiteral("Ctrl+Shift+S"))}, [this] { files_.saveAs(); });
    menu->addSeparator();
    add({"file.import", tr("&Import readings\u2026"), QKeySequence(QStringLiteral("Ctrl+I"))}, [this] { files_.import(); });
    add({"file.paste-table", tr("Import from the clip&board\u2026"), QKeySequence(QStringLiteral("Ctrl+Shift+V"))}, [this] { pasteTable(); });
    menu->addSeparator();
    add({"file.close", tr("&Close"), QKeySequence(QStringLiteral("Ctrl+W"))}, [this] { close(); });
    add({"file.quit", tr("&Quit"), QKeySequence(QStringLiteral("Ctrl+Q"))}, [] { QApplication::closeAllWindows(); });
}

void MainWindow::fillRecent(QMenu* menu) {
    menu->clear();
    int number = 0;
    for (const QString& path : around_.settings.recentFiles()) {
        const QString name = QFileInfo(path).fileName().replace(QLatin1Char('&'), QLatin1String("&&"));
        QAction* action = menu->addAction(tr("&%1 %2").arg(++number).arg(name));
        action->setToolTip(path);
        action->setData(path);
        connect(action, &QAction::triggered, this, [this, path] { takeUp(path); });
    }
    menu->setEnabled(number > 0);
}

void MainWindow::makeEditMenu() {
    QMenu* menu = menuBar()->addMenu(tr("&Edit"));
    menu->setObjectName(QStringLiteral("menu.edit"));
    QUndoStack& stack = bench_.undoStack();
    QAction* undo = actions_.add(menu, {"edit.undo", tr("&Undo"), QKeySequence(QStringLiteral("Ctrl+Z"))});
    QAction* redo = actions_.add(menu, {"edit.redo", tr("&Redo"), QKeySequence(QStringLiteral("Ctrl+Shift+Z"))});
    const auto follow = [this, undo, redo] {
        QUndoStack& s = bench_.undoStack();
        undo->setEnabled(s.canUndo() && !bench_.readOnly());
        redo->setEnabled(s.canRedo() && !bench_.readOnly());
        undo->setText(s.canUndo() ? tr("&Undo: %1").arg(s.undoText()) : tr("&Undo"));
        redo->setText(s.canRedo() ? tr("&Redo: %1").arg(s.redoText()) : tr("&Redo"));
    };
    connect(&stack, &QUndoStack::indexChanged, this, follow);
    connect(&bench_, &Workbench::recordChanged, this, follow);
    follow();
    connect(undo, &QAction::triggered, &stack, &QUndoStack::undo);
    connect(redo, &QAction::triggered, &stack, &QUndoStack::redo);
    menu->addSeparator();
    connect(actions_.add(menu, {"edit.find", tr("&Find a command\u2026"), QKeySequence(QStringLiteral("Ctrl+K"))}), &QAction::triggered,
            this, &MainWindow::findCommand);
}

void MainWindow::makeRecordMenu() {
    QMenu* menu = recordMenu_ = menuBar()->addMenu(tr("&Record"));
    menu->setObjectName(QStringLiteral("menu.record"));
    connect(menu, &QMenu::aboutToShow, pages_, &PageStack::makeAll);
    connect(actions_.add(menu, {"record.person", tr("Your &initials\u2026"), QKeySequence(QStringLiteral("Ctrl+Shift+I"))}),
            &QAction::triggered, this, &MainWindow::askPerson);
    connect(actions_.add(menu, {"record.journal", tr("&Journal\u2026"), QKeySequence(QStringLiteral("Ctrl+J"))}), &QAction::triggered, this,
            [this] {
                JournalDialog dialog(bench_.record(), this);
                around_.dialogs.run(dialog);
            });
}

void MainWindow::takeOverActions() {
    QAction* const own = recordMenu_->actions().constFirst();
    for (int i = 0; i < pages_->count(); ++i) {
        QWidget* const page = pages_->page(i);
        recordMenu_->insertActions(own, page->actions());
        if (!page->actions().isEmpty())
            recordMenu_->insertSeparator(own);
        actions_.adopt(page);
    }
}

void MainWindow::makeViewMenu() {
    QMenu* menu = menuBar()->addMenu(tr("&View"));
    menu->setObjectName(QStringLiteral("menu.view"));
    const std::pair<const char*, QString> stages[] = {{"view.job", tr("Go to &Job")},
                                                      {"view.bench", tr("Go to &Bench")},
                                                      {"view.budget", tr("Go to B&udget")},
                                                      {"view.certificate", tr("Go to &Certificate")}};
    int number = 0;
    for (const Stage stage : allStages) {
        const auto& [id, text] = stages[number++];
        connect(actions_.add(menu, {id, text, QKeySequence(QStringLiteral("Ctrl+%1").arg(number))}), &QAction::triggered, this,
                [this, stage] { showStage(stage); });
    }
    menu->addSeparator();
    connect(actions_.add(menu, {"view.next-part", tr("&Next part"), QKeySequence(Qt::Key_F6)}), &QAction::triggered, this,
            [this] { goToPart(1); });
    connect(actions_.add(menu, {"view.previous-part", tr("&Previous part"), QKeySequence(QStringLiteral("Shift+F6"))}), &QAction::triggered,
            this, [this] { goToPart(-1); });
    menu->addSeparator();
    connect(actions_.add(menu, {"view.scheme", tr("&Light or dark"), QKeySequence(QStringLiteral("Ctrl+Shift+D"))}), &QAction::triggered,
            this, &MainWindow::toggleScheme);
    connect(actions_.add(menu, {"view.full-screen", tr("&Full screen"), QKeySequence(Qt::Key_F11)}), &QAction::triggered, this,
            [this] { isFullScreen() ? showNormal() : showFullScreen(); });
}

void MainWindow::makeHelpMenu() {
    QMenu* menu = menuBar()->addMenu(tr("&Help"));
    menu->setObjectName(QStringLiteral("menu.help"));
    const auto open = [this](QDialog* dialog) {
        dialog->setAttribute(Qt::WA_DeleteOnClose, false);
        around_.dialogs.run(*dialog);
        dialog->deleteLater();
    };
    connect(actions_.add(menu, {"help.user", tr("&How to work with it"), QKeySequence(Qt::Key_F1)}), &QAction::triggered, this,
            [this, open] { open(userHelp(this)); });
    connect(actions_.add(menu, {"help.keyboard", tr("&Keyboard"), QKeySequence(QStringLiteral("Ctrl+F1"))}), &QAction::triggered, this,
            [this, open] { open(keyboardHelp(actions_.all(), this)); });
    connect(actions_.add(menu, {"help.self-test", tr("&Self-test…"), {}, "run after an installation"}), &QAction::triggered, this, [this] {
        SelfTestDialog dialog([this](QWidget* from, const QString& suggestion) { return around_.dialogs.pdfPath(from, suggestion); }, this);
        around_.dialogs.run(dialog);
    });
    connect(actions_.add(menu, {"help.about", tr("&About"), {}, "looked at once in a while"}), &QAction::triggered, this,
            [this, open] { open(aboutProgram(this)); });
}

} // namespace spanwright
