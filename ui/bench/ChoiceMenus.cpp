// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ChoiceMenus.h"

#include "core/fit/CalibrationFunction.h"
#include "core/fit/fitFunction.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/ChoiceText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>
#include <QLabel>
#include <QMenu>
#include <QStyleOptionToolButton>
#include <QStylePainter>
#include <QWidgetAction>

#include <algorithm>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("ChoiceMenus", text);
}

const QString Arrow = QStringLiteral(" ▾");
constexpr int SidePadding = 12; // of both sides

template <class Edit>
void change(Workbench& workbench, const QString& text, Edit&& edit) {
    workbench.perform(changePart(workbench.record(), &Record::choices, text, std::forward<Edit>(edit)));
}

struct Group {
    const char* name;
    std::vector<FunctionChoice> functions;
};

const std::vector<Group>& groups() {
    using F = FunctionFamily;
    static const std::vector<Group> all{
        {QT_TRANSLATE_NOOP("ChoiceMenus", "Lines"), {{F::Line, 0}, {F::Proportional, 0}, {F::Constant, 0}}},
        {QT_TRANSLATE_NOOP("ChoiceMenus", "Polynomials"), {{F::Polynomial, 2}, {F::Polynomial, 3}, {F::Polynomial, 4}, {F::Polynomial, 5}, {F::Polynomial, 6}, {F::Polynomial, 7}, {F::Polynomial, 8}, {F::Polynomial, 9}, {F::Polynomial, 10}}},
        {QT_TRANSLATE_NOOP("ChoiceMenus", "Polynomials through zero"), {{F::PolynomialNoConstant, 2}, {F::PolynomialNoConstant, 3}, {F::PolynomialNoConstant, 4}, {F::PolynomialNoConstant, 5}, {F::PolynomialNoConstant, 6}}},
        {QT_TRANSLATE_NOOP("ChoiceMenus", "Curves"), {{F::SquareRoot, 0}, {F::Logarithmic, 0}, {F::Power, 0}, {F::ExponentialApproach, 0}}},
        {QT_TRANSLATE_NOOP("ChoiceMenus", "Sensors"), {{F::CallendarVanDusen, 0}, {F::ThermistorB, 0}, {F::SteinhartHart, 2}, {F::SteinhartHart, 3}, {F::SteinhartHart, 4}, {F::Nernst, 0}}},
        {QT_TRANSLATE_NOOP("ChoiceMenus", "Table"), {{F::Table, 0}}},
    };
    return all;
}

/// Words in a list that cannot be chosen, as far from the edge as its entries.
QLabel* addWords(QMenu& menu, const QString& text) {
    constexpr int entryIndent = 30;
    auto* label = new QLabel(text);
    label->setTextFormat(Qt::PlainText);
    label->setFont(textFont(TextRole::Small));
    label->setForegroundRole(inkRole::quiet);
    label->setContentsMargins(entryIndent, space::half, space::card, space::half);
    auto* action = new QWidgetAction(&menu);
    action->setDefaultWidget(label);
    if (!menu.isEmpty())
        menu.addSeparator();
    menu.addAction(action);
    return label;
}

void fillFunctions(QMenu& menu, Workbench& workbench) {
    menu.clear();
    const Choices& choices = workbench.record().choices;
    const auto entry = [&](QMenu& into, const FunctionChoice& function) {
        QAction* action = into.addAction(sentenceCase(functionText(function)));
        action->setObjectName(QString::fromStdString(functionName(function)));
        action->setCheckable(true);
        action->setChecked(choices.function == function);
        action->setToolTip(formulaText(function));
        into.setToolTipsVisible(true);
        QObject::connect(action, &QAction::triggered, &workbench, [&workbench, function] {
            change(workbench, tr("choose %1").arg(functionText(function)), [&](Choices& c) { c.function = function; });
        });
    };
    for (const Group& group : groups()) {
        const bool few = group.functions.size() <= 3;
        QMenu* into = few ? &menu : menu.addMenu(tr(group.name));
        for (const FunctionChoice& function : group.functions)
            entry(*into, function);
        if (&group == &groups().front())
            menu.addSeparator();
    }
    menu.addSeparator();
    for (const FitDirection direction : {FitDirection::Indication, FitDirection::Reference}) {
        const QString text = direction == FitDirection::Indication ? tr("Gives the indication from the reference") : tr("Gives the reference from the indication");
        QAction* action = menu.addAction(text);
        action->setCheckable(true);
        action->setChecked(directionOf(choices) == direction);
        action->setEnabled(!factsOf(choices.function.family).only); // some sensor equations give one quantity only
        QObject::connect(action, &QAction::triggered, &workbench, [&workbench, direction, text] { change(workbench, text.toLower(), [&](Choices& c) { c.fit = direction; }); });
    }
    addWords(menu, formulaText(choices.function))->setObjectName(QStringLiteral("functionFormula"));
}

