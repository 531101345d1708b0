// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/AdjustedLackOfFit.h"

#include "core/split/FunctionBasis.h"
#include "core/split/RunwiseQr.h"

#include <algorithm>
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

/// What a node holds beside the columns of its run: the function, then the contrasts of direction.
class SharedColumns {
  public:
    SharedColumns(const NoiseChain& chain, const FunctionBasis& basis) : chain_(chain), basis_(basis), contrast_(contrastColumns(chain)) {}
    [[nodiscard]] std::size_t count() const { return basis_.terms + static_cast<std::size_t>(chain_.contrasts); }
    [[nodiscard]] std::vector<double> row(const std::vector<Node>& nodes, std::size_t k) const {
        std::vector<double> row(count(), 0.0);
        for (std::size_t j = 0; j < basis_.terms; ++j)
            row[j] = basis_.column(j)[k];
        const std::size_t c = nodes[k].cell;
        if (contrast_[c] >= 0)
            row[basis_.terms + static_cast<std::size_t>(contrast_[c])] += 0.5;
        for (std::size_t next = c + 1; next < chain_.cells.size() && chain_.cells[next].group == chain_.cells[c].group; ++next)
            row[basis_.terms + static_cast<std::size_t>(contrast_[next])] -= 0.5;
        return row;
    }

  private:
    const NoiseChain& chain_;
    const FunctionBasis& basis_;
    std::vector<int> contrast_;
};

} // namespace

AdjustedLackOfFit adjustedLackOfFit(const Sample& sample, const NoiseChain& chain, const Fit& fit) {
    AdjustedLackOfFit result;
    if (chain.balanced || (chain.contrasts == 0 && chain.runOffsets == 0))
        return result;
    const std::vector<Node> nodes = nodesOf(chain);
    const std::vector<double> places = placesOf(sample, fit);
    const double middle = (sample.groupValue.front() + sample.groupValue.back()) / 2;
    const double half = std::max((sample.groupValue.back() - sample.groupValue.front()) / 2, 1e-300);
    std::vector<double> abscissa;
    for (const Node& node : nodes)
        abscissa.push_back(places[static_cast<std::size_t>(chain.cells[node.cell].group)]);
    const FunctionBasis basis = functionBasis(fit, abscissa);
    if (basis.empty())
        return result;
    const SharedColumns shared(chain, basis);
    const std::size_t runs = chain.runOffsets > 0 ? chain.runs : 0;
    const auto columns = static_cast<std::size_t>(shared.count()) + 2 * runs;
    if (nodes.size() * columns * columns > 50'000'000)
        return result;

    std::vector<RunBlock> blocks(std::max<std::size_t>(runs, 1));
    double explainedByMeans = 0;
    for (std::size_t k = 0; k < nodes.size(); ++k) {
        const Node& node = nodes[k];
        const double x = (sample.groupValue[static_cast<std::size_t>(chain.cells[node.cell].group)] - middle) / half;
        RunBlock& block = blocks[runs > 0 ? node.run : 0];
        block.rows.push_back({std::sqrt(node.weight), x, shared.row(nodes, k), node.mean});
        explainedByMeans += node.weight * node.mean * node.mean;
    }
    const RunwiseSolution solved = solveByRuns(blocks, shared.count(), runs > 0 ? RunColumns::Free : RunColumns::None);

    SplitRow row;
    row.ss = std::max(0.0, toDouble(chain.s1) - explainedByMeans + solved.rest - toDouble(chain.s5));
    row.df = chain.setPoints + chain.contrasts + chain.runOffsets + chain.runSlopes - solved.rank;
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
