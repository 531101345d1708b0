// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/BenchPage.h"
#include "ui/commands/Workbench.h"

class QDialog;

namespace spanwright {
class NumberEdit;
class ReadingsTable;
} // namespace spanwright

namespace spanwright::test {

/// The bench in a window, with keys and mouse at hand and a clock that a test moves.
class BenchWindow {
  public:
    explicit BenchWindow(const Record& record);

    /// A widget or an action by its object name; the test fails when there is none.
    template <class T>
    T* find(const char* name) const {
        T* found = page.findChild<T*>(QLatin1String(name));
        if (!found)
            qFatal("no %s", name);
        return found;
    }
    [[nodiscard]] ReadingsTable* table() const;
    /// The open editor of a cell, or nothing.
    [[nodiscard]] NumberEdit* cell() const;
    /// The dialog of that name that is seen, or nothing.
    [[nodiscard]] QDialog* dialog(const char* name) const;
    void act(const char* id) const;
    /// What an action opens.
    QDialog* open(const char* action, const char* dialog) const;
    /// Opens the list of a chooser and triggers the entry with that text.
    void choose(const char* button, const QString& entry) const;

    static void type(QWidget* widget, const char* keys);
    /// Types into a field and enters it.
    void enter(const char* field, const char* keys) const;

    [[nodiscard]] const ReadingColumns& readings() const { return *workbench.record().readings; }
    [[nodiscard]] const Choices& choices() const { return workbench.record().choices; }

    std::int64_t now = 1'764'590'400'000; ///< ms
    Workbench workbench;
    BenchPage page;
};

/// A transmitter with a plan of three set points, rising and falling, two runs, and nothing taken yet.
Record plannedTransmitter();

/// As it was typed, or "none".
std::string text(const std::optional<Decimal>& value);

} // namespace spanwright::test
