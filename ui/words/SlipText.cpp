// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

struct SlipText {
    Q_DECLARE_TR_FUNCTIONS(SlipText)

  public:
    static QString cause(SlipKind kind);
};

QString SlipText::cause(SlipKind kind) {
    switch (kind) {
    case SlipKind::RowsExchanged: return tr("Rows exchanged?");
    case SlipKind::DigitsSwapped: return tr("Digits swapped?");
    case SlipKind::DecimalShifted: return tr("Decimal mark in the wrong place?");
    case SlipKind::UnitPrefix: return tr("Typed in another unit?");
    case SlipKind::SignLost: return tr("Sign lost?");
    case SlipKind::DigitDoubled: return tr("One key twice?");
    case SlipKind::DigitMissing: return tr("A digit missing?");
    case SlipKind::UnitFactor: return tr("Read in another unit?");
    case SlipKind::Unexplained: return tr("It lies far from what the other readings say. Was it settled?");
    case SlipKind::OutsideItemRange: return tr("It lies outside the range of the item.");
    case SlipKind::OutsideStandardRange: return tr("It lies outside the range of the reference standard.");
    case SlipKind::OffResolution: return tr("It is finer than the stated resolution.");
    case SlipKind::RepeatsRowBefore: return tr("Both numbers are those of the row before. Read afresh?");
    case SlipKind::AgainstDirection: return tr("The reference moved against the direction of the run.");
    case SlipKind::BeforeSettled: return tr("Typed sooner than the planned wait.");
    }
    return {};
}

} // namespace

QString slipText(const Slip& slip, const Decimal& typed) {
    if (slip.kind == SlipKind::RowsExchanged)
        return SlipText::tr("You typed %1. It would fit in the place of reading %2. %3").arg(typedText(typed)).arg(slip.other).arg(SlipText::cause(slip.kind));
    if (slip.suggestion)
        return SlipText::tr("You typed %1. %2 would fit. %3").arg(typedText(typed), typedText(*slip.suggestion), SlipText::cause(slip.kind));
    return SlipText::tr("You typed %1. %2").arg(typedText(typed), SlipText::cause(slip.kind));
}

} // namespace spanwright
