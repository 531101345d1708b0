// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"
#include "ui/look/NumberText.h"

#include <QLocale>
#include <QString>

namespace spanwright {

/// A printed number with the locale's decimal mark, a true minus sign and an exponent as ×10ⁿ; – where there is none.
QString digitsText(const Digits& digits, SignShown sign = SignShown::Minus, const QLocale& locale = QLocale());

/// One sentence on what is missing or doubtful, and what to do.
QString gapText(const ChecklistItem& item, const Record& record, const Evaluation& evaluation);
QString statementText(const StatementLine& line);
QString performanceText(PerformanceRow::Kind kind);
/// "within limits", … as it stands in a table of results.
QString stateText(ConformityState state);
/// What a result over all points says.
QString overallText(ConformityState state);
/// Limits in words: "±(0.075 % of span)".
QString limitsText(const Limits& limits, const Item& item);
/// The decision rule with its guard band and its risk.
QString decisionText(const Limits& limits);
/// The calibration function as an equation in the symbols y and x, with its coefficients as printed; empty where it is no sum of
/// powers.
QString equationForm(const FunctionSection& function);

} // namespace spanwright
