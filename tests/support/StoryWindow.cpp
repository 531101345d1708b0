// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/StoryWindow.h"

#include "ui/shell/PageStack.h"

#include <QApplication>

namespace spanwright::test {

StoryWindow::StoryWindow(const QString& home) : now(1'791'884'400'000), settings_(home + QStringLiteral("/settings.ini")) {
    settings_.setPerson(QStringLiteral("IO"));
    window_ = std::make_unique<MainWindow>(
        WindowSurroundings{settings_, dialogs, [this] { return now; }, dataFolder(home)});
    window_->resize(1440, 900);
    window_->show();
    window_->activateWindow();
    if (!QTest::qWaitForWindowActive(window_.get()))
        QTest::qFail("the window did not become active", __FILE__, __LINE__);
    const auto* pages = window_->findChild<PageStack*>();
    if (!QTest::qWaitFor([&] { return pages->complete(); }, 60'000))
        QTest::qFail("the pages were not made", __FILE__, __LINE__);
}

QString StoryWindow::told() const {
    QStringList lines;
    for (const auto& [title, text] : dialogs.told)
        lines << title + QStringLiteral(": ") + text;
    return lines.join(QLatin1Char('\n'));
}

void StoryWindow::type(const QString& text) {
    QWidget* focus = QApplication::focusWidget();
    if (!focus)
        return QTest::qFail("nothing has the focus", __FILE__, __LINE__);
    QTest::keyClicks(focus, text);
}

void StoryWindow::press(Qt::Key key, Qt::KeyboardModifiers modifiers) {
    QWidget* focus = QApplication::focusWidget();
    QTest::keyClick(focus ? focus : window_.get(), key, modifiers);
}

void StoryWindow::act(const char* id) {
    QAction* action = window_->actions().find(QLatin1String(id));
    if (!action || !action->isEnabled())
        return QTest::qFail(id, __FILE__, __LINE__);
    if (action->shortcut().isEmpty())
        return action->trigger();
    // A dialog that has just gone may have taken the activation with it.
    window_->activateWindow();
    if (!QTest::qWaitForWindowActive(window_.get()))
        QTest::qFail("the window did not become active", __FILE__, __LINE__);
    const int key = action->shortcut()[0].toCombined();
    QWidget* focus = QApplication::focusWidget();
    QTest::keyClick(focus ? focus : window_.get(), static_cast<Qt::Key>(key & ~Qt::KeyboardModifierMask),
                    Qt::KeyboardModifiers(key & Qt::KeyboardModifierMask));
}

} // namespace spanwright::test
