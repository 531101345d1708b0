// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Checklist.h"
#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"
#include "core/split/SplitLines.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// A number as it is printed: digits with a decimal point and '-' for minus, rounded once; empty where there is none.
using Digits = std::string;

/// Incomplete: something that blocks is missing. Draft: not all three people have signed off. SignedOff: names are entered; it is
/// still for them to release it, and the program never calls it valid.
enum class DraftState { Incomplete, Draft, SignedOff };

/// One line of the table of results. Units: of the reference or of the indication as named, percentages of the output span.
struct ResultLine {
    Digits setPoint;
    Direction direction = Direction::Unknown;
    std::size_t n = 0;
    Digits reference, indication;
    Digits rising, falling; ///< means, where both are stated together
    Digits error, expanded, coverageFactor;
    Digits expandedReference; ///< U in the unit of the reference
    Digits errorPercent, expandedPercent;
    Digits limit, acceptance; ///< half-widths; acceptance is "" where the guard band leaves no room
    std::optional<ConformityState> state;
    Digits conformance; ///< p_c in %, ">99.9" and "<0.1" at the ends
    /// Unrounded, for the picture.
    struct Drawn {
        double reference = 0, error = 0, expanded = 0;
        std::optional<double> limit, acceptance;
    } drawn;
};

/// A line of the budget that is printed.
struct BudgetRow {
    std::optional<DerivedLine> derived;
    std::string name;
    bool fromOtherPhase = false;
    Side side = Side::Indication;
    Distribution distribution = Distribution::Normal;
    Digits amount, divisor, standardUncertainty, degreesOfFreedom, sensitivity, contribution; ///< degreesOfFreedom "" when infinite
    double share = 0;
};

/// The budget of the point with the largest U.
struct BudgetSection {
    Digits setPoint;
    Direction direction = Direction::Unknown;
    std::vector<BudgetRow> rows;
    Digits combined, degreesOfFreedom, coverageFactor, expanded, expandedReference;
    Distribution distribution = Distribution::Normal;
};

/// Performance figures in the unit of the indication and in % of output span.
struct PerformanceRow {
    enum class Kind { MeasuredError, InaccuracyHigh, InaccuracyLow, Hysteresis, HysteresisInRun, NonRepeatability,
                      NonLinearityTerminal, NonLinearityIndependent, NonLinearityZeroBased };
    Kind kind = Kind::MeasuredError;
    Digits value, percentOfSpan, setPoint;
};

/// Figures of a force transducer, in % of the deflection unless named otherwise.
struct ForceSection {
    struct Step {
        Digits force, mean, reproducibility, repeatability, interpolation, reversibility;
    };
    std::vector<Step> steps;
    Digits zero;
    int degree = 1, interpolationDegree = 1;
    Digits lowerLimitFactor, lowerLimitForce, lowestForceClassA, lowestForceClassAA;
};

/// A line of the variance split as a table.
struct SplitTableLine {
    using Test = SplitLine::Test;
    SplitPart part = SplitPart::Total;
    Test test = Test::Chain;
    int level = 0; ///< how far it is indented
    Digits sumOfSquares, meanSquare, f, p;
    int degreesOfFreedom = 0;
    std::optional<double> share;      ///< of the total; not for a second test
    std::optional<double> noiseShare; ///< of what the function does not explain; for its parts
};

/// The variance split as it is printed.
struct SplitSection {
    FunctionChoice function;
    FitDirection direction = FitDirection::Indication; ///< the unit is that of this quantity, squared
    bool weighted = false;                             ///< pure numbers
    std::vector<SplitTableLine> lines;
    SplitPart against = SplitPart::PureError;
};

struct PhaseSection {
    Phase phase = Phase::AsFound;
    std::size_t readings = 0, used = 0, excluded = 0;
    bool directionsSeparate = false;
    bool errorKnown = false; ///< false: the item states no output, so there is no error of indication
    std::vector<ResultLine> results;
    Digits smallestFactor, largestFactor; ///< of k in the table
    bool rectangular = false;             ///< k of a rectangular distribution in at least one line
    std::optional<ConformityState> overall;
    std::optional<std::size_t> largest; ///< line with the error of largest magnitude
    std::optional<BudgetSection> budget;
    std::vector<PerformanceRow> performance;
    std::optional<SplitSection> split; ///< where it is wanted
    std::optional<ForceSection> force;
};

