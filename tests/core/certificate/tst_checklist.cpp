// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/Certificate.h"
#include "tests/support/Evaluated.h"
#include "tests/support/SampleRecord.h"

#include <QTest>

#include <functional>

using namespace spanwright;
using test::number;

namespace {

std::vector<ChecklistItem> listOf(const Record& record) {
    return checklist(record, test::evaluated(record));
}

const ChecklistItem* find(const std::vector<ChecklistItem>& list, Gap gap) {
    for (const ChecklistItem& item : list)
        if (item.gap == gap)
            return &item;
    return nullptr;
}

struct Missing {
    const char* name;
    std::function<void(Record&)> change;
    Gap gap;
    GapLevel level;
    const char* stage;
    const char* field;
};

void exclude(Record& record, ReadingId first, ReadingId last, ExclusionReason reason) {
    for (ReadingId id = first; id <= last; ++id)
        record.exclusions.edit().add({id, reason, "", "IO", 0});
}

void overdue(Record& record, const char* reason, const char* by) {
    record.standards[0].due = "2026-10-01";
    record.standards[0].overdueReason = reason;
    record.standards[0].overdueBy = by;
}

void withoutAnyContribution(Record& record) {
    record.standards.clear();
    record.budget.lines.clear();
    for (const auto line : {DerivedLine::Repeatability, DerivedLine::RunToRun, DerivedLine::ReferenceResolution,
                            DerivedLine::IndicationResolution})
        record.budget.omitted.push_back({line, "left out"});
}

/// One change of the complete sample for each thing that a certificate asks for.
const std::vector<Missing>& missings() {
    using enum Gap;
    constexpr auto block = GapLevel::Block, warn = GapLevel::Warn;
    using R = Record&;
    static const std::vector<Missing> all = {
        {"laboratory", [](R r) { r.job.laboratory.clear(); }, NoLaboratory, block, "job", "job.laboratory"},
        {"laboratory of blanks", [](R r) { r.job.laboratory = "  "; }, NoLaboratory, block, "job", "job.laboratory"},
        {"address", [](R r) { r.job.laboratoryAddress.clear(); }, NoLaboratoryAddress, block, "job", "job.laboratory_address"},
        {"number", [](R r) { r.job.certificateNumber.clear(); }, NoNumber, block, "job", "job.certificate_number"},
        {"customer", [](R r) { r.job.customer.clear(); }, NoCustomer, block, "job", "job.customer"},
        {"contact", [](R r) { r.job.customerContact.clear(); }, NoCustomerContact, block, "job", "job.customer_contact"},
        {"method", [](R r) { r.job.method.clear(); }, NoMethod, block, "job", "job.method"},
        {"edition", [](R r) { r.job.methodEdition.clear(); }, NoMethodEdition, block, "job", "job.method_edition"},
        {"description", [](R r) { r.item.description.clear(); }, NoDescription, block, "job", "item.description"},
        {"maker", [](R r) { r.item.maker.clear(); }, NoMaker, block, "job", "item.maker"},
        {"model", [](R r) { r.item.model.clear(); }, NoModel, block, "job", "item.model"},
        {"serial", [](R r) { r.item.serial.clear(); }, NoSerial, block, "job", "item.serial"},
        {"range", [](R r) { r.item.rangeHigh.reset(); }, NoRange, warn, "job", "item.range_high"},
        {"output", [](R r) { r.item.outputLow.reset(); }, NoOutput, warn, "job", "item.output_low"},
        {"condition", [](R r) { r.job.conditionReceived.clear(); }, NoCondition, warn, "job", "job.condition_received"},
        {"receipt", [](R r) { r.job.received.clear(); }, NoReceipt, warn, "job", "job.received"},
        {"place", [](R r) { r.job.place.clear(); }, NoPlace, warn, "job", "job.place"},
        {"customer's data", [](R r) { r.job.customerSupplied.clear(); }, NoCustomerData, warn, "job", "job.customer_supplied"},
        {"external results", [](R r) { r.job.externalProviders.clear(); }, NoExternalProviders, warn, "job", "job.external_providers"},
        {"issued before", [](R r) { r.job.issued = "2026-10-01"; }, CalibratedAfterIssue, block, "job", "job.issued"},
        {"received after", [](R r) { r.job.received = "2026-10-20"; }, CalibratedBeforeReceipt, warn, "job", "job.received"},
        {"unit, reference", [](R r) { r.item.reference.unit.clear(); }, NoUnit, block, "job", "item.reference.unit"},
        {"unit, indication", [](R r) { r.item.indication.unit.clear(); }, NoUnit, block, "job", "item.indication.unit"},
        {"readings", [](R r) { r.readings = ReadingColumns(); }, NoResults, block, "bench", "readings"},
        {"plan", [](R r) { r.plan.runs = 4; }, PlanNotDone, warn, "bench", "readings"},
        {"silent exclusion", [](R r) { exclude(r, 3, 3, ExclusionReason::Other); }, ExclusionWithoutReason, block, "bench", "exclusions"},
        {"many exclusions", [](R r) { exclude(r, 3, 12, ExclusionReason::NotSettled); }, ManyExcluded, warn, "bench", "exclusions"},
        {"performer", [](R r) { r.signOffs.erase(r.signOffs.begin()); }, NotPerformed, warn, "certificate", "signoffs.performed"},
        {"position", [](R r) { r.signOffs[1].position.clear(); }, NotChecked, warn, "certificate", "signoffs.checked"},
        {"checked too early", [](R r) { r.signOffs[1].date = "2026-10-01"; }, SignedBeforeCalibration, block, "certificate", "signoffs.checked"},
        {"authorisation", [](R) {}, NotAuthorised, warn, "certificate", "signoffs.authorised"},
        {"omitted line", [](R r) { r.budget.omitted = {{DerivedLine::RunToRun, ""}}; }, OmittedWithoutReason, block, "budget",
         "budget.omitted"},
        {"uncertainty", withoutAnyContribution, NoUncertainty, block, "budget", "budget.lines"},
        {"conditions", [](R r) { r.conditions.influences.clear(); }, NoConditions, block, "job", "conditions.influences"},
        {"end value", [](R r) { r.conditions.influences[1].end.reset(); }, ConditionMissing, block, "job",
         "conditions.influences.1.end"},
        {"outside limits", [](R r) { r.conditions.influences[0].start = number("27"); }, ConditionOutside, warn, "job",
         "conditions.influences.0.start"},
        {"traceability", [](R r) { r.job.traceability.clear(); }, NoTraceability, block, "job", "job.traceability"},
        {"standards", [](R r) { r.standards.erase(r.standards.begin()); }, NoStandard, block, "job", "standards"},
        {"certificate", [](R r) { r.standards[1].certificate.clear(); }, StandardWithoutCertificate, block, "job",
         "standards.1.certificate"},
        {"issuer", [](R r) { r.standards[0].issuer.clear(); }, StandardWithoutIssuer, warn, "job", "standards.0.issuer"},
        {"due date", [](R r) { r.standards[0].due.clear(); }, StandardWithoutDue, warn, "job", "standards.0.due"},
        {"U of a standard", [](R r) { r.standards[0].expandedUncertainty.reset(); }, StandardWithoutUncertainty, block, "job",
         "standards.0.expanded_uncertainty"},
        {"unit of a standard", [](R r) { r.standards[0].unit = "kPa"; }, StandardUnitDiffers, block, "job", "standards.0.unit"},
        {"overdue", [](R r) { overdue(r, "", ""); }, StandardOverdue, block, "job", "standards.0.overdue_reason"},
        {"overdue, no name", [](R r) { overdue(r, "compared", ""); }, StandardOverdue, block, "job", "standards.0.overdue_by"},
        {"overdue, accepted", [](R r) { overdue(r, "compared", "RA"); }, StandardOverdueAccepted, warn, "job",
         "standards.0.overdue_reason"},
        {"range of a standard", [](R r) { r.standards[0].rangeHigh = number("6"); }, StandardRangeTooSmall, warn, "job",
         "standards.0.range_high"},
        {"forgotten correction", [](R r) { r.standards[0].correctionUse = CorrectionUse::None; }, CorrectionNotApplied, warn, "job",
         "standards.0.correction_use"},
        {"adjustment", [](R r) { r.job.adjustment.clear(); }, AdjustmentNotDescribed, block, "job", "job.adjustment"},
        {"adjusted", [](R r) { r.job.adjusted = false; }, AsLeftWithoutAdjustment, warn, "job", "job.adjusted"},
        {"specification", [](R r) { r.limits.specification.clear(); }, NoSpecification, block, "budget", "limits.specification"},
        {"limits", [](R r) { r.limits.percentOfSpan.reset(); }, NoLimits, block, "budget", "limits.percent_of_span"},
        {"decision", [](R r) { r.item.outputLow.reset(); }, NoDecision, block, "job", "item.output_low"},
        {"agreement", [](R r) { r.limits.agreedWith.clear(); }, RuleNotAgreed, warn, "budget", "limits.agreed_with"},
        {"late agreement", [](R r) { r.limits.agreedOn = "2026-10-14"; }, RuleAgreedLate, warn, "budget", "limits.agreed_on"},
        {"recalibration", [](R r) { r.job.recalibrationDate = "2027-10-13"; }, RecalibrationNotAgreed, block, "job",
         "job.recalibration_agreed"},
        {"replacement", [](R r) { r.job.replaces = "QC-2026-0400"; }, NoReasonOfReplacement, block, "job", "job.replaces_reason"},
        {"replaces itself", [](R r) { r.job.replaces = r.job.certificateNumber; }, ReplacesItself, block, "job",
         "job.certificate_number"},
    };
    return all;
}

void keepOnly(Record& record, Phase phase) {
    ReadingColumns kept;
    const ReadingColumns& readings = *record.readings;
    for (std::size_t i = 0; i < readings.size(); ++i)
        if (readings.phases()[i] == phase)
            kept.append(readings.row(i));
    record.readings = kept;
}

} // namespace

