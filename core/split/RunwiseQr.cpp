// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/RunwiseQr.h"

#include <Eigen/QR>

#include <algorithm>
#include <utility>

namespace spanwright {

namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

constexpr double DependentBelow = 1e-10; ///< of the largest pivot
constexpr Index OwnColumns = 2;          ///< offset and slope, before the shared columns; the right-hand side is behind them

MatrixXd matrixOf(const RunBlock& block, Index shared) {
    MatrixXd rows(static_cast<Index>(block.rows.size()), OwnColumns + shared + 1);
    for (Index i = 0; i < rows.rows(); ++i) {
        const RunBlock::Row& row = block.rows[static_cast<std::size_t>(i)];
        rows(i, 0) = row.root;
        rows(i, 1) = row.root * row.x;
        for (Index j = 0; j < shared; ++j)
            rows(i, OwnColumns + j) = row.root * row.shared[static_cast<std::size_t>(j)];
        rows(i, OwnColumns + shared) = row.root * row.right;
    }
    return rows;
}

/// Rows of all runs, taken apart.
struct Dissected {
    std::vector<std::pair<std::size_t, Eigen::RowVectorXd>> own; ///< with the columns of that run
    MatrixXd common;                                            ///< shared columns and right-hand side
};

Dissected dissect(const std::vector<RunBlock>& blocks, Index shared, RunColumns columns) {
    Dissected all;
    std::vector<MatrixXd> others;
    Index height = 0;
    for (std::size_t run = 0; run < blocks.size(); ++run) {
        MatrixXd rows = matrixOf(blocks[run], shared);
        const Index own = columns == RunColumns::Free ? std::min(OwnColumns, rows.rows()) : 0;
        if (own == OwnColumns) {
            const Eigen::HouseholderQR<MatrixXd> turned(rows.leftCols(OwnColumns));
            rows.applyOnTheLeft(turned.householderQ().adjoint());
        }
        for (Index i = 0; i < own; ++i)
            all.own.emplace_back(run, rows.row(i));
        height += rows.rows() - own;
        others.push_back(rows.bottomRightCorner(rows.rows() - own, shared + 1));
    }
    all.common.resize(height, shared + 1);
    Index at = 0;
    for (const MatrixXd& block : others) {
        all.common.middleRows(at, block.rows()) = block;
        at += block.rows();
    }
    return all;
}

/// Turns tall rows into a triangle and returns what no shared column explains of them.
double makeTriangle(MatrixXd& common) {
    const Index shared = common.cols() - 1, height = common.rows();
    if (height <= shared)
        return 0;
    const Eigen::HouseholderQR<MatrixXd> turned(common.leftCols(shared));
    const VectorXd right = turned.householderQ().adjoint() * common.col(shared);
    MatrixXd triangle = MatrixXd::Zero(shared, shared + 1);
    triangle.leftCols(shared) = turned.matrixQR().topRows(shared).template triangularView<Eigen::Upper>();
    triangle.col(shared) = right.head(shared);
    common = std::move(triangle);
    return right.tail(height - shared).squaredNorm();
}

/// Puts a run's two values where its columns are; the last run is minus the sum of the others.
void putRun(MatrixXd& design, Index row, Index shared, std::size_t run, const Eigen::RowVectorXd& values) {
    const Index free = (design.cols() - shared) / 2, r = static_cast<Index>(run);
    for (Index own = 0; own < OwnColumns; ++own) {
        auto columns = design.row(row).segment(shared + own * free, free);
        if (r < free)
            columns(r) = values(own);
        else
            columns.setConstant(-values(own));
    }
}

} // namespace

RunwiseSolution solveByRuns(const std::vector<RunBlock>& blocks, std::size_t sharedCount, RunColumns columns) {
    const auto shared = static_cast<Index>(sharedCount);
    Dissected rows = dissect(blocks, shared, columns);
    RunwiseSolution solution;
    solution.rest = makeTriangle(rows.common);
    const auto own = static_cast<Index>(rows.own.size());
    const Index free = columns == RunColumns::Free ? static_cast<Index>(blocks.size()) - 1 : 0;
    MatrixXd design = MatrixXd::Zero(own + rows.common.rows(), shared + OwnColumns * free);
    VectorXd right(design.rows());
    for (Index i = 0; i < own; ++i) {
        const auto& [run, values] = rows.own[static_cast<std::size_t>(i)];
        design.row(i).head(shared) = values.segment(OwnColumns, shared);
        putRun(design, i, shared, run, values);
        right(i) = values(OwnColumns + shared);
    }
    design.bottomLeftCorner(rows.common.rows(), shared) = rows.common.leftCols(shared);
    right.tail(rows.common.rows()) = rows.common.col(shared);
    Eigen::ColPivHouseholderQR<MatrixXd> qr(design.rows(), design.cols());
    qr.setThreshold(DependentBelow);
    qr.compute(design);
    solution.rank = static_cast<int>(qr.rank());
    solution.rest += (qr.householderQ().adjoint() * right).tail(right.size() - qr.rank()).squaredNorm();
    return solution;
}

} // namespace spanwright
