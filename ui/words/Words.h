// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Error.h"
#include "core/base/Warning.h"
#include "core/diagnose/Finding.h"
#include "core/diagnose/Slips.h"
#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <QString>

namespace spanwright {

/// One sentence: what, where, what to do. Every code has one; a test walks them all.
QString errorText(const Error& error);
QString warningText(const Warning& warning);

/// A finding in words: one plain sentence, the figures behind it, and the one thing to do.
struct FindingWords {
    QString sentence;
    QString figures;
    QString remedy; ///< label of the action; empty when there is none
};
FindingWords findingWords(const Finding& finding, const Record& record);

/// A question about a typed number: "You typed 1.847. 1.487 would fit. Digits swapped?"
QString slipText(const Slip& slip, const Decimal& typed);

/// Names as they stand on screen and paper.
QString phaseText(Phase phase);
QString directionText(Direction direction);
QString functionText(const FunctionChoice& function);
/// "y = b0 + b1·x", where it is valid, and where it is published.
QString formulaText(const FunctionChoice& function);
/// How an iterated fit ended; empty for one that is solved in a single step.
QString convergenceText(const Convergence& convergence);
QString reasonText(ExclusionReason reason);
QString distributionText(Distribution distribution);
QString derivedLineText(DerivedLine line);
QString decisionRuleText(const Limits& limits);
QString conformityText(ConformityState state);
QString signOffText(SignOffRole role);
QString splitPartText(SplitPart part);
/// Why a value read back stands without an uncertainty; empty for a sound one.
QString valueStateText(ValueState state);

/// "y = 4.0005 + 0.0266639 x" with the units' names, to as many digits as the uncertainties support, true minus signs.
QString equationText(const Fit& fit, const Item& item);

} // namespace spanwright