class ChecklistTest : public QObject {
    Q_OBJECT

  private slots:
    void theCompleteSampleIsNotBlocked() { QVERIFY(!blocked(listOf(test::pressureTransmitter()))); }

    // ISO/IEC 17025:2017, 7.8, item by item: each absence is named and leads to its field.
    void namesEachThingThatIsMissing_data() {
        QTest::addColumn<int>("index");
        for (std::size_t i = 0; i < missings().size(); ++i)
            QTest::newRow(missings()[i].name) << static_cast<int>(i);
    }
    void namesEachThingThatIsMissing() {
        QFETCH(int, index);
        const Missing& missing = missings()[static_cast<std::size_t>(index)];
        Record record = test::pressureTransmitter();
        missing.change(record);
        const auto list = listOf(record);
        const ChecklistItem* item = find(list, missing.gap);
        QVERIFY(item);
        QCOMPARE(int(item->level), int(missing.level));
        QCOMPARE(QString::fromStdString(item->stage), QString(missing.stage));
        QCOMPARE(QString::fromStdString(item->field), QString(missing.field));
        QVERIFY(missing.level == GapLevel::Warn || blocked(list));
        if (missing.gap != Gap::NotAuthorised)
            QVERIFY(!find(listOf(test::pressureTransmitter()), missing.gap));
    }

