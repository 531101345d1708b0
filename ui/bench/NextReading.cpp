// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/NextReading.h"

#include "ui/bench/NextPlace.h"
#include "ui/bench/NumberEdit.h"
#include "ui/bench/PhaseChoice.h"
#include "ui/bench/PlanRows.h"
#include "ui/bench/Suspects.h"
#include "ui/bench/TypedAnswer.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QHBoxLayout>
#include <QKeyEvent>
#include <QLabel>
#include <QPainter>
#include <QTimer>
#include <QVBoxLayout>


namespace spanwright {

namespace {

QLabel* label(TextRole role, const QString& name) {
    auto* made = new QLabel;
    made->setObjectName(name);
    made->setFont(textFont(role));
    made->setTextFormat(Qt::PlainText);
    return made;
}

} // namespace

NextReading::NextReading(Workbench& workbench, QWidget* parent) : QFrame(parent), workbench_(workbench), clock_(new QTimer(this)) {
    setObjectName(QStringLiteral("nextReading"));
    setAccessibleName(tr("Next reading"));
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::step + 2, space::card, space::card - 2);
    all->setSpacing(space::half + 1);
    buildHead(all);
    buildFields(all);
    connect(&workbench_, &Workbench::recordChanged, this, &NextReading::refresh);
    connect(&workbench_, &Workbench::evaluationChanged, this, &NextReading::showExpected);
    clock_->setInterval(1000);
    connect(clock_, &QTimer::timeout, this, &NextReading::showDwell);
    refresh();
}

void NextReading::buildHead(QVBoxLayout* all) {
    auto* head = new QHBoxLayout;
    QLabel* title = label(TextRole::Heading, QStringLiteral("nextTitle"));
    title->setText(tr("Next reading"));
    counter_ = label(TextRole::Small, QStringLiteral("takenCounter"));
    counter_->setForegroundRole(inkRole::quiet);
    head->addWidget(title);
    head->addWidget(new PhaseChoice(workbench_));
    head->addStretch(1);
    head->addWidget(counter_);
    all->addLayout(head);

    place_ = new NextPlace;
    connect(place_, &NextPlace::planRequested, this, &NextReading::planRequested);
    all->addWidget(place_);
}

void NextReading::buildFields(QVBoxLayout* all) {
    auto* fields = new QHBoxLayout;
    fields->setSpacing(space::step);
    const auto field = [&](const QString& name, const QString& words) {
        auto* edit = new NumberEdit;
        QFont large = textFont(TextRole::Title);
        large.setPointSizeF(13);
        large.setWeight(QFont::Normal);
        edit->setFont(large);
        edit->setMinimumHeight(36);
        edit->setObjectName(name);
        edit->setAccessibleName(words);
        edit->installEventFilter(this);
        connect(edit, &QLineEdit::textEdited, this, &NextReading::judgeTyping);
        fields->addWidget(edit, 1);
        return edit;
    };
    reference_ = field(QStringLiteral("referenceField"), tr("Reference"));
    indication_ = field(QStringLiteral("indicationField"), tr("Indication"));
    reference_->setPlaceholderText(tr("reference"));
    indication_->setPlaceholderText(tr("indication"));
    all->addLayout(fields);

    auto* foot = new QHBoxLayout;
    expected_ = label(TextRole::Small, QStringLiteral("expectedWords"));
    expected_->setForegroundRole(inkRole::quiet);
    dwell_ = label(TextRole::Small, QStringLiteral("dwellWords"));
    dwell_->setForegroundRole(inkRole::quiet);
    foot->addWidget(expected_, 1);
    foot->addWidget(dwell_);
    all->addLayout(foot);
    answer_ = new TypedAnswer;
    connect(answer_, &TypedAnswer::kept, this, &NextReading::recordTyped);
    connect(answer_, &TypedAnswer::suggestionChosen, this,
            [this](const Decimal& suggestion) { record(suggestion, tr("taken instead of %1 when asked").arg(indication_->text().trimmed())); });
    all->addWidget(answer_);
}

void NextReading::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setPen(QPen(scheme().line, 1));
    painter.setBrush(scheme().card);
    painter.drawRoundedRect(QRectF(rect()).adjusted(0.5, 0.5, -0.5, -0.5), 5, 5);
}

const PhaseEvaluation* NextReading::figures() const {
    return workbench_.evaluation()->phase(workbench_.record().choices.phase);
}

