// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/StatedCovariance.h"

#include "core/fit/Cholesky.h"

#include <algorithm>
#include <map>

namespace spanwright {

namespace {

using Extent = SampleMatrix::Extent;
using Dense = std::vector<DoubleDouble>;

Error tooLarge(std::size_t readings) {
    return Error(ErrorCode::MatrixTooLarge,
                 {{"got", std::to_string(readings)}, {"most", std::to_string(MostCorrelatedReadings)}});
}

Error notPositive(std::size_t row) {
    return Error(ErrorCode::MatrixNotPositive, {{"row", std::to_string(row + 1)}});
}

Result<void> checkSymmetric(const std::vector<std::vector<Decimal>>& numbers) {
    for (std::size_t i = 0; i < numbers.size(); ++i)
        for (std::size_t j = 0; j < i; ++j)
            if (compareValue(numbers[i][j], numbers[j][i]) != 0)
                return Error(ErrorCode::MatrixNotSymmetric, {{"row", std::to_string(i + 1)},
                                                             {"column", std::to_string(j + 1)},
                                                             {"text", numbers[i][j].text()},
                                                             {"mirror", numbers[j][i].text()}});
    return {};
}

/// A column, or zeros where nothing is stated for a reading.
DoubleDouble statedOr(const PairColumn& column, std::size_t i) {
    return column.empty() || column.high[i] != column.high[i] ? DoubleDouble(0.0) : column[i];
}

/// Fills the blocks from the columns, for what no matrix gives.
class Blocks {
  public:
    explicit Blocks(const FitTask& task) : task_(task), n_(task.sample.size()) {
        for (Dense* block : {&joint_.xx, &joint_.xy, &joint_.yy})
            block->assign(n_ * n_, 0.0);
    }

    void fromColumns() {
        for (std::size_t i = 0; i < n_; ++i) {
            joint_.xx[i * n_ + i] = sqr(statedOr(task_.ux, i));
            joint_.yy[i * n_ + i] = sqr(statedOr(task_.uy, i));
            joint_.xy[i * n_ + i] = statedOr(task_.sample.uCovariance, i);
        }
    }

    void fromMatrix(const SampleMatrix& matrix) {
        const bool indicationIsY = task_.direction == FitDirection::Indication;
        if (matrix.extent == Extent::Indications) {
            (indicationIsY ? joint_.yy : joint_.xx) = matrix.values;
            return;
        }
        const std::size_t x0 = indicationIsY ? 0 : n_, y0 = n_ - x0, wide = 2 * n_;
        for (std::size_t i = 0; i < n_; ++i)
            for (std::size_t j = 0; j < n_; ++j) {
                joint_.xx[i * n_ + j] = matrix.values[(x0 + i) * wide + x0 + j];
                joint_.yy[i * n_ + j] = matrix.values[(y0 + i) * wide + y0 + j];
                joint_.xy[i * n_ + j] = matrix.values[(x0 + i) * wide + y0 + j];
            }
    }

    void addShared() {
        for (const SharedTerm& term : task_.sample.shared) {
            const bool ordinate = (term.side == Side::Indication) == (task_.direction == FitDirection::Indication);
            const PairColumn& values = ordinate ? task_.y : task_.x;
            Dense u;
            for (std::size_t i = 0; i < n_; ++i)
                u.push_back(term.form == SharedTerm::Form::Relative ? term.u * values[i] : term.u);
            Dense& block = ordinate ? joint_.yy : joint_.xx;
            for (std::size_t i = 0; i < n_; ++i)
                for (std::size_t j = 0; j < n_; ++j)
                    block[i * n_ + j] += u[i] * u[j];
        }
    }

    void takeNoise() {
        for (std::size_t i = 0; i < n_; ++i)
            joint_.noise.push_back(toDouble(joint_.yy[i * n_ + i]));
    }

    JointCovariance take() { return std::move(joint_); }

