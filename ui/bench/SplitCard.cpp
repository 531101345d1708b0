// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/SplitCard.h"

#include "ui/look/LinkButton.h"
#include "ui/look/Look.h"
#include "ui/plot/SplitPicture.h"
#include "ui/words/Words.h"

#include <QHBoxLayout>
#include <QLabel>

namespace spanwright {

namespace {

constexpr std::size_t MostInWords = 100'000; ///< beyond, "n = 1234567" is all that the head has room for

/// What one warning says cannot be told, and why, in few words; empty for a warning about something else.
QString unknownFigure(const Warning& warning) {
    std::string figure, reason;
    for (const Fact& fact : warning.facts)
        (fact.name == "figure" ? figure : reason) = fact.value;
    const bool silent = reason == "not-stated";
    switch (warning.code) {
    case WarningCode::NoReplicates: return SplitCard::tr("lack of fit, repeatability (no set point read twice)");
    case WarningCode::OneDirection: return silent ? SplitCard::tr("hysteresis (directions not stated)") : SplitCard::tr("hysteresis (no set point from both directions)");
    case WarningCode::OneRun:
        return silent            ? SplitCard::tr("run to run (runs not stated)")
               : reason == "one" ? SplitCard::tr("run to run (one run)")
                                 : SplitCard::tr("run to run (no runs to compare)");
    case WarningCode::FigureUndefined:
        return figure == "lack_of_fit" ? SplitCard::tr("lack of fit (no more set points than coefficients)") : SplitCard::tr("repeatability (nothing read twice in one run)");
    default: return {};
    }
}

/// What the readings cannot tell; empty when they tell everything.
QString unknownText(const VarianceSplit& split) {
    QStringList parts;
    for (const Warning& warning : split.warnings)
        if (const QString part = unknownFigure(warning); !part.isEmpty())
            parts << part;
    return parts.isEmpty() ? QString() : SplitCard::tr("Not known: %1.").arg(parts.join(QStringLiteral("; ")));
}

QString whyNoSplit(const PhaseEvaluation* phase) {
    if (phase && phase->notFitted)
        return errorText(*phase->notFitted);
    if (phase && phase->fit && phase->fit->correlated)
        return SplitCard::tr("With covariances between readings there is no split: it is defined for readings whose errors are independent.");
    return SplitCard::tr("What the spread is made of appears here once a function is fitted.");
}

} // namespace

SplitCard::SplitCard(QWidget* parent) : Card(tr("Variance split"), parent), picture_(new SplitPicture), unknown_(new QLabel) {
    unknown_->setObjectName(QStringLiteral("splitUnknown"));
    unknown_->setFont(textFont(TextRole::Small));
    unknown_->setForegroundRole(inkRole::quiet);
    unknown_->setWordWrap(true);
    auto* table = new LinkButton(QStringLiteral("splitFigures"), tr("As a table"));
    auto* performance = new LinkButton(QStringLiteral("performanceFigures"), tr("Performance figures"));
    connect(table, &QToolButton::clicked, this, &SplitCard::tableRequested);
    connect(performance, &QToolButton::clicked, this, &SplitCard::performanceRequested);
    auto* links = new QHBoxLayout;
    links->setSpacing(space::card);
    links->addWidget(table);
    links->addWidget(performance);
    links->addStretch(1);
    body()->addWidget(picture_);
    body()->addWidget(unknown_);
    body()->addLayout(links);
}

void SplitCard::setSubject(const PlotSubject& subject, const QString& functionName) {
    const PhaseEvaluation* phase = subject.phase.get();
    picture_->setSplit(phase ? phase->split : std::nullopt, functionName, whyNoSplit(phase));
    const QString unknown = phase && phase->split ? unknownText(*phase->split) : QString();
    unknown_->setText(unknown);
    unknown_->setVisible(!unknown.isEmpty());
    const std::size_t used = phase && phase->fit ? phase->fit->used : 0;
    setNote(used == 0 ? QString() : used < MostInWords ? readingsText(used) : tr("n = %1").arg(used));
}

} // namespace spanwright
