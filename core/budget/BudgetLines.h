// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/fit/Fit.h"
#include "core/record/Record.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// A variance that the readings gave, unit of the fit's ordinate squared, and its degrees of freedom.
struct Spread {
    double variance = 0;
    double degreesOfFreedom = 0;
};

/// The place at which a budget is drawn up.
struct BudgetPlace {
    double reference = 0, indication = 0;
    double slope = 1; ///< change of the indication per change of the reference
    /// What a weighted variance of the split is multiplied by to be the variance of one reading here; 1 for equal weights.
    double weightScale = 1;
};

/// `fit` may be null: then the slope is the perfect item's.
BudgetPlace budgetPlace(const Record& record, const Fit* fit, double reference, double indication);

/// Gathers the contributions at one place: each source once, without those that the record leaves out.
class BudgetLines {
  public:
    BudgetLines(const Record& record, const BudgetPlace& place) : record_(record), place_(place) {}

    void add(DerivedLine line, Side side, Distribution distribution, double amount, double divisor, double degreesOfFreedom);
    void addStandards();
    void addReferenceResolution();
    void addIndicationResolution();
    /// The spread of a mean of `n`.
    void addSpread(DerivedLine line, Side side, const Spread& spread, std::size_t n, bool fromOtherPhase);
    void addManual();

    [[nodiscard]] std::vector<BudgetItem> take() { return std::move(items_); }

  private:
    [[nodiscard]] bool omitted(DerivedLine line) const;
    void addCommon(DerivedLine line, const std::string& id, Side side, Distribution distribution, double amount, double divisor);
    void addResolution(DerivedLine line, Side side, const std::optional<Decimal>& ofItem, StandardRole role);

    const Record& record_;
    BudgetPlace place_;
    std::vector<BudgetItem> items_;
};

} // namespace spanwright
