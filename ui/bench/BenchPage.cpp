// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/BenchPage.h"

#include "core/fit/fitFunction.h"
#include "ui/bench/CompareDialog.h"
#include "ui/bench/CoefficientsDialog.h"
#include "ui/bench/ConvertDialog.h"
#include "ui/bench/DegreeTable.h"
#include "ui/bench/ExcludeDialog.h"
#include "ui/bench/ExclusionsDialog.h"
#include "ui/bench/FindingsCard.h"
#include "ui/bench/IntervalsDialog.h"
#include "ui/bench/LineCard.h"
#include "ui/bench/MatrixDialog.h"
#include "ui/bench/NextReading.h"
#include "ui/bench/PerformanceDialog.h"
#include "ui/bench/ReadingsTable.h"
#include "ui/bench/ResidualsCard.h"
#include "ui/bench/SplitCard.h"
#include "ui/bench/SplitTable.h"
#include "ui/look/WholeRows.h"
#include "ui/commands/ExclusionCommands.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Card.h"
#include "ui/look/Look.h"
#include "ui/plot/LinePlot.h"
#include "ui/plot/PlotPair.h"
#include "ui/plot/ResidualPlot.h"
#include "ui/plot/SplitPicture.h"
#include "ui/words/Words.h"

#include <QAction>
#include <QHBoxLayout>
#include <QSplitter>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

namespace {

/// The line of the budget that holds what a finding is about.
std::optional<DerivedLine> budgetLineOf(FindingCode code) {
    switch (code) {
    case FindingCode::Hysteresis: return DerivedLine::Hysteresis;
    case FindingCode::RunZeroShift:
    case FindingCode::RunGainChange:
    case FindingCode::FirstRunDiffers: return DerivedLine::RunToRun;
    default: return std::nullopt;
    }
}

QSplitter* parted(Qt::Orientation orientation, QWidget* parent) {
    auto* splitter = new QSplitter(orientation, parent);
    splitter->setHandleWidth(space::step + space::half);
    splitter->setChildrenCollapsible(false);
    return splitter;
}

/// A card above a lower one, as a further part of `columns`.
void stack(QSplitter* columns, Card* above, Card* below, int narrowest) {
    QSplitter* rows = parted(Qt::Vertical, columns);
    rows->addWidget(above);
    rows->addWidget(below);
    rows->setStretchFactor(0, 3);
    rows->setStretchFactor(1, 2);
    rows->setSizes({420, 290});
    rows->setMinimumWidth(narrowest);
}

} // namespace

BenchPage::BenchPage(Workbench& workbench, QWidget* parent) : QWidget(parent), workbench_(workbench) {
    setObjectName(QStringLiteral("benchPage"));
    auto* all = new QHBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    QSplitter* columns = parted(Qt::Horizontal, this);
    all->addWidget(columns);
    buildLeft(columns);
    buildMiddle(columns);
    buildRight(columns);
    columns->setObjectName(QStringLiteral("benchColumns"));
    columns->setStretchFactor(0, 1); // a wide window also shows the set point and the state of every reading
    columns->setStretchFactor(1, 4);
    columns->setStretchFactor(2, 1);
    columns->setSizes({384, 572, 288});
    new PlotPair(line_->plot(), residuals_->plot(), this);
    buildActions();
    connectSelection();
    connect(&workbench_, &Workbench::recordChanged, this, &BenchPage::refreshWords);
    connect(&workbench_, &Workbench::evaluationChanged, this, &BenchPage::refresh);
    refresh();
    refreshWords();
    showSelection();
}

void BenchPage::buildLeft(QSplitter* columns) {
    auto* left = new QWidget(columns);
    next_ = new NextReading(workbench_);
    table_ = new ReadingsTable(workbench_);
    readingsCard_ = new Card(tr("Readings"));
    // The table reaches from edge to edge; the head stays where the heads of other cards are.
    readingsCard_->layout()->setContentsMargins(1, space::step + space::half, 1, space::step);
    readingsCard_->layout()->itemAt(0)->layout()->setContentsMargins(space::card - 1, 0, space::card - 1, 0);
    readingsCard_->body()->addWidget(new WholeRows(table_));
    auto* column = new QVBoxLayout(left);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(space::step + space::half);
    column->addWidget(next_);
    column->addWidget(readingsCard_, 1);
    left->setMinimumWidth(340);
    connect(next_, &NextReading::planRequested, this, &BenchPage::planRequested);
}

void BenchPage::buildMiddle(QSplitter* columns) {
    line_ = new LineCard(workbench_);
    residuals_ = new ResidualsCard(workbench_);
    connect(residuals_, &ResidualsCard::excludeRequested, this, &BenchPage::exclude);
    connect(residuals_, &ResidualsCard::readmitRequested, this, &BenchPage::readmit);
    connect(residuals_, &ResidualsCard::partsLeft, this, [this] { split_->picture().select(std::nullopt); });
    stack(columns, line_, residuals_, 420);
}

