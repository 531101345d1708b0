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
};

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
        return tr("%1 does not exist here: %2.")
            .arg(facts.plain("figure", tr("A figure")), facts.plain("reason", tr("the readings do not give it")));
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
