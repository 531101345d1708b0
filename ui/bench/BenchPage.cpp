// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/BenchPage.h"

#include "core/fit/fitFunction.h"
#include "core/diagnose/FindingName.h"
#include "ui/bench/ChoiceMenus.h"
#include "ui/bench/CompareDialog.h"
#include "ui/bench/CoefficientsDialog.h"
#include "ui/bench/ConvertDialog.h"
#include "ui/bench/DegreeTable.h"
#include "ui/bench/Dismissals.h"
#include "ui/bench/ExcludeDialog.h"
#include "ui/bench/ExclusionsDialog.h"
#include "ui/bench/FindingsView.h"
#include "ui/bench/IntervalsDialog.h"
#include "ui/bench/MatrixDialog.h"
#include "ui/bench/NextReading.h"
#include "ui/bench/PerformanceDialog.h"
#include "ui/bench/ReadingsTable.h"
#include "ui/bench/ReasonDialog.h"
#include "ui/bench/SelectionBar.h"
#include "ui/bench/SplitTable.h"
#include "ui/look/WholeRows.h"
#include "ui/commands/ExclusionCommands.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Card.h"
#include "ui/look/LinkButton.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/LinePlot.h"
#include "ui/plot/PlotPair.h"
#include "ui/plot/ResidualPlot.h"
#include "ui/plot/SplitPicture.h"
#include "ui/words/Words.h"

#include <QAction>
#include <QDateTime>
#include <QHBoxLayout>
#include <QLabel>
#include <QMenu>
#include <QSplitter>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

namespace {

/// What the readings cannot tell, and why, in few words; empty when they tell everything.
QString unknownText(const VarianceSplit& split) {
    QStringList parts;
    for (const Warning& warning : split.warnings) {
        std::string figure, reason;
        for (const Fact& fact : warning.facts)
            (fact.name == "figure" ? figure : reason) = fact.value;
        const bool silent = reason == "not-stated";
        switch (warning.code) {
        case WarningCode::NoReplicates: parts << BenchPage::tr("lack of fit, repeatability (no set point read twice)"); break;
        case WarningCode::OneDirection: parts << (silent ? BenchPage::tr("hysteresis (directions not stated)") : BenchPage::tr("hysteresis (no set point from both directions)")); break;
        case WarningCode::OneRun:
            parts << (silent ? BenchPage::tr("run to run (runs not stated)") : reason == "one" ? BenchPage::tr("run to run (one run)") : BenchPage::tr("run to run (no runs to compare)"));
            break;
        case WarningCode::FigureUndefined:
            parts << (figure == "lack_of_fit" ? BenchPage::tr("lack of fit (no more set points than coefficients)") : BenchPage::tr("repeatability (nothing read twice in one run)"));
            break;
        default: break;
        }
    }
    return parts.isEmpty() ? QString() : BenchPage::tr("Not known: %1.").arg(parts.join(QStringLiteral("; ")));
}

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

QSplitter* parted(Qt::Orientation orientation, std::initializer_list<QWidget*> widgets) {
    auto* splitter = new QSplitter(orientation);
    splitter->setHandleWidth(space::step + space::half);
    splitter->setChildrenCollapsible(false);
    for (QWidget* widget : widgets)
        splitter->addWidget(widget);
    return splitter;
}

QString robustWords(const Fit& fit) {
    return BenchPage::tr("for comparison only: weighs down %1").arg(readingsText(fit.weighedDown.size()));
}

} // namespace

BenchPage::BenchPage(Workbench& workbench, QWidget* parent) : QWidget(parent), workbench_(workbench) {
    setObjectName(QStringLiteral("benchPage"));
    auto* all = new QHBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    QSplitter* columns = parted(Qt::Horizontal, {buildLeft(), buildMiddle(), buildRight()});
    columns->setObjectName(QStringLiteral("benchColumns"));
    columns->setStretchFactor(0, 1); // a wide window also shows the set point and the state of every reading
    columns->setStretchFactor(1, 4);
    columns->setStretchFactor(2, 1);
    columns->setSizes({384, 572, 288});
    all->addWidget(columns);
    new PlotPair(*line_, *residual_, this);
    buildActions();
    connectSelection();
    connect(&workbench_, &Workbench::recordChanged, this, &BenchPage::refreshWords);
    connect(&workbench_, &Workbench::evaluationChanged, this, &BenchPage::refresh);
    refresh();
    refreshWords();
    showSelection();
}