void fillWeights(QMenu& menu, Workbench& workbench) {
    menu.clear();
    const Choices& choices = workbench.record().choices;
    const auto entry = [&](const QString& text, bool checked, auto edit) {
        QAction* action = menu.addAction(sentenceCase(text));
        action->setCheckable(true);
        action->setChecked(checked);
        QObject::connect(action, &QAction::triggered, &workbench, [&workbench, text, edit] { change(workbench, tr("choose %1").arg(text), edit); });
    };
    addWords(menu, tr("Weights"));
    for (const Weights weights : {Weights::Equal, Weights::Stated, Weights::Replicates, Weights::Proportional, Weights::VarianceFunction})
        entry(weightsText(weights), choices.weights == weights, [weights](Choices& c) { c.weights = weights; });
    addWords(menu, tr("Method"));
    for (const Method method : {Method::LeastSquares, Method::BothUncertain})
        entry(methodText(method), choices.method == method, [method](Choices& c) { c.method = method; });
    for (const RobustWeight robust : {RobustWeight::Huber, RobustWeight::Bisquare})
        entry(robustText(robust), choices.method == Method::Robust && choices.robust == robust, [robust](Choices& c) {
            c.method = Method::Robust;
            c.robust = robust;
        });
    addWords(menu, tr("Uncertainty of the function"));
    entry(tr("from the residual spread"), choices.covariance == CovarianceScale::Residuals, [](Choices& c) { c.covariance = CovarianceScale::Residuals; });
    entry(tr("from the stated uncertainties as they are"), choices.covariance == CovarianceScale::Stated, [](Choices& c) { c.covariance = CovarianceScale::Stated; });
    addWords(menu, tr("Calibration error that readings of a standard share"));
    entry(tr("carried to the budget, not the fit"), choices.sharedError == SharedError::Budget, [](Choices& c) { c.sharedError = SharedError::Budget; });
    entry(tr("in the fit, with the stated uncertainties as they are"), choices.sharedError == SharedError::Fit, [](Choices& c) {
        c.sharedError = SharedError::Fit;
        c.covariance = CovarianceScale::Stated; // what is stated cannot be scaled by the residuals
    });
}

} // namespace

ChoiceButton::ChoiceButton(const QString& name, const QString& accessibleName, QWidget* parent) : QToolButton(parent) {
    setObjectName(name);
    setAccessibleName(accessibleName);
    setFont(textFont(TextRole::Small));
    setPopupMode(QToolButton::InstantPopup);
    setMenu(new QMenu(this));
    setFocusPolicy(Qt::TabFocus);
    setForegroundRole(inkRole::quiet);
    setProperty("choice", true);
}

void ChoiceButton::fillWith(const std::function<void(QMenu&)>& fill) {
    fill_ = [this, fill] {
        fill(*menu());
        if (!further_.empty())
            menu()->addSeparator();
        for (QAction* action : further_)
            menu()->addAction(action);
    };
    connect(menu(), &QMenu::aboutToShow, this, fill_);
    fill_();
}

std::vector<QAction*> ChoiceButton::choices() {
    if (fill_)
        fill_();
    std::vector<QAction*> found;
    const std::function<void(const QMenu&)> collect = [&](const QMenu& from) {
        for (QAction* action : from.actions())
            if (const QMenu* inner = action->menu())
                collect(*inner);
            else if (!action->isSeparator() && !qobject_cast<QWidgetAction*>(action) && std::find(further_.begin(), further_.end(), action) == further_.end())
                found.push_back(action);
    };
    collect(*menu());
    return found;
}

void ChoiceButton::setChoice(const QString& text) {
    choice_ = text;
    setText(text + Arrow);
    setAccessibleDescription(text);
    updateGeometry();
}

