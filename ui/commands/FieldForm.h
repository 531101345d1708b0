// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/FieldLine.h"
#include "ui/commands/Workbench.h"

#include <QCheckBox>
#include <QComboBox>
#include <QPlainTextEdit>
#include <QSpinBox>
#include <QWidget>

class QGridLayout;
class QLabel;

namespace spanwright {

/// An editor under its label, with room for a unit behind it and for a sentence under it when what was typed is refused.
class FieldBox : public QWidget {
    Q_OBJECT

  public:
    FieldBox(const QString& label, QWidget* editor, QWidget* parent = nullptr);
    void setUnit(const QString& unit);
    /// A quiet line under the editor.
    void setHint(const QString& hint);

  private:
    QLabel* unit_;
    QLabel* hint_;
    QLabel* refusal_;
};

/// Lays FieldBoxes out in columns of equal width, row after row.
class FieldGrid : public QWidget {
    Q_OBJECT

  public:
    explicit FieldGrid(int columns, QWidget* parent = nullptr);
    void add(QWidget* box, int span = 1);
    void startRow();

  private:
    QGridLayout* grid_;
    int columns_;
    int row_ = 0, column_ = 0;
};

/// A longer text, taken in when the editor is left.
class FieldText : public QPlainTextEdit {
    Q_OBJECT

  public:
    FieldText(Workbench& bench, const QString& id, const QString& name, FieldBinding binding, QWidget* parent = nullptr);
    void commit();

  protected:
    bool event(QEvent* event) override;
    void focusOutEvent(QFocusEvent* event) override;
    [[nodiscard]] QSize sizeHint() const override;

  private:
    void show();
    Workbench& bench_;
    FieldBinding binding_;
};

/// A box that is ticked or not. `access` returns a reference to a bool in the part.
template <class Part, class Access>
QCheckBox* fieldCheck(Workbench& bench, const QString& id, const QString& name, Part Record::*part, Access access) {
    auto* box = new QCheckBox(name);
    box->setObjectName(id);
    box->setAccessibleName(name);
    const auto show = [&bench, box, part, access] {
        Part copy = bench.record().*part;
        const QSignalBlocker quiet(box);
        box->setChecked(access(copy));
        box->setEnabled(!bench.readOnly());
    };
    QObject::connect(&bench, &Workbench::recordChanged, box, show);
    QObject::connect(box, &QCheckBox::toggled, box, [&bench, part, access, name](bool on) {
        bench.perform(changePart(bench.record(), part, name, [&](Part& p) { access(p) = on; }));
    });
    show();
    return box;
}

/// One of several, as words in the order of the enumeration.
template <class Part, class Access>
QComboBox* fieldChoice(Workbench& bench, const QString& id, const QString& name, const QStringList& words, Part Record::*part,
                       Access access) {
    auto* box = new QComboBox;
    box->setObjectName(id);
    box->setAccessibleName(name);
    box->addItems(words);
    const auto show = [&bench, box, part, access] {
        Part copy = bench.record().*part;
        const QSignalBlocker quiet(box);
        box->setCurrentIndex(static_cast<int>(access(copy)));
        box->setEnabled(!bench.readOnly());
    };
    QObject::connect(&bench, &Workbench::recordChanged, box, show);
    QObject::connect(box, &QComboBox::currentIndexChanged, box, [&bench, part, access, name](int index) {
        bench.perform(changePart(bench.record(), part, name, [&](Part& p) {
            access(p) = static_cast<std::remove_reference_t<decltype(access(p))>>(index);
        }));
    });
    show();
    return box;
}

/// A small whole number.
template <class Part, class Access>
QSpinBox* fieldCount(Workbench& bench, const QString& id, const QString& name, int low, int high, Part Record::*part, Access access) {
    auto* box = new QSpinBox;
    box->setObjectName(id);
    box->setAccessibleName(name);
    box->setRange(low, high);
    box->setKeyboardTracking(false);
    const auto show = [&bench, box, part, access] {
        Part copy = bench.record().*part;
        const QSignalBlocker quiet(box);
        box->setValue(access(copy));
        box->setEnabled(!bench.readOnly());
    };
    QObject::connect(&bench, &Workbench::recordChanged, box, show);
    QObject::connect(box, &QSpinBox::valueChanged, box, [&bench, part, access, name](int value) {
        bench.perform(changePart(bench.record(), part, name, [&](Part& p) { access(p) = value; }));
    });
    show();
    return box;
}

/// A FieldLine in its FieldBox.
FieldBox* fieldBox(Workbench& bench, const QString& id, const QString& label, FieldBinding binding);
FieldBox* longFieldBox(Workbench& bench, const QString& id, const QString& label, FieldBinding binding);

} // namespace spanwright
