// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/VarianceSplit.h"

#include <QWidget>

#include <optional>
#include <vector>

namespace spanwright {

/// What the spread of the readings is made of. The left column is all of it: the signal, and the noise as a sliver. The right
/// column is that sliver enlarged and divided. A part is selected with the mouse or the arrow keys; Escape lets go.
class SplitPicture : public QWidget {
    Q_OBJECT

  public:
    explicit SplitPicture(QWidget* parent = nullptr);

    /// `functionName` labels the signal. Without a split, `why` says so.
    void setSplit(std::optional<VarianceSplit> split, const QString& functionName, const QString& why);
    [[nodiscard]] std::optional<SplitPart> selected() const { return selected_; }
    void select(std::optional<SplitPart> part);

    /// One part as it is drawn, from the top.
    struct Part {
        SplitPart part = SplitPart::Repeatability;
        SplitRow row;
        double share = 0; ///< of the noise; of the total for the signal
        QRectF bar;
        QRectF label;
    };
    [[nodiscard]] const std::vector<Part>& parts() const { return parts_; }
    [[nodiscard]] QString summary() const;

    QSize sizeHint() const override { return {250, 380}; }
    QSize minimumSizeHint() const override { return {220, 210}; }

  signals:
    void partSelected(std::optional<spanwright::SplitPart> part);

  protected:
    void paintEvent(QPaintEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    bool event(QEvent* event) override;

  private:
    void layOut();
    void placeLabels(double lowest);
    [[nodiscard]] const Part* at(const QPointF& place) const;
    [[nodiscard]] QString figuresOf(const Part& part) const;
    [[nodiscard]] QString testOf(const Part& part) const;
    void paintSignal(QPainter& painter) const;
    void paintPart(QPainter& painter, const Part& part) const;
    void choose(std::optional<SplitPart> part);

    std::optional<VarianceSplit> split_;
    QString functionName_, why_;
    std::vector<Part> parts_; ///< the signal first, then the noise from the top
    QRectF sliver_, noise_;
    std::optional<SplitPart> selected_;
};

} // namespace spanwright
