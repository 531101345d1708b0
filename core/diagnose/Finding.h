// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Choices.h"

#include <string>
#include <vector>

namespace spanwright {

enum class Severity { Note, Attention, Serious };

enum class FindingCode {
    LackOfFit,
    HiddenCurvature,
    Hysteresis,
    RunZeroShift,
    RunGainChange,
    FirstRunDiffers,
    ScatterGrows,
    Autocorrelated,
    NonNormal,
    Straggler,
    Outlier,
    Influential,
    ExcludedReadings,
    SetPointExcluded,
    ManyExcluded,
    TooFewReadings,
    OutsideBand,
    DegreeNotJustified,
    ThroughZeroNotSupported,
    StatedTooSmall,
    StatedTooLarge,
    RepeatedReading,
    Extrapolation,
    LowestOutweigh,
    BetweenPlateaus,
};
/// The last code, for a test that walks them all.
inline constexpr FindingCode lastFindingCode = FindingCode::BetweenPlateaus;

/// The one thing to do about a finding.
enum class Remedy {
    None,
    CompareFunction,
    CarryToBudget,
    SeeExclusions,
    SeeReadings,
    ChooseWeights,
    TakeMoreReadings,
    CheckRun
};

struct Figure {
    std::string name; ///< as in figures JSON: "f", "p", "value", "percent_of_span", …
    double value = 0;
    bool operator==(const Figure&) const = default;
};

/// What the figures mean, as a code; the sentence is made in ui/words/FindingText.
struct Finding {
    FindingCode code = FindingCode::LackOfFit;
    Severity severity = Severity::Note;
    std::vector<ReadingId> rows;
    std::vector<Figure> figures;
    Remedy remedy = Remedy::None;
    FunctionChoice suggestion; ///< with Remedy::CompareFunction
};

} // namespace spanwright