QWidget* BenchPage::buildLeft() {
    next_ = new NextReading(workbench_);
    table_ = new ReadingsTable(workbench_);
    readingsCard_ = new Card(tr("Readings"));
    // The table reaches from edge to edge; the head stays where the heads of other cards are.
    readingsCard_->layout()->setContentsMargins(1, space::step + space::half, 1, space::step);
    readingsCard_->layout()->itemAt(0)->layout()->setContentsMargins(space::card - 1, 0, space::card - 1, 0);
    readingsCard_->body()->addWidget(new WholeRows(table_));
    auto* left = new QWidget;
    auto* column = new QVBoxLayout(left);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(space::step + space::half);
    column->addWidget(next_);
    column->addWidget(readingsCard_, 1);
    left->setMinimumWidth(340);
    connect(next_, &NextReading::planRequested, this, &BenchPage::planRequested);
    return left;
}

QWidget* BenchPage::buildMiddle() {
    line_ = new LinePlot;
    residual_ = new ResidualPlot;
    lineCard_ = new Card(tr("Indication against reference"));
    functionButton_ = functionButton(workbench_, lineCard_);
    weightsButton_ = weightsButton(workbench_, lineCard_);
    for (QWidget* control : std::initializer_list<QWidget*>{functionButton_, weightsButton_, coverageButton(workbench_, lineCard_), enlargementButton(*line_, lineCard_)})
        lineCard_->addHeadWidget(control);
    equation_ = new QLabel;
    equation_->setObjectName(QStringLiteral("equation"));
    equation_->setAccessibleName(tr("Calibration function"));
    equation_->setTextFormat(Qt::PlainText);
    equation_->setTextInteractionFlags(Qt::TextSelectableByMouse | Qt::TextSelectableByKeyboard);
    equation_->setWordWrap(true);
    equation_->setFont(textFont(TextRole::Small));
    lineCard_->body()->addWidget(line_, 1);
    lineCard_->body()->addWidget(equation_);

    auto* residuals = new Card(tr("Residuals"));
    auto* bar = new SelectionBar(workbench_);
    connect(bar, &SelectionBar::excludeRequested, this, &BenchPage::exclude);
    connect(bar, &SelectionBar::readmitRequested, this, &BenchPage::readmit);
    viewButton_ = new ChoiceButton(QStringLiteral("residualChoice"), tr("What the residuals are drawn against"));
    residuals->addHeadWidget(bar);
    residuals->addHeadWidget(viewButton_);
    residuals->body()->addWidget(residual_, 1);
    for (const ResidualView view : residualViews)
        viewButton_->menu()->addAction(residualViewText(view, {}), this, [this, view] { setView(view); });

    QSplitter* rows = parted(Qt::Vertical, {lineCard_, residuals});
    rows->setStretchFactor(0, 3);
    rows->setStretchFactor(1, 2);
    rows->setSizes({420, 290});
    rows->setMinimumWidth(420);
    return rows;
}

QToolButton* BenchPage::cardLink(const QString& name, const QString& text, void (BenchPage::*what)()) {
    auto* link = new LinkButton(name, text);
    connect(link, &QToolButton::clicked, this, what);
    return link;
}

QWidget* BenchPage::buildRight() {
    split_ = new SplitPicture;
    findings_ = new FindingsView;
    splitCard_ = new Card(tr("Variance split"));
    splitCard_->body()->addWidget(split_);
    unknown_ = new QLabel;
    unknown_->setObjectName(QStringLiteral("splitUnknown"));
    unknown_->setFont(textFont(TextRole::Small));
    unknown_->setForegroundRole(inkRole::quiet);
    unknown_->setWordWrap(true);
    splitCard_->body()->addWidget(unknown_);
    auto* links = new QHBoxLayout;
    links->setSpacing(space::card);
    links->addWidget(cardLink(QStringLiteral("splitFigures"), tr("As a table"), &BenchPage::showSplitTable));
    links->addWidget(cardLink(QStringLiteral("performanceFigures"), tr("Performance figures"), &BenchPage::showPerformance));
    links->addStretch(1);
    splitCard_->body()->addLayout(links);
    findingsCard_ = new Card(tr("Findings"));
    findingsCard_->body()->addWidget(findings_);
    QSplitter* rows = parted(Qt::Vertical, {splitCard_, findingsCard_});
    rows->setStretchFactor(0, 3);
    rows->setStretchFactor(1, 2);
    rows->setSizes({420, 290});
    rows->setMinimumWidth(264);
    connect(findings_, &FindingsView::remedyChosen, this, &BenchPage::follow);
    connect(findings_, &FindingsView::readingsChosen, this, [this](const std::vector<ReadingId>& ids) { workbench_.select({ids.begin(), ids.end()}); });
    connect(findings_, &FindingsView::dismissChosen, this, &BenchPage::dismiss);
    connect(findings_, &FindingsView::recallChosen, this, &BenchPage::recall);
    connect(split_, &SplitPicture::partSelected, this, &BenchPage::showPart);
    return rows;
}

