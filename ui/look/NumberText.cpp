// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/NumberText.h"

#include <QCoreApplication>

#include <charconv>
#include <cmath>

namespace spanwright {

namespace {

const QChar minusSign(0x2212);

/// Digits with a decimal point and a hyphen, as they are shown.
QString shown(std::string_view text, const QLocale& locale) {
    QString result = QString::fromLatin1(text.data(), static_cast<qsizetype>(text.size()));
    result.replace(QLatin1Char('.'), locale.decimalPoint());
    result.replace(QLatin1Char('-'), minusSign);
    return result;
}

QString missing(double value) {
    if (std::isnan(value))
        return QString(QChar(0x2013));
    return value < 0 ? QString(minusSign) + QChar(0x221e) : QString(QChar(0x221e));
}

std::string plain(double value, int decimals) {
    char buffer[400];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::fixed, decimals).ptr;
    std::string text(buffer, end);
    if (text.front() == '-' && text.find_first_of("123456789") == std::string::npos)
        text.erase(0, 1);
    return text;
}

QString superscript(int exponent) {
    static const char16_t digits[] = u"\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079";
    QString text = exponent < 0 ? QString(QChar(0x207b)) : QString();
    for (const QChar c : QString::number(std::abs(exponent)))
        text += QChar(digits[c.digitValue()]);
    return text;
}

} // namespace

QString typedText(const Decimal& value, const QLocale& locale) {
    return shown(value.text(), locale);
}

QString fixedText(double value, int decimals, SignShown sign, const QLocale& locale) {
    if (!std::isfinite(value))
        return missing(value);
    const std::string text = plain(value, std::clamp(decimals, 0, 30));
    const bool plus = sign == SignShown::Both && text.front() != '-' && text.find_first_of("123456789") != std::string::npos;
    return (plus ? QStringLiteral("+") : QString()) + shown(text, locale);
}

QString significantText(double value, int digits, const QLocale& locale) {
    if (!std::isfinite(value))
        return missing(value);
    if (value == 0)
        return QStringLiteral("0");
    // The exponent is taken after rounding: 9.996 to three digits is 10.0.
    char buffer[64];
    const auto end =
        std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::scientific, std::clamp(digits, 1, 17) - 1).ptr;
    const std::string text(buffer, end);
    const std::size_t e = text.find('e');
    const int exponent = std::atoi(text.c_str() + e + 1);
    if (exponent >= -5 && exponent < std::max(digits, 7))
        return shown(plain(value, std::max(0, digits - 1 - exponent)), locale);
    return shown(text.substr(0, e), locale) + QChar(0x2009) + QChar(0x00d7) + QChar(0x2009) + QStringLiteral("10") +
           superscript(exponent);
}

QString placeText(double value, const QLocale& locale) {
    if (!std::isfinite(value))
        return missing(value);
    QLocale plain = locale;
    plain.setNumberOptions(QLocale::OmitGroupSeparator);
    return plain.toString(value, 'g', 8).replace(QLatin1Char('-'), QChar(0x2212));
}

QString shareText(double share, const QLocale& locale) {
    if (!std::isfinite(share))
        return missing(share);
    const double percent = share * 100;
    int decimals = 0;
    if (percent > 0 && percent < 1) {
        if (percent < 0.01)
            return QStringLiteral("< ") + shown("0.01", locale) + QStringLiteral(" %");
        decimals = percent < 0.1 ? 2 : 1;
    }
    // As many nines as it takes to stay below one hundred.
    if (share < 1)
        while (decimals < 12 && plain(percent, decimals).substr(0, 3) == "100")
            ++decimals;
    if (share < 1 && decimals > 1 && percent > 99)
        decimals = std::min(decimals + 1, 12);
    return shown(plain(percent, decimals), locale) + QStringLiteral(" %");
}

QString briefShareText(double share, const QLocale& locale) {
    return share > 0.999 && share < 1 ? QStringLiteral("> ") + shown("99.9", locale) + QStringLiteral(" %") : shareText(share, locale);
}

QString pText(double p, const QLocale& locale) {
    if (!std::isfinite(p))
        return missing(p);
    if (p < 0.001)
        return QStringLiteral("< ") + shown("0.001", locale);
    if (p > 0.999 && p < 1)
        return QStringLiteral("> ") + shown("0.999", locale);
    return shown(plain(p, p < 0.01 ? 4 : p < 0.1 ? 3 : 2), locale);
}

} // namespace spanwright
