// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/FileBytes.h"
#include "core/exchange/ReadingImport.h"
#include "tests/support/Paths.h"
#include "tests/support/SampleRecord.h"
#include "ui/commands/PartCommand.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/commands/Workbench.h"

#include <chrono>
#include <stdexcept>
#include <utility>

namespace spanwright::test {

namespace {

using std::chrono::year_month_day;

constexpr std::int64_t Second = 1000, Minute = 60 * Second;

std::int64_t morningOf(year_month_day day) {
    using namespace std::chrono;
    return duration_cast<milliseconds>((sys_days{day} + 8h + 30min).time_since_epoch()).count();
}

/// The readings of a sample table, typed one after the other from the morning on: `apart` between two, `between` more where the set
/// point changes.
void appendTable(Record& record, const std::string& name, const ImportMapping& mapping, std::int64_t at, std::int64_t apart, std::int64_t between) {
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
        reading.id = record.nextReadingId++;
        if (!reading.setPoint)
            reading.setPoint = reading.reference;
        reading.direction = Direction::Rising;
        reading.run = std::max(reading.run, 1);
        if (before && compareValue(*before, *reading.setPoint) != 0)
            at += between;
        before = reading.setPoint;
        at += apart + reading.id * 7'919 % (apart / 4);
        reading.enteredAt = at;
        reading.enteredBy = "IO";
        record.readings.edit().append(reading);
    }
}

Job jobOf(const char* number, const char* day) {
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
    job.received = "2026-10-09";
    job.conditionReceived = "Clean, no damage; in the room since 2026-10-09";
    job.calibrated = day;
    job.traceability = "The standards named below are calibrated at laboratories whose results are traceable to the SI.";
    return job;
}

Conditions room() {
    Conditions conditions;
    conditions.influences = {{{"temperature", "°C"}, number("20.9"), number("21.2"), number("18"), number("24")},
                             {{"relative humidity", "%"}, number("45"), number("44"), number("30"), number("70")},
                             {{"air pressure", "hPa"}, number("1007"), number("1006"), number("950"), number("1050")}};
    return conditions;
}

Standard standardOf(const char* id, const char* description, StandardRole role, const char* unit, const char* low, const char* high, const char* resolution) {
    Standard standard;
    standard.id = id;
    standard.description = description;
    standard.role = role;
    standard.issuer = "Hollin Reference Laboratory";
    standard.calibratedOn = "2026-03-17";
    standard.due = "2027-03-17";
    standard.unit = unit;
    standard.rangeLow = number(low);
    standard.rangeHigh = number(high);
    standard.resolution = number(resolution);
    standard.coverageFactor = number("2");
    return standard;
}

Plan planOf(std::initializer_list<const char*> setPoints, int runs, int repeats) {
    Plan plan;
    for (const char* setPoint : setPoints)
        plan.setPoints.push_back(number(setPoint));
    plan.directions = PlanDirections::Rising;
    plan.runs = runs;
    plan.repeats = repeats;
    return plan;
}

} // namespace

Record temperatureProbe() {
    Record record;
    record.job = jobOf("0421", "2026-10-15");
    record.job.method = "QP-04 Resistance thermometers, comparison in a stirred bath";
    record.job.methodEdition = "6";
    record.item = {"Platinum resistance probe", "Oskery", "TP-22", "OK-7714", "TP-22-C", {"temperature", "°C"}, {"resistance", "Ω"}, number("0"), number("240"),
                   {}, {}, number("0.0001"), number("0.001")};
    Standard bath = standardOf("QR-T-04", "Reference thermometer in a stirred bath", StandardRole::Reference, "°C", "-40", "250", "0.001");
    bath.certificate = "HL-25-0932";
    bath.calibratedOn = "2025-10-03";
    bath.due = "2026-10-03";
    bath.expandedUncertainty = number("0.015");
    bath.drift = number("0.006");
    for (const auto& [at, correction] : {std::pair{"0", "-0.0120"}, {"40", "-0.0152"}, {"80", "-0.0183"}, {"120", "-0.0215"}, {"160", "-0.0247"},
                                         {"200", "-0.0278"}, {"240", "-0.0310"}})
        bath.corrections.push_back({number(at), number(correction)});
    Standard bridge = standardOf("QR-E-03", "Resistance bridge", StandardRole::Indication, "Ω", "0", "400", "0.0001");
    bridge.certificate = "AE-26-0081";
    bridge.expandedUncertainty = number("0.0006");
    bridge.drift = number("0.0002");
    record.standards = {bath, bridge};
    record.conditions = room();
    record.conditions.remarks = "Immersion 250 mm; four wires; 1 mA";
    record.plan = planOf({"0", "40", "80", "120", "160", "200", "240"}, 1, 4);
    record.choices.at = {number("0"), number("120"), number("240")};
    ImportMapping mapping;
    mapping.reference = 0;
    mapping.indication = 1;
    mapping.setPoint = 2;
    appendTable(record, "temperature-probe.csv", mapping, morningOf(year_month_day{std::chrono::year{2026}, std::chrono::October, std::chrono::day{15}}), 45 * Second, 35 * Minute);
    return record;
}

