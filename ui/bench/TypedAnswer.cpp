// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/TypedAnswer.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

TypedAnswer::TypedAnswer(QWidget* parent) : QWidget(parent), sentence_(new QLabel), use_(new QPushButton), keep_(new QPushButton) {
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(0, 0, 0, 0);
    all->setSpacing(space::half + 1);
    QFont strong = textFont(TextRole::Small);
    strong.setWeight(QFont::DemiBold);
    sentence_->setObjectName(QStringLiteral("typedWords"));
    sentence_->setTextFormat(Qt::PlainText);
    sentence_->setFont(strong);
    sentence_->setWordWrap(true);
    sentence_->setMinimumHeight(QFontMetrics(strong).height());
    all->addWidget(sentence_);
    auto* answers = new QHBoxLayout;
    use_->setObjectName(QStringLiteral("useSuggestion"));
    keep_->setObjectName(QStringLiteral("keepTyped"));
    for (QPushButton* answer : {use_, keep_}) {
        answer->setAutoDefault(true); // Enter answers once the button is reached; Enter in the field only asks again
        answers->addWidget(answer);
    }
    answers->addStretch(1);
    all->addLayout(answers);
    connect(use_, &QPushButton::clicked, this, [this] {
        if (suggestion_)
            emit suggestionChosen(Decimal(*suggestion_)); // a copy: recording takes the question back
    });
    connect(keep_, &QPushButton::clicked, this, &TypedAnswer::kept);
    settle();
    showLine();
}

void TypedAnswer::say(const QString& sentence, Tone tone) {
    sentence_->setText(sentence);
    sentence_->setForegroundRole(tone == Tone::Doubtful ? inkRole::warning : inkRole::accent);
    showLine();
}

void TypedAnswer::ask(const QString& question, const QString& typed, const std::optional<Decimal>& suggestion) {
    question_ = question;
    suggestion_ = suggestion;
    say(suggestion ? question : tr("%1 Read again, or press Enter once more to record it.").arg(question), Tone::Doubtful);
    keep_->setText(tr("&Keep %1").arg(typed));
    keep_->show();
    use_->setVisible(suggestion.has_value());
    if (suggestion)
        use_->setText(tr("&Use %1").arg(typedText(*suggestion)));
}

void TypedAnswer::settle() {
    question_.clear();
    suggestion_.reset();
    use_->hide();
    keep_->hide();
}

void TypedAnswer::keepRoom(bool kept) {
    roomKept_ = kept;
    showLine();
}

void TypedAnswer::showLine() {
    sentence_->setVisible(roomKept_ || !sentence_->text().isEmpty());
    setVisible(sentence_->isVisibleTo(this));
}

} // namespace spanwright
