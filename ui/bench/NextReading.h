// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/TypedCheck.h"
#include "ui/commands/Workbench.h"

#include <QFrame>

class QLabel;
class QPushButton;
class QTimer;
class QToolButton;
class QVBoxLayout;

namespace spanwright {

class ChoiceButton;
class NumberEdit;

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
    void tell(const QString& sentence, bool warning);
    void judgeTyping();
    void acceptReference();
    void acceptIndication(bool sure);
    /// `answer`: what the journal says of the question before; empty when none was asked.
    void record(const Decimal& indication, const QString& answer = {});
    bool asked(const Decimal& indication);
    void ask(const QString& sentence, const std::optional<Decimal>& suggestion, NumberColumn column);
    void settle();
    void askPhase(Phase phase);
    void choosePhase(Phase phase);
    [[nodiscard]] const PhaseEvaluation* figures() const;
    [[nodiscard]] std::optional<double> reference() const;
    [[nodiscard]] bool referenceTyped() const;

    Workbench& workbench_;
    Reading next_;          ///< what the fields will become
    bool planned_ = false;  ///< next_ is asked for by the plan
    ChoiceButton* phase_;
    QLabel* counter_;
    QLabel* setPoint_;
    QLabel* unit_;
    QLabel* place_;
    NumberEdit* reference_;
    NumberEdit* indication_;
    QLabel* expected_;
    QLabel* sentence_;
    QToolButton* plan_;
    QPushButton* use_;
    QPushButton* keep_;
    QLabel* dwell_;
    QTimer* clock_;
    std::optional<Decimal> suggestion_;
    bool asking_ = false;
    QString question_; ///< what was asked about, for the journal
};

} // namespace spanwright
