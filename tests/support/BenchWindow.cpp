// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/BenchWindow.h"

#include "tests/support/SampleRecord.h"
#include "ui/bench/NumberEdit.h"
#include "ui/bench/ReadingsTable.h"

#include <QAction>
#include <QApplication>
#include <QDialog>
#include <QMenu>
#include <QTest>
#include <QToolButton>

namespace spanwright::test {

namespace {

/// The one that is seen: those closed before may still be on their way out.
template <class T>
T* visible(const QList<T*>& candidates) {
    for (T* candidate : candidates)
        if (candidate->isVisible())
            return candidate;
    return nullptr;
}

} // namespace

BenchWindow::BenchWindow(const Record& record) : workbench([this] { return now; }), page(workbench) {
    workbench.setPerson(QStringLiteral("IO"));
    workbench.setRecord(record);
    page.resize(1280, 720);
    page.show();
    QApplication::setActiveWindow(&page);
    QTest::qWait(0);
}

ReadingsTable* BenchWindow::table() const {
    return find<ReadingsTable>("readingsTable");
}

NumberEdit* BenchWindow::cell() const {
    return visible(table()->viewport()->findChildren<NumberEdit*>(QStringLiteral("cellEditor")));
}

QDialog* BenchWindow::dialog(const char* name) const {
    return visible(page.findChildren<QDialog*>(QLatin1String(name)));
}

void BenchWindow::act(const char* id) const {
    find<QAction>(id)->trigger();
}

QDialog* BenchWindow::open(const char* action, const char* dialog) const {
    act(action);
    return find<QDialog>(dialog);
}

void BenchWindow::choose(const char* button, const QString& entry) const {
    QMenu* menu = find<QToolButton>(button)->menu();
    emit menu->aboutToShow();
    for (QAction* action : menu->actions())
        if (action->text() == entry)
            return action->trigger();
    qFatal("no entry %s", qPrintable(entry));
}

void BenchWindow::type(QWidget* widget, const char* keys) {
    QTest::keyClicks(widget, QLatin1String(keys));
}

void BenchWindow::enter(const char* field, const char* keys) const {
    auto* edit = find<NumberEdit>(field);
    edit->setFocus();
    type(edit, keys);
    QTest::keyClick(edit, Qt::Key_Return);
}

Record plannedTransmitter() {
    Record record;
    record.item = pressureTransmitter().item;
    record.plan.setPoints = {number("0"), number("5"), number("10")};
    record.plan.runs = 2;
    return record;
}

std::string text(const std::optional<Decimal>& value) {
    return value ? value->text() : "none";
}

} // namespace spanwright::test
