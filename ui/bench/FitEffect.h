// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"

#include <QString>
#include <QWidget>

#include <vector>

class QGridLayout;

namespace spanwright {

/// A figure of two fits side by side.
struct EffectRow {
    QString name, before, after;
};

/// Coefficients, residual s, the largest half-width of the new-reading band and the largest residual of two evaluations of a
/// phase. A figure that one of them has not is a dash.
std::vector<EffectRow> effectRows(const PhaseEvaluation* before, const PhaseEvaluation* after, const Item& item);

/// "residual s, mA"
QString inUnit(const QString& name, const QString& unit);
/// Half-width of the new-reading band where it is widest in the range; NaN without a fit.
double largestHalfWidth(const PhaseEvaluation* phase);

/// Those rows as a small table with two headings.
class EffectTable : public QWidget {
    Q_OBJECT

  public:
    explicit EffectTable(QWidget* parent = nullptr);
    void show(const QString& before, const QString& after, const std::vector<EffectRow>& rows);
    [[nodiscard]] QString text() const { return text_; }

  private:
    QGridLayout* grid_;
    QString text_;
};

} // namespace spanwright
