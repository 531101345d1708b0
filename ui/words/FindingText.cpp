// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>
#include <QStringList>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

struct FindingText {
    Q_DECLARE_TR_FUNCTIONS(FindingText)

  public:
    static QString sentence(const Finding& finding);
    static QString figure(const Figure& figure, const Record& record);
    static QString remedy(const Finding& finding);
};

bool has(const Finding& finding, const char* figure) {
    return std::any_of(finding.figures.begin(), finding.figures.end(), [&](const Figure& one) { return one.name == figure; });
}

/// No default in the switch: a new code without a sentence does not compile.
QString FindingText::sentence(const Finding& finding) {
    switch (finding.code) {
    case FindingCode::LackOfFit: return tr("The set-point means lie further from the function than the scatter explains.");
    case FindingCode::HiddenCurvature:
        return tr("The gap between rising and falling readings hides curvature: pooled, the function seems to fit; against "
                  "repeatability it does not.");
    case FindingCode::Hysteresis:
        if (!has(finding, "f")) // nothing was repeated; the gaps over the set points speak for themselves
            return tr("Falling readings differ from rising ones at most set points in the same sense.");
        return tr("Rising and falling readings differ by more than repeatability explains.");
    case FindingCode::RunZeroShift: return tr("The zero shifts from run to run by more than repeatability explains.");
    case FindingCode::RunGainChange: return tr("The slope changes from run to run by more than repeatability explains.");
    case FindingCode::FirstRunDiffers: return tr("The first run differs from the others, as an item that was not exercised does.");
    case FindingCode::ScatterGrows: return tr("Scatter grows with level, so equal weights overstate the uncertainty at the low end.");
    case FindingCode::Autocorrelated:
        return tr("Neighbouring readings resemble each other; there is less information in them than their number suggests.");
    case FindingCode::NonNormal: return tr("The residuals are not normally distributed; intervals are approximate.");
    case FindingCode::Straggler:
        if (finding.rows.size() > 1)
            return tr("%1 readings are stragglers (5 % level). Look for technical causes; they stay in.").arg(finding.rows.size());
        return tr("A reading is a straggler (5 % level). Look for a technical cause; it stays in.");
    case FindingCode::Outlier:
        if (finding.rows.size() > 1)
            return tr("%1 readings are statistical outliers (1 % level). Look for technical causes; they stay in.").arg(finding.rows.size());
        return tr("A reading is a statistical outlier (1 % level). Look for a technical cause; it stays in.");
    case FindingCode::Influential:
        if (finding.rows.size() > 1)
            return tr("The function hangs on a few readings more than on the others.");
        return tr("The function hangs on a single reading more than on the others.");
    case FindingCode::ExcludedReadings: return tr("Readings were excluded.");
    case FindingCode::SetPointExcluded: return tr("Every reading of a set point is excluded.");
    case FindingCode::ManyExcluded: return tr("More readings are excluded than the limit allows; the result may no longer describe the item.");
    case FindingCode::TooFewReadings:
        if (has(finding, "set_points"))
            return tr("There are too few set points for this function: readings at the same ones again do not tell its shape.");
        return tr("There are few readings for this function, so its uncertainty is poorly known.");
    case FindingCode::OutsideBand: return tr("Readings lie outside the band in which new readings are expected.");
    case FindingCode::DegreeNotJustified: return tr("The highest term of the function is not supported by the readings.");
    case FindingCode::ThroughZeroNotSupported: return tr("A line through zero is not supported: the constant differs from zero.");
    case FindingCode::StatedTooSmall:
        return tr("The residuals are larger than the stated uncertainties explain: the function does not fit, or the uncertainties are too small.");
    case FindingCode::StatedTooLarge: return tr("The residuals are smaller than the stated uncertainties let expect; they may be stated too large.");
    case FindingCode::RepeatedReading: return tr("A reading is identical to the one before it. Was it read afresh?");
    case FindingCode::LowestOutweigh:
        return tr("Weights proportional to level make the readings near zero outweigh all others, as if they had no scatter. Weights that grow from a "
                  "constant do not.");
    case FindingCode::BetweenPlateaus:
        return tr("Readings were taken on the way between plateaus, where the item lags behind the reference. Exclude them, or fit the means of the "
                  "plateaus.");
    case FindingCode::Extrapolation: return tr("A value asked for lies outside the calibrated range.");
    }
    return {};
}

/// Figures whose words are a pattern around the value.
struct FigurePattern {
    const char* name;
    const char* words;
};

