// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/TypedCheck.h"

#include "core/interval/Bands.h"
#include "ui/look/NumberText.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Share of the span beyond which a value is asked about before there are readings to compare it with. Common practice.
constexpr double farShare = 0.2;

QString tr(const char* text) {
    return QCoreApplication::translate("TypedCheck", text);
}

bool finerThan(const Decimal& value, const std::optional<Decimal>& resolution) {
    return resolution && !value.isWide() && !resolution->isWide() && value.decimals > resolution->decimals;
}

} // namespace

std::optional<Expected> expectedAt(double reference, const PhaseEvaluation* phase, const Item& item) {
    if (!std::isfinite(reference))
        return std::nullopt;
    if (phase && phase->fit && phase->fit->direction == FitDirection::Indication && phase->fit->degreesOfFreedom >= 2 && phase->fit->setPoints >= 3) {
        const BandPoint band = bandAt(*phase->fit, reference);
        if (std::isfinite(band.newReading.low) && std::isfinite(band.newReading.high))
            return Expected{band.newReading.low, band.newReading.high, Expected::From::Readings};
    }
    if (!item.rangeLow || !item.rangeHigh || !item.outputLow || !item.outputHigh)
        return std::nullopt;
    const double x0 = item.rangeLow->toDouble(), x1 = item.rangeHigh->toDouble();
    const double y0 = item.outputLow->toDouble(), y1 = item.outputHigh->toDouble();
    if (x0 == x1 || y0 == y1)
        return std::nullopt;
    const double ideal = y0 + (reference - x0) / (x1 - x0) * (y1 - y0);
    const double far = farShare * std::abs(y1 - y0);
    return Expected{ideal - far, ideal + far, Expected::From::Range};
}

TypedCheck checkIndication(const Decimal& indication, double reference, const PhaseEvaluation* phase, const Item& item) {
    if (finerThan(indication, item.resolution))
        return {tr("This has more decimals than the resolution of %1.").arg(typedText(*item.resolution)), false};
    const std::optional<Expected> expected = expectedAt(reference, phase, item);
    if (!expected)
        return {};
    const double value = indication.toDouble();
    const bool inside = value >= expected->low && value <= expected->high;
    if (expected->from == Expected::From::Readings)
        return inside ? TypedCheck{tr("inside the prediction band"), false} : TypedCheck{tr("outside the prediction band"), true};
    return inside ? TypedCheck{} : TypedCheck{tr("more than a fifth of the span from what a perfect item would read"), true};
}

bool insideOfReadings(const Decimal& indication, double reference, const PhaseEvaluation* phase, const Item& item) {
    const std::optional<Expected> expected = expectedAt(reference, phase, item);
    const double value = indication.toDouble();
    return expected && expected->from == Expected::From::Readings && value >= expected->low && value <= expected->high;
}

TypedCheck checkReference(const Decimal& reference, const std::optional<Decimal>& setPoint, const Item& item) {
    if (finerThan(reference, item.referenceResolution))
        return {tr("This has more decimals than the reference is read with, %1.").arg(typedText(*item.referenceResolution)), false};
    if (setPoint && item.rangeLow && item.rangeHigh) {
        const double span = std::abs(item.rangeHigh->toDouble() - item.rangeLow->toDouble());
        if (std::abs(reference.toDouble() - setPoint->toDouble()) > 0.05 * span)
            return {tr("This is far from the set point of %1.").arg(typedText(*setPoint)), true};
    }
    return {};
}

int indicationDecimals(const Record& record) {
    if (!record.readings->indication().empty() && record.readings->indication().exact())
        return record.readings->indication().scale();
    return record.item.resolution ? record.item.resolution->decimals : 3;
}

} // namespace spanwright
