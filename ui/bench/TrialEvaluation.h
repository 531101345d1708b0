// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <QObject>

#include <memory>

namespace spanwright {

class Progress;

/// What would follow if the record were another: evaluated off the window's thread, the newest request wins.
class TrialEvaluation : public QObject {
    Q_OBJECT

  public:
    explicit TrialEvaluation(QObject* parent = nullptr);
    ~TrialEvaluation() override;
    void start(Record record);

  signals:
    void ready(std::shared_ptr<const spanwright::Evaluation> evaluation);

  private:
    void stop();
    std::shared_ptr<Progress> progress_;
};

} // namespace spanwright
