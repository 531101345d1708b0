// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Finding.h"
#include "core/record/Record.h"

#include <QScrollArea>

#include <vector>

class QVBoxLayout;

namespace spanwright {

/// The findings, most serious first: one plain sentence, the figures behind it, one thing to do about it.
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

  private:
    void add(const Finding& finding, const Record& record);
    std::vector<Finding> findings_;
    QVBoxLayout* list_;
};

} // namespace spanwright