void BenchPage::buildRight(QSplitter* columns) {
    split_ = new SplitCard;
    auto* findings = new FindingsCard(workbench_);
    connect(findings, &FindingsCard::remedyChosen, this, &BenchPage::follow);
    connect(split_, &SplitCard::tableRequested, this, &BenchPage::showSplitTable);
    connect(split_, &SplitCard::performanceRequested, this, &BenchPage::showPerformance);
    connect(&split_->picture(), &SplitPicture::partSelected, this, &BenchPage::showPart);
    stack(columns, split_, findings, 264);
}

void BenchPage::buildActions() {
    const auto add = [this](const char* id, const QString& text, const QKeySequence& keys, auto&& run) {
        auto* action = new QAction(text, this);
        action->setObjectName(QLatin1String(id));
        action->setShortcut(keys);
        action->setShortcutContext(Qt::WidgetWithChildrenShortcut);
        connect(action, &QAction::triggered, this, run);
        addAction(action);
        return action;
    };
    add("bench.next", tr("Type the next reading"), QKeySequence(Qt::CTRL | Qt::Key_Return), [this] { startTyping(); });
    add("bench.exclude", tr("Exclude the selected readings"), QKeySequence(Qt::CTRL | Qt::Key_E), [this] { exclude(); });
    add("bench.readmit", tr("Take the selected readings back in"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_E), [this] { readmit(); });
    add("bench.split-table", tr("Variance split as a table"), QKeySequence(Qt::CTRL | Qt::Key_T), [this] { showSplitTable(); });
    add("bench.performance", tr("Performance figures"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_T), [this] { showPerformance(); });
    add("bench.compare", tr("Compare with another function or method"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_C), [this] {
        const Record& record = workbench_.record();
        const bool robust = record.choices.method == Method::Robust;
        (new CompareDialog(workbench_, robust ? CompareDialog::withMethod(record, Method::LeastSquares) : CompareDialog::withRobust(record, record.choices.robust), this))->open();
    });
    add("bench.exclusions", tr("What the exclusions do"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_X), [this] { showExclusions(); });
    add("bench.convert", tr("Value from a reading"), QKeySequence(Qt::CTRL | Qt::Key_B), [this] { (new ConvertDialog(workbench_, this))->show(); });
    add("bench.coefficients", tr("Coefficients for a data logger"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_B),
        [this] { (new CoefficientsDialog(workbench_, screenTextPath(), this))->show(); });
    add("bench.intervals", tr("Coefficients and intervals"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_K), [this] { (new IntervalsDialog(workbench_, this))->show(); });
    degrees_ = add("bench.degrees", tr("Choosing a degree"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_G), [this] { showDegrees(); });
    add("bench.covariances", tr("Covariances between readings"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_M), [this] { (new MatrixDialog(workbench_, this))->open(); });
    const auto named = [this](const char* id) { return findChild<QAction*>(QLatin1String(id)); };
    line_->setFurther({named("bench.degrees"), named("bench.intervals")}, {named("bench.covariances"), named("bench.compare")});
    add("bench.line", tr("Go to the line plot"), QKeySequence(Qt::CTRL | Qt::Key_L), [this] { line_->plot().setFocus(); });
    add("bench.residuals", tr("Go to the residuals"), QKeySequence(Qt::CTRL | Qt::Key_R), [this] { residuals_->plot().setFocus(); });
    add("bench.table", tr("Go to the readings"), QKeySequence(Qt::CTRL | Qt::Key_G), [this] { table_->setFocus(); });
}

void BenchPage::connectSelection() {
    connect(&workbench_, &Workbench::selectionChanged, this, &BenchPage::showSelection);
    for (PlotView* plot : std::initializer_list<PlotView*>{&line_->plot(), &residuals_->plot()}) {
        connect(plot, &PlotView::selected, this, [this](const std::set<ReadingId>& ids) { workbench_.select(ids); });
        connect(plot, &PlotView::excludeRequested, this, &BenchPage::exclude);
    }
    connect(table_, &ReadingsTable::excludeRequested, this, &BenchPage::exclude);
    connect(table_, &ReadingsTable::readmitRequested, this, &BenchPage::readmit);
}

void BenchPage::startTyping() {
    next_->startTyping();
}

void BenchPage::refresh() {
    const PlotSubject subject = subjectOf(workbench_.record(), workbench_.evaluation());
    line_->setSubject(subject);
    residuals_->setSubject(subject);
    split_->setSubject(subject, functionText(workbench_.record().choices.function));
    degrees_->setEnabled(subject.phase && subject.phase->degrees);
    showSelection();
}

