// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/certificate/Page.h"

#include <QPixmap>
#include <QScrollArea>

#include <map>

namespace spanwright {

/// The sheets below each other, as wide as there is room for; painted by the same function as the paper.
class PageSheets : public QWidget {
    Q_OBJECT

  public:
    explicit PageSheets(QWidget* parent = nullptr);
    void setPages(Pages pages);
    [[nodiscard]] const Pages& pages() const { return pages_; }
    /// Fits the sheets into this width.
    void setSheetWidth(int width);

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    [[nodiscard]] QRect sheet(std::size_t index) const;
    const QPixmap& picture(std::size_t index, const QSize& size);
    void arrange();

    Pages pages_;
    int width_ = 600;
    std::map<std::size_t, QPixmap> pictures_;
};

/// A preview that scrolls by keyboard and wheel.
class PagePreview : public QScrollArea {
    Q_OBJECT

  public:
    explicit PagePreview(QWidget* parent = nullptr);
    void setPages(Pages pages);
    [[nodiscard]] const Pages& pages() const { return sheets_->pages(); }

  protected:
    void resizeEvent(QResizeEvent* event) override;
    void changeEvent(QEvent* event) override;

  private:
    void fit();
    PageSheets* sheets_;
};

} // namespace spanwright
