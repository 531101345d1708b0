// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/TypedCheck.h"
#include "ui/commands/Workbench.h"

#include <QFrame>

class QLabel;
class QTimer;
class QVBoxLayout;

namespace spanwright {

class NextPlace;
class NumberEdit;
class TypedAnswer;

/// What to do next: the set point in figures that can be read from the bench, direction and run in words, a field for what is read,
/// what is expected, and a plain sentence on what was typed. A doubtful value is asked about before it is recorded.
class NextReading : public QFrame {
    Q_OBJECT

  public:
    explicit NextReading(Workbench& workbench, QWidget* parent = nullptr);
    /// Puts the cursor into the field that is typed next.
    void startTyping();

  signals:
    void planRequested();
    void entered();

  protected:
    void paintEvent(QPaintEvent* event) override;
    bool eventFilter(QObject* object, QEvent* event) override;

  private:
    void buildHead(QVBoxLayout* all);
    void buildFields(QVBoxLayout* all);
    void refresh();
    void showPlace();
    void showExpected();
    void showDwell();
    void judgeTyping();
    void acceptReference();
    void acceptIndication();
    [[nodiscard]] bool complete();
    void recordTyped();
    /// `answer`: what the journal says of the question before; empty when none was asked.
    void record(const Decimal& indication, const QString& answer = {});
    [[nodiscard]] bool asked();
    void say(const TypedCheck& check);
    void refuse(NumberEdit& field);
    [[nodiscard]] const PhaseEvaluation* figures() const;
    [[nodiscard]] std::optional<double> reference() const;
    [[nodiscard]] bool referenceTyped() const;

    Workbench& workbench_;
    Reading next_;          ///< what the fields will become
    bool planned_ = false;  ///< next_ is asked for by the plan
    QLabel* counter_;
    NextPlace* place_;
    NumberEdit* reference_;
    NumberEdit* indication_;
    QLabel* expected_;
    TypedAnswer* answer_;
    QLabel* dwell_;
    QTimer* clock_;
};

} // namespace spanwright
