// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingName.h"

namespace spanwright {

std::string_view findingName(FindingCode code) {
    switch (code) {
    case FindingCode::LackOfFit:
        return "lack-of-fit";
    case FindingCode::HiddenCurvature:
        return "hidden-curvature";
    case FindingCode::Hysteresis:
        return "hysteresis";
    case FindingCode::RunZeroShift:
        return "run-zero-shift";
    case FindingCode::RunGainChange:
        return "run-gain-change";
    case FindingCode::FirstRunDiffers:
        return "first-run-differs";
    case FindingCode::ScatterGrows:
        return "scatter-grows";
    case FindingCode::Autocorrelated:
        return "autocorrelated";
    case FindingCode::NonNormal:
        return "non-normal";
    case FindingCode::Straggler:
        return "straggler";
    case FindingCode::Outlier:
        return "outlier";
    case FindingCode::Influential:
        return "influential";
    case FindingCode::ExcludedReadings:
        return "excluded-readings";
    case FindingCode::SetPointExcluded:
        return "set-point-excluded";
    case FindingCode::ManyExcluded:
        return "many-excluded";
    case FindingCode::TooFewReadings:
        return "too-few-readings";
    case FindingCode::OutsideBand:
        return "outside-band";
    case FindingCode::DegreeNotJustified:
        return "degree-not-justified";
    case FindingCode::ThroughZeroNotSupported:
        return "through-zero-not-supported";
    case FindingCode::StatedTooSmall:
        return "stated-too-small";
    case FindingCode::StatedTooLarge:
        return "stated-too-large";
    case FindingCode::RepeatedReading:
        return "repeated-reading";
    case FindingCode::Extrapolation:
        return "extrapolation";
    case FindingCode::LowestOutweigh:
        return "lowest-outweigh";
    case FindingCode::BetweenPlateaus:
        return "between-plateaus";
    }
    return {};
}

} // namespace spanwright
