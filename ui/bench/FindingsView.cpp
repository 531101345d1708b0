// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/FindingsView.h"

#include "ui/bench/Dismissals.h"
#include "ui/look/LinkButton.h"
#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QFrame>
#include <QGridLayout>
#include <QLabel>
#include <QPainter>
#include <QToolButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// The severity as a shape before the sentence: a filled square, a hollow one, a dot.
class SeverityMark : public QWidget {
  public:
    explicit SeverityMark(Severity severity) : severity_(severity) { setFixedSize(12, QFontMetrics(textFont(TextRole::Small)).height()); }

  protected:
    void paintEvent(QPaintEvent*) override {
        QPainter painter(this);
        painter.setRenderHint(QPainter::Antialiasing);
        const QColor colour = severity_ == Severity::Note ? scheme().quiet : scheme().warning;
        const QPointF middle(4.5, height() / 2.0);
        painter.setPen(QPen(colour, 1.4));
        painter.setBrush(severity_ == Severity::Attention ? QBrush(Qt::NoBrush) : QBrush(colour));
        if (severity_ == Severity::Note)
            painter.drawEllipse(middle, 1.5, 1.5);
        else
            painter.drawRect(QRectF(middle - QPointF(3, 3), QSizeF(6, 6)));
    }

  private:
    Severity severity_;
};

QLabel* wrapped(const QString& text, QFont::Weight weight) {
    auto* made = new QLabel(text);
    made->setTextFormat(Qt::PlainText);
    made->setWordWrap(true);
    QFont font = textFont(TextRole::Small);
    font.setWeight(weight);
    made->setFont(font);
    made->setTextInteractionFlags(Qt::TextSelectableByMouse);
    return made;
}

} // namespace

FindingsView::FindingsView(QWidget* parent) : QScrollArea(parent) {
    setObjectName(QStringLiteral("findings"));
    setAccessibleName(tr("Findings"));
    setFrameShape(QFrame::NoFrame);
    setWidgetResizable(true);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setFocusPolicy(Qt::NoFocus);
    auto* inside = new QWidget;
    list_ = new QVBoxLayout(inside);
    list_->setContentsMargins(0, 0, space::half, 0);
    list_->setSpacing(3);
    setWidget(inside);
    viewport()->setAutoFillBackground(false);
    inside->setAutoFillBackground(false);
}

void FindingsView::setFindings(std::vector<Finding> findings, const Record& record, const QString& whenNone) {
    while (QLayoutItem* item = list_->takeAt(0)) {
        if (item->widget()) {
            item->widget()->hide(); // it may stay for a while: a dialog that is open holds deletion back
            item->widget()->deleteLater();
        }
        delete item;
    }
    findings_ = std::move(findings);
    bool any = false;
    for (const Finding& finding : findings_)
        if (!dismissalOf(finding, record)) {
            add(finding, record);
            any = true;
        }
    if (!any) {
        QLabel* none = wrapped(whenNone, QFont::Normal);
        none->setForegroundRole(inkRole::quiet);
        list_->addWidget(none);
    }
    for (const Finding& finding : findings_)
        if (const Dismissal* dismissal = dismissalOf(finding, record))
            addDismissed(finding, *dismissal, record);
    list_->addStretch(1);
}

QToolButton* FindingsView::link(QHBoxLayout* into, const QString& text, const QString& name, const QString& about) {
    auto* button = new LinkButton(name, text);
    button->setAccessibleName(text + QStringLiteral(": ") + about);
    into->addWidget(button);
    return button;
}

void FindingsView::addDismissed(const Finding& finding, const Dismissal& dismissal, const Record& record) {
    const FindingWords words = findingWords(finding, record);
    QLabel* line = wrapped(tr("Dismissed: %1").arg(words.sentence), QFont::Normal);
    QLabel* why = wrapped(tr("%1 %2: %3").arg(QString::fromStdString(dismissal.by), QString::fromStdString(dismissal.date), QString::fromStdString(dismissal.reason)).trimmed(), QFont::Normal);
    for (QLabel* label : {line, why}) {
        label->setForegroundRole(inkRole::quiet);
        list_->addWidget(label);
    }
    auto* actions = new QHBoxLayout;
    connect(link(actions, tr("Bring back"), QStringLiteral("recall"), words.sentence), &QToolButton::clicked, this, [this, finding] { emit recallChosen(finding); });
    actions->addStretch(1);
    auto* row = new QWidget;
    row->setLayout(actions);
    actions->setContentsMargins(0, 0, 0, space::half);
    list_->addWidget(row);
}

void FindingsView::add(const Finding& finding, const Record& record) {
    const FindingWords words = findingWords(finding, record);
    auto* entry = new QWidget;
    auto* lines = new QGridLayout(entry);
    lines->setContentsMargins(0, 0, 0, 0);
    lines->setHorizontalSpacing(0);
    lines->setVerticalSpacing(1);
    lines->setColumnStretch(1, 1);
    lines->addWidget(new SeverityMark(finding.severity), 0, 0, Qt::AlignTop);
    lines->addWidget(wrapped(words.sentence, QFont::DemiBold), 0, 1);
    if (!words.figures.isEmpty()) {
        QLabel* figures = wrapped(words.figures, QFont::Normal);
        figures->setForegroundRole(inkRole::quiet);
        lines->addWidget(figures, 1, 1);
    }
    // The remedy has a line of its own: its words may be as wide as the card.
    const auto row = [&](int at) {
        auto* actions = new QHBoxLayout;
        actions->setSpacing(space::card);
        lines->addLayout(actions, at, 1);
        return actions;
    };
    if (!words.remedy.isEmpty()) {
        QHBoxLayout* first = row(2);
        connect(link(first, words.remedy, QStringLiteral("remedy"), words.sentence), &QToolButton::clicked, this, [this, finding] { emit remedyChosen(finding); });
        first->addStretch(1);
    }
    QHBoxLayout* second = row(3);
    if (!finding.rows.empty() && finding.remedy != Remedy::SeeReadings)
        connect(link(second, tr("Show"), QStringLiteral("showReadings"), words.sentence), &QToolButton::clicked, this, [this, finding] { emit readingsChosen(finding.rows); });
    connect(link(second, tr("Dismiss"), QStringLiteral("dismiss"), words.sentence), &QToolButton::clicked, this, [this, finding] { emit dismissChosen(finding); });
    second->addStretch(1);
    list_->addWidget(entry);
    auto* rule = new QFrame;
    rule->setFixedHeight(1);
    rule->setAutoFillBackground(true);
    rule->setBackgroundRole(QPalette::Mid);
    list_->addWidget(rule);
    list_->addSpacing(3);
}

} // namespace spanwright
