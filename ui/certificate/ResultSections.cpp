// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificateSections.h"
#include "ui/certificate/CertificateText.h"
#include "ui/certificate/ErrorPlot.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <algorithm>

namespace spanwright {

namespace {

struct ResultSections {
    Q_DECLARE_TR_FUNCTIONS(ResultSections)
};

constexpr double PlotHeight = 62; // mm

std::optional<PlotMark::Shape> shapeOf(Direction direction) {
    if (direction == Direction::Rising)
        return PlotMark::Shape::Up;
    if (direction == Direction::Falling)
        return PlotMark::Shape::Down;
    return std::nullopt;
}

/// Which columns the results of a phase need.
struct Columns {
    bool direction = false, bothMeans = false, error = false, percent = false, limit = false, state = false;
};

Columns columnsOf(const PhaseSection& section) {
    Columns columns;
    for (const ResultLine& line : section.results) {
        columns.direction = columns.direction || line.direction != Direction::Unknown;
        columns.bothMeans = columns.bothMeans || (!line.rising.empty() && !line.falling.empty());
        columns.percent = columns.percent || !line.errorPercent.empty();
        columns.limit = columns.limit || !line.limit.empty();
        columns.state = columns.state || line.state.has_value();
    }
    columns.error = section.errorKnown;
    return columns;
}

std::vector<TableColumn> headsOf(const Columns& columns, const Item& item) {
    const QString reference = QString::fromStdString(item.reference.unit), indication = QString::fromStdString(item.indication.unit);
    const QString percent = ResultSections::tr("% of span");
    std::vector<TableColumn> heads;
    if (columns.direction)
        heads.push_back({ResultSections::tr("approach"), {}, ColumnAlign::Left, 1.2});
    heads.push_back({ResultSections::tr("reference"), reference, ColumnAlign::DecimalMark, 1.2});
    if (columns.bothMeans) {
        heads.push_back({ResultSections::tr("rising"), indication, ColumnAlign::DecimalMark, 1.1});
        heads.push_back({ResultSections::tr("falling"), indication, ColumnAlign::DecimalMark, 1.1});
    }
    heads.push_back({columns.bothMeans ? ResultSections::tr("mean") : ResultSections::tr("indication"), indication, ColumnAlign::DecimalMark, 1.25});
    if (columns.error)
        heads.push_back({ResultSections::tr("error"), indication, ColumnAlign::DecimalMark, 1.15});
    heads.push_back({ResultSections::tr("U"), indication, ColumnAlign::DecimalMark, 1});
    heads.push_back({ResultSections::tr("k"), {}, ColumnAlign::DecimalMark, 0.7});
    if (columns.error && columns.percent)
        heads.push_back({ResultSections::tr("error"), percent, ColumnAlign::DecimalMark, 1.15});
    heads.push_back({ResultSections::tr("U"), columns.percent ? percent : reference, ColumnAlign::DecimalMark, 1.1});
    if (columns.limit)
        heads.push_back({ResultSections::tr("limit"), QStringLiteral("± ") + indication, ColumnAlign::DecimalMark, 1.1});
    if (columns.state) {
        heads.push_back({ResultSections::tr("conf. prob."), QStringLiteral("%"), ColumnAlign::DecimalMark, 1.4});
        heads.push_back({ResultSections::tr("statement"), {}, ColumnAlign::Left, 1.7});
    }
    return heads;
}

std::vector<TableCell> rowOf(const ResultLine& line, const Columns& columns) {
    std::vector<TableCell> row;
    if (columns.direction)
        row.push_back({directionText(line.direction), PageInk::Text, false, shapeOf(line.direction)});
    row.push_back({digitsText(line.reference)});
    if (columns.bothMeans) {
        row.push_back({digitsText(line.rising)});
        row.push_back({digitsText(line.falling)});
    }
    row.push_back({digitsText(line.indication)});
    if (columns.error)
        row.push_back({digitsText(line.error, SignShown::Both)});
    row.push_back({digitsText(line.expanded)});
    row.push_back({digitsText(line.coverageFactor)});
    if (columns.error && columns.percent)
        row.push_back({digitsText(line.errorPercent, SignShown::Both)});
    row.push_back({digitsText(columns.percent ? line.expandedPercent : line.expandedReference)});
    if (columns.limit)
        row.push_back({digitsText(line.limit)});
    if (columns.state) {
        const bool pass = line.state == ConformityState::Pass;
        row.push_back({digitsText(line.conformance)});
        row.push_back({line.state ? stateText(*line.state) : QStringLiteral("–"), pass ? PageInk::Text : PageInk::Warning, !pass});
    }
    return row;
}

QString captionOf(const PhaseSection& section) {
    QString means = section.used == 1 ? ResultSections::tr("1 reading") : ResultSections::tr("%1 readings").arg(section.used);
    if (section.excluded > 0)
        means += ResultSections::tr(", %1 excluded").arg(section.excluded);
    const auto& lines = section.results;
    const bool equal = std::all_of(lines.begin(), lines.end(), [&](const ResultLine& line) { return line.n == lines.front().n; });
    if (equal && !lines.empty())
        means += lines.front().n == 1 ? ResultSections::tr(", one in each line") : ResultSections::tr(", each line the mean of %1").arg(lines.front().n);
    return section.phase == Phase::AsFound ? ResultSections::tr("before any adjustment · %1").arg(means)
                                           : ResultSections::tr("after adjustment · %1").arg(means);
}

/// "pass at every point", or the points where it is not.
QString conformityWords(const PhaseSection& section, const Item& item) {
    constexpr std::size_t most = 6;
    QStringList places;
    std::size_t count = 0;
    for (const ResultLine& line : section.results) {
        if (!line.state || *line.state == ConformityState::Pass)
            continue;
        if (++count > most)
            continue;
        const QString at = withUnit(digitsText(line.setPoint), item.reference.unit);
        places << (line.direction == Direction::Unknown ? at : at + QLatin1Char(' ') + directionText(line.direction));
    }
    if (count == 0)
        return overallText(ConformityState::Pass) + QLatin1Char('.');
    const QString more = count > most ? ResultSections::tr(" and more") : QString();
    return ResultSections::tr("%1. Not accepted: %2 of %3 points (%4%5).")
        .arg(overallText(*section.overall))
        .arg(count)
        .arg(section.results.size())
        .arg(places.join(QStringLiteral(", ")), more);
}

void addDecision(Flow& flow, const Certificate& certificate, const PhaseSection& section) {
    const TextStyle quiet{8.5, false, PageInk::Quiet};
    if (!section.overall) {
        if (!certificate.limits.stated)
            flow.paragraph(ResultSections::tr("No statement of conformity was asked for."), quiet);
        else if (std::any_of(section.results.begin(), section.results.end(), [](const ResultLine& line) { return line.expanded.empty(); }))
            flow.paragraph(ResultSections::tr("No statement of conformity: the uncertainty is not known."), {9.5, true, PageInk::Warning});
        return;
    }
    const bool pass = *section.overall == ConformityState::Pass;
    flow.paragraph(ResultSections::tr("Conformity %1: %2").arg(phaseText(section.phase), conformityWords(section, certificate.item)),
                   {9.5, true, pass ? PageInk::Text : PageInk::Warning});
    const Limits& limits = certificate.limits;
    QString words = ResultSections::tr("The statement covers every line of this table. Limits of the error of indication: %1%2. Decision rule: %3; conf. prob. is the "
                                       "conformance probability (JCGM 106) at the point. Decisions are taken on unrounded values.")
                        .arg(limitsText(limits, certificate.item),
                             limits.specification.empty() ? QString() : QStringLiteral(" (") + QString::fromStdString(limits.specification) + QLatin1Char(')'),
                             decisionText(limits));
    if (!limits.agreedWith.empty())
        words += QLatin1Char(' ') + ResultSections::tr("Agreed with %1%2.")
                                        .arg(QString::fromStdString(limits.agreedWith),
                                             limits.agreedOn.empty() ? QString() : ResultSections::tr(" on %1").arg(QString::fromStdString(limits.agreedOn)));
    flow.paragraph(words, quiet);
}

} // namespace

void addSummary(Flow& flow, const Certificate& certificate) {
    const Item& item = certificate.item;
    Table table;
    table.columns = {{ResultSections::tr("results"), {}, ColumnAlign::Left, 1.1},
                     {ResultSections::tr("largest error"), QString::fromStdString(item.indication.unit), ColumnAlign::DecimalMark, 1.3},
                     {ResultSections::tr("largest error"), ResultSections::tr("% of span"), ColumnAlign::DecimalMark, 1.3},
                     {ResultSections::tr("U"), QString::fromStdString(item.indication.unit), ColumnAlign::DecimalMark, 1},
                     {ResultSections::tr("at"), {}, ColumnAlign::Left, 1.6},
                     {ResultSections::tr("limit"), QStringLiteral("± ") + QString::fromStdString(item.indication.unit), ColumnAlign::DecimalMark, 1},
                     {ResultSections::tr("conformity"), {}, ColumnAlign::Left, 2}};
    for (const PhaseSection& section : certificate.phases) {
        if (!section.largest)
            continue;
        const ResultLine& line = section.results[*section.largest];
        const QString at = withUnit(digitsText(line.setPoint), item.reference.unit);
        const bool pass = section.overall == ConformityState::Pass;
        table.rows.push_back({{phaseText(section.phase), PageInk::Text, true},
                              {digitsText(line.error, SignShown::Both)},
                              {digitsText(line.errorPercent, SignShown::Both)},
                              {digitsText(line.expanded)},
                              {line.direction == Direction::Unknown ? at : at + QStringLiteral(", ") + directionText(line.direction)},
                              {digitsText(line.limit)},
                              {section.overall             ? stateText(*section.overall)
                               : certificate.limits.stated ? ResultSections::tr("none")
                                                           : ResultSections::tr("not asked for"),
                               !section.overall || pass ? PageInk::Text : PageInk::Warning, section.overall.has_value()}});
    }
    if (table.rows.empty())
        return;
    flow.headedTable(ResultSections::tr("Results in short"), ResultSections::tr("in full on the following pages"), table);
}

void addResults(Flow& flow, const Certificate& certificate, const PhaseSection& section) {
    const QString name = ResultSections::tr("Results %1").arg(phaseText(section.phase));
    const Columns columns = columnsOf(section);
    Table table;
    table.columns = headsOf(columns, certificate.item);
    for (const ResultLine& line : section.results)
        table.rows.push_back(rowOf(line, columns));
    flow.headedTable(name, captionOf(section), table);
    addDecision(flow, certificate, section);
    if (!section.errorKnown)
        return;
    flow.heading(ResultSections::tr("Error of indication %1").arg(phaseText(section.phase)), {}, PlotHeight);
    for (PageBlock& block : errorPlot(section, certificate.item, flow.picture(PlotHeight)))
        flow.place(std::move(block));
}

} // namespace spanwright
