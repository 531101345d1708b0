// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <chrono>
#include <initializer_list>

namespace spanwright::test {

/// A number from its text; the text must be a number.
Decimal number(const char* text);

/// What every sample shares: one invented laboratory, its customer, its room, its standards. Calibrations begin in the morning of a
/// day of October 2026.

/// Milliseconds since 1970 of that time of that day.
std::int64_t momentOf(int dayOfOctober, std::chrono::minutes time);
/// A procedure of the laboratory.
struct Procedure {
    const char* name;
    const char* edition;
};
/// `number`: that of the work, of the order and the certificate.
Job sampleJob(const char* number, const Procedure& procedure, const char* day);
/// The climate at the beginning and at the end, within what the room is kept to.
struct Climate {
    const char* temperature[2]; ///< °C
    const char* humidity[2];    ///< %
    const char* pressure[2];    ///< hPa
};
Conditions sampleConditions(const Climate& climate, const char* remarks);
/// A standard with k = 2; most were calibrated in the same place on the same day.
struct StandardFacts {
    const char* id;
    const char* description;
    const char* issuer = "Hollin Reference Laboratory";
    const char* certificate;
    const char* calibratedOn = "2026-03-17";
    const char* due = "2027-03-17";
    const char* unit;
    const char* low;
    const char* high;
    const char* resolution = nullptr; ///< a dead weight has none
    const char* expanded;
    const char* drift;
};
Standard sampleStandard(StandardRole role, const StandardFacts& facts);
void addCorrections(Standard& standard, std::initializer_list<std::pair<const char*, const char*>> corrections);
Plan samplePlan(std::initializer_list<const char*> setPoints, PlanDirections directions);

/// Appends a reading as the technician typed it, at least `apart` ms after `at` and up to a part of `spread` later, as people do;
/// returns when.
std::int64_t appendTyped(Record& record, Reading reading, std::int64_t at, std::int64_t apart, std::int64_t spread);

} // namespace spanwright::test
