// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/budget/ResultsCard.h"

#include "ui/budget/TextTable.h"
#include "ui/look/Look.h"
#include "ui/look/NumberColumns.h"
#include "ui/look/NumberText.h"
#include "ui/look/WholeRows.h"
#include "ui/words/Words.h"

#include <QLabel>
#include <QTableView>
#include <QVBoxLayout>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

enum Columns { SetPoint, Way, Reference, Indication, ErrorShown, Expanded, Factor, Freedom, Limit, Decision, Probability };

QString degreesText(double degrees) {
    return std::isfinite(degrees) && degrees < 10000 ? fixedText(std::floor(degrees), 0) : QString(QChar(0x221e));
}

const SetPointBudget* budgetOf(const Budget& budget, const PointResult& point) {
    for (const SetPointBudget& b : budget.points)
        if (b.setPoint == point.setPoint && b.direction == point.direction)
            return &b;
    return nullptr;
}

QString probabilityText(double p) {
    return p > 0.999 && p < 1 ? QStringLiteral("> ") + fixedText(99.9, 1) + QStringLiteral(" %") : fixedText(100 * p, 1) + QStringLiteral(" %");
}

/// Digits after the mark of what was read: as many as were typed, and more where U is finer.
struct ReadDecimals {
    int setPoint, reference, indication;
};

ReadDecimals readDecimals(const ReadingColumns& readings, const std::vector<PointResult>& points) {
    int finest = 0;
    for (const PointResult& p : points)
        finest = std::max(finest, decimalsOf(p.expanded));
    // A mean carries at most two digits more than the readings it is made of.
    const auto with = [&](int typed) { return std::max(typed, std::min(finest, typed + 2)); };
    return {readings.setPoint().scale(), with(readings.reference().scale()), with(readings.indication().scale())};
}

std::vector<TextTable::Cell> rowOf(const PointResult& p, const Budget& budget, const ReadDecimals& read) {
    const int decimals = decimalsOf(p.expanded);
    const SetPointBudget* made = budgetOf(budget, p);
    const bool bad = p.state == ConformityState::Fail || p.state == ConformityState::ConditionalFail;
    std::vector<TextTable::Cell> row(11);
    row[SetPoint].text = fixedText(p.setPoint, read.setPoint);
    row[Way].text = p.direction == Direction::Unknown ? QString() : directionText(p.direction);
    row[Reference].text = fixedText(p.reference, read.reference);
    row[Indication].text = fixedText(p.indication, read.indication);
    row[ErrorShown].text = fixedText(p.error, decimals, SignShown::Both);
    row[Expanded].text = fixedText(p.expanded, decimals);
    row[Factor].text = fixedText(p.coverageFactor, 2);
    row[Freedom].text = made ? degreesText(made->effectiveDegreesOfFreedom) : QString();
    // Without a contribution nothing is known, which is not an uncertainty of zero.
    if (made && made->items.empty())
        for (const int unknown : {Expanded, Factor, Freedom})
            row[static_cast<std::size_t>(unknown)].text = QStringLiteral("\u2013");
    row[Limit].text = p.limit ? QStringLiteral("\u00b1") + fixedText(*p.limit, decimals) : QString();
    row[Decision].text = p.state ? conformityText(*p.state) : QString();
    row[Decision].warning = bad;
    row[Probability].text = p.conformanceProbability ? probabilityText(*p.conformanceProbability) : QString();
    return row;
}

} // namespace

int decimalsOf(double u) {
    if (!std::isfinite(u) || u <= 0)
        return 4;
    int exponent = static_cast<int>(std::floor(std::log10(u)));
    // 0.0996 to two digits is 0.10.
    if (u / std::pow(10, exponent) >= 9.95)
        ++exponent;
    return std::clamp(1 - exponent, 0, 15);
}

ResultsCard::ResultsCard(Workbench& bench, QWidget* parent)
    : Card(tr("Results at each set point"), parent), bench_(bench),
      table_(new TextTable({{tr("set point"), true},
                            {tr("direction"), false},
                            {tr("reference"), true},
                            {tr("indication"), true},
                            {tr("error"), true},
                            {tr("U"), true},
                            {tr("k"), true},
                            {tr("\u03bd\neff"), true},
                            {tr("limit"), true},
                            {tr("decision"), false},
                            {tr("p of\nconformity"), true}},
                           this)),
      view_(textView(table_, QStringLiteral("budget.results"), tr("Results at each set point"))), empty_(new QLabel) {
    empty_->setForegroundRole(inkRole::quiet);
    empty_->setWordWrap(true);
    body()->addWidget(empty_);
    rows_ = new WholeRows(view_, WholeRows::Fill::Rows);
    body()->addWidget(rows_, 1);
    new NumberColumns(view_);
    connect(view_->selectionModel(), &QItemSelectionModel::currentRowChanged, this,
            [this](const QModelIndex& row) { emit pointChosen(row.row()); });
    connect(&bench, &Workbench::evaluationChanged, this, &ResultsCard::show);
    show();
}

void ResultsCard::show() {
    const Record& record = bench_.record();
    const auto evaluation = bench_.evaluation();
    const PhaseEvaluation* phase = evaluation->phase(record.choices.phase);
    const QString x = QString::fromStdString(record.item.reference.unit), y = QString::fromStdString(record.item.indication.unit);
    table_->setHead(SetPoint, tr("set point\n%1").arg(x).trimmed());
    table_->setHead(Reference, tr("reference\n%1").arg(x).trimmed());
    table_->setHead(Indication, tr("indication\n%1").arg(y).trimmed());
    table_->setHead(ErrorShown, tr("error\n%1").arg(y).trimmed());
    table_->setHead(Expanded, tr("U\n%1").arg(y).trimmed());
    table_->setHead(Limit, tr("limit\n%1").arg(y).trimmed());
    std::vector<std::vector<TextTable::Cell>> rows;
    if (phase) {
        const ReadDecimals decimals = readDecimals(*record.readings, phase->verdict.points);
        for (const PointResult& p : phase->verdict.points)
            rows.push_back(rowOf(p, phase->budget, decimals));
    }
    const bool errorKnown = phase && std::any_of(phase->verdict.points.begin(), phase->verdict.points.end(),
                                                 [](const PointResult& p) { return std::isfinite(p.error); });
    view_->setColumnHidden(ErrorShown, !errorKnown);
    view_->setColumnHidden(Limit, !record.limits.stated);
    view_->setColumnHidden(Decision, !record.limits.stated);
    view_->setColumnHidden(Probability, !record.limits.stated);
    view_->setColumnHidden(Way, !record.choices.separateDirections);
    const bool none = rows.empty();
    table_->fill(std::move(rows));
    empty_->setText(phase && phase->readings > 0
                        ? tr("There is no result yet: state the range and the indication at its ends on the Job stage.")
                        : tr("There are no readings in this phase yet."));
    empty_->setVisible(none);
    rows_->setVisible(!none);
    if (!none && !view_->currentIndex().isValid())
        view_->setCurrentIndex(table_->index(0, 0));
    QString note = phaseText(record.choices.phase);
    if (phase && phase->verdict.overall)
        note += QStringLiteral(" · ") + conformityText(*phase->verdict.overall);
    setNote(note);
}

} // namespace spanwright
