// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/JournalDialog.h"

#include "ui/look/Look.h"
#include "ui/look/PaddedDelegate.h"
#include "ui/look/WholeRows.h"
#include "ui/words/JournalText.h"

#include <QAbstractTableModel>
#include <QCoreApplication>
#include <QDateTime>
#include <QDialogButtonBox>
#include <QHeaderView>
#include <QLabel>
#include <QPushButton>
#include <QTableView>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

namespace {

class JournalModel : public QAbstractTableModel {
    Q_DECLARE_TR_FUNCTIONS(JournalModel)

  public:
    JournalModel(Shared<Journal> journal, QObject* parent) : QAbstractTableModel(parent), journal_(std::move(journal)) {}
    int rowCount(const QModelIndex& parent = {}) const override { return parent.isValid() ? 0 : static_cast<int>(journal_->size()); }
    int columnCount(const QModelIndex& parent = {}) const override { return parent.isValid() ? 0 : 7; }
    QVariant data(const QModelIndex& index, int role) const override {
        if (role != Qt::DisplayRole && role != Qt::ToolTipRole)
            return {};
        const JournalEntry& e = journal_->entries()[journal_->size() - 1 - static_cast<std::size_t>(index.row())];
        const JournalWords words = journalWords(e);
        switch (index.column()) {
        case 0: return QDateTime::fromMSecsSinceEpoch(e.at).toString(QStringLiteral("yyyy-MM-dd HH:mm:ss"));
        case 1: return e.who.empty() ? QStringLiteral("\u2013") : QString::fromStdString(e.who);
        case 2: return words.what;
        case 3: return words.where;
        case 4: return words.before;
        case 5: return words.after;
        default: return words.reason;
        }
    }
    QVariant headerData(int section, Qt::Orientation orientation, int role) const override {
        if (orientation != Qt::Horizontal || role != Qt::DisplayRole)
            return {};
        const QString names[] = {tr("when"), tr("who"), tr("what"), tr("where"), tr("before"), tr("after"), tr("reason")};
        return names[section];
    }

  private:
    Shared<Journal> journal_;
};

} // namespace

JournalDialog::JournalDialog(const Record& record, QWidget* parent) : QDialog(parent) {
    setObjectName(QStringLiteral("journalDialog"));
    setWindowTitle(tr("Journal"));
    resize(1180, 600);
    auto* all = new QVBoxLayout(this);
    auto* table = new QTableView;
    table->setObjectName(QStringLiteral("journal.table"));
    table->setAccessibleName(tr("Journal, newest first"));
    table->setModel(new JournalModel(record.journal, table));
    table->verticalHeader()->hide();
    table->verticalHeader()->setDefaultSectionSize(24);
    table->setShowGrid(false);
    table->setWordWrap(false);
    table->setItemDelegate(new PaddedDelegate(table));
    table->setSelectionBehavior(QAbstractItemView::SelectRows);
    table->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    for (int column = 0; column < 4; ++column)
        table->resizeColumnToContents(column);
    const int widths[] = {130, 300}; // before and after; what is longer is seen whole in its tip
    for (int i = 0; i < 2; ++i)
        table->setColumnWidth(4 + i, widths[i]);
    table->horizontalHeader()->setStretchLastSection(true);
    all->addWidget(new WholeRows(table), 1);
    const std::vector<JournalEntry>& entries = record.journal->entries();
    if (std::any_of(entries.begin(), entries.end(), [](const JournalEntry& e) { return e.who.empty(); })) {
        auto* nobody = new QLabel(tr("\u2013 under \u201cwho\u201d: no initials were given at the time. Give yours on the Job stage or with Ctrl+Shift+I."));
        nobody->setObjectName(QStringLiteral("journal.nobody"));
        nobody->setFont(textFont(TextRole::Small));
        nobody->setForegroundRole(inkRole::quiet);
        nobody->setWordWrap(true);
        all->addWidget(nobody);
    }
    auto* buttons = new QDialogButtonBox;
    buttons->addButton(tr("&Close"), QDialogButtonBox::RejectRole)->setDefault(true);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    all->addWidget(buttons);
}

} // namespace spanwright
