// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/UncertaintyMatrix.h"

#include <QAbstractTableModel>

namespace spanwright {

/// A matrix of covariances as a table: rows and columns are headed by reading and side, both triangles filled.
class MatrixModel : public QAbstractTableModel {
    Q_OBJECT

  public:
    using QAbstractTableModel::QAbstractTableModel;
    void show(const UncertaintyMatrix& matrix);

    [[nodiscard]] int rowCount(const QModelIndex& parent = {}) const override;
    [[nodiscard]] int columnCount(const QModelIndex& parent = {}) const override;
    [[nodiscard]] QVariant data(const QModelIndex& index, int role) const override;
    [[nodiscard]] QVariant headerData(int section, Qt::Orientation orientation, int role) const override;

  private:
    UncertaintyMatrix matrix_;
};

} // namespace spanwright
