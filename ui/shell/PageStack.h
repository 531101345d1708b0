// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QStackedWidget>

#include <functional>
#include <vector>

namespace spanwright {

/// Pages of which only the one in sight is made at once: the others follow one by one when the first has been painted and nothing
/// else waits, or at the moment when somebody asks for them.
class PageStack : public QStackedWidget {
    Q_OBJECT

  public:
    using Maker = std::function<QWidget*(QWidget* parent)>;
    explicit PageStack(QWidget* parent = nullptr) : QStackedWidget(parent) {}

    /// Appends a page that is made by `make`.
    void append(Maker make);
    /// The page, made by now.
    QWidget* page(int index);
    void makeAll();
    [[nodiscard]] bool complete() const;

  signals:
    /// Once, when the last page has been made.
    void completed();

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    void makeNext();

    std::vector<Maker> makers_; ///< by page; empty when it has been made
    bool begun_ = false;
};

} // namespace spanwright