  private:
    const FitTask& task_;
    std::size_t n_;
    JointCovariance joint_;
};

/// Whether the columns are needed for the values of that side, and have them all.
Result<void> checkColumns(const FitTask& task, CovarianceOf of) {
    const SampleMatrix* matrix = task.sample.matrix.get();
    if (matrix != nullptr && matrix->extent == Extent::Both)
        return {};
    const bool indicationIsY = task.direction == FitDirection::Indication;
    const bool yGiven = matrix != nullptr && indicationIsY, xGiven = matrix != nullptr && !indicationIsY;
    std::vector<std::size_t> missing, negative, tooMuch;
    const auto known = [](const PairColumn& u, std::size_t i) { return !u.empty() && u.high[i] == u.high[i]; };
    for (std::size_t i = 0; i < task.sample.size(); ++i) {
        const bool needsX = of == CovarianceOf::Both && !xGiven, needsY = !yGiven;
        if ((needsX && !known(task.ux, i)) || (needsY && !known(task.uy, i))) {
            missing.push_back(i);
            continue;
        }
        const DoubleDouble ux = needsX ? task.ux[i] : DoubleDouble(0.0), uy = needsY ? task.uy[i] : DoubleDouble(0.0);
        const bool none = of == CovarianceOf::Both ? needsX && needsY && !(ux + uy > 0.0) : needsY && !(uy > 0.0);
        if (ux < 0.0 || uy < 0.0 || none)
            negative.push_back(i);
        else if (needsX && needsY && abs(statedOr(task.sample.uCovariance, i)) > ux * uy)
            tooMuch.push_back(i);
    }
    if (!missing.empty())
        return Error(ErrorCode::UncertaintyMissing, {{"rows", rowsFact(task.sample, missing)}});
    if (!negative.empty())
        return Error(ErrorCode::UncertaintyNotPositive, {{"rows", rowsFact(task.sample, negative)}});
    if (!tooMuch.empty())
        return Error(ErrorCode::CovarianceTooLarge, {{"rows", rowsFact(task.sample, tooMuch)}});
    return {};
}

} // namespace

std::shared_ptr<const SampleMatrix> sampleMatrix(const UncertaintyMatrix& matrix, const std::vector<ReadingId>& ids) {
    if (matrix.empty())
        return nullptr;
    std::map<std::pair<Side, ReadingId>, std::size_t> rowOf;
    for (std::size_t i = 0; i < matrix.rows.size(); ++i)
        rowOf.emplace(std::pair(matrix.rows[i].side, matrix.rows[i].reading), i);
    auto part = std::make_shared<SampleMatrix>();
    const bool both = matrix.rows.front().side == Side::Reference;
    part->extent = both ? Extent::Both : Extent::Indications;
    for (const Side side : {Side::Reference, Side::Indication}) {
        if (side == Side::Reference && !both)
            continue;
        for (std::size_t i = 0; i < ids.size(); ++i) {
            const auto found = rowOf.find({side, ids[i]});
            if (found != rowOf.end())
                part->row.push_back(found->second);
            else if (part->unknown.empty() || part->unknown.back() != i)
                part->unknown.push_back(i);
        }
    }
    if (!part->unknown.empty() || ids.size() > MostCorrelatedReadings)
        return part;
    const std::size_t n = part->row.size();
    part->values.resize(n * n);
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < n; ++j) {
            const std::size_t low = std::min(part->row[i], part->row[j]), high = std::max(part->row[i], part->row[j]);
            const std::vector<Decimal>& covariances = matrix.rows[high].covariances;
            part->values[i * n + j] = low < covariances.size() ? covariances[low].toDoubleDouble() : DoubleDouble(0.0);
        }
    return part;
}

std::vector<SharedTerm> sharedTerms(const std::vector<Standard>& standards) {
    std::vector<SharedTerm> terms;
    for (const Standard& standard : standards) {
        const bool relative = standard.form == UncertaintyForm::PercentOfReading;
        const DoubleDouble unit = relative ? DoubleDouble(1.0) / 100.0 : DoubleDouble(1.0);
        const auto add = [&](const DoubleDouble& u) {
            if (u != 0.0)
                terms.push_back({standard.role == StandardRole::Reference ? Side::Reference : Side::Indication,
                                 relative ? SharedTerm::Form::Relative : SharedTerm::Form::Absolute, u * unit});
        };
        if (standard.expandedUncertainty)
            add(standard.expandedUncertainty->toDoubleDouble() /
                (standard.coverageFactor ? standard.coverageFactor->toDoubleDouble() : DoubleDouble(2.0)));
        if (standard.drift)
            add(standard.drift->toDoubleDouble() / sqrt(DoubleDouble(3.0)));
    }
    return terms;
}

