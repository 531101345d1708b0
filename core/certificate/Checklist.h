// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <string>
#include <vector>

namespace spanwright {

/// What a calibration certificate asks for and the record does not yet give (ISO/IEC 17025:2017, 7.8; ILAC P14; ILAC G8). The
/// sentence is made in ui/certificate/CertificateText. Beside each: the requirement.
enum class Gap {
    NoLaboratory,           ///< 7.8.2.1 b
    NoLaboratoryAddress,    ///< 7.8.2.1 b
    NoNumber,               ///< 7.8.2.1 d
    NoCustomer,             ///< 7.8.2.1 e
    NoCustomerContact,      ///< 7.8.2.1 e
    NoMethod,               ///< 7.8.2.1 f
    NoMethodEdition,        ///< 7.2.1
    NoDescription,          ///< 7.8.2.1 g
    NoMaker,                ///< 7.8.2.1 g
    NoModel,                ///< 7.8.2.1 g
    NoSerial,               ///< 7.8.2.1 g; "none" is an answer
    NoRange,                ///< 7.8.2.1 g
    NoOutput,               ///< without it there is no error of indication
    NoCondition,            ///< 7.8.2.1 g
    NoReceipt,              ///< 7.8.2.1 h
    NoPlace,                ///< 7.8.2.1 c; "at the laboratory" is an answer
    NoCustomerData,         ///< 7.8.2.2; "none" is an answer
    NoExternalProviders,    ///< 7.8.2.1 p; "none" is an answer
    NumberUsedElsewhere,    ///< 7.8.2.1 d; from the folder, not from the record; facts: number, file
    NoCalibrationDate,      ///< 7.8.2.1 i
    CalibratedAfterIssue,   ///< 7.8.2.1 i; facts: calibrated, issued
    CalibratedBeforeReceipt,///< facts: calibrated, received
    NoUnit,                 ///< 7.8.2.1 m; facts: quantity
    NoResults,              ///< 7.8.2.1 m
    PlanNotDone,            ///< facts: phase, planned, complete
    ExclusionWithoutReason, ///< 7.8.2.1 n; facts: count
    ManyExcluded,           ///< facts: phase, count, of, limit
    NotPerformed,           ///< no name of the person who performed
    NotChecked,
    NotAuthorised,          ///< 7.8.2.1 o
    SignedBeforeCalibration, ///< facts: role, date, calibrated
    NoUncertainty,          ///< 7.8.4.1 a; facts: phase
    NoRepeatability,        ///< nothing was read twice; facts: phase
    OmittedWithoutReason,   ///< a line of the budget left out; facts: line
    NoConditions,           ///< 7.8.4.1 b
    ConditionMissing,       ///< 7.8.4.1 b; facts: quantity
    ConditionOutside,       ///< facts: quantity
    NoTraceability,         ///< 7.8.4.1 c
    NoStandard,             ///< 6.5; no standard that gives the reference
    StandardWithoutCertificate, ///< facts: standard
    StandardWithoutIssuer,
    StandardWithoutDue,
    StandardWithoutUncertainty,
    StandardUnitDiffers,    ///< facts: standard, unit, expected
    StandardOverdue,        ///< facts: standard, days
    StandardOverdueAccepted,///< the same with a reason and a name; facts: standard, days, by
    StandardRangeTooSmall,  ///< facts: standard
    CorrectionNotApplied,   ///< 6.4.11; a table is there and said not to be used; facts: standard
    NoAsFound,              ///< 7.8.4.1 d
    NoAsLeft,               ///< 7.8.4.1 d
    AdjustmentNotDescribed, ///< 7.8.4.1 d
    AsLeftWithoutAdjustment,///< readings as left, but "adjusted" is not ticked
    NoSpecification,        ///< 7.8.6.2 b
    NoLimits,               ///< 7.8.6.2 b
    NoDecision,             ///< limits without an error to hold against them; facts: phase
    RuleNotAgreed,          ///< 7.1.3
    RuleAgreedLate,         ///< agreed after the readings; facts: agreed, calibrated
    NoFunction,             ///< no calibration function with a valid range; facts: phase
    RobustFunction,         ///< the robust fit is for comparison only
    RecalibrationNotAgreed, ///< 7.8.4.3
    NoReasonOfReplacement,  ///< 7.8.8
    ReplacesItself,         ///< 7.8.8.3
    SeriousFinding,         ///< facts: finding (index), phase
};

/// The last code, for a test that walks them all.
inline constexpr Gap lastGap = Gap::SeriousFinding;

/// Block: printed only as an incomplete draft. Warn: printed, and to be looked at.
enum class GapLevel { Block, Warn };

/// One gap, and where it is mended: a stage ("job", "bench", "budget", "certificate") and the path of a field as in the session
/// file ("job.customer", "standards.0.certificate", "signoffs.authorised").
struct ChecklistItem {
    Gap gap = Gap::NoLaboratory;
    GapLevel level = GapLevel::Block;
    std::string stage;
    std::string field;
    std::vector<Fact> facts;
    bool operator==(const ChecklistItem&) const = default;
};

/// That another session bears this certificate's number; for who knows the folder.
ChecklistItem numberUsedElsewhere(const std::string& number, const std::string& file);

/// What is missing or doubtful, in the order of the certificate, what blocks and what warns mixed.
std::vector<ChecklistItem> checklist(const Record& record, const Evaluation& evaluation);

/// Whether anything in the list blocks.
bool blocked(const std::vector<ChecklistItem>& list);

} // namespace spanwright