constexpr FigurePattern patterns[] = {
    {"f", QT_TRANSLATE_NOOP("FindingText", "F = %1")},
    {"f_naive", QT_TRANSLATE_NOOP("FindingText", "F pooled = %1")},
    {"percent_of_span", QT_TRANSLATE_NOOP("FindingText", "%1 % of span")},
    {"run", QT_TRANSLATE_NOOP("FindingText", "run %1")},
    {"chi_squared", QT_TRANSLATE_NOOP("FindingText", "χ² = %1")},
    {"t", QT_TRANSLATE_NOOP("FindingText", "t = %1")},
    {"w", QT_TRANSLATE_NOOP("FindingText", "W = %1")},
    {"r", QT_TRANSLATE_NOOP("FindingText", "%1 standard deviations out")},
    {"critical", QT_TRANSLATE_NOOP("FindingText", "critical value %1")},
    {"cook", QT_TRANSLATE_NOOP("FindingText", "Cook's distance %1")},
    {"limit", QT_TRANSLATE_NOOP("FindingText", "limit %1")},
    {"expected", QT_TRANSLATE_NOOP("FindingText", "%1 to be expected")},
    {"lag_1", QT_TRANSLATE_NOOP("FindingText", "correlation of neighbours %1")},
    {"effective_readings", QT_TRANSLATE_NOOP("FindingText", "worth %1 independent readings")},
    {"variance_ratio", QT_TRANSLATE_NOOP("FindingText", "variance ratio %1")},
    {"exponent", QT_TRANSLATE_NOOP("FindingText", "scatter goes with level to the power %1")},
    {"asked_for", QT_TRANSLATE_NOOP("FindingText", "%1 was asked for")},
    {"residual_sd_with", QT_TRANSLATE_NOOP("FindingText", "residual s %1 with them")},
    {"residual_sd", QT_TRANSLATE_NOOP("FindingText", "%1 without")},
};

QString FindingText::figure(const Figure& figure, const Record& record) {
    // What was counted or typed has no digits of its own to lose.
    static const QStringList whole{"run", "degrees_of_freedom", "df", "set_point", "asked_for"};
    const QString value = whole.contains(QString::fromStdString(figure.name))
                              ? QLocale().toString(figure.value, 'g', 6).replace(QLatin1Char('-'), QChar(0x2212))
                              : significantText(figure.value, 3);
    const auto withUnit = [&](const Quantity& quantity) {
        return quantity.unit.empty() ? value : value + QLatin1Char(' ') + QString::fromStdString(quantity.unit);
    };
    const std::string& name = figure.name;
    for (const FigurePattern& pattern : patterns)
        if (name == pattern.name)
            return tr(pattern.words).arg(value);
    if (name == "p" || name == "p_naive") {
        const QString p = pText(figure.value);
        const QString label = name == "p" ? tr("p") : tr("p pooled");
        return p.startsWith(QLatin1Char('<')) ? label + QLatin1Char(' ') + p : label + QStringLiteral(" = ") + p;
    }
    if (name == "value")
        return withUnit(directionOf(record.choices) == FitDirection::Reference ? record.item.reference : record.item.indication);
    if (name == "set_point")
        return tr("at %1").arg(withUnit(record.item.reference));
    if (name == "share")
        return shareText(figure.value);
    if (name == "weight_share")
        return tr("%1 of the weight").arg(shareText(figure.value));
    if (name == "level")
        return tr("lowest level %1").arg(value);
    if (name == "plateaus")
        return tr("%n plateau(s)", nullptr, static_cast<int>(figure.value));
    if (name == "exclusion_limit")
        return tr("limit %1").arg(shareText(figure.value));
    if (name == "set_points")
        return tr("%n set point(s)", nullptr, static_cast<int>(figure.value));
    if (name == "degrees_of_freedom" || name == "df")
        return tr("%n degree(s) of freedom", nullptr, static_cast<int>(figure.value));
    if (name == "count")
        return tr("%n reading(s)", nullptr, static_cast<int>(figure.value));
    if (name == "values_outside")
        return tr("%n value(s) outside", nullptr, static_cast<int>(figure.value));
    QString words = QString::fromStdString(name);
    return words.replace(QLatin1Char('_'), QLatin1Char(' ')) + QStringLiteral(" = ") + value;
}

QString FindingText::remedy(const Finding& finding) {
    switch (finding.remedy) {
    case Remedy::None: return {};
    case Remedy::CompareFunction: return tr("Compare %1").arg(functionText(finding.suggestion));
    case Remedy::CarryToBudget: return tr("Carry to the budget");
    case Remedy::SeeExclusions: return tr("See the exclusions");
    case Remedy::SeeReadings: return tr("See the readings");
    case Remedy::ChooseWeights: return tr("Choose weights");
    case Remedy::TakeMoreReadings: return tr("Take more readings");
    case Remedy::CheckRun: return tr("Look at the runs");
    }
    return {};
}

} // namespace

FindingWords findingWords(const Finding& finding, const Record& record) {
    QStringList figures;
    for (const Figure& figure : finding.figures)
        if (!std::isnan(figure.value))
            figures << FindingText::figure(figure, record);
    return {FindingText::sentence(finding), figures.join(QStringLiteral(", ")), FindingText::remedy(finding)};
}

} // namespace spanwright
