// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/AdjustedLackOfFit.h"

#include "core/split/FunctionBasis.h"

#include <Eigen/QR>

#include <cmath>

namespace spanwright {
namespace {

/// A mean of the residuals of the readings that share set point, direction and run.
struct Node {
    std::size_t cell = 0;
    std::size_t run = 0;
    double weight = 0, mean = 0;
};

std::vector<Node> nodesOf(const NoiseChain& chain) {
    std::vector<Node> nodes;
    if (chain.cellRuns.empty()) {
        for (std::size_t c = 0; c < chain.cells.size(); ++c)
            nodes.push_back({c, 0, chain.cells[c].weight, chain.cells[c].mean});
    } else {
        for (const auto& one : chain.cellRuns)
            nodes.push_back(
                {static_cast<std::size_t>(one.cell), static_cast<std::size_t>(one.run), one.weight, one.mean});
    }
    return nodes;
}

/// For each cell the column of its direction contrast, or −1; several columns when readings of unknown direction share
/// the point.
std::vector<int> contrastColumns(const NoiseChain& chain) {
    std::vector<int> column(chain.cells.size(), -1);
    int next = 0;
    for (std::size_t c = 1; c < chain.cells.size(); ++c)
        if (chain.cells[c].group == chain.cells[c - 1].group)
            column[c] = next++;
    return column;
}

/// Where the function stands for each set point: the set point itself, or, where the function gives the reference, the mean of
/// the indications there.
std::vector<double> placesOf(const Sample& sample, const Fit& fit) {
    if (fit.direction == FitDirection::Indication)
        return sample.groupValue;
    std::vector<double> sum(sample.groupValue.size()), n(sum.size());
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto group = static_cast<std::size_t>(sample.group[i]);
        sum[group] += sample.indication.high[i];
        ++n[group];
    }
    for (std::size_t g = 0; g < sum.size(); ++g)
        sum[g] /= n[g];
    return sum;
}

} // namespace

AdjustedLackOfFit adjustedLackOfFit(const Sample& sample, const NoiseChain& chain, const Fit& fit) {
    AdjustedLackOfFit result;
    if (chain.balanced || (chain.contrasts == 0 && chain.runOffsets == 0))
        return result;
    const std::vector<Node> nodes = nodesOf(chain);
    const std::vector<double> places = placesOf(sample, fit);
    std::vector<double> abscissa, setPoint;
    for (const Node& node : nodes) {
        const auto group = static_cast<std::size_t>(chain.cells[node.cell].group);
        abscissa.push_back(places[group]);
        setPoint.push_back(sample.groupValue[group]);
    }
    const FunctionBasis basis = functionBasis(fit, abscissa);
    if (basis.empty())
        return result;
    const std::vector<int> contrast = contrastColumns(chain);
    const std::size_t runTerms = chain.runOffsets > 0 ? chain.runs - 1 : 0;
    const std::size_t runAt = basis.terms + static_cast<std::size_t>(chain.contrasts);
    const std::size_t columns = runAt + 2 * runTerms;
    if (nodes.size() * columns * columns > 50'000'000)
        return result;

    Eigen::MatrixXd design =
        Eigen::MatrixXd::Zero(static_cast<Eigen::Index>(nodes.size()), static_cast<Eigen::Index>(columns));
    Eigen::VectorXd right(static_cast<Eigen::Index>(nodes.size()));
    const double middle = (sample.groupValue.front() + sample.groupValue.back()) / 2;
    const double half = std::max((sample.groupValue.back() - sample.groupValue.front()) / 2, 1e-300);
    double explainedByMeans = 0;
    for (std::size_t k = 0; k < nodes.size(); ++k) {
        const auto row = static_cast<Eigen::Index>(k);
        const double root = std::sqrt(nodes[k].weight);
        const auto put = [&](std::size_t column, double value) {
            design(row, static_cast<Eigen::Index>(column)) += root * value;
        };
        for (std::size_t j = 0; j < basis.terms; ++j)
            put(j, basis.column(j)[k]);
        const std::size_t c = nodes[k].cell;
        if (contrast[c] >= 0)
            put(basis.terms + static_cast<std::size_t>(contrast[c]), 0.5);
        for (std::size_t next = c + 1; next < chain.cells.size() && chain.cells[next].group == chain.cells[c].group;
             ++next)
            put(basis.terms + static_cast<std::size_t>(contrast[next]), -0.5);
        for (std::size_t r = 0; r < runTerms; ++r) {
            const double code = nodes[k].run == r ? 1 : nodes[k].run == runTerms ? -1 : 0;
            put(runAt + r, code);
            put(runAt + runTerms + r, code * (setPoint[k] - middle) / half);
        }
        right(row) = root * nodes[k].mean;
        explainedByMeans += nodes[k].weight * nodes[k].mean * nodes[k].mean;
    }
    Eigen::ColPivHouseholderQR<Eigen::MatrixXd> qr(design.rows(), design.cols());
    qr.setThreshold(1e-10);
    qr.compute(design);
    const double rest = (qr.householderQ().transpose() * right).tail(right.size() - qr.rank()).squaredNorm();

    SplitRow row;
    row.ss = std::max(0.0, toDouble(chain.s1) - explainedByMeans + rest - toDouble(chain.s5));
    row.df = chain.setPoints + chain.contrasts + chain.runOffsets + chain.runSlopes - static_cast<int>(qr.rank());
    if (row.df <= 0)
        return result;
    row.ms = row.ss / row.df;
    result.row = row;
    if (!basis.linear)
        result.approximation = "linearised";
    else if (fit.direction == FitDirection::Reference)
        result.approximation = "mean-indication";
    return result;
}

} // namespace spanwright
