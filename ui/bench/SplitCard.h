// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/Card.h"
#include "ui/plot/PlotSubject.h"

class QLabel;

namespace spanwright {

class SplitPicture;

/// What the spread of the readings is made of: the picture, what these readings cannot tell, and the way to the figures.
class SplitCard : public Card {
    Q_OBJECT

  public:
    explicit SplitCard(QWidget* parent = nullptr);
    [[nodiscard]] SplitPicture& picture() const { return *picture_; }
    void setSubject(const PlotSubject& subject, const QString& functionName);

  signals:
    void tableRequested();
    void performanceRequested();

  private:
    SplitPicture* picture_;
    QLabel* unknown_;
};

} // namespace spanwright
