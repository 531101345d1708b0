// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "tests/support/ScriptedDialogs.h"
#include "ui/shell/MainWindow.h"

#include <QTemporaryDir>
#include <QTest>

#include <memory>

namespace spanwright::test {

/// The real main window with a folder, settings and a clock of its own.
class StoryWindow {
  public:
    /// `home` is kept from one window to the next to tell what a program finds when it starts again.
    explicit StoryWindow(const QString& home);

    [[nodiscard]] MainWindow& window() { return *window_; }
    [[nodiscard]] Workbench& workbench() { return window_->workbench(); }
    [[nodiscard]] const Record& record() { return workbench().record(); }
    [[nodiscard]] static QString dataFolder(const QString& home) { return home + QStringLiteral("/data"); }
    /// What the window had to say, a line each.
    [[nodiscard]] QString told() const;

    ScriptedDialogs dialogs;
    std::int64_t now; ///< ms; a test moves it

    /// A widget by its object name; the test fails when there is none.
    template <class W>
    W* find(const char* name) {
        W* widget = window_->findChild<W*>(QLatin1String(name));
        if (!widget)
            QTest::qFail(name, __FILE__, __LINE__);
        return widget;
    }
    /// Types into what has the focus now.
    void type(const QString& text);
    void press(Qt::Key key, Qt::KeyboardModifiers modifiers = Qt::NoModifier);
    /// The action of that id as a person reaches it: by its keys, else through the menu.
    void act(const char* id);

  private:
    Settings settings_;
    std::unique_ptr<MainWindow> window_;
};

} // namespace spanwright::test
