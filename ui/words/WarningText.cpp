// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/Sentence.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <span>

namespace spanwright {

namespace {

/// No default in the switch: a new code without a sentence does not compile.
struct WarningText {
    Q_DECLARE_TR_FUNCTIONS(WarningText)

  public:
    static QString of(WarningCode code, Sentence& facts);
    /// Figures, reasons and methods come as codes; one that is not in its list stands as words.
    static QString figure(Sentence& facts);
    static QString reason(Sentence& facts);
    static QString method(Sentence& facts);
    static QString oneRun(Sentence& facts);
};

struct Code {
    const char* code;
    const char* words;
};

constexpr Code figures[] = {
    {"error", QT_TRANSLATE_NOOP("WarningText", "Error of indication")},
    {"repeatability", QT_TRANSLATE_NOOP("WarningText", "Repeatability")},
    {"lack_of_fit", QT_TRANSLATE_NOOP("WarningText", "Lack of fit")},
    {"lack_of_fit_adjusted", QT_TRANSLATE_NOOP("WarningText", "Lack of fit after direction and run")},
    {"span", QT_TRANSLATE_NOOP("WarningText", "The output span")},
    {"results", QT_TRANSLATE_NOOP("WarningText", "Results at each set point")},
    {"durbin_watson", QT_TRANSLATE_NOOP("WarningText", "The p value of the Durbin–Watson test")},
    {"split", QT_TRANSLATE_NOOP("WarningText", "The variance split")},
    {"diagnostics", QT_TRANSLATE_NOOP("WarningText", "Tests of the residuals")},
    {"tolerance", QT_TRANSLATE_NOOP("WarningText", "The tolerance band")},
    {"cochran", QT_TRANSLATE_NOOP("WarningText", "The critical value of the Cochran test")},
};

constexpr Code reasons[] = {
    {"no-output-range", QT_TRANSLATE_NOOP("WarningText", "the item's output range is not stated")},
    {"no-replicates", QT_TRANSLATE_NOOP("WarningText", "no set point was read more than once in the same direction")},
    {"no-replicates-everywhere", QT_TRANSLATE_NOOP("WarningText", "fewer than two set points were read more than once")},
    {"no-repeats", QT_TRANSLATE_NOOP("WarningText", "no set point was read more than once in the same direction and run")},
    {"set-points", QT_TRANSLATE_NOOP("WarningText", "there are no more set points than coefficients")},
    {"no-degrees-of-freedom", QT_TRANSLATE_NOOP("WarningText", "no degrees of freedom are left")},
    {"no-test", QT_TRANSLATE_NOOP("WarningText", "there is nothing to test: no degrees of freedom, or residuals that are only rounding")},
    {"no-spread", QT_TRANSLATE_NOOP("WarningText", "the readings do not vary")},
    {"no-stated-uncertainties", QT_TRANSLATE_NOOP("WarningText", "the fit does not rest on stated uncertainties")},
    {"one-direction", QT_TRANSLATE_NOOP("WarningText", "no set point was approached from both directions")},
    {"one-run", QT_TRANSLATE_NOOP("WarningText", "there is only one run")},
    {"run-not-stated", QT_TRANSLATE_NOOP("WarningText", "it is not stated to which run a reading belongs")},
    {"outside-domain", QT_TRANSLATE_NOOP("WarningText", "the value lies outside where the function exists")},
    {"no-scatter", QT_TRANSLATE_NOOP("WarningText", "the readings do not scatter about the function")},
    {"directions-and-runs", QT_TRANSLATE_NOOP("WarningText", "directions and runs are not known")},
    {"no-answer", QT_TRANSLATE_NOOP("WarningText", "no reference value in the range belongs to the indication")},
    {"no-finite-interval", QT_TRANSLATE_NOOP("WarningText", "the interval has no finite end")},
    {"too-few-readings", QT_TRANSLATE_NOOP("WarningText", "there are too few readings, or they do not scatter")},
    {"three-to-5000-readings", QT_TRANSLATE_NOOP("WarningText", "the test takes from 3 to 5000 readings that scatter")},
    {"no-slope-in-function", QT_TRANSLATE_NOOP("WarningText", "it is tested for functions that change with the abscissa")},
    {"not-a-line", QT_TRANSLATE_NOOP("WarningText", "it is tested for a straight line through four readings or more")},
    {"no-set-points", QT_TRANSLATE_NOOP("WarningText", "there are fewer than two set points, or far too many")},
    {"too-many-set-points", QT_TRANSLATE_NOOP("WarningText", "there are more than 1000 set points; state the set points of the readings")},
    {"correlated", QT_TRANSLATE_NOOP("WarningText", "it is defined for readings without covariances between them")},
    {"stated-covariance", QT_TRANSLATE_NOOP("WarningText", "the stated uncertainties are taken as they are, without a spread of the readings")},
    {"takes-no-part", QT_TRANSLATE_NOOP("WarningText", "the reading takes no part in the fit, or decides a coefficient alone")},
};

constexpr Code methods[] = {
    {"normal", QT_TRANSLATE_NOOP("WarningText", "the normal distribution stands in for the exact one")},
    {"linearised", QT_TRANSLATE_NOOP("WarningText", "the function is not linear in its coefficients and is taken by its tangent")},
    {"mean-indication", QT_TRANSLATE_NOOP("WarningText", "the function gives the reference, and is taken at the mean indication of each set point")},
    {"mean-number", QT_TRANSLATE_NOOP("WarningText", "set points have different numbers of readings, and their mean is taken")},
    {"reference-itself", QT_TRANSLATE_NOOP("WarningText", "the item's range is not stated; a perfect item is taken to show the reference itself")},
    {"end-points", QT_TRANSLATE_NOOP("WarningText", "the item's range is not stated; the means at both ends stand in for it")},
};

QString inWords(std::span<const Code> list, const QString& code) {
    for (const Code& entry : list)
        if (code == QLatin1String(entry.code))
            return WarningText::tr(entry.words);
    return QString(code).replace(QLatin1Char('-'), QLatin1Char(' '));
}

QString WarningText::figure(Sentence& facts) {
    return inWords(figures, facts.plain("figure", tr("A figure")));
}

QString WarningText::reason(Sentence& facts) {
    return inWords(reasons, facts.plain("reason", tr("the readings do not give it")));
}

QString WarningText::method(Sentence& facts) {
    return inWords(methods, facts.plain("method", tr("no exact method exists")));
}

QString WarningText::oneRun(Sentence& facts) {
    const QString reason = facts.plain("reason");
    if (reason == QLatin1String("not-stated"))
        return tr("It is not stated to which run a reading belongs, so changes between runs are not known.");
    if (reason == QLatin1String("too-many"))
        return tr("There are more runs than there can be: the column seems to count readings. Changes between runs are not known.");
    if (reason == QLatin1String("no-repeats"))
        return tr("The runs share no set point, so changes between runs are not known.");
    return tr("There is only one run, so changes between runs are not known.");
}

QString WarningText::of(WarningCode code, Sentence& facts) {
    switch (code) {
    case WarningCode::ColumnNotExact:
        return tr("Some numbers in the column %1 have too many digits to be held exactly; they are used to about 31 digits.")
            .arg(facts.plain("name", facts.plain("column", tr("of readings"))));
    case WarningCode::NoReplicates:
        facts.plain("figure");
        return tr("No set point was read more than once, so lack of fit cannot be tested and repeatability is not known.");
    case WarningCode::OneRun: return oneRun(facts);
    case WarningCode::OneDirection:
        return facts.plain("reason") == QLatin1String("not-stated")
                   ? tr("It is not stated whether readings were taken rising or falling, so hysteresis is not known.")
                   : tr("No set point was approached from both directions, so hysteresis is not known.");
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
    case WarningCode::NoIndication:
        return tr("The function reaches the reference value %1 for no indication in the range or near it.").arg(facts.plain("value", tr("asked for")));
    case WarningCode::SeveralIndications:
        return tr("The reference value %1 belongs to more than one indication; the one nearest to the middle of the range was taken.")
            .arg(facts.plain("value", tr("asked for")));
    case WarningCode::NotMonotonic:
        return tr("The function rises and falls within the range, so an indication may belong to several reference values.");
    case WarningCode::IncompleteReadings:
        return tr("%1 readings lack a reference or an indication and do not count.").arg(facts.plain("count", tr("Some")));
    case WarningCode::FigureUndefined:
        return tr("%1: not given, because %2.")
            .arg(figure(facts), reason(facts));
    case WarningCode::ApproximateMethod:
        return tr("%1 is an approximation: %2.")
            .arg(figure(facts), method(facts));
    case WarningCode::MatrixUnused:
        return tr("Covariances between readings are stated, and this way of weighing does not use them: choose weights from the stated "
                  "uncertainties, or both uncertain.");
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
