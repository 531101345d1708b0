// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"

#include <array>
#include <chrono>
#include <span>

namespace spanwright::test {

namespace {

constexpr const char* calibrationDay = "2026-10-13";

struct Pair {
    const char* reference;
    const char* indication;
};

struct Pass {
    Phase phase;
    int run;
    Direction direction;
    std::span<const char* const> setPoints; ///< in the order taken
    std::span<const Pair> pairs;
};

constexpr std::array rising11{"0", "1", "2", "3", "4", "5", "6", "7", "8", "9", "10"};
constexpr std::array falling11{"10", "9", "8", "7", "6", "5", "4", "3", "2", "1", "0"};
constexpr std::array rising5{"0", "2.5", "5", "7.5", "10"};
constexpr std::array falling5{"10", "7.5", "5", "2.5", "0"};

constexpr Pair rising1[] = {{"0.0001", "4.002"},  {"0.9986", "5.596"},  {"2.0001", "7.195"},  {"3.0000", "8.794"},
                            {"3.9997", "10.391"}, {"5.0005", "11.993"}, {"5.9994", "13.591"}, {"6.9997", "15.192"},
                            {"8.0004", "16.797"}, {"8.9994", "18.400"}, {"10.0003", "20.004"}};
constexpr Pair falling1[] = {{"10.0007", "20.004"}, {"8.9998", "18.404"}, {"7.9995", "16.802"}, {"6.9996", "15.204"},
                             {"6.0010", "13.605"},  {"4.9999", "12.003"}, {"3.9999", "10.404"}, {"3.0010", "8.804"},
                             {"2.0007", "7.206"},   {"1.0003", "5.605"},  {"-0.0011", "4.002"}};
constexpr Pair rising2[] = {{"-0.0001", "4.003"}, {"0.9991", "5.598"},  {"1.9994", "7.193"},  {"3.0000", "8.796"},
                            {"4.0001", "10.392"}, {"4.9997", "11.993"}, {"6.0014", "13.597"}, {"6.9991", "15.194"},
                            {"8.0000", "16.794"}, {"9.0002", "18.402"}, {"9.9992", "20.004"}};
constexpr Pair falling2[] = {{"9.9998", "20.007"}, {"9.0011", "18.406"}, {"8.0007", "16.805"}, {"7.0005", "15.207"},
                             {"5.9997", "13.603"}, {"4.9998", "12.005"}, {"4.0002", "10.404"}, {"3.0008", "8.806"},
                             {"2.0016", "7.207"},  {"0.9992", "5.604"},  {"-0.0004", "4.003"}};
constexpr Pair rising3[] = {{"0.0006", "4.003"},  {"0.9997", "5.596"},  {"1.9993", "7.194"},  {"3.0000", "8.793"},
                            {"4.0001", "10.392"}, {"4.9994", "11.988"}, {"6.0007", "13.595"}, {"7.0012", "15.196"},
                            {"8.0001", "16.796"}, {"9.0005", "18.398"}, {"10.0003", "20.002"}};
constexpr Pair falling3[] = {{"10.0004", "20.003"}, {"8.9991", "18.401"}, {"7.9999", "16.801"}, {"6.9991", "15.202"},
                             {"6.0001", "13.603"},  {"4.9999", "12.003"}, {"3.9996", "10.403"}, {"3.0007", "8.804"},
                             {"2.0003", "7.203"},   {"1.0001", "5.601"},  {"0.0001", "4.001"}};
constexpr Pair risingLeft[] = {{"0.0003", "4.003"}, {"2.4995", "7.995"}, {"5.0009", "11.995"}, {"7.4990", "15.995"},
                               {"9.9993", "20.005"}};
constexpr Pair fallingLeft[] = {{"9.9998", "20.006"}, {"7.4999", "16.003"}, {"4.9991", "12.003"}, {"2.5003", "8.007"},
                                {"0.0002", "4.004"}};

/// Appends a pass, one reading every 80 to 110 s from `at`; returns when the pass is done.
std::int64_t appendPass(Record& record, const Pass& pass, std::int64_t at) {
    for (std::size_t i = 0; i < pass.pairs.size(); ++i) {
        Reading reading;
        reading.phase = pass.phase;
        reading.run = pass.run;
        reading.direction = pass.direction;
        reading.setPoint = number(pass.setPoints[i]);
        reading.reference = number(pass.pairs[i].reference);
        reading.indication = number(pass.pairs[i].indication);
        at = appendTyped(record, reading, at, 80'000, 30'000);
    }
    return at;
}

void appendReadings(Record& record) {
    using namespace std::chrono_literals;
    const Pass asFound[] = {{Phase::AsFound, 1, Direction::Rising, rising11, rising1},
                            {Phase::AsFound, 1, Direction::Falling, falling11, falling1},
                            {Phase::AsFound, 2, Direction::Rising, rising11, rising2},
                            {Phase::AsFound, 2, Direction::Falling, falling11, falling2},
                            {Phase::AsFound, 3, Direction::Rising, rising11, rising3},
                            {Phase::AsFound, 3, Direction::Falling, falling11, falling3}};
    const Pass asLeft[] = {{Phase::AsLeft, 1, Direction::Rising, rising5, risingLeft},
                           {Phase::AsLeft, 1, Direction::Falling, falling5, fallingLeft}};
    std::int64_t at = momentOf(13, 8h + 35min);
    for (const Pass& pass : asFound)
        at = appendPass(record, pass, at);
    at = momentOf(13, 13h + 5min);
    for (const Pass& pass : asLeft)
        at = appendPass(record, pass, at);
}

Job job() {
    Job job = sampleJob("0418", {"QP-11 Pressure transmitters, comparison with a pressure controller", "4"}, calibrationDay);
    job.customerSupplied = "Tag and measuring range";
    job.conditionReceived = "Clean, no damage, seal intact; in the room since 2026-10-09";
    job.adjusted = true;
    job.adjustment = "Zero trimmed by +0.0012 mA, span by -0.0010 mA";
    return job;
}

Item item() {
    Item item;
    item.description = "Pressure transmitter";
    item.maker = "Vessholt";
    item.model = "PT-4107";
    item.serial = "NV-20318";
    item.tag = "PT-4107-A";
    item.reference = {"pressure", "bar"};
    item.indication = {"current", "mA"};
    item.rangeLow = number("0");
    item.rangeHigh = number("10");
    item.outputLow = number("4");
    item.outputHigh = number("20");
    item.resolution = number("0.001");
    item.referenceResolution = number("0.0001");
    return item;
}

std::vector<Standard> standards() {
    Standard controller = sampleStandard(StandardRole::Reference, {.id = "QR-P-02",
                                                                   .description = "Pressure controller, gauge",
                                                                   .issuer = "Hollin Pressure Laboratory",
                                                                   .certificate = "HL-26-1190",
                                                                   .unit = "bar",
                                                                   .low = "0",
                                                                   .high = "20",
                                                                   .resolution = "0.0001",
                                                                   .expanded = "0.0020",
                                                                   .drift = "0.0008"});
    controller.correctionUse = CorrectionUse::AlreadyApplied;
    addCorrections(controller, {{"0", "0.0004"}, {"5", "0.0001"}, {"10", "-0.0003"}, {"15", "-0.0007"}, {"20", "-0.0011"}});
    const Standard meter = sampleStandard(StandardRole::Indication, {.id = "QR-E-01",
                                                                     .description = "Milliammeter",
                                                                     .issuer = "Ambry Electrical Laboratory",
                                                                     .certificate = "AE-26-0077",
                                                                     .calibratedOn = "2026-01-20",
                                                                     .due = "2027-01-20",
                                                                     .unit = "mA",
                                                                     .low = "0",
                                                                     .high = "24",
                                                                     .resolution = "0.0001",
                                                                     .expanded = "0.0012",
                                                                     .drift = "0.0005"});
    return {controller, meter};
}

Plan plan() {
    Plan plan = samplePlan({"0", "1", "2", "3", "4", "5", "6", "7", "8", "9", "10"}, PlanDirections::RisingThenFalling);
    plan.runs = 3;
    plan.dwellSeconds = 60;
    plan.preloads = 3;
    return plan;
}

Limits limits() {
    Limits limits;
    limits.stated = true;
    limits.specification = "Maker's specification, ±0.075 % of span";
    limits.percentOfSpan = number("0.075");
    limits.side = Side::Indication;
    limits.rule = DecisionRule::GuardedByU;
    limits.agreedWith = "Brackwater Pumping Station, order 4471";
    limits.agreedOn = "2026-10-02";
    return limits;
}

} // namespace

Record pressureTransmitter() {
    Record record;
    record.job = job();
    record.item = item();
    record.standards = standards();
    record.conditions = sampleConditions({{"20.8", "21.4"}, {"46", "44"}, {"1009", "1008"}},
                                         "Upright, process connection down; nitrogen; supply 24 V, loop resistor 250 Ω");
    record.plan = plan();
    record.choices.separateDirections = true;
    record.choices.at = {number("0"), number("5"), number("10")};
    record.choices.read = {number("12.000")};
    ManualBudgetLine head;
    head.name = "Pressure head";
    head.source = "Ports level within 15 cm, nitrogen at up to 10 bar";
    head.side = Side::Reference;
    head.distribution = Distribution::Rectangular;
    head.amount = number("0.0002");
    record.budget.lines = {head};
    record.limits = limits();
    record.signOffs = {{SignOffRole::Performed, "IO", "Technician", calibrationDay},
                       {SignOffRole::Checked, "TL", "Engineer", "2026-10-14"}};
    appendReadings(record);
    return record;
}

} // namespace spanwright::test
