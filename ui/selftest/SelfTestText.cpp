// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/selftest/SelfTest.h"

#include <QCoreApplication>
#include <QDateTime>
#include <QSysInfo>

#include <cmath>

namespace spanwright {

namespace {

struct Text {
    Q_DECLARE_TR_FUNCTIONS(SelfTest)
};

QString rowText(const QString& row) {
    if (row == QLatin1String("residual"))
        return Text::tr("residual");
    if (row == QLatin1String("regression"))
        return Text::tr("signal");
    if (row == QLatin1String("lack_of_fit"))
        return Text::tr("lack of fit");
    return row == QLatin1String("pure_error") ? Text::tr("pure error") : row;
}

QString endText(const QString& end) {
    return end == QLatin1String("low") ? Text::tr("lower limit") : end == QLatin1String("high") ? Text::tr("upper limit") : Text::tr("value");
}

} // namespace

QString selfTestFigureText(const QString& name) {
    const QStringList path = name.split(QLatin1Char('.'));
    const QString& first = path.front();
    const int number = path.value(1).toInt() + 1;
    if (first == QLatin1String("coefficients"))
        return path.back() == QLatin1String("value") ? Text::tr("coefficient %1").arg(number) : Text::tr("coefficient %1, standard uncertainty").arg(number);
    if (first == QLatin1String("coefficient_covariance"))
        return Text::tr("covariance of coefficients %1 and %2").arg(number).arg(path.back().toInt() + 1);
    if (first == QLatin1String("residual_sd"))
        return Text::tr("residual standard deviation");
    if (first == QLatin1String("r_squared"))
        return QStringLiteral("R²");
    if (first == QLatin1String("chi_squared"))
        return QStringLiteral("χ²");
    if (first == QLatin1String("lag1_autocorrelation"))
        return Text::tr("autocorrelation of neighbours");
    if (first == QLatin1String("split"))
        return path.back() == QLatin1String("f") ? Text::tr("F of %1").arg(rowText(path[1])) : Text::tr("sum of squares, %1").arg(rowText(path[1]));
    if (first == QLatin1String("at"))
        return path.contains(QLatin1String("simultaneous")) ? Text::tr("band for all values, place %1, %2").arg(number).arg(endText(path.back()))
                                                             : Text::tr("function, place %1").arg(number);
    if (first == QLatin1String("read"))
        return path.back() == QLatin1String("reference") ? Text::tr("value read back") : Text::tr("value read back, %1").arg(endText(path.back()));
    return name;
}

QString selfTestNumberText(double value) {
    return std::isnan(value) ? QStringLiteral("–") : QString::number(value, 'g', 16);
}

QString selfTestVerdict(const SelfTestOutcome& outcome) {
    const std::size_t failed = outcome.failed();
    if (outcome.cases.empty())
        return Text::tr("No case could be read.");
    return failed == 0 ? Text::tr("All %1 figures of %2 cases agree with their sources to the last digit printed.")
                             .arg(outcome.figures())
                             .arg(outcome.cases.size())
                       : Text::tr("%1 of %2 figures do not agree with their sources.").arg(failed).arg(outcome.figures());
}

QString selfTestText(const SelfTestOutcome& outcome) {
    QString text;
    for (const SelfTestCase& one : outcome.cases) {
        text += one.name + QStringLiteral("   (") + one.source + QStringLiteral(")\n");
        for (const SelfTestFigure& figure : one.figures)
            text += QStringLiteral("  %1 %2 %3 %4  %5\n")
                        .arg(figure.name, -40)
                        .arg(figure.printed, 24)
                        .arg(selfTestNumberText(figure.got), 24)
                        .arg(figure.digits, 5, 'f', 1)
                        .arg(figure.holds ? Text::tr("agrees") : Text::tr("DIFFERS"));
    }
    return text + selfTestVerdict(outcome) + QLatin1Char('\n');
}

SelfTestOccasion selfTestOccasion() {
    const QDateTime now = QDateTime::currentDateTime();
    return {now.toOffsetFromUtc(now.offsetFromUtc()).toString(Qt::ISODate), QStringLiteral("Spanwright " SPANWRIGHT_VERSION),
            QSysInfo::prettyProductName() + QStringLiteral(", ") + QSysInfo::currentCpuArchitecture()};
}

} // namespace spanwright