Record loadCell() {
    Record record;
    record.job = jobOf("0424", "2026-10-20");
    record.job.method = "QP-17 Force transducers, deadweights";
    record.job.methodEdition = "2";
    record.item = {"Load cell", "Tarnby", "LC-50", "TB-50-0093", "LC-50-1", {"force", "kN"}, {"signal", "mV/V"}, number("0"), number("50"),
                   number("0"), number("2"), number("0.000002"), {}};
    Standard weights = standardOf("QR-F-03", "Deadweight set", StandardRole::Reference, "kN", "5", "50", "0.000001");
    weights.certificate = "HL-26-0415";
    weights.resolution.reset();
    weights.form = UncertaintyForm::PercentOfReading;
    weights.expandedUncertainty = number("0.005");
    weights.drift = number("0.001");
    Standard indicator = standardOf("QR-E-07", "Bridge amplifier", StandardRole::Indication, "mV/V", "0", "2.5", "0.000002");
    indicator.certificate = "AE-26-0112";
    indicator.expandedUncertainty = number("0.000010");
    indicator.drift = number("0.000004");
    record.standards = {weights, indicator};
    record.conditions = room();
    record.conditions.remarks = "Compression; zero before each run; three preloads in each position";
    record.plan = planOf({"5", "10", "15", "20", "25", "30", "35", "40", "45", "50"}, 4, 1);
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
    appendTable(record, "load-cell.csv", mapping, morningOf(year_month_day{std::chrono::year{2026}, std::chrono::October, std::chrono::day{20}}), 50 * Second, 0);
    return record;
}

Record flowSensorAsTyped() {
    Record record;
    record.job = jobOf("0427", "2026-10-22");
    record.job.method = "QP-09 Gas flow sensors, bell prover";
    record.job.methodEdition = "3";
    record.item = {"Thermal flow sensor", "Vessholt", "FS-50", "NV-31102", "FS-50-B", {"flow", "L/min"}, {"voltage", "V"}, number("0"), number("50"),
                   number("0"), number("5"), number("0.001"), number("0.001")};
    Standard prover = standardOf("QR-Q-01", "Bell prover", StandardRole::Reference, "L/min", "1", "60", "0.001");
    prover.certificate = "HL-26-0733";
    prover.form = UncertaintyForm::PercentOfReading;
    prover.expandedUncertainty = number("0.20");
    prover.drift = number("0.05");
    Standard meter = standardOf("QR-E-02", "Voltmeter", StandardRole::Indication, "V", "0", "10", "0.0001");
    meter.certificate = "AE-26-0090";
    meter.expandedUncertainty = number("0.0004");
    meter.drift = number("0.0001");
    record.standards = {prover, meter};
    record.conditions = room();
    record.conditions.remarks = "Dry air, horizontal, straight inlet of 30 diameters";
    record.plan = planOf({"2", "5", "10", "15", "20", "30", "40", "50"}, 1, 6);
    record.plan.dwellSeconds = 60;
    record.choices.at = {number("2"), number("25"), number("50")};
    ImportMapping mapping;
    mapping.reference = 0;
    mapping.indication = 1;
    mapping.setPoint = 2;
    appendTable(record, "flow-sensor-as-typed.csv", mapping, morningOf(year_month_day{std::chrono::year{2026}, std::chrono::October, std::chrono::day{22}}), 40 * Second, 6 * Minute);
    return record;
}

Record asTaken(const Record& wanted) {
    constexpr std::int64_t day = 24 * 60 * Minute;
    std::int64_t now = wanted.readings->enteredAt().front() - day;
    Workbench workbench([&now] { return now; });
    const auto step = [&](auto part) {
        workbench.perform(std::make_unique<PartCommand<std::remove_cvref_t<decltype(wanted.*part)>>>(QString(), part, wanted.*part));
        now += 95 * Second;
    };
    workbench.setPerson("TL");
    step(&Record::job);
    step(&Record::item);
    step(&Record::standards);
    step(&Record::plan);
    step(&Record::choices);
    workbench.setPerson("IO");
    now = wanted.readings->enteredAt().front() - 10 * Minute;
    step(&Record::conditions);
    for (std::size_t row = 0; row < wanted.readings->size(); ++row) {
        Reading reading = wanted.readings->row(row);
        reading.id = 0;
        now = reading.enteredAt;
        workbench.perform(std::make_unique<AddReadings>(std::vector{reading}));
    }
    return workbench.record();
}

} // namespace spanwright::test
