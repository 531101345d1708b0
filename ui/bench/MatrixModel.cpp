// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/MatrixModel.h"

#include "ui/look/NumberText.h"

#include <algorithm>

namespace spanwright {

void MatrixModel::show(const UncertaintyMatrix& matrix) {
    beginResetModel();
    matrix_ = matrix;
    endResetModel();
}

int MatrixModel::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : static_cast<int>(matrix_.rows.size());
}

int MatrixModel::columnCount(const QModelIndex& parent) const {
    return rowCount(parent);
}

QVariant MatrixModel::data(const QModelIndex& index, int role) const {
    if (role == Qt::TextAlignmentRole)
        return static_cast<int>(Qt::AlignRight | Qt::AlignVCenter);
    if (role != Qt::DisplayRole)
        return {};
    const auto [low, high] = std::minmax({static_cast<std::size_t>(index.row()), static_cast<std::size_t>(index.column())});
    const std::vector<Decimal>& row = matrix_.rows[high].covariances;
    return low < row.size() ? typedText(row[low]) : QString();
}

QVariant MatrixModel::headerData(int section, Qt::Orientation, int role) const {
    if (role != Qt::DisplayRole)
        return {};
    const MatrixRow& row = matrix_.rows[static_cast<std::size_t>(section)];
    const bool both = matrix_.rows.front().side == Side::Reference;
    const QString id = QStringLiteral("#%1").arg(row.reading);
    return !both ? id : row.side == Side::Reference ? tr("%1 ref.").arg(id) : tr("%1 ind.").arg(id);
}

} // namespace spanwright
