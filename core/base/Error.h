// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace spanwright {

/// What went wrong for a reason that lies with the user, the file or the data. The sentence is made in ui/words/ErrorText;
/// a test walks every code and holds that each has one. Add a code beside its kin and a sentence there.
enum class ErrorCode {
    // files
    FileMissing,
    FileEmpty,
    FileIsDirectory,
    FileNotReadable,
    FileNotWritable,
    FileReadFailed,
    FileWriteFailed,
    FileChangedOnDisk,
    FileInUse,
    FileExists,
    FileIsInput,   ///< would be written over while it is read
    FileIsSession, ///< a session is not written over by a result
    FileBinary,
    FileEncoding,
    // tables of text
    UnclosedQuote,
    RaggedRow,
    HeaderShort, ///< names fewer columns than the rows have
    NotANumber,
    NumberTooLarge,
    ThousandsSeparator,
    ColumnMissing,
    ColumnUnclear, ///< several could be meant
    NoDataRows,
    SeparatorUnclear,
    DecimalMarkUnclear,
    DateOrderUnclear,
    DirectionUnknown,
    UnitsDiffer,
    // session files
    NotJson,
    NotASession,
    NewerLayout,
    SessionValueBad,
    // typing
    CellEmpty,
    CellNotANumber,
    CellDateBad,
    CellOutOfRange,
    ReasonMissing,
    // the record as a whole
    NoReadings,
    ReadingMissing,
    TooFewReadings,
    ReferencesAllEqual,
    TooFewSetPoints,
    RankLost,
    OutsideDomain,
    UncertaintyNotPositive,
    UncertaintyMissing,
    NoSpread,
    TooFewReplicates,
    LevelZero,
    MagnitudeUnfit, ///< squares of the numbers leave the range of arithmetic
    NoConvergence,
    NoInverse,
    FunctionUnknown,
    ColumnUnfit,
    MethodUnfit,
    CovarianceTooLarge,
    MatrixShape,
    MatrixSize,
    MatrixTooLarge,
    MatrixNotSymmetric,
    MatrixNotPositive,
    MatrixRowMissing,
    Cancelled,
    // the certificate
    CertificateIncomplete,
    // the command line
    UsageUnknownOption,
    UsageValueBad,
    UsageValueMissing,
    UsageNoFile,
    UsageUnknownCommand,
};
/// The last code, for a test that walks them all.
inline constexpr ErrorCode lastErrorCode = ErrorCode::UsageUnknownCommand;

/// One fact about an error, a warning or a finding: a name that the sentence refers to ("file", "line", "text") and its value.
struct Fact {
    std::string name;
    std::string value;
    bool operator==(const Fact&) const = default;
};

/// A code and the facts of this occurrence; never a sentence.
struct Error {
    ErrorCode code = ErrorCode::FileReadFailed;
    std::vector<Fact> facts;

    Error() = default;
    explicit Error(ErrorCode which, std::vector<Fact> known = {}) : code(which), facts(std::move(known)) {}

    /// The same error with one fact more, for a caller that knows where it happened.
    [[nodiscard]] Error with(std::string name, std::string value) const;
    /// The value of a fact, empty when it is not known.
    [[nodiscard]] std::string_view fact(std::string_view name) const;

    bool operator==(const Error&) const = default;
};

} // namespace spanwright
