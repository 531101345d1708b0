// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificateText.h"

#include "core/record/Fields.h"
#include "core/verdict/Conformity.h"
#include "ui/certificate/CertificateSections.h"
#include "ui/words/Sentence.h"
#include "ui/words/Words.h"

#include <QCoreApplication>
#include <QStringList>

namespace spanwright {

namespace {

struct CertificateText {
    Q_DECLARE_TR_FUNCTIONS(CertificateText)

  public:
    static QString of(Statement statement, Sentence& facts);
};

QString superscript(int exponent) {
    static const QString digits = QStringLiteral("⁰¹²³⁴⁵⁶⁷⁸⁹");
    QString text = exponent < 0 ? QStringLiteral("⁻") : QString();
    for (const QChar c : QString::number(std::abs(exponent)))
        text += digits[c.digitValue()];
    return text;
}

/// What somebody was to enter and may have left empty.
QString stated(Sentence& facts, const char* name) {
    const QString text = facts.plain(name);
    return text.isEmpty() ? CertificateText::tr("not stated") : text;
}

QString phaseOf(Sentence& facts) {
    return facts.plain("phase") == QLatin1String("as-left") ? phaseText(Phase::AsLeft) : phaseText(Phase::AsFound);
}

QString CertificateText::of(Statement statement, Sentence& facts) {
    switch (statement) {
    case Statement::AsFoundOutsideLimits:
        return tr("As found, errors of indication were outside the limits. Earlier measurements made with the item may be affected.");
    case Statement::AsFoundNotAccepted:
        return tr("As found, every error was inside the limits, but not every one inside the acceptance limits of the decision rule.");
    case Statement::HysteresisLeft:
        return tr("As left, rising and falling errors near %1 have opposite signs: no adjustment of zero or span removes this "
                  "hysteresis.")
            .arg(withUnit(digitsText(facts.plain("set_point").toStdString()), facts.plain("unit").toStdString()));
    case Statement::ManyExcluded:
        return tr("Of the %1 readings %2, %3 are excluded, more than the limit of %4 %. They are listed with their reasons.")
            .arg(facts.plain("of"), phaseOf(facts), facts.plain("count"), digitsText(facts.plain("limit").toStdString()));
    case Statement::SetPointExcluded:
        return tr("Every reading %1 at %2 %3 is excluded, so no result is stated there.")
            .arg(phaseOf(facts), digitsText(facts.plain("set_point").toStdString()), facts.plain("unit"));
    case Statement::NoAsFound:
        return tr("Results from before the adjustment are not available: %1.").arg(stated(facts, "reason"));
    case Statement::Replaces:
        return tr("This certificate replaces certificate %1. Reason: %2.").arg(facts.plain("number"), stated(facts, "reason"));
    case Statement::ErrorSign: return tr("Error of indication = indication − value of a perfect item at the reference; correction = −error.");
    case Statement::ExpandedUncertainty:
        return tr("The expanded uncertainty U is the standard uncertainty of measurement multiplied by the coverage factor k stated "
                  "beside it, which gives a coverage probability of about %1 %. It was evaluated in accordance with JCGM 100 (GUM); k "
                  "follows from the effective degrees of freedom.")
            .arg(digitsText(facts.plain("coverage").toStdString()));
    case Statement::Rectangular:
        return tr("Where one rectangular contribution dominates, k is that of a rectangular distribution.");
    case Statement::HysteresisInUncertainty:
        return tr("The mean of rising and falling is stated; half of their difference is included in U as a rectangular contribution.");
    case Statement::HysteresisSeparate: return tr("Rising and falling are stated separately; U does not include their difference.");
    case Statement::ResolutionAndRepeatability:
        return tr("The budget counts the resolution of the indication beside the repeatability, which holds a part of it: U is not too small by this.");
    case Statement::RepeatabilityFromOtherPhase:
        return tr("Readings %1 were taken once at each point and direction; their repeatability is that of the readings %2.")
            .arg(phaseOf(facts), facts.plain("phase") == QLatin1String("as-left") ? phaseText(Phase::AsFound) : phaseText(Phase::AsLeft));
    case Statement::RepeatabilityMissing:
        return tr("Readings %1 were not repeated; U includes no repeatability.").arg(phaseOf(facts));
    case Statement::LineOmitted: {
        const auto line = valueOf<DerivedLine>(facts.plain("line").toStdString());
        return tr("Not included in U: %1. Reason: %2.")
            .arg(line ? derivedLineText(*line) : QString(), stated(facts, "reason"));
    }
    case Statement::DriftNotIncluded: return tr("U holds for the time of calibration; it includes no drift of the item afterwards.");
    case Statement::CorrectionsApplied:
        return tr("The corrections of the certificate of %1 are applied to the reference values.").arg(facts.plain("standards"));
    case Statement::CorrectionsAlreadyApplied:
        return tr("The corrections of the certificate of %1 were applied before the values were recorded.").arg(facts.plain("standards"));
    case Statement::CorrectionsNone: return tr("No corrections are applied for %1.").arg(facts.plain("standards"));
    case Statement::OverdueStandard:
        return tr("The standard %1 was overdue for calibration by %2 days. Reason for its use: %3. Authorised by: %4.")
            .arg(facts.plain("standard"), facts.plain("days"), stated(facts, "reason"), stated(facts, "by"));
    case Statement::NoSampling: return tr("No sampling was involved.");
    case Statement::OnlyThisItem: return tr("The results relate only to the item described and to the conditions stated.");
    case Statement::NotReproducedInPart:
        return tr("This document shall not be reproduced except in full, unless the laboratory agrees in writing.");
    case Statement::Recalibration:
        return tr("Date of recalibration as agreed with the customer: %1.").arg(facts.plain("date"));
    }
    return {};
}

/// "0.075 % of span", joined by plus signs.
QString partsText(const Limits& limits, const Item& item) {
    QStringList parts;
    if (limits.percentOfReading)
        parts << CertificateText::tr("%1 % of reading").arg(typedText(*limits.percentOfReading));
    if (limits.percentOfSpan)
        parts << CertificateText::tr("%1 % of span").arg(typedText(*limits.percentOfSpan));
    if (limits.constant) {
        const Quantity& quantity = limits.side == Side::Reference ? item.reference : item.indication;
        parts << typedText(*limits.constant) + QLatin1Char(' ') + QString::fromStdString(quantity.unit);
    }
    return parts.join(QStringLiteral(" + "));
}

} // namespace

QString digitsText(const Digits& digits, SignShown sign, const QLocale& locale) {
    if (digits.empty())
        return QStringLiteral("–");
    QString text = QString::fromStdString(digits);
    QString exponent;
    if (const auto e = text.indexOf(QLatin1Char('e')); e >= 0) {
        exponent = QStringLiteral("×10") + superscript(text.mid(e + 1).toInt());
        text.truncate(e);
    }
    const bool plus = sign == SignShown::Both && text.front().isDigit() &&
                      std::any_of(text.begin(), text.end(), [](QChar c) { return c.isDigit() && c != QLatin1Char('0'); });
    text.replace(QLatin1Char('.'), locale.decimalPoint()).replace(QLatin1Char('-'), QStringLiteral("−"));
    text.replace(QLatin1Char('<'), QStringLiteral("< ")).replace(QLatin1Char('>'), QStringLiteral("> "));
    return (plus ? QStringLiteral("+") : QString()) + text + exponent;
}

QString statementText(const StatementLine& line) {
    Sentence facts(line.facts);
    return CertificateText::of(line.statement, facts);
}

QString performanceText(PerformanceRow::Kind kind) {
    using Kind = PerformanceRow::Kind;
    switch (kind) {
    case Kind::MeasuredError: return CertificateText::tr("largest measured error (means)");
    case Kind::InaccuracyHigh: return CertificateText::tr("inaccuracy, largest positive error of one reading");
    case Kind::InaccuracyLow: return CertificateText::tr("inaccuracy, largest negative error of one reading");
    case Kind::Hysteresis: return CertificateText::tr("hysteresis (means)");
    case Kind::HysteresisInRun: return CertificateText::tr("hysteresis within one run");
    case Kind::NonRepeatability: return CertificateText::tr("non-repeatability (largest spread)");
    case Kind::NonLinearityTerminal: return CertificateText::tr("non-linearity, terminal-based");
    case Kind::NonLinearityIndependent: return CertificateText::tr("non-linearity, independent");
    case Kind::NonLinearityZeroBased: return CertificateText::tr("non-linearity, zero-based");
    }
    return {};
}

QString stateText(ConformityState state) {
    return conformityText(state);
}

QString overallText(ConformityState state) {
    switch (state) {
    case ConformityState::Pass: return CertificateText::tr("pass at every point");
    case ConformityState::ConditionalPass: return CertificateText::tr("conditional pass: at least one error lies in the guard band");
    case ConformityState::ConditionalFail: return CertificateText::tr("conditional fail: at least one error lies just outside the limits");
    case ConformityState::Fail: return CertificateText::tr("fail at one point or more");
    }
    return {};
}

QString limitsText(const Limits& limits, const Item& item) {
    return QStringLiteral("±(") + partsText(limits, item) + QLatin1Char(')');
}

QString decisionText(const Limits& limits) {
    constexpr double factor = 1.96; // of U for 95 %
    const double risk = acceptanceRisk(limits, factor);
    const QString share = risk >= 0.01 ? QLocale().toString(100 * risk, 'f', risk < 0.5 ? 1 : 0)
                                       : significantText(100 * risk, 2);
    const QString words = CertificateText::tr("%1; the risk of accepting an item that does not conform is at most %2 % at an acceptance limit")
                              .arg(decisionRuleText(limits), share);
    if (limits.rule != DecisionRule::FourState)
        return words;
    return words + CertificateText::tr(", and up to 50 % for a conditional pass (inside a limit by less than U); a conditional fail is outside by less than U");
}

QString equationForm(const FunctionSection& function) {
    const bool forward = function.direction == FitDirection::Indication;
    const QString y = forward ? QStringLiteral("y") : QStringLiteral("x"), base = forward ? QStringLiteral("x") : QStringLiteral("y");
    const bool left = function.centre.starts_with('-');
    const QString x = function.centre.empty() ? base
                                              : QStringLiteral("(%1 %2 %3)").arg(base, left ? QStringLiteral("+") : QStringLiteral("−"), digitsText(function.centre.substr(left ? 1 : 0)));
    int power = 0;
    switch (function.function.family) {
    case FunctionFamily::Constant:
    case FunctionFamily::Line:
    case FunctionFamily::Polynomial: break;
    case FunctionFamily::Proportional:
    case FunctionFamily::PolynomialNoConstant: power = function.centre.empty() ? 1 : 0; break;
    default: return {};
    }
    QString sum;
    for (const auto& term : function.terms) {
        QString number = digitsText(term.value);
        const bool minus = number.startsWith(QStringLiteral("−"));
        if (!sum.isEmpty()) {
            sum += minus ? QStringLiteral(" − ") : QStringLiteral(" + ");
            number = minus ? number.mid(1) : number;
        }
        sum += number;
        if (power >= 1)
            sum += QStringLiteral(" ") + x;
        if (power >= 2)
            sum += superscript(power);
        ++power;
    }
    return y + QStringLiteral(" = ") + sum;
}

} // namespace spanwright
