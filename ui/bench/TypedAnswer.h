// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <QWidget>

#include <optional>

class QLabel;
class QPushButton;

namespace spanwright {

/// What is said about a number while it is typed; and, when it is doubtful, the question whether it is recorded as it is or another one in
/// its place.
class TypedAnswer : public QWidget {
    Q_OBJECT

  public:
    enum class Tone { Fine, Doubtful };
    explicit TypedAnswer(QWidget* parent = nullptr);
    void say(const QString& sentence, Tone tone = Tone::Fine);
    void ask(const QString& question, const QString& typed, const std::optional<Decimal>& suggestion);
    /// Takes the question back; what was said stays.
    void settle();
    /// With nothing said, a line is kept free all the same, so that nothing moves when there is something to say.
    void keepRoom(bool kept);
    /// What was asked; empty when nothing is.
    [[nodiscard]] QString question() const { return question_; }
    [[nodiscard]] bool suggests() const { return suggestion_.has_value(); }

  signals:
    void kept();
    void suggestionChosen(const spanwright::Decimal& suggestion);

  private:
    void showLine();

    QLabel* sentence_;
    QPushButton* use_;
    QPushButton* keep_;
    QString question_;
    std::optional<Decimal> suggestion_;
    bool roomKept_ = false;
};

} // namespace spanwright
