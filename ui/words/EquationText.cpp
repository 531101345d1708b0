// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

struct EquationText {
    Q_DECLARE_TR_FUNCTIONS(EquationText)
};

const QString minusSign = QChar(0x2212);

/// Digits that the uncertainty supports: down to the second digit of u, at least 2, at most 15.
int digitsOf(const Coefficient& coefficient) {
    const double value = std::abs(coefficient.value);
    const double u = coefficient.standardUncertainty;
    if (!(value > 0) || !(u > 0))
        return 6;
    return std::clamp(static_cast<int>(std::floor(std::log10(value)) - std::floor(std::log10(u))) + 2, 2, 15);
}

QString number(const Coefficient& coefficient) {
    return significantText(coefficient.value, digitsOf(coefficient));
}

QString superscript(int power) {
    static const QString digits = QStringLiteral("⁰¹²³⁴⁵⁶⁷⁸⁹");
    QString text;
    for (const QChar c : QString::number(power))
        text += digits[c.digitValue()];
    return text;
}

QString powerOf(const QString& variable, int power) {
    return power == 0 ? QString() : power == 1 ? QLatin1Char(' ') + variable : QLatin1Char(' ') + variable + superscript(power);
}

/// "4.0005 + 0.0266639 x − 1.2×10⁻⁵ x²"; `first` is the power of the first coefficient.
QString sum(const Fit& fit, const QString& variable, int first) {
    QString text;
    int power = first;
    for (const Coefficient& coefficient : fit.coefficients) {
        QString term = number(coefficient);
        const bool minus = term.startsWith(minusSign);
        if (!text.isEmpty()) {
            text += minus ? QStringLiteral(" − ") : QStringLiteral(" + ");
            term = minus ? term.mid(1) : term;
        }
        text += term + powerOf(variable, power++);
    }
    return text;
}

/// The right-hand side, or the function's name with its coefficients where the form is no sum of powers.
QString formula(const Fit& fit, const QString& x) {
    switch (fit.function.family) {
    case FunctionFamily::Constant:
    case FunctionFamily::Line:
    case FunctionFamily::Polynomial: return sum(fit, x, 0);
    case FunctionFamily::Proportional:
    case FunctionFamily::PolynomialNoConstant: return sum(fit, x, 1);
    default: break;
    }
    QStringList parts;
    for (const Coefficient& coefficient : fit.coefficients)
        parts << QString::fromStdString(coefficient.name) + QStringLiteral(" = ") + number(coefficient);
    return functionText(fit.function) + QStringLiteral(": ") + parts.join(QStringLiteral(", "));
}

QString quantity(const QString& symbol, const Quantity& quantity) {
    const QString name = QString::fromStdString(quantity.name);
    const QString unit = QString::fromStdString(quantity.unit);
    if (name.isEmpty() && unit.isEmpty())
        return {};
    const QString what = name.isEmpty() ? symbol : symbol + QLatin1Char(' ') + name;
    return unit.isEmpty() ? what : EquationText::tr("%1 in %2").arg(what, unit);
}

} // namespace

QString equationText(const Fit& fit, const Item& item) {
    const bool forward = fit.direction == FitDirection::Indication;
    const QString y = forward ? QStringLiteral("y") : QStringLiteral("x");
    const QString x = forward ? QStringLiteral("x") : QStringLiteral("y");
    QStringList names;
    for (const QString& text : {quantity(QStringLiteral("y"), item.indication), quantity(QStringLiteral("x"), item.reference)})
        if (!text.isEmpty())
            names << text;
    const QString equation = y + QStringLiteral(" = ") + formula(fit, x);
    return names.isEmpty() ? equation : equation + QStringLiteral("   (") + names.join(QStringLiteral(", ")) + QLatin1Char(')');
}

} // namespace spanwright
