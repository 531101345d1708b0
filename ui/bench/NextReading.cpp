// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/NextReading.h"

#include "ui/bench/ChoiceMenus.h"
#include "ui/bench/NumberEdit.h"
#include "ui/bench/PlanRows.h"
#include "ui/bench/Suspects.h"
#include "ui/commands/PartCommand.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/Words.h"

#include <QHBoxLayout>
#include <QKeyEvent>
#include <QLabel>
#include <QMenu>
#include <QMessageBox>
#include <QPainter>
#include <QPushButton>
#include <QTimer>
#include <QToolButton>
#include <QVBoxLayout>

#include <algorithm>
#include <cmath>

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
    phase_ = new ChoiceButton(QStringLiteral("phaseChoice"), tr("Phase"));
    for (const Phase phase : bothPhases)
        phase_->menu()->addAction(sentenceCase(phaseText(phase)), this, [this, phase] { askPhase(phase); });
    counter_ = label(TextRole::Small, QStringLiteral("takenCounter"));
    counter_->setForegroundRole(inkRole::quiet);
    head->addWidget(title);
    head->addWidget(phase_);
    head->addStretch(1);
    head->addWidget(counter_);
    all->addLayout(head);

    auto* figure = new QHBoxLayout;
    figure->setSpacing(space::half);
    setPoint_ = label(TextRole::Display, QStringLiteral("setPointFigure"));
    unit_ = label(TextRole::Title, QStringLiteral("setPointUnit"));
    unit_->setForegroundRole(inkRole::quiet);
    place_ = label(TextRole::Title, QStringLiteral("placeWords"));
    QFont plain = textFont(TextRole::Title);
    plain.setWeight(QFont::Normal);
    place_->setFont(plain);
    unit_->setFont(plain);
    place_->setWordWrap(true);
    plan_ = new QToolButton;
    plan_->setObjectName(QStringLiteral("makePlan"));
    plan_->setProperty("link", true);
    plan_->setText(tr("Plan the set points"));
    connect(plan_, &QToolButton::clicked, this, &NextReading::planRequested);
    setPoint_->setContentsMargins(0, -6, 0, -6);
    unit_->setContentsMargins(0, 0, 0, 5);
    place_->setContentsMargins(space::step, 0, 0, 5);
    figure->addWidget(setPoint_, 0, Qt::AlignBottom);
    figure->addWidget(unit_, 0, Qt::AlignBottom);
    figure->addWidget(place_, 1, Qt::AlignBottom);
    figure->addWidget(plan_, 0, Qt::AlignBottom);
    all->addLayout(figure);
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
    sentence_ = label(TextRole::Small, QStringLiteral("typedWords"));
    sentence_->setWordWrap(true);
    QFont strong = textFont(TextRole::Small);
    strong.setWeight(QFont::DemiBold);
    sentence_->setFont(strong);
    sentence_->setMinimumHeight(QFontMetrics(strong).height());
    all->addWidget(sentence_);
    auto* answers = new QHBoxLayout;
    use_ = new QPushButton;
    use_->setObjectName(QStringLiteral("useSuggestion"));
    keep_ = new QPushButton;
    keep_->setObjectName(QStringLiteral("keepTyped"));
    connect(use_, &QPushButton::clicked, this, [this] {
        if (suggestion_)
            record(*suggestion_, tr("taken instead of %1 when asked").arg(indication_->text().trimmed()));
    });
    connect(keep_, &QPushButton::clicked, this, [this] { acceptIndication(true); });
    for (QPushButton* answer : {use_, keep_})
        answer->setAutoDefault(true); // Enter answers once the button is reached; Enter in the field only asks again
    answers->addWidget(use_);
    answers->addWidget(keep_);
    answers->addStretch(1);
    all->addLayout(answers);
    use_->hide();
    keep_->hide();
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
        if (!readings.complete(i) && readings.phases()[i] == phase && readings.runs()[i] == next_.run && readings.directions()[i] == next_.direction &&
            readings.setPoint().at(i) == next_.setPoint)
            next_ = readings.row(i);
    phase_->setChoice(sentenceCase(phaseText(phase)));
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
    showPlace();
    showExpected();
    showDwell();
}

void NextReading::showPlace() {
    const Record& record = workbench_.record();
    const Taken taken = takenOf(record, record.choices.phase);
    const bool done = !planned_ && taken.planned > 0;
    plan_->setVisible(!planned_ && taken.planned == 0);
    setPoint_->setVisible(planned_);
    unit_->setVisible(planned_);
    place_->setContentsMargins(planned_ ? space::step : 0, 0, 0, 5);
    if (planned_) {
        setPoint_->setText(typedText(*next_.setPoint));
        unit_->setText(QString::fromStdString(record.item.reference.unit));
        QStringList words;
        if (next_.direction != Direction::Unknown)
            words << directionText(next_.direction);
        words << tr("run %1").arg(next_.run);
        place_->setText(words.join(QStringLiteral(", ")));
    } else {
        place_->setText(done ? tr("All planned readings are taken. Further ones may be typed here.") : tr("No set points are planned."));
    }
    setPoint_->setAccessibleName(planned_ ? tr("Go to %1 %2, %3").arg(setPoint_->text(), unit_->text(), place_->text()) : place_->text());
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
    dwell_->setVisible(planned_); // a line kept free would be an empty strip once the plan is done
    dwell_->setText(waiting ? tr("settles for another %1:%2").arg(left / 60).arg(left % 60, 2, 10, QLatin1Char('0')) : QString());
    waiting ? clock_->start() : clock_->stop();
}

