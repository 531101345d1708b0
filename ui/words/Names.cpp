// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/CalibrationFunction.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

struct Names {
    Q_DECLARE_TR_FUNCTIONS(Names)
};

} // namespace

QString phaseText(Phase phase) {
    return phase == Phase::AsFound ? Names::tr("as found") : Names::tr("as left");
}

QString directionText(Direction direction) {
    switch (direction) {
    case Direction::Unknown: return Names::tr("not known");
    case Direction::Rising: return Names::tr("rising");
    case Direction::Falling: return Names::tr("falling");
    }
    return {};
}

QString functionText(const FunctionChoice& function) {
    switch (function.family) {
    case FunctionFamily::Constant: return Names::tr("constant");
    case FunctionFamily::Line: return Names::tr("straight line");
    case FunctionFamily::Proportional: return Names::tr("line through zero");
    case FunctionFamily::Polynomial: return Names::tr("polynomial of degree %1").arg(function.order);
    case FunctionFamily::PolynomialNoConstant: return Names::tr("polynomial of degree %1 through zero").arg(function.order);
    case FunctionFamily::SquareRoot: return Names::tr("square root");
    case FunctionFamily::Logarithmic: return Names::tr("logarithm");
    case FunctionFamily::Power: return Names::tr("power");
    case FunctionFamily::ExponentialApproach: return Names::tr("exponential approach");
    case FunctionFamily::CallendarVanDusen: return Names::tr("Callendar–Van Dusen");
    case FunctionFamily::ThermistorB: return Names::tr("thermistor, B equation");
    case FunctionFamily::SteinhartHart: return Names::tr("Steinhart–Hart, %1 terms").arg(function.order);
    case FunctionFamily::Nernst: return Names::tr("Nernst");
    case FunctionFamily::Table: return Names::tr("table, straight between set points");
    }
    return {};
}

QString formulaText(const FunctionChoice& function) {
    const FunctionFacts& facts = factsOf(function.family);
    const auto text = [](std::string_view words) { return QString::fromUtf8(words.data(), static_cast<qsizetype>(words.size())); };
    QString formula = text(facts.formula);
    if (function.family == FunctionFamily::Polynomial || function.family == FunctionFamily::PolynomialNoConstant)
        formula.replace(QLatin1Char('N'), QString::number(function.order));
    if (function.order == 2)
        formula.replace(QStringLiteral(" + … + "), QStringLiteral(" + "));
    if (!facts.where.empty())
        formula += Names::tr("   for %1").arg(text(facts.where));
    const QString source = facts.source == "common practice" ? Names::tr("common practice") : text(facts.source);
    return formula + QLatin1Char('\n') + source;
}

QString convergenceText(const Convergence& convergence) {
    if (convergence.reason == "linear")
        return {};
    if (convergence.reached)
        return convergence.reason == "rounding" ? Names::tr("settled to rounding after %1 steps").arg(convergence.iterations)
                                                : Names::tr("settled after %1 steps").arg(convergence.iterations);
    return convergence.reason == "no-decrease" ? Names::tr("did not settle: no step lowers the residuals further")
                                               : Names::tr("did not settle in %1 steps").arg(convergence.iterations);
}

QString reasonText(ExclusionReason reason) {
    switch (reason) {
    case ExclusionReason::NotSettled: return Names::tr("not settled");
    case ExclusionReason::TypingSlip: return Names::tr("typing slip");
    case ExclusionReason::WrongReference: return Names::tr("wrong reference");
    case ExclusionReason::Disturbance: return Names::tr("disturbance");
    case ExclusionReason::OutOfRange: return Names::tr("out of range");
    case ExclusionReason::InstrumentFault: return Names::tr("fault of an instrument");
    case ExclusionReason::Other: return Names::tr("other reason");
    }
    return {};
}

QString distributionText(Distribution distribution) {
    switch (distribution) {
    case Distribution::Normal: return Names::tr("normal");
    case Distribution::Rectangular: return Names::tr("rectangular");
    case Distribution::Triangular: return Names::tr("triangular");
    case Distribution::UShaped: return Names::tr("U-shaped");
    case Distribution::Student: return Names::tr("Student");
    }
    return {};
}

QString derivedLineText(DerivedLine line) {
    switch (line) {
    case DerivedLine::StandardUncertainty: return Names::tr("reference standard");
    case DerivedLine::StandardDrift: return Names::tr("drift of the standard");
    case DerivedLine::ReferenceResolution: return Names::tr("resolution of the reference");
    case DerivedLine::IndicationResolution: return Names::tr("resolution of the item");
    case DerivedLine::Repeatability: return Names::tr("repeatability");
    case DerivedLine::RunToRun: return Names::tr("run to run");
    case DerivedLine::Hysteresis: return Names::tr("hysteresis");
    case DerivedLine::Fit: return Names::tr("calibration function");
    }
    return {};
}

QString decisionRuleText(const Limits& limits) {
    switch (limits.rule) {
    case DecisionRule::Simple: return Names::tr("simple acceptance (w = 0)");
    case DecisionRule::GuardedByU: return Names::tr("guarded acceptance (w = U)");
    case DecisionRule::GuardedByFraction:
        return Names::tr("guarded acceptance (w = %1 U)").arg(typedText(limits.fraction));
    case DecisionRule::FourState: return Names::tr("four states (w = U)");
    }
    return {};
}

QString conformityText(ConformityState state) {
    switch (state) {
    case ConformityState::Pass: return Names::tr("pass");
    case ConformityState::ConditionalPass: return Names::tr("conditional pass");
    case ConformityState::ConditionalFail: return Names::tr("conditional fail");
    case ConformityState::Fail: return Names::tr("fail");
    }
    return {};
}

QString signOffText(SignOffRole role) {
    switch (role) {
    case SignOffRole::Performed: return Names::tr("performed");
    case SignOffRole::Checked: return Names::tr("checked");
    case SignOffRole::Authorised: return Names::tr("authorised");
    }
    return {};
}

QString splitPartText(SplitPart part) {
    switch (part) {
    case SplitPart::Total: return Names::tr("total");
    case SplitPart::Regression: return Names::tr("signal");
    case SplitPart::Residual: return Names::tr("residual");
    case SplitPart::LackOfFit: return Names::tr("lack of fit");
    case SplitPart::PureError: return Names::tr("pure error");
    case SplitPart::Hysteresis: return Names::tr("hysteresis");
    case SplitPart::RunOffset: return Names::tr("run offset");
    case SplitPart::RunSlope: return Names::tr("run slope");
    case SplitPart::Repeatability: return Names::tr("repeatability");
    }
    return {};
}

QString valueStateText(ValueState state) {
    switch (state) {
    case ValueState::Sound: return {};
    case ValueState::NoAnswer: return Names::tr("no value belongs to this indication");
    case ValueState::OutsideRange: return Names::tr("outside the calibrated range");
    case ValueState::SeveralAnswers: return Names::tr("several values belong to this indication");
    case ValueState::NoFiniteInterval: return Names::tr("the slope is too uncertain to bound the value");
    case ValueState::NoUncertainty: return Names::tr("too few readings for an uncertainty");
    }
    return {};
}

} // namespace spanwright