void BenchPage::refreshWords() {
    const Choices& choices = workbench_.record().choices;
    const FitDirection direction = directionOf(choices);
    readingsCard_->setTitle(tr("Readings %1").arg(phaseText(choices.phase)));
    line_->setTitle(direction == FitDirection::Indication ? tr("Indication against reference") : tr("Reference against indication"));
    residuals_->setDirection(direction);
}

void BenchPage::showSelection() {
    line_->plot().showSelection(workbench_.selection());
    residuals_->plot().showSelection(workbench_.selection());
}

void BenchPage::showPart(std::optional<SplitPart> part) {
    residuals_->showPart(part);
    line_->plot().showMean(part == SplitPart::Regression);
}

void BenchPage::exclude() {
    std::vector<ReadingId> ids;
    for (const ReadingId id : workbench_.selection())
        if (!workbench_.record().exclusions->contains(id))
            ids.push_back(id);
    if (ids.empty())
        readmit();
    else if (!workbench_.readOnly())
        (new ExcludeDialog(workbench_, std::move(ids), this))->open();
}

void BenchPage::readmit() {
    std::vector<ReadingId> ids;
    for (const ReadingId id : workbench_.selection())
        if (workbench_.record().exclusions->contains(id))
            ids.push_back(id);
    if (!ids.empty())
        workbench_.perform(std::make_unique<Readmit>(std::move(ids)));
}

void BenchPage::showExclusions() {
    (new ExclusionsDialog(workbench_, this))->open();
}

void BenchPage::showPerformance() {
    (new PerformanceDialog(workbench_, this))->open();
}

void BenchPage::showDegrees() {
    const Record& record = workbench_.record();
    const PlotSubject now = subjectOf(record, workbench_.evaluation());
    if (!now.phase || !now.phase->degrees)
        return;
    const bool forward = directionOf(record.choices) == FitDirection::Indication;
    const std::optional<Decimal>& resolution = forward ? record.item.resolution : record.item.referenceResolution;
    const FunctionChoice& function = record.choices.function;
    auto* dialog = new DegreeTable({*now.phase->degrees, resolution ? resolution->toDouble() : 0, function.family == FunctionFamily::Line ? 1 : function.order,
                                    QString::fromStdString(now.ordinate().unit), QString::fromStdString(now.abscissa().unit)},
                                   this);
    connect(dialog, &DegreeTable::degreeChosen, this, [this](int degree) {
        const FunctionChoice chosen = degree == 1 ? FunctionChoice{FunctionFamily::Line, 0} : FunctionChoice{FunctionFamily::Polynomial, degree};
        workbench_.perform(changePart(workbench_.record(), &Record::choices, tr("choose %1").arg(functionText(chosen)), [&](Choices& choices) { choices.function = chosen; }));
    });
    dialog->open();
}

void BenchPage::follow(const Finding& finding) {
    switch (finding.remedy) {
    case Remedy::CompareFunction: (new CompareDialog(workbench_, CompareDialog::withFunction(workbench_.record(), finding.suggestion), this))->open(); break;
    case Remedy::CarryToBudget: carryToBudget(budgetLineOf(finding.code)); break;
    case Remedy::SeeExclusions: showExclusions(); break;
    case Remedy::SeeReadings:
        workbench_.select({finding.rows.begin(), finding.rows.end()});
        table_->setFocus();
        break;
    case Remedy::ChooseWeights: line_->openWeights(); break;
    case Remedy::TakeMoreReadings: emit planRequested(); break;
    case Remedy::CheckRun: {
        const SplitPart part = finding.code == FindingCode::RunGainChange ? SplitPart::RunSlope : SplitPart::RunOffset;
        split_->picture().select(part);
        showPart(part);
        break;
    }
    case Remedy::None: break;
    }
}

/// A line that was left out counts again; one that counts is shown.
void BenchPage::carryToBudget(std::optional<DerivedLine> line) {
    const auto& omitted = workbench_.record().budget.omitted;
    if (line && !workbench_.readOnly() && std::any_of(omitted.begin(), omitted.end(), [&](const OmittedLine& one) { return one.line == *line; }))
        workbench_.perform(changePart(workbench_.record(), &Record::budget, tr("take %1 into the budget").arg(derivedLineText(*line)), [line](BudgetInput& budget) {
            std::erase_if(budget.omitted, [&](const OmittedLine& one) { return one.line == *line; });
        }));
    emit budgetRequested(line);
}

void BenchPage::showSplitTable() {
    (new SplitTable(workbench_, this))->open();
}

} // namespace spanwright
