// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/SetPoints.h"

#include "ui/look/NumberText.h"
#include "ui/look/TypedNumber.h"

#include <QRegularExpression>
#include <QStringList>

#include <algorithm>
#include <charconv>
#include <cmath>

namespace spanwright {

namespace {

void sortAndUnite(std::vector<Decimal>& points) {
    std::stable_sort(points.begin(), points.end(), [](const Decimal& a, const Decimal& b) { return compareValue(a, b) < 0; });
    points.erase(std::unique(points.begin(), points.end(), [](const Decimal& a, const Decimal& b) { return compareValue(a, b) == 0; }),
                 points.end());
}

/// Pieces that hold one number each; a comma that cannot be a decimal mark parts them.
Result<QStringList> numberPieces(const QString& text) {
    static const QRegularExpression between(QStringLiteral("\\s*;\\s*|,\\s+|\\s+"));
    static const QRegularExpression grouped(QStringLiteral("^[+\\-\u2212]?[1-9]\\d{0,2}(,\\d{3})+(\\.\\d*)?$"));
    QStringList pieces;
    for (const QString& piece : text.trimmed().split(between, Qt::SkipEmptyParts)) {
        const auto commas = piece.count(QLatin1Char(','));
        const bool parting = commas > 1 || (commas == 1 && piece.contains(QLatin1Char('.')));
        if (parting && grouped.match(piece).hasMatch())
            return Error(ErrorCode::ThousandsSeparator, {{"text", piece.toStdString()}});
        pieces << (parting ? piece.split(QLatin1Char(','), Qt::SkipEmptyParts) : QStringList(piece));
    }
    return pieces;
}

Result<std::vector<Decimal>> numbersOf(const QStringList& pieces) {
    std::vector<Decimal> numbers;
    for (const QString& piece : pieces) {
        Result<Decimal> number = parseTyped(piece);
        if (!number)
            return number.error();
        numbers.push_back(*number);
    }
    return numbers;
}

/// A computed place as a decimal, to `digits` significant digits.
std::optional<Decimal> decimalOf(double value, int digits) {
    char buffer[64];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::general, digits).ptr;
    const Result<Decimal> number = Decimal::parse(std::string_view(buffer, static_cast<std::size_t>(end - buffer)));
    return number ? std::optional(*number) : std::nullopt;
}

/// Shares in % as places in the range; its ends stay as they were typed.
std::vector<Decimal> placesOf(const std::vector<Decimal>& shares, const Decimal& low, const Decimal& high) {
    constexpr int digits = 12;
    const double from = low.toDouble(), span = high.toDouble() - from;
    std::vector<Decimal> places;
    for (const Decimal& share : shares) {
        const double percent = share.toDouble();
        if (percent == 0)
            places.push_back(low);
        else if (percent == 100)
            places.push_back(high);
        else if (const auto place = decimalOf(from + span * percent / 100, digits))
            places.push_back(*place);
    }
    return places;
}

} // namespace

Result<std::vector<Decimal>> parseNumberList(const QString& text) {
    const Result<QStringList> pieces = numberPieces(text);
    return pieces ? numbersOf(*pieces) : Result<std::vector<Decimal>>(pieces.error());
}

Result<std::vector<Decimal>> parseSetPoints(const QString& text, const Item& item) {
    static const QRegularExpression spaced(QStringLiteral("\\s+%"));
    QString tidy = text.trimmed();
    tidy.replace(spaced, QStringLiteral("%"));
    const auto signs = tidy.count(QLatin1Char('%'));
    const bool isUnit = item.reference.unit.starts_with('%');
    Result<QStringList> pieces = numberPieces(QString(tidy).replace(QLatin1String("%"), QLatin1String(" ")));
    if (!pieces)
        return pieces.error();
    const bool marked = signs > 0 && tidy.endsWith(QLatin1Char('%')) && (signs == 1 || signs == pieces->size());
    if (signs > 0 && !marked)
        return Error(ErrorCode::CellNotANumber, {{"text", tidy.toStdString()}});
    Result<std::vector<Decimal>> points = numbersOf(*pieces);
    if (!points)
        return points;
    if (marked && !isUnit) {
        if (!item.rangeLow || !item.rangeHigh)
            return Error(ErrorCode::CellOutOfRange, {{"text", tidy.toStdString()}, {"reason", "no-range"}});
        points = placesOf(*points, *item.rangeLow, *item.rangeHigh);
    }
    std::vector<Decimal> sorted = *points;
    sortAndUnite(sorted);
    return sorted;
}

QString numberListText(const std::vector<Decimal>& numbers) {
    QStringList texts;
    for (const Decimal& number : numbers)
        texts << typedText(number);
    return texts.join(QStringLiteral("; "));
}

std::vector<Decimal> evenSetPoints(const Decimal& from, const Decimal& to, int count) {
    constexpr int digits = 10;
    std::vector<Decimal> points{from};
    const double low = from.toDouble(), step = (to.toDouble() - low) / (count - 1);
    for (int i = 1; i < count - 1; ++i) {
        // To ten digits of the step, which leaves a round step round.
        const double grain = std::pow(10, std::floor(std::log10(std::abs(step))) - 9);
        if (const auto point = decimalOf(std::round((low + step * i) / grain) * grain, digits))
            points.push_back(*point);
    }
    points.push_back(to);
    sortAndUnite(points);
    return points;
}

} // namespace spanwright
