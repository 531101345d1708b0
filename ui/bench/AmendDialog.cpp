// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/AmendDialog.h"

#include "ui/look/Look.h"

#include <QComboBox>
#include <QDialogButtonBox>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

AmendDialog::AmendDialog(const QString& what, const QString& before, const QString& after, QWidget* parent)
    : QDialog(parent), reason_(new QComboBox) {
    setObjectName(QStringLiteral("amendDialog"));
    setWindowTitle(tr("Change a recorded value"));
    setAttribute(Qt::WA_DeleteOnClose);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step);
    auto* heading = new QLabel(what);
    heading->setTextFormat(Qt::PlainText);
    heading->setFont(textFont(TextRole::Heading));
    auto* change = new QLabel(before + QStringLiteral("  →  ") + after);
    change->setTextFormat(Qt::PlainText);
    change->setFont(textFont(TextRole::Title));
    auto* question = new QLabel(tr("&Why? The value before is kept beside the new one."));
    question->setBuddy(reason_);
    reason_->setObjectName(QStringLiteral("amendReason"));
    reason_->setAccessibleName(tr("Reason"));
    reason_->setEditable(true);
    reason_->addItems({tr("typed wrongly"), tr("read again at the instrument"), tr("typed in the wrong place")});
    reason_->lineEdit()->selectAll();
    reason_->setMinimumWidth(320);
    auto* buttons = new QDialogButtonBox;
    buttons->addButton(tr("Record the change"), QDialogButtonBox::AcceptRole)->setDefault(true);
    buttons->addButton(tr("Keep the value"), QDialogButtonBox::RejectRole);
    for (QWidget* widget : std::initializer_list<QWidget*>{heading, change, question, reason_, buttons})
        all->addWidget(widget);
    const auto complete = [this, buttons] {
        for (QAbstractButton* button : buttons->buttons())
            if (buttons->buttonRole(button) == QDialogButtonBox::AcceptRole)
                button->setEnabled(!reason().isEmpty());
    };
    connect(reason_, &QComboBox::editTextChanged, this, complete);
    // An editable list keeps Enter to itself; here it answers.
    connect(reason_->lineEdit(), &QLineEdit::returnPressed, this, [this] {
        if (isVisible() && !reason().isEmpty())
            accept();
    });
    connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    reason_->setFocus();
}

QString AmendDialog::reason() const {
    return reason_->currentText().trimmed();
}

} // namespace spanwright
