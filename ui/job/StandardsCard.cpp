// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/StandardsCard.h"

#include "ui/commands/PartCommand.h"
#include "ui/job/StandardEditor.h"
#include "ui/look/Look.h"
#include "ui/look/NumberColumns.h"
#include "ui/look/PaddedDelegate.h"

#include <QHeaderView>
#include <QTableWidget>
#include <QToolButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// "overdue by 12 days", "due 2027-03-14", "no due date".
QString dueText(const Standard& standard, int index, const Evaluation& evaluation) {
    for (const Evaluation::OverdueStandard& o : evaluation.overdue)
        if (static_cast<int>(o.index) == index)
            return StandardsCard::tr("overdue by %n day(s)", nullptr, o.days);
    return standard.due.empty() ? StandardsCard::tr("no due date") : QString::fromStdString(standard.due);
}

} // namespace

StandardsCard::StandardsCard(Workbench& bench, QWidget* parent)
    : Card(tr("Reference standards"), parent), bench_(bench), table_(new QTableWidget(0, 3)), remove_(new QToolButton) {
    auto* addButton = new QToolButton;
    addButton->setObjectName(QStringLiteral("standards.add"));
    addButton->setText(tr("Add a standard"));
    addButton->setProperty("link", true);
    addButton->setFocusPolicy(Qt::StrongFocus);
    remove_->setObjectName(QStringLiteral("standards.remove"));
    remove_->setText(tr("Remove"));
    remove_->setFocusPolicy(Qt::StrongFocus);
    addHeadWidget(remove_);
    addHeadWidget(addButton);
    connect(addButton, &QToolButton::clicked, this, &StandardsCard::add);
    connect(remove_, &QToolButton::clicked, this, &StandardsCard::remove);

    table_->setObjectName(QStringLiteral("standards"));
    table_->setAccessibleName(tr("Reference standards"));
    table_->setHorizontalHeaderLabels({tr("id"), tr("what"), tr("due")});
    table_->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    table_->horizontalHeader()->setHighlightSections(false);
    table_->verticalHeader()->hide();
    table_->verticalHeader()->setDefaultSectionSize(26);
    table_->setShowGrid(false);
    table_->setItemDelegate(new PaddedDelegate(table_));
    table_->setTabKeyNavigation(false);
    table_->setSelectionBehavior(QAbstractItemView::SelectRows);
    table_->setSelectionMode(QAbstractItemView::SingleSelection);
    table_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    new NumberColumns(table_, 1);
    connect(table_, &QTableWidget::currentCellChanged, this, [this](int row) {
        if (row >= 0)
            choose(row);
    });
    body()->addWidget(table_);
    connect(&bench, &Workbench::evaluationChanged, this, &StandardsCard::show);
    show();
}

int StandardsCard::count() const {
    return static_cast<int>(bench_.record().standards.size());
}

void StandardsCard::choose(int index) {
    chosen_ = std::clamp(index, 0, std::max(0, count() - 1));
    show();
}

void StandardsCard::show() {
    const std::vector<Standard>& standards = bench_.record().standards;
    const QSignalBlocker quiet(table_);
    if (chosen_ >= count())
        chosen_ = std::max(0, count() - 1);
    table_->setRowCount(count());
    for (int row = 0; row < count(); ++row) {
        const Standard& s = standards[static_cast<std::size_t>(row)];
        const QString texts[] = {QString::fromStdString(s.id), QString::fromStdString(s.description),
                                 dueText(s, row, *bench_.evaluation())};
        for (int column = 0; column < 3; ++column) {
            auto* item = new QTableWidgetItem(texts[column]);
            item->setToolTip(texts[column]);
            if (column == 2 && texts[2] != QString::fromStdString(s.due))
                item->setForeground(scheme().warning);
            table_->setItem(row, column, item);
        }
    }
    if (count() > 0)
        table_->setCurrentCell(chosen_, 0);
    table_->setFixedHeight(table_->horizontalHeader()->sizeHint().height() + 2 * table_->frameWidth() +
                           table_->verticalHeader()->defaultSectionSize() * std::clamp(count(), 1, 5));
    remove_->setEnabled(count() > 0 && !bench_.readOnly());
    if (editing_ != (count() > 0 ? chosen_ : -1))
        showEditor();
}

void StandardsCard::showEditor() {
    editing_ = count() > 0 ? chosen_ : -1;
    delete editor_;
    editor_ = nullptr;
    if (editing_ < 0)
        return;
    editor_ = makeStandardEditor(bench_, static_cast<std::size_t>(editing_));
    body()->addWidget(editor_);
    editor_->show();
}

void StandardsCard::add() {
    chosen_ = count();
    bench_.perform(changePart(bench_.record(), &Record::standards, tr("add a standard"), [&](std::vector<Standard>& all) {
        Standard standard;
        const Item& item = bench_.record().item;
        standard.role = all.empty() ? StandardRole::Reference : StandardRole::Indication;
        standard.unit = all.empty() ? item.reference.unit : item.indication.unit;
        all.push_back(standard);
    }));
    if (editor_)
        editor_->setFocus();
}

void StandardsCard::remove() {
    // The fields of the one that goes must not be asked any more.
    const auto gone = chosen_;
    delete editor_;
    editor_ = nullptr;
    editing_ = -1;
    bench_.perform(changePart(bench_.record(), &Record::standards, tr("remove a standard"),
                              [&](std::vector<Standard>& all) { all.erase(all.begin() + gone); }));
    show();
}

} // namespace spanwright
