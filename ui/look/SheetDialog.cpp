// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/SheetDialog.h"

#include "ui/look/Look.h"

#include <QLabel>
#include <QPushButton>
#include <QScreen>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

SheetDialog::SheetDialog(const QString& id, const QString& title, QWidget* parent) : QDialog(parent), body_(new QVBoxLayout), buttons_(new QDialogButtonBox) {
    setObjectName(id);
    setWindowTitle(title);
    setAttribute(Qt::WA_DeleteOnClose);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step + space::half);
    body_->setSpacing(space::step);
    all->addLayout(body_, 1);
    all->addWidget(buttons_);
    buttons_->hide(); // until there are some
    connect(buttons_, &QDialogButtonBox::accepted, this, &QDialog::accept);
    connect(buttons_, &QDialogButtonBox::rejected, this, &QDialog::reject);
}

QPushButton* SheetDialog::addButton(const QString& text, QDialogButtonBox::ButtonRole role, const QString& id) {
    QPushButton* button = buttons_->addButton(text, role);
    button->setObjectName(id);
    buttons_->show();
    return button;
}

QPushButton* SheetDialog::addClose() {
    return addButton(tr("&Close"), QDialogButtonBox::RejectRole);
}

void SheetDialog::fitToContents() {
    constexpr int frame = 60; // of the window manager
    ensurePolished();
    QLayout* all = layout();
    all->activate();
    const QSize room = screen()->availableSize() - QSize(frame, frame);
    const int width = std::min(std::max(all->totalSizeHint().width(), minimumWidth()), room.width());
    const int tall = all->hasHeightForWidth() ? all->totalHeightForWidth(width) : all->totalSizeHint().height();
    resize(width, std::min(std::max(tall, all->totalMinimumSize().height()), room.height()));
}

QLabel* SheetDialog::quietNote(const QString& id) {
    auto* note = new QLabel;
    note->setObjectName(id);
    note->setForegroundRole(inkRole::quiet);
    note->setFont(textFont(TextRole::Small));
    note->setTextFormat(Qt::PlainText);
    note->setWordWrap(true);
    note->setTextInteractionFlags(Qt::TextSelectableByMouse);
    return note;
}

} // namespace spanwright
