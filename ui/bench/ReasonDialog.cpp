// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReasonDialog.h"

#include "ui/look/Look.h"

#include <QComboBox>
#include <QDialogButtonBox>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

ReasonDialog::ReasonDialog(const QString& name, const Question& question, QWidget* parent) : QDialog(parent), reason_(new QComboBox) {
    setObjectName(name);
    setWindowTitle(question.title);
    setAttribute(Qt::WA_DeleteOnClose);
    setMinimumWidth(380);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step);
    const auto line = [&](const QString& text, TextRole role) {
        auto* label = new QLabel(text);
        label->setTextFormat(Qt::PlainText);
        label->setWordWrap(true);
        label->setFont(textFont(role));
        all->addWidget(label);
    };
    line(question.heading, TextRole::Heading);
    if (!question.change.isEmpty())
        line(question.change, TextRole::Title);
    auto* ask = new QLabel(question.ask);
    ask->setBuddy(reason_);
    all->addWidget(ask);
    reason_->setObjectName(QStringLiteral("reason"));
    reason_->setAccessibleName(tr("Reason"));
    reason_->setEditable(true);
    reason_->addItems(question.usual);
    reason_->lineEdit()->selectAll();
    all->addWidget(reason_);
    auto* buttons = new QDialogButtonBox;
    QPushButton* yes = buttons->addButton(question.accept, QDialogButtonBox::AcceptRole);
    yes->setDefault(true);
    buttons->addButton(question.reject, QDialogButtonBox::RejectRole);
    all->addWidget(buttons);
    const auto complete = [this, yes] { yes->setEnabled(!reason().isEmpty()); };
    connect(reason_, &QComboBox::editTextChanged, this, complete);
    complete();
    // An editable list keeps Enter to itself; here it answers.
    connect(reason_->lineEdit(), &QLineEdit::returnPressed, this, [this] {
        if (isVisible() && !reason().isEmpty())
            accept();
    });
    connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    reason_->setFocus();
}

QString ReasonDialog::reason() const {
    return reason_->currentText().trimmed();
}

} // namespace spanwright
