// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QToolButton>

namespace spanwright {

/// Words that are pressed, as wide as they are, so that they stand in line with the text around them.
class LinkButton : public QToolButton {
    Q_OBJECT

  public:
    LinkButton(const QString& name, const QString& text, QWidget* parent = nullptr);
    [[nodiscard]] QSize sizeHint() const override;
    [[nodiscard]] QSize minimumSizeHint() const override { return sizeHint(); }
};

} // namespace spanwright