void BenchPage::buildActions() {
    const auto add = [this](const char* id, const QString& text, const QKeySequence& keys, auto&& run) {
        auto* action = new QAction(text, this);
        action->setObjectName(QLatin1String(id));
        action->setShortcut(keys);
        action->setShortcutContext(Qt::WidgetWithChildrenShortcut);
        connect(action, &QAction::triggered, this, run);
        addAction(action);
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
    add("bench.degrees", tr("Choosing a degree"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_G), [this] { showDegrees(); });
    add("bench.covariances", tr("Covariances between readings"), QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_M), [this] { (new MatrixDialog(workbench_, this))->open(); });
    const auto named = [this](const char* id) { return findChild<QAction*>(QLatin1String(id)); };
    functionButton_->setFurther({named("bench.degrees"), named("bench.intervals")});
    weightsButton_->setFurther({named("bench.covariances"), named("bench.compare")});
    add("bench.line", tr("Go to the line plot"), QKeySequence(Qt::CTRL | Qt::Key_L), [this] { line_->setFocus(); });
    add("bench.residuals", tr("Go to the residuals"), QKeySequence(Qt::CTRL | Qt::Key_R), [this] { residual_->setFocus(); });
    add("bench.table", tr("Go to the readings"), QKeySequence(Qt::CTRL | Qt::Key_G), [this] { table_->setFocus(); });
}

void BenchPage::connectSelection() {
    connect(&workbench_, &Workbench::selectionChanged, this, &BenchPage::showSelection);
    for (PlotView* plot : std::initializer_list<PlotView*>{line_, residual_}) {
        connect(plot, &PlotView::selected, this, [this](const std::set<ReadingId>& ids) { workbench_.select(ids); });
        connect(plot, &PlotView::excludeRequested, this, &BenchPage::exclude);
    }
    connect(table_, &ReadingsTable::excludeRequested, this, &BenchPage::exclude);
    connect(table_, &ReadingsTable::readmitRequested, this, &BenchPage::readmit);
}

void BenchPage::startTyping() {
    next_->startTyping();
}

PlotSubject BenchPage::subject() const {
    const Record& record = workbench_.record();
    return {phaseOf(workbench_.evaluation(), record.choices.phase), record.item, record.readings, record.exclusions, directionOf(record.choices)};
}

