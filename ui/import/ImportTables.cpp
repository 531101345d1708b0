// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/import/ImportTables.h"

#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QComboBox>
#include <QCoreApplication>
#include <QHeaderView>

namespace spanwright {

QString importRoleText(ImportRole role) {
    const auto tr = [](const char* text) { return QCoreApplication::translate("ImportRole", text); };
    switch (role) {
    case ImportRole::None: return tr("not taken in");
    case ImportRole::Reference: return tr("reference");
    case ImportRole::Indication: return tr("indication");
    case ImportRole::SetPoint: return tr("set point");
    case ImportRole::Direction: return tr("direction");
    case ImportRole::Run: return tr("run");
    case ImportRole::UReference: return tr("u of reference");
    case ImportRole::UIndication: return tr("u of indication");
    case ImportRole::UCovariance: return tr("covariance of reference and indication");
    case ImportRole::Time: break;
    }
    return tr("time");
}

std::optional<std::size_t>& roleColumn(ImportMapping& mapping, ImportRole role) {
    switch (role) {
    case ImportRole::Reference: return mapping.reference;
    case ImportRole::Indication: return mapping.indication;
    case ImportRole::SetPoint: return mapping.setPoint;
    case ImportRole::Direction: return mapping.direction;
    case ImportRole::Run: return mapping.run;
    case ImportRole::UReference: return mapping.uReference;
    case ImportRole::UIndication: return mapping.uIndication;
    case ImportRole::UCovariance: return mapping.uCovariance;
    case ImportRole::None:
    case ImportRole::Time: break;
    }
    return mapping.time;
}

ImportRole roleOf(const ImportMapping& mapping, std::size_t column) {
    ImportMapping copy = mapping;
    for (int role = 1; role < ImportRoles; ++role)
        if (roleColumn(copy, static_cast<ImportRole>(role)) == column)
            return static_cast<ImportRole>(role);
    return ImportRole::None;
}

ImportPreview::ImportPreview(QWidget* parent) : QTableWidget(parent) {
    setObjectName(QStringLiteral("import.preview"));
    setAccessibleName(tr("First rows of the table"));
    setEditTriggers(QAbstractItemView::NoEditTriggers);
    setSelectionMode(QAbstractItemView::NoSelection);
    setFocusPolicy(Qt::NoFocus);
    horizontalHeader()->setHighlightSections(false);
    verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    verticalHeader()->setDefaultSectionSize(26);
    verticalHeader()->setHighlightSections(false);
}

void ImportPreview::clearAll() {
    clear();
    setRowCount(0);
    setColumnCount(0);
}

void ImportPreview::show(const CsvRules& rules, const ImportMapping& mapping, const std::vector<PreviewRow>& rows) {
    clearAll();
    const std::size_t columns = rules.columns.size();
    setColumnCount(static_cast<int>(columns));
    setRowCount(static_cast<int>(rows.size()) + 1);
    QStringList heads, lines{tr("taken as")};
    for (std::size_t c = 0; c < columns; ++c) {
        QString head = QString::fromStdString(columnLabel(rules, c));
        if (!rules.columns[c].unit.empty())
            head += QStringLiteral(" / ") + QString::fromStdString(rules.columns[c].unit);
        heads << head;
        auto* chooser = new QComboBox;
        chooser->setObjectName(QStringLiteral("import.role.%1").arg(c));
        chooser->setAccessibleName(tr("Column %1 is taken as").arg(head));
        for (int role = 0; role < ImportRoles; ++role)
            chooser->addItem(importRoleText(static_cast<ImportRole>(role)));
        chooser->setCurrentIndex(static_cast<int>(roleOf(mapping, c)));
        connect(chooser, &QComboBox::activated, this, [this, c](int role) { emit roleChosen(c, role); });
        setCellWidget(0, static_cast<int>(c), chooser);
    }
    for (std::size_t r = 0; r < rows.size(); ++r) {
        lines << QString::number(rows[r].line);
        for (std::size_t c = 0; c < columns && c < rows[r].cells.size(); ++c) {
            const PreviewCell& cell = rows[r].cells[c];
            auto* item = new QTableWidgetItem(QString::fromStdString(cell.text));
            const bool taken = roleOf(mapping, c) != ImportRole::None;
            item->setForeground(cell.refused && taken ? scheme().warning : taken ? scheme().ink : scheme().quiet);
            item->setTextAlignment(Qt::AlignVCenter | (rules.columns[c].kind == ColumnKind::Number ? Qt::AlignRight : Qt::AlignLeft));
            if (cell.refused)
                item->setToolTip(errorText(Error(*cell.refused, {{"text", cell.text}})));
            setItem(static_cast<int>(r) + 1, static_cast<int>(c), item);
        }
    }
    setHorizontalHeaderLabels(heads);
    setVerticalHeaderLabels(lines);
    setRowHeight(0, 34);
    for (int c = 0; c < columnCount(); ++c)
        setColumnWidth(c, std::max(132, horizontalHeader()->sectionSizeHint(c) + 8));
}

void ImportIssues::fill(const CellIssues& issues, const CsvRules& rules) {
    beginResetModel();
    rows_.clear();
    for (const CellIssue& issue : issues.first)
        rows_.push_back({QString::number(issue.line),
                         issue.column < rules.columns.size() ? QString::fromStdString(columnLabel(rules, issue.column)) : QString(),
                         QString::fromStdString(issue.text), errorText(issue.error(rules))});
    endResetModel();
}

void ImportIssues::clear() {
    beginResetModel();
    rows_.clear();
    endResetModel();
}

int ImportIssues::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : static_cast<int>(rows_.size());
}

int ImportIssues::columnCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : 4;
}

QVariant ImportIssues::data(const QModelIndex& index, int role) const {
    if (role != Qt::DisplayRole && role != Qt::ToolTipRole)
        return {};
    const Row& row = rows_[static_cast<std::size_t>(index.row())];
    const QString* cells[] = {&row.line, &row.column, &row.text, &row.why};
    return *cells[index.column()];
}

QVariant ImportIssues::headerData(int section, Qt::Orientation orientation, int role) const {
    if (orientation != Qt::Horizontal || role != Qt::DisplayRole)
        return {};
    const QString heads[] = {tr("line"), tr("column"), tr("in the file"), tr("what to do")};
    return heads[section];
}

} // namespace spanwright