bool NextReading::referenceTyped() const {
    return workbench_.record().plan.referenceTyped || !planned_;
}

void NextReading::refresh() {
    const Record& record = workbench_.record();
    const Phase phase = record.choices.phase;
    const Reading before = next_;
    const auto next = record.readings->size() > 5000 ? std::nullopt : nextPlanned(record.plan, *record.readings, phase);
    planned_ = next.has_value();
    next_ = next ? readingFor(*next, record.plan) : Reading{};
    next_.phase = phase;
    // A reading that was begun in the table at this place is completed, not doubled.
    const ReadingColumns& readings = *record.readings;
    for (std::size_t i = readings.size() > 5000 ? readings.size() : 0; planned_ && i < readings.size(); ++i)
        if (!readings.complete(i) && readings.phases()[i] == phase && (readings.runs()[i] == next_.run || readings.runs()[i] == 0) &&
            (readings.directions()[i] == next_.direction || readings.directions()[i] == Direction::Unknown) &&
            readings.setPoint().at(i) == next_.setPoint)
            next_ = readings.row(i);
    const Taken taken = takenOf(record, phase);
    counter_->setText(taken.planned > 0 ? tr("%1 of %2 taken").arg(taken.atPlan).arg(taken.planned) : readingsText(taken.all));
    reference_->setUnit(QString::fromStdString(record.item.reference.unit));
    indication_->setUnit(QString::fromStdString(record.item.indication.unit));
    reference_->setVisible(referenceTyped());
    const bool moved = before.setPoint != next_.setPoint || before.run != next_.run || before.direction != next_.direction || before.phase != next_.phase;
    if (moved && !reference_->isModified())
        reference_->setText({});
    if (next_.reference && referenceTyped() && !reference_->isModified())
        reference_->setText(typedText(*next_.reference));
    for (QWidget* widget : std::initializer_list<QWidget*>{reference_, indication_})
        widget->setEnabled(!workbench_.readOnly());
    answer_->keepRoom(planned_); // a line kept free would be an empty strip once the plan is done
    showPlace();
    showExpected();
    showDwell();
}

void NextReading::showPlace() {
    const Record& record = workbench_.record();
    if (planned_)
        place_->showPlanned(next_, QString::fromStdString(record.item.reference.unit));
    else if (takenOf(record, record.choices.phase).planned > 0)
        place_->showDone();
    else
        place_->showUnplanned();
}

std::optional<double> NextReading::reference() const {
    if (referenceTyped()) {
        const Result<Decimal> typed = reference_->number();
        if (typed)
            return typed->toDouble();
    } else if (next_.reference) {
        return next_.reference->toDouble();
    }
    return next_.setPoint ? std::optional(next_.setPoint->toDouble()) : std::nullopt;
}

void NextReading::showExpected() {
    const Record& record = workbench_.record();
    const auto at = reference();
    const auto expected = at ? expectedAt(*at, figures(), record.item) : std::nullopt;
    if (!expected) {
        expected_->setText(QString());
    } else {
        const int decimals = indicationDecimals(record);
        const QString low = fixedText(expected->low, decimals), high = fixedText(expected->high, decimals);
        const QString unit = QString::fromStdString(record.item.indication.unit);
        expected_->setText(expected->from == Expected::From::Readings ? tr("expected %1 to %2 %3").arg(low, high, unit)
                                                                     : tr("a perfect item reads %1 %2").arg(fixedText((expected->low + expected->high) / 2, decimals), unit));
    }
    expected_->setVisible(planned_ || expected);
    judgeTyping();
}

/// How long there is still to wait since the reading before; the clock runs only while there is something to wait for.
void NextReading::showDwell() {
    const Record& record = workbench_.record();
    const auto& times = record.readings->enteredAt();
    const std::int64_t last = times.empty() ? 0 : times.back();
    const std::int64_t left = last == 0 || record.plan.dwellSeconds == 0 ? 0 : record.plan.dwellSeconds - (workbench_.now() - last) / 1000;
    const bool waiting = planned_ && left > 0 && left <= record.plan.dwellSeconds;
    dwell_->setVisible(planned_);
    dwell_->setText(waiting ? tr("settles for another %1:%2").arg(left / 60).arg(left % 60, 2, 10, QLatin1Char('0')) : QString());
    waiting ? clock_->start() : clock_->stop();
}

