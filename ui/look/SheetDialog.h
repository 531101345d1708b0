// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QDialog>
#include <QDialogButtonBox>

class QLabel;
class QPushButton;
class QVBoxLayout;

namespace spanwright {

/// A dialog at the distances of a card: what it shows in body(), its buttons at the foot. Gone once it is closed.
class SheetDialog : public QDialog {
    Q_OBJECT

  public:
    SheetDialog(const QString& id, const QString& title, QWidget* parent);

  protected:
    [[nodiscard]] QVBoxLayout* body() const { return body_; }
    /// At the foot. A button of AcceptRole calls accept(), one of RejectRole reject().
    QPushButton* addButton(const QString& text, QDialogButtonBox::ButtonRole role, const QString& id = {});
    QPushButton* addClose();
    /// The size at which tables and wrapped texts are seen whole, as far as the screen allows.
    void fitToContents();

    /// Words that explain what stands above them: small, quiet, wrapped, to be selected.
    static QLabel* quietNote(const QString& id);

  private:
    QVBoxLayout* body_;
    QDialogButtonBox* buttons_;
};

} // namespace spanwright
