// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/ChoiceText.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("Choices", text);
}

} // namespace

QString weightsText(Weights weights) {
    switch (weights) {
    case Weights::Equal: return tr("equal weights");
    case Weights::Stated: return tr("weights from stated uncertainties");
    case Weights::Replicates: return tr("weights from replicates");
    case Weights::Proportional: return tr("weights proportional to level");
    case Weights::VarianceFunction: return tr("weights from scatter that grows with level");
    }
    return {};
}

QString robustText(RobustWeight weight) {
    return weight == RobustWeight::Huber ? tr("robust after Huber, for comparison only") : tr("robust, bisquare, for comparison only");
}

QString methodText(Method method) {
    switch (method) {
    case Method::LeastSquares: return tr("least squares");
    case Method::BothUncertain: return tr("reference and indication both uncertain");
    case Method::Robust: return tr("robust, for comparison only");
    }
    return {};
}

} // namespace spanwright