    void asksForResultsBeforeAndAfterAnAdjustment() {
        Record found = test::pressureTransmitter();
        keepOnly(found, Phase::AsFound);
        QVERIFY(find(listOf(found), Gap::NoAsLeft));
        Record left = test::pressureTransmitter();
        keepOnly(left, Phase::AsLeft);
        QVERIFY(find(listOf(left), Gap::NoAsFound));
        QVERIFY(find(listOf(left), Gap::NoFunction)); // it is taken from the readings as found
        left.job.noAsFoundReason = "the item gave no output";
        QVERIFY(!find(listOf(left), Gap::NoAsFound));
    }

    // One reading at each point and direction, and no other phase to take the repeatability from.
    void saysThatNothingWasRepeated() {
        Record left = test::pressureTransmitter();
        keepOnly(left, Phase::AsLeft);
        QVERIFY(find(listOf(left), Gap::NoRepeatability));
        QVERIFY(!find(listOf(test::pressureTransmitter()), Gap::NoRepeatability));
    }

    void theDayComesFromTheReadingsWhenItIsNotEntered() {
        Record record = test::pressureTransmitter();
        record.job.calibrated.clear();
        QVERIFY(!find(listOf(record), Gap::NoCalibrationDate));
        for (std::size_t i = 0; i < record.readings->size(); ++i)
            record.readings.edit().setEntry(i, 0, "IO");
        QVERIFY(find(listOf(record), Gap::NoCalibrationDate));
    }

    void theRobustFitIsForComparisonOnly() {
        const Record record = test::pressureTransmitter();
        Evaluation evaluation = test::evaluated(record);
        evaluation.phases[0]->fit->method = Method::Robust;
        const auto list = checklist(record, evaluation);
        const ChecklistItem* item = find(list, Gap::RobustFunction);
        QVERIFY(item && item->level == GapLevel::Block);
        QVERIFY(!buildCertificate(record, evaluation, {}).function);
    }
};

QTEST_APPLESS_MAIN(ChecklistTest)
#include "tst_checklist.moc"
