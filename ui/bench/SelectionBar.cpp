// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/SelectionBar.h"

#include "ui/look/Look.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QToolButton>

#include <algorithm>

namespace spanwright {

SelectionBar::SelectionBar(Workbench& workbench, QWidget* parent) : QWidget(parent), workbench_(workbench), count_(new QLabel) {
    setObjectName(QStringLiteral("selectionBar"));
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(0, 0, 0, 0);
    row->setSpacing(space::half);
    count_->setFont(textFont(TextRole::Small));
    count_->setForegroundRole(inkRole::quiet);
    row->addWidget(count_);
    const auto link = [&](const QString& text, const QString& name, const QString& tip) {
        auto* button = new QToolButton;
        button->setText(text);
        button->setObjectName(name);
        button->setProperty("link", true);
        button->setFont(textFont(TextRole::Small));
        button->setToolTip(tip);
        button->setFocusPolicy(Qt::TabFocus);
        button->setProperty("choice", true);
        row->addWidget(button);
        return button;
    };
    exclude_ = link(tr("Exclude…"), QStringLiteral("excludeSelected"), tr("X in a plot or in the table"));
    readmit_ = link(tr("Take back in"), QStringLiteral("readmitSelected"), tr("R in the table"));
    QToolButton* clear = link(tr("Let go"), QStringLiteral("clearSelection"), tr("Escape in a plot"));
    connect(exclude_, &QToolButton::clicked, this, &SelectionBar::excludeRequested);
    connect(readmit_, &QToolButton::clicked, this, &SelectionBar::readmitRequested);
    connect(clear, &QToolButton::clicked, this, [this] { workbench_.select({}); });
    connect(&workbench_, &Workbench::selectionChanged, this, &SelectionBar::refresh);
    connect(&workbench_, &Workbench::recordChanged, this, &SelectionBar::refresh);
    refresh();
}

void SelectionBar::refresh() {
    const auto& chosen = workbench_.selection();
    const Exclusions& exclusions = *workbench_.record().exclusions;
    const auto out = static_cast<std::size_t>(std::count_if(chosen.begin(), chosen.end(), [&](ReadingId id) { return exclusions.contains(id); }));
    setVisible(!chosen.empty());
    count_->setText(tr("%1 selected").arg(chosen.size()));
    exclude_->setVisible(out < chosen.size());
    readmit_->setVisible(out > 0);
    exclude_->setEnabled(!workbench_.readOnly());
    readmit_->setEnabled(!workbench_.readOnly());
}

} // namespace spanwright