struct FunctionSection {
    Phase phase = Phase::AsFound;
    FunctionChoice function;
    FitDirection direction = FitDirection::Indication;
    Method method = Method::LeastSquares;
    Weights weights = Weights::Equal;
    struct Term {
        std::string name, unit;
        Digits value;       ///< as for a data logger: rounding moves no value by U/20 of one read back
        Digits uncertainty; ///< standard uncertainty; "" where the number is no coefficient of the fit
    };
    std::vector<Term> terms;
    Digits centre;    ///< the polynomial is in powers of x − centre; "" where in those of x
    Digits low, high; ///< valid range of the abscissa
    Digits residualSd;
    int degreesOfFreedom = 0;
    Digits largestResidual;
    bool weighted = false; ///< residualSd is a pure number
    struct Check {
        Digits x, y;
    };
    std::vector<Check> checks; ///< computed from the numbers as printed
    Digits readBackExpanded, readBackFactor; ///< U of a reference value read back with one new reading, unit of the reference
};

struct ExcludedLine {
    std::size_t row = 0; ///< of the reading, from 1
    Phase phase = Phase::AsFound;
    int run = 0;
    Direction direction = Direction::Unknown;
    Digits setPoint, reference, indication; ///< as typed
    ExclusionReason reason = ExclusionReason::Other;
    std::string words, by;
};

/// What the program says by itself; the sentence is made in ui/certificate/CertificateText.
enum class Statement {
    AsFoundOutsideLimits,
    AsFoundNotAccepted,      ///< inside the limits, but not every error inside the acceptance limits
    HysteresisLeft,          ///< as-left errors of opposite sign at one set point: no trim removes hysteresis; facts: set_point, unit
    ManyExcluded,            ///< facts: phase, count, of, limit
    SetPointExcluded,        ///< every reading there is; facts: phase, set_point, unit
    NoAsFound,               ///< facts: reason
    Replaces,                ///< facts: number, reason
    ErrorSign,
    ExpandedUncertainty,     ///< facts: coverage (in %)
    Rectangular,
    HysteresisInUncertainty,
    HysteresisSeparate,      ///< directions are stated separately
    ResolutionAndRepeatability,  ///< both are counted, and share a part
    RepeatabilityFromOtherPhase, ///< facts: phase
    RepeatabilityMissing,    ///< facts: phase
    LineOmitted,             ///< facts: line, reason
    DriftNotIncluded,        ///< changes of the item after the calibration are not in U
    CorrectionsApplied,      ///< facts: standards
    CorrectionsAlreadyApplied, ///< facts: standards
    CorrectionsNone,         ///< facts: standards
    OverdueStandard,         ///< facts: standard, days, reason, by
    NoSampling,
    OnlyThisItem,
    NotReproducedInPart,
    Recalibration,           ///< facts: date
};

/// The last code, for a test that walks them all.
inline constexpr Statement lastStatement = Statement::Recalibration;

struct StatementLine {
    Statement statement = Statement::OnlyThisItem;
    std::vector<Fact> facts;
};

/// The certificate as data: everything that is printed, already rounded. The texts of job, item, standards, conditions and
/// limits are those of the record.
struct Certificate {
    DraftState state = DraftState::Draft;
    std::vector<ChecklistItem> gaps;
    Job job;
    Item item;
    std::vector<Standard> standards;
    Conditions conditions;
    Limits limits;
    std::vector<SignOff> signOffs;
    std::string calibrated; ///< date of measurement
    Digits coveragePercent;
    std::vector<PhaseSection> phases; ///< in the order of the work
    std::optional<FunctionSection> function;
    std::vector<ExcludedLine> excluded;
    std::vector<StatementLine> notices;    ///< for the first page
    std::vector<StatementLine> statements; ///< after the results
    std::string program, drawnUpOn, digest;
};

/// What the certificate says about its own making.
struct CertificateContext {
    std::string program;   ///< name and version
    std::string drawnUpOn; ///< date
    std::string digest;    ///< of the record, "sha256:…"; may be empty
};

/// Everything that follows for the certificate from a record and its evaluation. A record with gaps gives a certificate that is
/// Incomplete.
Certificate buildCertificate(const Record& record, const Evaluation& evaluation, const CertificateContext& context);

} // namespace spanwright