/// In a narrow window the choice gives way to its arrow; its end, a degree say, stays.
void ChoiceButton::paintEvent(QPaintEvent*) {
    QStylePainter painter(this);
    QStyleOptionToolButton option;
    initStyleOption(&option);
    const QFontMetrics metrics(font());
    const int room = width() - SidePadding - metrics.horizontalAdvance(Arrow);
    if (metrics.horizontalAdvance(choice_) > room)
        option.text = metrics.elidedText(choice_, Qt::ElideMiddle, room) + Arrow;
    painter.drawComplexControl(QStyle::CC_ToolButton, option);
}

/// Without the room that a style keeps for its own arrow.
QSize ChoiceButton::sizeHint() const {
    const QFontMetrics metrics(font());
    return {metrics.horizontalAdvance(text()) + SidePadding, metrics.height() + 8};
}

ChoiceButton* functionButton(Workbench& workbench, QWidget* parent) {
    auto* button = new ChoiceButton(QStringLiteral("functionChoice"), tr("Calibration function"), parent);
    const auto refresh = [button, &workbench] { button->setChoice(sentenceCase(functionText(workbench.record().choices.function))); };
    QObject::connect(&workbench, &Workbench::recordChanged, button, refresh);
    button->fillWith([&workbench](QMenu& menu) { fillFunctions(menu, workbench); });
    refresh();
    return button;
}

ChoiceButton* coverageButton(Workbench& workbench, QWidget* parent) {
    auto* button = new ChoiceButton(QStringLiteral("coverageChoice"), tr("Coverage probability of every interval"), parent);
    const auto refresh = [button, &workbench] { button->setChoice(shareText(workbench.record().choices.coverage.toDouble())); };
    for (const Decimal& coverage : {Decimal{90, 2, {}}, Decimal{95, 2, {}}, Decimal{9545, 4, {}}, Decimal{99, 2, {}}, Decimal{9973, 4, {}}}) {
        const QString text = significantText(coverage.toDouble() * 100, coverage.decimals) + QStringLiteral(" %");
        QAction* action = button->menu()->addAction(text);
        QObject::connect(action, &QAction::triggered, &workbench, [&workbench, coverage, text] {
            change(workbench, tr("choose a coverage of %1").arg(text), [&](Choices& c) { c.coverage = coverage; });
        });
    }
    QObject::connect(&workbench, &Workbench::recordChanged, button, refresh);
    refresh();
    return button;
}

ChoiceButton* weightsButton(Workbench& workbench, QWidget* parent) {
    auto* button = new ChoiceButton(QStringLiteral("weightsChoice"), tr("Weights and method"), parent);
    const auto refresh = [button, &workbench] {
        const Choices& choices = workbench.record().choices;
        QString text = choices.method == Method::BothUncertain ? tr("both uncertain") : choices.method == Method::Robust ? tr("robust") : QString();
        if (text.isEmpty())
            text = choices.weights == Weights::Equal ? tr("equal weights") : choices.weights == Weights::Stated ? tr("stated weights")
                   : choices.weights == Weights::Replicates ? tr("replicate weights") : choices.weights == Weights::Proportional ? tr("proportional weights") : tr("weights by level");
        button->setChoice(text);
    };
    button->fillWith([&workbench](QMenu& menu) { fillWeights(menu, workbench); });
    QObject::connect(&workbench, &Workbench::recordChanged, button, refresh);
    refresh();
    return button;
}

ChoiceButton* enlargementButton(LinePlot& plot, QWidget* parent) {
    auto* button = new ChoiceButton(QStringLiteral("enlargementChoice"), tr("Enlargement of departures from the line"), parent);
    button->setChoice(tr("×1"));
    button->setToolTip(tr("How many times the distance from the line is drawn"));
    const auto entry = [&](const QString& text, Enlargement enlargement) {
        QAction* action = button->menu()->addAction(text);
        QObject::connect(action, &QAction::triggered, &plot, [&plot, enlargement] { plot.setEnlargement(enlargement); });
    };
    entry(tr("As much as shows the bands well"), std::nullopt);
    entry(tr("×1, the true picture"), 1);
    for (const int factor : {10, 100, 1000, 10000})
        entry(tr("Departures drawn ×%1").arg(factor), factor);
    QObject::connect(&plot, &LinePlot::enlargementChanged, button, [button](int factor) { button->setChoice(tr("×%1").arg(factor)); });
    return button;
}

} // namespace spanwright