void NextReading::tell(const QString& sentence, bool warning) {
    sentence_->setText(sentence);
    sentence_->setVisible(planned_ || !sentence.isEmpty());
    sentence_->setForegroundRole(warning ? inkRole::warning : inkRole::accent);
}

void NextReading::settle() {
    asking_ = false;
    question_.clear();
    suggestion_.reset();
    use_->hide();
    keep_->hide();
}

void NextReading::judgeTyping() {
    settle();
    const Result<Decimal> typed = indication_->number();
    const auto at = reference();
    if (typed && at) {
        const TypedCheck check = checkIndication(*typed, *at, figures(), workbench_.record().item);
        tell(check.sentence, check.doubtful);
    } else if (const Result<Decimal> ref = reference_->number(); referenceTyped() && ref && reference_->isModified()) {
        const TypedCheck check = checkReference(*ref, next_.setPoint, workbench_.record().item);
        tell(check.sentence, check.doubtful);
    } else if (indication_->text().isEmpty()) {
        tell({}, false);
    }
}

bool NextReading::eventFilter(QObject* object, QEvent* event) {
    if (event->type() == QEvent::KeyPress) {
        const int key = static_cast<QKeyEvent*>(event)->key();
        if (key == Qt::Key_Return || key == Qt::Key_Enter) {
            object == reference_ ? acceptReference() : acceptIndication(asking_ && !suggestion_);
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
        reference_->setRefused(true);
        tell(errorText(number.error()), true);
        return;
    }
    showExpected();
    indication_->setFocus();
    indication_->selectAll();
}

void NextReading::acceptIndication(bool sure) {
    const Result<Decimal> number = indication_->number();
    if (!number) {
        indication_->setRefused(true);
        tell(errorText(number.error()), true);
        return;
    }
    if (referenceTyped() && !reference_->number()) {
        reference_->setRefused(true);
        tell(errorText(reference_->number().error()), true);
        reference_->setFocus();
        return;
    }
    if (!sure && asked(*number))
        return;
    record(*number, question_.isEmpty() ? QString() : tr("kept as typed when asked: %1").arg(question_));
}

/// Asks about a number that a slip of the hand could have made, or that lies outside what is expected.
bool NextReading::asked(const Decimal& indication) {
    Reading typed = next_;
    if (referenceTyped())
        typed.reference = *reference_->number();
    typed.indication = indication;
    const Record& record = workbench_.record();
    const std::vector<Suspect> suspects = suspectsAmong(record, figures(), {typed}, {NumberColumn::Reference, NumberColumn::Indication});
    if (!suspects.empty()) {
        const Suspect& first = suspects.front();
        ask(first.sentence, first.column == NumberColumn::Indication ? first.suggestion : std::nullopt, first.column);
        return true;
    }
    const TypedCheck check = checkIndication(indication, *reference(), figures(), record.item);
    if (check.doubtful)
        ask(tr("%1: %2.").arg(indication_->text().trimmed(), check.sentence), std::nullopt, NumberColumn::Indication);
    return check.doubtful;
}

/// Nothing is recorded until one of the answers is chosen; Enter once more keeps what was typed where there is no suggestion.
void NextReading::ask(const QString& sentence, const std::optional<Decimal>& suggestion, NumberColumn column) {
    asking_ = true;
    question_ = sentence;
    suggestion_ = suggestion;
    tell(suggestion ? sentence : tr("%1 Read again, or press Enter once more to record it.").arg(sentence), true);
    keep_->setText(tr("&Keep %1").arg((column == NumberColumn::Reference ? reference_ : indication_)->text().trimmed()));
    keep_->show();
    use_->setVisible(suggestion.has_value());
    if (suggestion)
        use_->setText(tr("&Use %1").arg(typedText(*suggestion)));
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
    settle();
    reference_->setText({});
    indication_->setText({});
    tell({}, false);
    const QString step = reading.id == 0 ? tr("enter a reading") : tr("complete a reading");
    workbench_.perform(std::make_unique<PutReadings>(step, std::vector<Reading>{reading}, answer.toStdString()));
    startTyping();
    emit entered();
}

void NextReading::startTyping() {
    const bool first = referenceTyped() && reference_->text().isEmpty();
    (first ? reference_ : indication_)->setFocus();
}

/// Going on to the readings after adjustment while those before it are incomplete would lose the evidence of how the item was found.
void NextReading::askPhase(Phase phase) {
    const Record& record = workbench_.record();
    const Taken found = takenOf(record, Phase::AsFound);
    const bool untouched = takenOf(record, Phase::AsLeft).all == 0;
    if (phase != Phase::AsLeft || !untouched || found.atPlan >= found.planned || record.choices.phase == phase) {
        choosePhase(phase);
        return;
    }
    auto* box = new QMessageBox(QMessageBox::NoIcon, tr("Readings as found are not complete"),
                                tr("%1 of %2 planned readings are taken as found. After an adjustment they cannot be taken any more.").arg(found.atPlan).arg(found.planned),
                                QMessageBox::NoButton, this);
    box->setObjectName(QStringLiteral("phaseGuard"));
    box->setAttribute(Qt::WA_DeleteOnClose);
    box->setDefaultButton(box->addButton(tr("Stay as found"), QMessageBox::RejectRole));
    connect(box->addButton(tr("Go on as left"), QMessageBox::AcceptRole), &QPushButton::clicked, this, [this, phase] { choosePhase(phase); });
    box->open();
}

void NextReading::choosePhase(Phase phase) {
    workbench_.perform(changePart(workbench_.record(), &Record::choices, tr("show readings %1").arg(phaseText(phase)), [&](Choices& choices) { choices.phase = phase; }));
}

} // namespace spanwright