void NextReading::judgeTyping() {
    answer_->settle();
    const Result<Decimal> typed = indication_->number();
    const auto at = reference();
    if (typed && at) {
        say(checkIndication(*typed, *at, figures(), workbench_.record().item));
    } else if (const Result<Decimal> ref = reference_->number(); referenceTyped() && ref && reference_->isModified()) {
        say(checkReference(*ref, next_.setPoint, workbench_.record().item));
    } else if (indication_->text().isEmpty()) {
        answer_->say({});
    }
}

void NextReading::say(const TypedCheck& check) {
    answer_->say(check.sentence, check.doubtful ? TypedAnswer::Tone::Doubtful : TypedAnswer::Tone::Fine);
}

/// What cannot be recorded is marked where it stands, with the reason under it.
void NextReading::refuse(NumberEdit& field) {
    field.setRefused(true);
    answer_->say(errorText(field.number().error()), TypedAnswer::Tone::Doubtful);
}

bool NextReading::eventFilter(QObject* object, QEvent* event) {
    if (event->type() == QEvent::KeyPress) {
        const int key = static_cast<QKeyEvent*>(event)->key();
        if (key == Qt::Key_Return || key == Qt::Key_Enter) {
            object == reference_ ? acceptReference() : acceptIndication();
            return true;
        }
        if (key == Qt::Key_Escape) {
            static_cast<NumberEdit*>(object)->setText({});
            judgeTyping();
            return true;
        }
    }
    return QFrame::eventFilter(object, event);
}

void NextReading::acceptReference() {
    const Result<Decimal> number = reference_->number();
    if (!number) {
        refuse(*reference_);
        return;
    }
    showExpected();
    indication_->setFocus();
    indication_->selectAll();
}

/// Enter once more keeps what was typed where nothing else was suggested.
void NextReading::acceptIndication() {
    const bool sure = !answer_->question().isEmpty() && !answer_->suggests();
    if (complete() && (sure || !asked()))
        recordTyped();
}

bool NextReading::complete() {
    if (!indication_->number()) {
        refuse(*indication_);
        return false;
    }
    if (referenceTyped() && !reference_->number()) {
        refuse(*reference_);
        reference_->setFocus();
        return false;
    }
    return true;
}

void NextReading::recordTyped() {
    const QString question = answer_->question();
    if (complete())
        record(*indication_->number(), question.isEmpty() ? QString() : tr("kept as typed when asked: %1").arg(question));
}

/// Asks about a number that a slip of the hand could have made, or that lies outside what is expected.
bool NextReading::asked() {
    const Decimal indication = *indication_->number();
    Reading typed = next_;
    if (referenceTyped())
        typed.reference = *reference_->number();
    typed.indication = indication;
    const Record& record = workbench_.record();
    const std::vector<Suspect> suspects = suspectsAmong(record, figures(), {typed}, {NumberColumn::Reference, NumberColumn::Indication});
    if (!suspects.empty()) {
        const Suspect& first = suspects.front();
        const bool reference = first.column == NumberColumn::Reference;
        answer_->ask(first.sentence, (reference ? reference_ : indication_)->text().trimmed(), reference ? std::nullopt : first.suggestion);
        return true;
    }
    const TypedCheck check = checkIndication(indication, *reference(), figures(), record.item);
    if (check.doubtful)
        answer_->ask(tr("%1: %2.").arg(indication_->text().trimmed(), check.sentence), indication_->text().trimmed(), std::nullopt);
    return check.doubtful;
}

void NextReading::record(const Decimal& indication, const QString& answer) {
    Reading reading = next_;
    if (referenceTyped()) {
        const Result<Decimal> typed = reference_->number();
        if (!typed)
            return;
        reading.reference = *typed;
    }
    reading.indication = indication;
    answer_->settle();
    answer_->say({});
    reference_->setText({});
    indication_->setText({});
    const QString step = reading.id == 0 ? tr("enter a reading") : tr("complete a reading");
    workbench_.perform(std::make_unique<PutReadings>(step, std::vector<Reading>{reading}, answer.toStdString()));
    startTyping();
    emit entered();
}

void NextReading::startTyping() {
    const bool first = referenceTyped() && reference_->text().isEmpty();
    (first ? reference_ : indication_)->setFocus();
}

} // namespace spanwright
