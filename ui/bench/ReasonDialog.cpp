// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReasonDialog.h"

#include "ui/look/Look.h"

#include <QComboBox>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

ReasonDialog::ReasonDialog(const QString& name, const Question& question, QWidget* parent) : SheetDialog(name, question.title, parent), reason_(new QComboBox) {
    setMinimumWidth(380);
    const auto line = [&](const QString& text, TextRole role) {
        auto* label = new QLabel(text);
        label->setTextFormat(Qt::PlainText);
        label->setWordWrap(true);
        label->setFont(textFont(role));
        body()->addWidget(label);
    };
    line(question.heading, TextRole::Heading);
    if (!question.change.isEmpty())
        line(question.change, TextRole::Title);
    auto* ask = new QLabel(question.ask);
    ask->setBuddy(reason_);
    body()->addWidget(ask);
    reason_->setObjectName(QStringLiteral("reason"));
    reason_->setAccessibleName(tr("Reason"));
    reason_->setEditable(true);
    reason_->addItems(question.usual);
    reason_->lineEdit()->selectAll();
    body()->addWidget(reason_);
    QPushButton* yes = addButton(question.accept, QDialogButtonBox::AcceptRole);
    yes->setDefault(true);
    addButton(question.reject, QDialogButtonBox::RejectRole);
    const auto complete = [this, yes] { yes->setEnabled(!reason().isEmpty()); };
    connect(reason_, &QComboBox::editTextChanged, this, complete);
    complete();
    // An editable list keeps Enter to itself; here it answers.
    connect(reason_->lineEdit(), &QLineEdit::returnPressed, this, [this] {
        if (isVisible() && !reason().isEmpty())
            accept();
    });
    reason_->setFocus();
}

QString ReasonDialog::reason() const {
    return reason_->currentText().trimmed();
}

} // namespace spanwright
