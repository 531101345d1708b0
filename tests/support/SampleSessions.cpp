// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/FileBytes.h"
#include "core/exchange/ReadingImport.h"
#include "tests/support/Paths.h"
#include "tests/support/SampleRecord.h"

#include <algorithm>
#include <chrono>
#include <stdexcept>

namespace spanwright::test {

namespace {

constexpr std::int64_t Second = 1000, Minute = 60 * Second;
constexpr auto Begin = std::chrono::hours(8) + std::chrono::minutes(30);

/// The pause between two readings; what is added where the set point changes.
struct Pace {
    std::int64_t apart = 0, atSetPoint = 0;
};

/// The readings of a sample table, typed one after the other from `at` on.
void appendTable(Record& record, const std::string& name, const ImportMapping& mapping, std::int64_t at, const Pace& pace) {
    const auto file = FileBytes::read(sourceDir() + "/sample-data/" + name);
    const auto rules = guessRules(file.value().bytes(), {});
    Progress progress;
    auto imported = readReadings(file->bytes(), rules.value(), mapping, progress);
    if (!imported)
        throw std::runtime_error(name);
    Record table;
    table.readings.edit().appendBlock(std::move(imported->block), 1);
    std::optional<Decimal> before;
    for (std::size_t row = 0; row < table.readings->size(); ++row) {
        Reading reading = table.readings->row(row);
        if (!reading.setPoint)
            reading.setPoint = reading.reference;
        reading.direction = Direction::Rising;
        reading.run = std::max(reading.run, 1);
        if (before && compareValue(*before, *reading.setPoint) != 0)
            at += pace.atSetPoint;
        before = reading.setPoint;
        at = appendTyped(record, reading, at, pace.apart, pace.apart / 4);
    }
}

constexpr Climate room{{"20.9", "21.2"}, {"45", "44"}, {"1007", "1006"}};

} // namespace

Record temperatureProbe() {
    Record record;
    record.job = sampleJob("0421", {"QP-04 Resistance thermometers, comparison in a stirred bath", "6"}, "2026-10-15");
    record.item = {"Platinum resistance probe", "Oskery", "TP-22", "OK-7714", "TP-22-C", {"temperature", "°C"}, {"resistance", "Ω"}, number("0"), number("240"),
                   {}, {}, number("0.0001"), number("0.001")};
    Standard bath = sampleStandard(StandardRole::Reference, {.id = "QR-T-04",
                                                             .description = "Reference thermometer in a stirred bath",
                                                             .certificate = "HL-25-0932",
                                                             .calibratedOn = "2025-10-03",
                                                             .due = "2026-10-03",
                                                             .unit = "°C",
                                                             .low = "-40",
                                                             .high = "250",
                                                             .resolution = "0.001",
                                                             .expanded = "0.015",
                                                             .drift = "0.006"});
    addCorrections(bath, {{"0", "-0.0120"}, {"40", "-0.0152"}, {"80", "-0.0183"}, {"120", "-0.0215"}, {"160", "-0.0247"}, {"200", "-0.0278"}, {"240", "-0.0310"}});
    const Standard bridge = sampleStandard(StandardRole::Indication, {.id = "QR-E-03",
                                                                      .description = "Resistance bridge",
                                                                      .certificate = "AE-26-0081",
                                                                      .unit = "Ω",
                                                                      .low = "0",
                                                                      .high = "400",
                                                                      .resolution = "0.0001",
                                                                      .expanded = "0.0006",
                                                                      .drift = "0.0002"});
    record.standards = {bath, bridge};
    record.conditions = sampleConditions(room, "Immersion 250 mm; four wires; 1 mA");
    record.plan = samplePlan({"0", "40", "80", "120", "160", "200", "240"}, PlanDirections::Rising);
    record.plan.repeats = 4;
    record.choices.at = {number("0"), number("120"), number("240")};
    ImportMapping mapping;
    mapping.reference = 0;
    mapping.indication = 1;
    mapping.setPoint = 2;
    appendTable(record, "temperature-probe.csv", mapping, momentOf(15, Begin), {45 * Second, 35 * Minute});
    return record;
}

Record loadCell() {
    Record record;
    record.job = sampleJob("0424", {"QP-17 Force transducers, deadweights", "2"}, "2026-10-20");
    record.item = {"Load cell", "Tarnby", "LC-50", "TB-50-0093", "LC-50-1", {"force", "kN"}, {"signal", "mV/V"}, number("0"), number("50"),
                   number("0"), number("2"), number("0.000002"), {}};
    Standard weights = sampleStandard(StandardRole::Reference, {.id = "QR-F-03",
                                                                .description = "Deadweight set",
                                                                .certificate = "HL-26-0415",
                                                                .unit = "kN",
                                                                .low = "5",
                                                                .high = "50",
                                                                .expanded = "0.005",
                                                                .drift = "0.001"});
    weights.form = UncertaintyForm::PercentOfReading;
    const Standard indicator = sampleStandard(StandardRole::Indication, {.id = "QR-E-07",
                                                                         .description = "Bridge amplifier",
                                                                         .certificate = "AE-26-0112",
                                                                         .unit = "mV/V",
                                                                         .low = "0",
                                                                         .high = "2.5",
                                                                         .resolution = "0.000002",
                                                                         .expanded = "0.000010",
                                                                         .drift = "0.000004"});
    record.standards = {weights, indicator};
    record.conditions = sampleConditions(room, "Compression; zero before each run; three preloads in each position");
    record.plan = samplePlan({"5", "10", "15", "20", "25", "30", "35", "40", "45", "50"}, PlanDirections::Rising);
    record.plan.runs = 4;
    record.plan.preloads = 3;
    record.plan.dwellSeconds = 30;
    record.plan.referenceTyped = false;
    for (const char* degrees : {"0", "0", "120", "240"})
        record.plan.positions.push_back(number(degrees));
    record.choices.function = {FunctionFamily::Polynomial, 2};
    record.choices.splitOnCertificate = true;
    ImportMapping mapping;
    mapping.reference = 0;
    mapping.indication = 1;
    mapping.run = 2;
    appendTable(record, "load-cell.csv", mapping, momentOf(20, Begin), {50 * Second, 0});
    return record;
}

Record flowSensorAsTyped() {
    Record record;
    record.job = sampleJob("0427", {"QP-09 Gas flow sensors, bell prover", "3"}, "2026-10-22");
    record.item = {"Thermal flow sensor", "Vessholt", "FS-50", "NV-31102", "FS-50-B", {"flow", "L/min"}, {"voltage", "V"}, number("0"), number("50"),
                   number("0"), number("5"), number("0.001"), number("0.001")};
    Standard prover = sampleStandard(StandardRole::Reference, {.id = "QR-Q-01",
                                                               .description = "Bell prover",
                                                               .certificate = "HL-26-0733",
                                                               .unit = "L/min",
                                                               .low = "1",
                                                               .high = "60",
                                                               .resolution = "0.001",
                                                               .expanded = "0.20",
                                                               .drift = "0.05"});
    prover.form = UncertaintyForm::PercentOfReading;
    const Standard meter = sampleStandard(StandardRole::Indication, {.id = "QR-E-02",
                                                                     .description = "Voltmeter",
                                                                     .certificate = "AE-26-0090",
                                                                     .unit = "V",
                                                                     .low = "0",
                                                                     .high = "10",
                                                                     .resolution = "0.0001",
                                                                     .expanded = "0.0004",
                                                                     .drift = "0.0001"});
    record.standards = {prover, meter};
    record.conditions = sampleConditions(room, "Dry air, horizontal, straight inlet of 30 diameters");
    record.plan = samplePlan({"2", "5", "10", "15", "20", "30", "40", "50"}, PlanDirections::Rising);
    record.plan.repeats = 6;
    record.plan.dwellSeconds = 60;
    record.choices.at = {number("2"), number("25"), number("50")};
    ImportMapping mapping;
    mapping.reference = 0;
    mapping.indication = 1;
    mapping.setPoint = 2;
    appendTable(record, "flow-sensor-as-typed.csv", mapping, momentOf(22, Begin), {40 * Second, 6 * Minute});
    return record;
}

} // namespace spanwright::test
