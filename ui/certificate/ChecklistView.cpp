// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/ChecklistView.h"

#include "ui/certificate/CertificateText.h"
#include "ui/look/Look.h"

#include <QKeyEvent>

#include <algorithm>

namespace spanwright {

namespace {

enum Role { StageRole = Qt::UserRole, FieldRole, LevelRole };

} // namespace

ChecklistView::ChecklistView(QWidget* parent) : QListWidget(parent) {
    setObjectName(QStringLiteral("certificateChecklist"));
    setAccessibleName(tr("What the certificate still lacks"));
    setWordWrap(true);
    setTextElideMode(Qt::ElideNone);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setFrameShape(QFrame::NoFrame);
    setProperty("bare", true);
    setResizeMode(QListView::Adjust);
    setSpacing(2);
    setCursor(Qt::PointingHandCursor);
    connect(this, &QListWidget::itemClicked, this, &ChecklistView::follow);
}

void ChecklistView::show(const std::vector<ChecklistItem>& items, const Record& record, const Evaluation& evaluation) {
    const int row = currentRow();
    clear();
    const auto blocks = std::count_if(items.begin(), items.end(), [](const ChecklistItem& item) { return item.level == GapLevel::Block; });
    const auto warns = static_cast<std::ptrdiff_t>(items.size()) - blocks;
    addHeading(blocks == 0 ? tr("Nothing is missing") : tr("Missing (%1)").arg(blocks));
    for (const ChecklistItem& item : items)
        if (item.level == GapLevel::Block)
            addEntry(item, gapText(item, record, evaluation));
    if (warns > 0)
        addHeading(tr("To be looked at (%1)").arg(warns));
    for (const ChecklistItem& item : items)
        if (item.level == GapLevel::Warn)
            addEntry(item, gapText(item, record, evaluation));
    colour();
    setCurrentRow(std::clamp(row, 0, count() - 1));
}

void ChecklistView::addHeading(const QString& text) {
    auto* item = new QListWidgetItem(text, this);
    item->setFlags(Qt::ItemIsEnabled);
    item->setFont(textFont(TextRole::Heading));
}

void ChecklistView::addEntry(const ChecklistItem& gap, const QString& text) {
    // The shape before the text says what the colour repeats: filled blocks, hollow warns.
    const bool block = gap.level == GapLevel::Block;
    auto* item = new QListWidgetItem((block ? QStringLiteral("■ ") : QStringLiteral("□ ")) + text, this);
    item->setData(StageRole, QString::fromStdString(gap.stage));
    item->setData(FieldRole, QString::fromStdString(gap.field));
    item->setData(LevelRole, static_cast<int>(gap.level));
    item->setData(Qt::AccessibleTextRole, (block ? tr("Missing: %1") : tr("To be looked at: %1")).arg(text));
    item->setToolTip(tr("Go to the field"));
}

void ChecklistView::follow(const QListWidgetItem* item) {
    if (item != nullptr && !item->data(StageRole).toString().isEmpty())
        emit goTo(item->data(StageRole).toString(), item->data(FieldRole).toString());
}

void ChecklistView::keyPressEvent(QKeyEvent* event) {
    if (event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter || event->key() == Qt::Key_Space)
        follow(currentItem());
    else
        QListWidget::keyPressEvent(event);
}

void ChecklistView::changeEvent(QEvent* event) {
    QListWidget::changeEvent(event);
    if (event->type() == QEvent::PaletteChange)
        colour();
}

void ChecklistView::colour() {
    for (int i = 0; i < count(); ++i) {
        const bool block = item(i)->data(LevelRole).isValid() && item(i)->data(LevelRole).toInt() == static_cast<int>(GapLevel::Block);
        item(i)->setForeground(block ? scheme().warning : scheme().ink);
    }
}

} // namespace spanwright