Result<UncertaintyMatrix> uncertaintyMatrix(const std::vector<std::vector<Decimal>>& numbers, const Record& record, Phase phase,
                                            std::string source) {
    const std::size_t n = numbers.size();
    for (std::size_t i = 0; i < n; ++i)
        if (numbers[i].size() != n)
            return Error(ErrorCode::MatrixShape, {{"row", std::to_string(i + 1)},
                                                  {"got", std::to_string(numbers[i].size())},
                                                  {"needed", std::to_string(n)}});
    std::vector<ReadingId> ids;
    const ReadingColumns& readings = *record.readings;
    for (std::size_t row = 0; row < readings.size(); ++row)
        if (readings.phases()[row] == phase && readings.complete(row))
            ids.push_back(readings.ids()[row]);
    const std::size_t m = ids.size();
    if (m == 0)
        return Error(ErrorCode::NoReadings);
    if (n != m && n != 2 * m)
        return Error(ErrorCode::MatrixSize,
                     {{"got", std::to_string(n)}, {"readings", std::to_string(m)}, {"both", std::to_string(2 * m)}});
    if (m > MostCorrelatedReadings)
        return tooLarge(m);
    if (const auto symmetric = checkSymmetric(numbers); !symmetric)
        return symmetric.error();
    UncertaintyMatrix matrix{std::move(source), {}};
    Dense values;
    for (std::size_t i = 0; i < n; ++i) {
        matrix.rows.push_back({ids[i % m], n == m || i >= m ? Side::Indication : Side::Reference,
                               {numbers[i].begin(), numbers[i].begin() + static_cast<std::ptrdiff_t>(i) + 1}});
        for (const Decimal& number : numbers[i])
            values.push_back(number.toDoubleDouble());
    }
    if (const auto lost = cholesky(std::move(values), n).lostRow)
        return notPositive(*lost);
    return matrix;
}

Result<bool> takesCovariances(const FitTask& task) {
    const Choices& choices = task.choices;
    const bool shared = choices.sharedError == SharedError::Fit && !task.sample.shared.empty();
    if (task.sample.matrix == nullptr && !shared)
        return false;
    const auto unfit = [&](const char* reason) {
        return Error(ErrorCode::MethodUnfit, {{"reason", reason}, {"text", functionName(choices.function)}});
    };
    if (choices.method == Method::Robust)
        return unfit("robust");
    const bool both = choices.method == Method::BothUncertain;
    if (shared) {
        if (choices.covariance != CovarianceScale::Stated)
            return unfit("scaled");
        const Side abscissa = task.direction == FitDirection::Indication ? Side::Reference : Side::Indication;
        for (const SharedTerm& term : task.sample.shared)
            if (!both && term.side == abscissa)
                return unfit("abscissa");
    }
    const bool stated = both || choices.weights == Weights::Stated || choices.covariance == CovarianceScale::Stated;
    const bool matrixOfOrdinates = task.sample.matrix != nullptr && (task.sample.matrix->extent == Extent::Both ||
                                                                     task.direction == FitDirection::Indication);
    if (!stated || (!both && !matrixOfOrdinates && !shared))
        return false;
    if (!task.model->linear())
        return unfit("non-linear");
    return true;
}

Result<JointCovariance> jointCovariance(const FitTask& task, CovarianceOf of) {
    const Sample& sample = task.sample;
    if (sample.size() > MostCorrelatedReadings)
        return tooLarge(sample.size());
    if (sample.matrix != nullptr && !sample.matrix->unknown.empty())
        return Error(ErrorCode::MatrixRowMissing, {{"rows", rowsFact(sample, sample.matrix->unknown)}});
    if (const auto columns = checkColumns(task, of); !columns)
        return columns.error();
    Blocks blocks(task);
    blocks.fromColumns();
    if (sample.matrix != nullptr) {
        if (const auto lost = cholesky(sample.matrix->values, sample.matrix->row.size()).lostRow)
            return notPositive(sample.matrix->row[*lost]);
        blocks.fromMatrix(*sample.matrix);
    }
    blocks.takeNoise();
    if (task.choices.sharedError == SharedError::Fit)
        blocks.addShared();
    return blocks.take();
}

} // namespace spanwright
