// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/JournalDialog.h"

#include "ui/look/Look.h"
#include "ui/look/PaddedDelegate.h"

#include <QAbstractTableModel>
#include <QCoreApplication>
#include <QDateTime>
#include <QDialogButtonBox>
#include <QHeaderView>
#include <QPushButton>
#include <QTableView>
#include <QVBoxLayout>

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
        switch (index.column()) {
        case 0: return QDateTime::fromMSecsSinceEpoch(e.at).toString(QStringLiteral("yyyy-MM-dd HH:mm:ss"));
        case 1: return QString::fromStdString(e.who);
        case 2: return journalWord(e.what);
        case 3: return QString::fromStdString(e.where);
        case 4: return QString::fromStdString(e.before);
        case 5: return QString::fromStdString(e.after);
        default: return QString::fromStdString(e.reason);
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

QString journalWord(const std::string& what) {
    static const std::pair<const char*, const char*> words[] = {
        {"reading-entered", QT_TRANSLATE_NOOP("Journal", "reading entered")},
        {"value-entered", QT_TRANSLATE_NOOP("Journal", "value entered")},
        {"value-amended", QT_TRANSLATE_NOOP("Journal", "value amended")},
        {"reading-placed", QT_TRANSLATE_NOOP("Journal", "reading placed")},
        {"readings-imported", QT_TRANSLATE_NOOP("Journal", "readings taken in")},
        {"excluded", QT_TRANSLATE_NOOP("Journal", "excluded")},
        {"readmitted", QT_TRANSLATE_NOOP("Journal", "readmitted")},
        {"changed", QT_TRANSLATE_NOOP("Journal", "changed")},
        {"undone", QT_TRANSLATE_NOOP("Journal", "undone")},
        {"redone", QT_TRANSLATE_NOOP("Journal", "redone")},
        {"seal-broken", QT_TRANSLATE_NOOP("Journal", "opened, changed outside the program")},
        {"journal-broken", QT_TRANSLATE_NOOP("Journal", "opened, an entry did not fit the one before")},
    };
    for (const auto& [code, word] : words)
        if (what == code)
            return QCoreApplication::translate("Journal", word);
    return QString::fromStdString(what);
}

JournalDialog::JournalDialog(const Record& record, QWidget* parent) : QDialog(parent) {
    setObjectName(QStringLiteral("journalDialog"));
    setWindowTitle(tr("Journal"));
    resize(980, 560);
    auto* all = new QVBoxLayout(this);
    auto* table = new QTableView;
    table->setObjectName(QStringLiteral("journal.table"));
    table->setAccessibleName(tr("Journal, newest first"));
    table->setModel(new JournalModel(record.journal, table));
    table->verticalHeader()->hide();
    table->verticalHeader()->setDefaultSectionSize(24);
    table->setShowGrid(false);
    table->setItemDelegate(new PaddedDelegate(table));
    table->setSelectionBehavior(QAbstractItemView::SelectRows);
    table->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    const int widths[] = {150, 50, 120, 190, 140, 140};
    for (int i = 0; i < 6; ++i)
        table->setColumnWidth(i, widths[i]);
    table->horizontalHeader()->setStretchLastSection(true);
    all->addWidget(table);
    auto* buttons = new QDialogButtonBox;
    buttons->addButton(tr("&Close"), QDialogButtonBox::RejectRole)->setDefault(true);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    all->addWidget(buttons);
}

} // namespace spanwright
