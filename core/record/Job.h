// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// Who the work is done for and by which procedure (ISO/IEC 17025:2017, 7.8.2.1). Dates are ISO 8601 calendar dates
/// ("2026-11-30") or empty.
struct Job {
    std::string number;            ///< work order
    std::string certificateNumber;
    std::string laboratory;
    std::string laboratoryAddress;
    std::string place;             ///< of calibration, where elsewhere than the laboratory
    std::string customer;
    std::string customerContact;
    std::string customerSupplied;  ///< data supplied by the customer, in words
    std::string method;            ///< procedure
    std::string methodEdition;
    std::string methodDeviations;
    std::string received;          ///< date of receipt
    std::string conditionReceived;
    std::string calibrated;        ///< date of measurement; derived from the readings' times when empty
    std::string issued;            ///< date of issue
    std::string traceability;      ///< statement
    std::string externalProviders; ///< results from external providers, in words
    bool adjusted = false;
    std::string adjustment;        ///< what was adjusted, in words
    std::string noAsFoundReason;   ///< why there are no results from before an adjustment
    std::string opinions;
    bool recalibrationAgreed = false;
    std::string recalibrationDate; ///< printed only when agreed with the customer (7.8.4.3)
    std::string replaces;          ///< number of the certificate that this one replaces (7.8.8)
    std::string replacesReason;
    bool operator==(const Job&) const = default;
};

/// A quantity as it is named and its unit as it is printed.
struct Quantity {
    std::string name;
    std::string unit;
    bool operator==(const Quantity&) const = default;
};

/// The item under calibration.
struct Item {
    std::string description;
    std::string maker;
    std::string model;
    std::string serial; ///< "none" when it has none
    std::string tag;
    Quantity reference;  ///< stimulus, e.g. pressure / bar
    Quantity indication; ///< response, e.g. current / mA
    std::optional<Decimal> rangeLow, rangeHigh;   ///< in the unit of the reference (LRV, URV)
    std::optional<Decimal> outputLow, outputHigh; ///< indication that belongs to them when perfect
    std::optional<Decimal> resolution;            ///< of the indication
    std::optional<Decimal> referenceResolution;   ///< of the reference as read
    bool operator==(const Item&) const = default;
};

/// One line of a standard's correction table: add `correction` to what the standard indicates at `at`.
struct CorrectionPoint {
    std::optional<Decimal> at;
    std::optional<Decimal> correction;
    bool operator==(const CorrectionPoint&) const = default;
};

enum class StandardRole { Reference, Indication }; ///< gives the reference value, or reads the item's output
enum class UncertaintyForm { Absolute, PercentOfReading };
/// Whether the correction table is applied here, was applied before the values were typed, or does not exist.
enum class CorrectionUse { None, Apply, AlreadyApplied };

/// A reference standard and what its certificate says (ISO/IEC 17025:2017, 6.4.13, 6.5).
struct Standard {
    std::string id;
    std::string description;
    StandardRole role = StandardRole::Reference;
    std::string certificate;
    std::string issuer;
    std::string calibratedOn;
    std::string due;
    std::string unit;
    std::optional<Decimal> rangeLow, rangeHigh;
    std::optional<Decimal> resolution;
    std::optional<Decimal> expandedUncertainty; ///< U
    std::optional<Decimal> coverageFactor;      ///< k
    UncertaintyForm form = UncertaintyForm::Absolute;
    std::optional<Decimal> drift; ///< half-width of a rectangular allowance since its calibration, same form as U
    CorrectionUse correctionUse = CorrectionUse::None;
    std::vector<CorrectionPoint> corrections;
    std::string overdueReason; ///< why it was used all the same
    std::string overdueBy;     ///< authorised by
    bool operator==(const Standard&) const = default;
};

/// An influence quantity at start and end (7.8.4.1 b) with the limits of the method.
struct Condition {
    Quantity quantity;
    std::optional<Decimal> start, end;
    std::optional<Decimal> low, high;
    bool operator==(const Condition&) const = default;
};

struct Conditions {
    std::vector<Condition> influences;
    std::string remarks; ///< orientation, medium, supply, load resistance
    bool operator==(const Conditions&) const = default;
};

} // namespace spanwright
