// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/PageStack.h"

#include <QTimer>

#include <algorithm>
#include <chrono>
#include <utility>

namespace spanwright {

namespace {

constexpr std::chrono::milliseconds Pause{20}; ///< for what the first page has to do

bool made(const PageStack::Maker& maker) {
    return !maker;
}

} // namespace

void PageStack::append(Maker make) {
    addWidget(new QWidget);
    makers_.push_back(std::move(make));
}

QWidget* PageStack::page(int index) {
    if (const Maker make = std::exchange(makers_[static_cast<std::size_t>(index)], {})) {
        QWidget* const place = widget(index);
        const bool inSight = currentIndex() == index;
        // A page that is built where it stands takes over the style once for every part, not once more for the whole.
        insertWidget(index, make(this));
        if (inSight)
            setCurrentIndex(index);
        removeWidget(place);
        delete place;
        if (complete())
            emit completed();
    }
    return widget(index);
}

void PageStack::makeAll() {
    for (int index = 0; index < count(); ++index)
        page(index);
}

bool PageStack::complete() const {
    return std::all_of(makers_.begin(), makers_.end(), made);
}

void PageStack::paintEvent(QPaintEvent* event) {
    QStackedWidget::paintEvent(event);
    // The pause begins when this paint is over, however long it takes.
    if (!std::exchange(begun_, true))
        QTimer::singleShot(0, this, [this] { QTimer::singleShot(Pause, this, &PageStack::makeNext); });
}

void PageStack::makeNext() {
    const auto next = std::find_if_not(makers_.begin(), makers_.end(), made);
    if (next == makers_.end())
        return;
    page(static_cast<int>(next - makers_.begin()));
    QTimer::singleShot(Pause, this, &PageStack::makeNext);
}

} // namespace spanwright