void BenchPage::refresh() {
    const PlotSubject now = subject();
    line_->setSubject(now);
    residual_->setSubject(now);
    const bool correlated = now.phase && now.phase->fit && now.phase->fit->correlated;
    const QString why = now.phase && now.phase->notFitted ? errorText(*now.phase->notFitted)
                        : correlated ? tr("With covariances between readings there is no split: it is defined for readings whose errors are independent.")
                                     : tr("What the spread is made of appears here once a function is fitted.");
    const QString name = functionText(workbench_.record().choices.function);
    split_->setSplit(now.phase ? now.phase->split : std::nullopt, name, why);
    const QString unknown = now.phase && now.phase->split ? unknownText(*now.phase->split) : QString();
    unknown_->setText(unknown);
    unknown_->setVisible(!unknown.isEmpty());
    const std::size_t used = now.phase && now.phase->fit ? now.phase->fit->used : 0;
    splitCard_->setNote(used == 0 ? QString() : used < 100000 ? readingsText(used) : tr("n = %1").arg(used));
    const std::vector<Finding> found = now.phase ? now.phase->findings : std::vector<Finding>{};
    findings_->setFindings(found, workbench_.record(), now.phase && now.phase->fit ? tr("Nothing stands out.") : tr("Findings appear here as readings come in."));
    const auto dismissed = std::count_if(found.begin(), found.end(), [&](const Finding& finding) { return dismissalOf(finding, workbench_.record()) != nullptr; });
    const qsizetype open = static_cast<qsizetype>(found.size()) - dismissed;
    findingsCard_->setNote(found.empty() ? QString() : dismissed == 0 ? QString::number(open) : tr("%1, %2 dismissed").arg(open).arg(dismissed));
    QString words;
    if (now.phase && now.phase->fit) {
        const Fit& fit = *now.phase->fit;
        words = equationText(fit, {}) + QStringLiteral("      ") + residualText(fit, now);
        if (fit.method == Method::Robust)
            words += QStringLiteral("      ") + robustWords(fit);
    }
    equation_->setText(words);
    if (auto* degrees = findChild<QAction*>(QStringLiteral("bench.degrees")))
        degrees->setEnabled(now.phase && now.phase->degrees);
    equation_->setToolTip(now.phase && now.phase->fit ? equationText(*now.phase->fit, now.item) : QString());
    showSelection();
}

void BenchPage::refreshWords() {
    const Record& record = workbench_.record();
    readingsCard_->setTitle(tr("Readings %1").arg(phaseText(record.choices.phase)));
    lineCard_->setTitle(directionOf(record.choices) == FitDirection::Indication ? tr("Indication against reference") : tr("Reference against indication"));
    setView(residual_->view());
}

void BenchPage::setView(ResidualView view) {
    if (view != residual_->view())
        residual_->setView(view);
    if (view != ResidualView::Reference && split_->selected())
        split_->select(std::nullopt);
    viewButton_->setChoice(residualViewText(view, subject()));
}

void BenchPage::showSelection() {
    line_->showSelection(workbench_.selection());
    residual_->showSelection(workbench_.selection());
}

void BenchPage::showPart(std::optional<SplitPart> part) {
    residual_->showPart(part);
    line_->showMean(part == SplitPart::Regression);
    setView(residual_->view());
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
    const PlotSubject now = subject();
    if (!now.phase || !now.phase->degrees)
        return;
    const Record& record = workbench_.record();
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
    case Remedy::ChooseWeights: weightsButton_->showMenu(); break;
    case Remedy::TakeMoreReadings: emit planRequested(); break;
    case Remedy::CheckRun: {
        const SplitPart part = finding.code == FindingCode::RunGainChange ? SplitPart::RunSlope : SplitPart::RunOffset;
        split_->select(part);
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

void BenchPage::dismiss(const Finding& finding) {
    if (workbench_.readOnly())
        return;
    const FindingWords words = findingWords(finding, workbench_.record());
    const ReasonDialog::Question question{tr("Dismiss a finding"),
                                          words.sentence,
                                          {},
                                          tr("&Why? It stays listed, and comes back when its figures change."),
                                          {},
                                          tr("Dismiss"),
                                          tr("Keep it")};
    auto* dialog = new ReasonDialog(QStringLiteral("dismissDialog"), question, this);
    connect(dialog, &QDialog::accepted, this, [this, finding, dialog] {
        const QString date = QDateTime::fromMSecsSinceEpoch(workbench_.now()).date().toString(Qt::ISODate);
        workbench_.perform(changePart(workbench_.record(), &Record::dismissals, tr("dismiss a finding"), [&](std::vector<Dismissal>& all) {
            all.push_back({std::string(findingName(finding.code)), figuresKey(finding), dialog->reason().toStdString(), workbench_.person().toStdString(), date.toStdString()});
        }));
    });
    dialog->open();
}

void BenchPage::recall(const Finding& finding) {
    const Dismissal* found = dismissalOf(finding, workbench_.record());
    if (!found)
        return;
    workbench_.perform(changePart(workbench_.record(), &Record::dismissals, tr("bring a finding back"), [gone = *found](std::vector<Dismissal>& all) { std::erase(all, gone); }));
}

void BenchPage::showSplitTable() {
    (new SplitTable(workbench_, this))->open();
}

} // namespace spanwright
