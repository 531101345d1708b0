// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/SuspectsDialog.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"

#include <QComboBox>
#include <QGridLayout>
#include <QLabel>
#include <QPushButton>
#include <QScrollArea>
#include <QVBoxLayout>

namespace spanwright {

namespace {

constexpr int Widest = 620, RowHeight = 36, MostRowsShown = 8;

QLabel* plainLabel(const QString& text, TextRole role) {
    auto* label = new QLabel(text);
    label->setTextFormat(Qt::PlainText);
    label->setWordWrap(true);
    label->setFont(textFont(role));
    return label;
}

} // namespace

SuspectsDialog::SuspectsDialog(std::vector<Suspect> suspects, const QStringList& names, QWidget* parent) : SheetDialog(QStringLiteral("suspectsDialog"), tr("Look at these numbers again"), parent), suspects_(std::move(suspects)) {
    setMinimumWidth(Widest);
    const auto count = static_cast<int>(suspects_.size());
    body()->addWidget(plainLabel(tr("%n number(s) may be [a slip of the hand|slips of the hand].", nullptr, count), TextRole::Heading));
    auto* sheet = new QWidget;
    auto* grid = new QGridLayout(sheet);
    grid->setContentsMargins(0, 0, 0, 0);
    grid->setHorizontalSpacing(space::card);
    grid->setColumnStretch(1, 1);
    for (int i = 0; i < count; ++i) {
        const Suspect& suspect = suspects_[static_cast<std::size_t>(i)];
        auto* choice = new QComboBox;
        choice->setObjectName(QStringLiteral("suspectAnswer.%1").arg(i));
        choice->setAccessibleName(tr("%1: what is recorded").arg(names.value(i)));
        choice->addItem(tr("%1, as typed").arg(typedText(suspect.typed)));
        if (suspect.suggestion)
            choice->addItem(tr("%1 instead").arg(typedText(*suspect.suggestion)));
        choice->setEnabled(suspect.suggestion.has_value());
        choices_.push_back(choice);
        grid->addWidget(plainLabel(names.value(i), TextRole::Small), i, 0);
        grid->addWidget(plainLabel(suspect.sentence, TextRole::Body), i, 1);
        grid->addWidget(choice, i, 2);
    }
    auto* scroll = new QScrollArea;
    scroll->setFrameShape(QFrame::NoFrame);
    scroll->setWidgetResizable(true);
    scroll->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    scroll->setWidget(sheet);
    scroll->setMinimumHeight(RowHeight * std::min(count, MostRowsShown) + space::step);
    body()->addWidget(scroll, 1);
    auto* hint = plainLabel(tr("Look at the instrument where you can. Nothing is replaced unless you choose it, and the journal keeps what you answered."), TextRole::Small);
    hint->setForegroundRole(inkRole::quiet);
    body()->addWidget(hint);
    QPushButton* yes = addButton(tr("&Record"), QDialogButtonBox::AcceptRole, QStringLiteral("suspectsRecord"));
    yes->setDefault(true);
    addButton(tr("Go &back"), QDialogButtonBox::RejectRole, QStringLiteral("suspectsBack"));
    yes->setFocus();
}

std::vector<Suspect> SuspectsDialog::answers() const {
    std::vector<Suspect> answered = suspects_;
    for (std::size_t i = 0; i < answered.size(); ++i)
        answered[i].useSuggestion = choices_[i]->currentIndex() == 1;
    return answered;
}

} // namespace spanwright
