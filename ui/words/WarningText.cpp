// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/Sentence.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

/// No default in the switch: a new code without a sentence does not compile.
struct WarningText {
    Q_DECLARE_TR_FUNCTIONS(WarningText)

  public:
    static QString of(WarningCode code, Sentence& facts);
    /// Why a figure does not exist, from the reason's code; a code that is not in the list stands as words.
    static QString reason(Sentence& facts);
    static QString figure(Sentence& facts);
};

QString WarningText::figure(Sentence& facts) {
    const QString name = facts.plain("figure", tr("A figure"));
    if (name == QLatin1String("error"))
        return tr("Error of indication");
    return name == QLatin1String("repeatability") ? tr("Repeatability") : name;
}

QString WarningText::reason(Sentence& facts) {
    static const struct {
        const char* code;
        const char* words;
    } known[] = {
        {"no-output-range", QT_TR_NOOP("the item's output range is not stated")},
        {"no-replicates", QT_TR_NOOP("no set point was read more than once in the same direction")},
        {"no-replicates-everywhere", QT_TR_NOOP("not every set point was read more than once")},
        {"no-degrees-of-freedom", QT_TR_NOOP("no degrees of freedom are left")},
        {"no-spread", QT_TR_NOOP("the readings do not vary")},
        {"no-stated-uncertainties", QT_TR_NOOP("no uncertainties are stated for the readings")},
        {"one-direction", QT_TR_NOOP("no set point was approached from both directions")},
        {"one-run", QT_TR_NOOP("there is only one run")},
        {"no-answer", QT_TR_NOOP("no reference value in the range belongs to the indication")},
        {"no-finite-interval", QT_TR_NOOP("the interval has no finite end")},
        {"too-few-readings", QT_TR_NOOP("there are too few readings")},
        {"three-to-5000-readings", QT_TR_NOOP("the test takes from 3 to 5000 readings")},
        {"no-slope-in-function", QT_TR_NOOP("the function does not change with the abscissa")},
        {"not-a-line", QT_TR_NOOP("it is tested for a straight line over at least four readings and three set points")},
        {"no-set-points", QT_TR_NOOP("the readings give too few set points")},
        {"takes-no-part", QT_TR_NOOP("the reading takes no part in the fit, or decides a coefficient alone")},
    };
    const QString code = facts.plain("reason", tr("the readings do not give it"));
    for (const auto& entry : known)
        if (code == QLatin1String(entry.code))
            return tr(entry.words);
    return QString(code).replace(QLatin1Char('-'), QLatin1Char(' '));
}

QString WarningText::of(WarningCode code, Sentence& facts) {
    switch (code) {
    case WarningCode::ColumnNotExact:
        return tr("Some numbers in the column %1 have too many digits to be held exactly; they are used to about 31 digits.")
            .arg(facts.plain("name", facts.plain("column", tr("of readings"))));
    case WarningCode::NoReplicates:
        return tr("No set point was read more than once, so lack of fit cannot be tested and repeatability is not known.");
    case WarningCode::OneRun: return tr("There is only one run, so changes between runs are not known.");
    case WarningCode::OneDirection: return tr("No set point was approached from both directions, so hysteresis is not known.");
    case WarningCode::NoDegreesOfFreedom:
        return tr("There are as many coefficients as readings, so nothing is left from which to tell an uncertainty.");
    case WarningCode::RankLost:
        return tr("The readings cannot tell some coefficients apart: %1.").arg(facts.plain("terms", tr("see the coefficients")));
    case WarningCode::NotConverged:
        return tr("The fit did not settle (%1); the figures are doubtful.").arg(facts.plain("reason", tr("reason unknown")));
    case WarningCode::Extrapolated:
        return tr("%1 lies outside the calibrated range; the value there is not covered by readings.")
            .arg(facts.plain("value", tr("A value asked for")));
    case WarningCode::NoFiniteInterval:
        return tr("At %1 the interval has no finite end: the slope cannot be told from zero well enough.")
            .arg(facts.plain("value", tr("one place")));
    case WarningCode::NoAnswer:
        return tr("No reference value in the range belongs to the indication %1.").arg(facts.plain("value", tr("asked for")));
    case WarningCode::SeveralAnswers:
        return tr("More than one reference value belongs to the indication %1.").arg(facts.plain("value", tr("asked for")));
    case WarningCode::NotMonotonic:
        return tr("The function rises and falls within the range, so an indication may belong to several reference values.");
    case WarningCode::IncompleteReadings:
        return tr("%1 readings lack a reference or an indication and do not count.").arg(facts.plain("count", tr("Some")));
    case WarningCode::FigureUndefined:
        return tr("%1: not given, because %2.")
            .arg(figure(facts), reason(facts));
    case WarningCode::ApproximateMethod:
        return tr("%1 is an approximation: %2.")
            .arg(facts.plain("figure", tr("A figure")), facts.plain("method", tr("no exact method exists")));
    case WarningCode::SealBroken:
        return tr("The seal does not hold: the file was changed outside the program. Compare it with a backup before it is used.");
    case WarningCode::JournalBroken:
        return tr("The journal does not hold from entry %1 on: something was changed or taken out.").arg(facts.plain("entry", tr("one")));
    case WarningCode::ResultsDiffer:
        return tr("%1 was stored as %2 and is now computed as %3.")
            .arg(facts.plain("figure", tr("A figure")), facts.plain("stored", tr("something else")), facts.plain("now", tr("another value")));
    }
    return {};
}

} // namespace

QString warningText(const Warning& warning) {
    Sentence facts(warning.facts);
    QString sentence = WarningText::of(warning.code, facts);
    return sentence + facts.rest();
}

} // namespace spanwright
