// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/LineCard.h"

#include "ui/bench/ChoiceMenus.h"
#include "ui/look/Look.h"
#include "ui/plot/LinePlot.h"
#include "ui/words/Words.h"

#include <QLabel>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// The equation and how well it fits, in one line.
QString equationLine(const Fit& fit, const PlotSubject& subject) {
    QStringList parts{equationText(fit, {}), residualText(fit, subject)};
    if (fit.method == Method::Robust)
        parts << LineCard::tr("for comparison only: weighs down %1").arg(readingsText(fit.weighedDown.size()));
    return parts.join(QStringLiteral("      "));
}

} // namespace

LineCard::LineCard(Workbench& workbench, QWidget* parent)
    : Card(QString(), parent), plot_(new LinePlot), function_(functionButton(workbench, this)), weights_(weightsButton(workbench, this)), equation_(new QLabel) {
    for (QWidget* control : std::initializer_list<QWidget*>{function_, weights_, coverageButton(workbench, this), enlargementButton(*plot_, this)})
        addHeadWidget(control);
    equation_->setObjectName(QStringLiteral("equation"));
    equation_->setAccessibleName(tr("Calibration function"));
    equation_->setTextFormat(Qt::PlainText);
    equation_->setTextInteractionFlags(Qt::TextSelectableByMouse | Qt::TextSelectableByKeyboard);
    equation_->setWordWrap(true);
    equation_->setFont(textFont(TextRole::Small));
    body()->addWidget(plot_, 1);
    body()->addWidget(equation_);
}

void LineCard::setSubject(const PlotSubject& subject) {
    plot_->setSubject(subject);
    const Fit* fit = subject.phase && subject.phase->fit ? &*subject.phase->fit : nullptr;
    equation_->setText(fit ? equationLine(*fit, subject) : QString());
    equation_->setToolTip(fit ? equationText(*fit, subject.item) : QString());
}

void LineCard::setFurther(std::vector<QAction*> ofFunction, std::vector<QAction*> ofWeights) {
    function_->setFurther(std::move(ofFunction));
    weights_->setFurther(std::move(ofWeights));
}

void LineCard::openWeights() {
    weights_->showMenu();
}

} // namespace spanwright
