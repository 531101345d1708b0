// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleLaboratory.h"

namespace spanwright::test {

Decimal number(const char* text) {
    return Decimal::parse(text).value();
}

std::int64_t momentOf(int dayOfOctober, std::chrono::minutes time) {
    using namespace std::chrono;
    const sys_days day = year{2026} / October / dayOfOctober;
    return duration_cast<milliseconds>((day + time).time_since_epoch()).count();
}

Job sampleJob(const char* number, const Procedure& procedure, const char* day) {
    Job job;
    job.number = std::string("W-2026-") + number;
    job.certificateNumber = std::string("QC-2026-") + number;
    job.laboratory = "Quillmere Calibration Room";
    job.laboratoryAddress = "7 Sluice Lane, Quillmere";
    job.place = "At the laboratory";
    job.customer = "Brackwater Pumping Station";
    job.customerContact = "Instrument workshop, Brackwater";
    job.customerSupplied = "none";
    job.externalProviders = "none";
    job.method = procedure.name;
    job.methodEdition = procedure.edition;
    job.received = "2026-10-09";
    job.conditionReceived = "Clean, no damage; in the room since 2026-10-09";
    job.calibrated = day;
    job.traceability = "The standards named below are calibrated at laboratories whose results are traceable to the SI.";
    return job;
}

Conditions sampleConditions(const Climate& climate, const char* remarks) {
    const auto influence = [](Quantity quantity, const char* const (&measured)[2], const char* low, const char* high) {
        return Condition{std::move(quantity), number(measured[0]), number(measured[1]), number(low), number(high)};
    };
    Conditions conditions;
    conditions.influences = {influence({"temperature", "°C"}, climate.temperature, "18", "24"),
                             influence({"relative humidity", "%"}, climate.humidity, "30", "70"),
                             influence({"air pressure", "hPa"}, climate.pressure, "950", "1050")};
    conditions.remarks = remarks;
    return conditions;
}

Standard sampleStandard(StandardRole role, const StandardFacts& facts) {
    Standard standard;
    standard.id = facts.id;
    standard.description = facts.description;
    standard.role = role;
    standard.certificate = facts.certificate;
    standard.issuer = facts.issuer;
    standard.calibratedOn = facts.calibratedOn;
    standard.due = facts.due;
    standard.unit = facts.unit;
    standard.rangeLow = number(facts.low);
    standard.rangeHigh = number(facts.high);
    if (facts.resolution)
        standard.resolution = number(facts.resolution);
    standard.expandedUncertainty = number(facts.expanded);
    standard.coverageFactor = number("2");
    standard.drift = number(facts.drift);
    return standard;
}

void addCorrections(Standard& standard, std::initializer_list<std::pair<const char*, const char*>> corrections) {
    for (const auto& [at, correction] : corrections)
        standard.corrections.push_back({number(at), number(correction)});
}

Plan samplePlan(std::initializer_list<const char*> setPoints, PlanDirections directions) {
    Plan plan;
    for (const char* setPoint : setPoints)
        plan.setPoints.push_back(number(setPoint));
    plan.directions = directions;
    return plan;
}

std::int64_t appendTyped(Record& record, Reading reading, std::int64_t at, std::int64_t apart, std::int64_t spread) {
    reading.id = record.nextReadingId++;
    reading.enteredAt = at + apart + reading.id * 7'919 % spread;
    reading.enteredBy = "IO";
    record.readings.edit().append(reading);
    return reading.enteredAt;
}

} // namespace spanwright::test
