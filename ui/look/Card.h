// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QFrame>

class QHBoxLayout;
class QLabel;
class QVBoxLayout;

namespace spanwright {

/// A sheet with a title on the left of its head and small controls on the right, as every part of every stage is.
class Card : public QFrame {
    Q_OBJECT

  public:
    explicit Card(const QString& title, QWidget* parent = nullptr);
    void setTitle(const QString& title);
    /// A quiet text at the right end of the head.
    void setNote(const QString& note);
    void addHeadWidget(QWidget* widget);
    [[nodiscard]] QVBoxLayout* body() const { return body_; }

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    QLabel* title_;
    QLabel* note_;
    QHBoxLayout* head_;
    QVBoxLayout* body_;
};

} // namespace spanwright
