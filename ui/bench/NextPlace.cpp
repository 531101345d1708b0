// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/NextPlace.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QToolButton>

namespace spanwright {

namespace {

constexpr int ToBaseline = 5, FigureMargin = -6; // px that bring words and figure onto one line of writing

QLabel* label(const QString& id, const QFont& font) {
    auto* made = new QLabel;
    made->setObjectName(id);
    made->setFont(font);
    made->setTextFormat(Qt::PlainText);
    return made;
}

QFont plainTitle() {
    QFont font = textFont(TextRole::Title);
    font.setWeight(QFont::Normal);
    return font;
}

} // namespace

NextPlace::NextPlace(QWidget* parent)
    : QWidget(parent), setPoint_(label(QStringLiteral("setPointFigure"), textFont(TextRole::Display))), unit_(label(QStringLiteral("setPointUnit"), plainTitle())),
      words_(label(QStringLiteral("placeWords"), plainTitle())), plan_(new QToolButton) {
    auto* all = new QHBoxLayout(this);
    all->setContentsMargins(0, 0, 0, 0);
    all->setSpacing(space::half);
    setPoint_->setContentsMargins(0, FigureMargin, 0, FigureMargin);
    unit_->setContentsMargins(0, 0, 0, ToBaseline);
    unit_->setForegroundRole(inkRole::quiet);
    words_->setWordWrap(true);
    plan_->setObjectName(QStringLiteral("makePlan"));
    plan_->setProperty("link", true);
    plan_->setText(tr("Plan the set points"));
    connect(plan_, &QToolButton::clicked, this, &NextPlace::planRequested);
    for (QWidget* part : std::initializer_list<QWidget*>{setPoint_, unit_, words_, plan_})
        all->addWidget(part, part == words_ ? 1 : 0, Qt::AlignBottom);
}

void NextPlace::showPlanned(const Reading& next, const QString& unit) {
    setPoint_->setText(typedText(*next.setPoint));
    unit_->setText(unit);
    QStringList words;
    if (next.direction != Direction::Unknown)
        words << directionText(next.direction);
    words << tr("run %1").arg(next.run);
    words_->setText(words.join(QStringLiteral(", ")));
    words_->setContentsMargins(space::step, 0, 0, ToBaseline);
    setPoint_->setAccessibleName(tr("Go to %1 %2, %3").arg(setPoint_->text(), unit, words_->text()));
    setPoint_->show();
    unit_->show();
    plan_->hide();
}

void NextPlace::showDone() {
    showWords(tr("All planned readings are taken. Further ones may be typed here."));
    plan_->hide();
}

void NextPlace::showUnplanned() {
    showWords(tr("No set points are planned."));
    plan_->show();
}

void NextPlace::showWords(const QString& words) {
    words_->setText(words);
    words_->setContentsMargins(0, 0, 0, ToBaseline);
    setPoint_->setAccessibleName(words);
    setPoint_->hide();
    unit_->hide();
}

} // namespace spanwright
