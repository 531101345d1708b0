// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Finding.h"
#include "core/record/Record.h"

#include <QScrollArea>

#include <vector>

class QHBoxLayout;
class QToolButton;
class QVBoxLayout;

namespace spanwright {

/// The findings, most serious first: one plain sentence, the figures behind it, one thing to do about it. Dismissed ones stay listed
/// below, with who and why, and stand above again when their figures change.
class FindingsView : public QScrollArea {
    Q_OBJECT

  public:
    explicit FindingsView(QWidget* parent = nullptr);
    void setFindings(std::vector<Finding> findings, const Record& record, const QString& whenNone);
    [[nodiscard]] const std::vector<Finding>& findings() const { return findings_; }

  signals:
    void remedyChosen(const spanwright::Finding& finding);
    /// The sentence was pressed: show the readings it is about.
    void readingsChosen(const std::vector<spanwright::ReadingId>& ids);
    void dismissChosen(const spanwright::Finding& finding);
    void recallChosen(const spanwright::Finding& finding);

  private:
    void add(const Finding& finding, const Record& record);
    void addDismissed(const Finding& finding, const Dismissal& dismissal, const Record& record);
    QToolButton* link(QHBoxLayout* into, const QString& text, const QString& name, const QString& about);
    std::vector<Finding> findings_;
    QVBoxLayout* list_;
};

} // namespace spanwright
