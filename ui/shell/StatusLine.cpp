// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/StatusLine.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPainter>

namespace spanwright {

namespace {

QLabel* quiet(const QString& name) {
    auto* label = new QLabel;
    label->setObjectName(name);
    label->setFont(textFont(TextRole::Small));
    label->setForegroundRole(inkRole::quiet);
    label->setTextFormat(Qt::PlainText);
    return label;
}

QString conditionsText(const Conditions& conditions) {
    QStringList words;
    for (const Condition& c : conditions.influences) {
        const std::optional<Decimal>& newest = c.end ? c.end : c.start;
        if (newest)
            words << typedText(*newest) + QLatin1Char(' ') + QString::fromStdString(c.quantity.unit);
    }
    return words.join(QStringLiteral("    "));
}

} // namespace

StatusLine::StatusLine(QWidget* parent)
    : QWidget(parent), standard_(quiet(QStringLiteral("status.standard"))), busy_(quiet(QStringLiteral("status.busy"))),
      conditions_(quiet(QStringLiteral("status.conditions"))) {
    setObjectName(QStringLiteral("statusLine"));
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(space::card + space::half, space::half, space::card + space::half, space::half);
    row->setSpacing(space::card);
    standard_->setMinimumWidth(80);
    row->addWidget(standard_, 1);
    row->addWidget(busy_);
    row->addWidget(conditions_);
    busy_->setText(tr("computing\u2026"));
    busy_->hide();
}

void StatusLine::show(const Record& record, const Evaluation& evaluation) {
    const auto first = std::find_if(record.standards.begin(), record.standards.end(),
                                    [](const Standard& s) { return s.role == StandardRole::Reference; });
    QString text = tr("No reference standard yet");
    if (first != record.standards.end()) {
        QStringList name;
        for (const std::string* part : {&first->description, &first->id})
            if (!part->empty())
                name << QString::fromStdString(*part);
        text = tr("Reference: %1").arg(name.join(QLatin1Char(' ')));
        text += first->due.empty() ? tr(", no due date stated") : tr(", certificate due %1").arg(QString::fromStdString(first->due));
    }
    QStringList overdue;
    for (const Evaluation::OverdueStandard& o : evaluation.overdue)
        if (o.index < record.standards.size())
            overdue << tr("%1 was overdue by %n day(s)", nullptr, o.days).arg(QString::fromStdString(record.standards[o.index].id));
    if (!overdue.isEmpty())
        text += QStringLiteral(" · ") + overdue.join(QStringLiteral(", "));
    standard_->setForegroundRole(overdue.isEmpty() ? inkRole::quiet : inkRole::warning);
    standard_->setText(text);
    conditions_->setText(conditionsText(record.conditions));
}

void StatusLine::setBusy(bool busy) {
    busy_->setVisible(busy);
}

void StatusLine::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.fillRect(rect(), scheme().card);
    painter.setPen(scheme().line);
    painter.drawLine(0, 0, width(), 0);
}

} // namespace spanwright
