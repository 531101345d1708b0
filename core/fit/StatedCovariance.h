// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"
#include "core/fit/FitTask.h"
#include "core/record/Record.h"

#include <vector>

namespace spanwright {

/// With more readings than this, covariances between them are not taken in: the work grows with the third power.
inline constexpr std::size_t MostCorrelatedReadings = 200;

/// The part of the record's matrix that belongs to the readings `ids` of a sample; null where the record has none.
std::shared_ptr<const SampleMatrix> sampleMatrix(const UncertaintyMatrix& matrix, const std::vector<ReadingId>& ids);
/// What all readings of a standard share: U/k and the drift allowance of each (rectangular, JCGM 100:2008, 4.3.7).
std::vector<SharedTerm> sharedTerms(const std::vector<Standard>& standards);

/// A matrix as it was read, n rows of n numbers, with the readings of the phase that it is about: n is the number of their complete
/// readings, excluded ones among them, for the indications alone, or twice as many for all references followed by all
/// indications. Errors: MatrixShape (facts: row, got, needed), MatrixSize (facts: got, readings, both), MatrixTooLarge (facts: got,
/// most), MatrixNotSymmetric (facts: row, column, text, mirror), MatrixNotPositive (facts: row).
Result<UncertaintyMatrix> uncertaintyMatrix(const std::vector<std::vector<Decimal>>& numbers, const Record& record, Phase phase,
                                            std::string source);

/// Whether covariances between readings take part in the fit that was chosen: those of a matrix, or of a shared error that is
/// carried in the fit. Errors: MethodUnfit (facts: reason, text) where the method has no place for them.
Result<bool> takesCovariances(const FitTask& task);

/// Stated covariances of abscissae x and ordinates y, n × n each, row by row; `xy` has the abscissae as rows.
struct JointCovariance {
    std::vector<DoubleDouble> xx, xy, yy;
    std::vector<double> noise; ///< variance of each ordinate without what is shared: of a new reading there
};

enum class CovarianceOf { Ordinates, Both };

/// From the matrix where there is one, else from the columns of stated uncertainties; shared errors added where they are carried
/// in the fit. Errors: UncertaintyMissing, UncertaintyNotPositive, CovarianceTooLarge, MatrixRowMissing (facts: rows),
/// MatrixTooLarge (facts: got, most), MatrixNotPositive (facts: row).
Result<JointCovariance> jointCovariance(const FitTask& task, CovarianceOf of);

} // namespace spanwright
