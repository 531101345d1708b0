// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Fields.h"
#include "ui/certificate/CertificateText.h"
#include "ui/look/NumberText.h"
#include "ui/words/Sentence.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

/// Every gap has its sentence in one of these; a test walks them all.
struct GapText {
    Q_DECLARE_TR_FUNCTIONS(GapText)

  public:
    static QString ofIdentification(Gap gap, Sentence& facts);
    static QString ofTraceability(Gap gap, Sentence& facts);
    static QString ofResults(Gap gap, Sentence& facts);
    static QString ofRelease(Gap gap, Sentence& facts);
    static QString phase(Sentence& facts) {
        return facts.plain("phase") == QLatin1String("as-left") ? phaseText(Phase::AsLeft) : phaseText(Phase::AsFound);
    }
};

QString GapText::ofIdentification(Gap gap, Sentence& facts) {
    switch (gap) {
    case Gap::NoLaboratory: return tr("The laboratory's name is missing.");
    case Gap::NoLaboratoryAddress: return tr("The laboratory's address is missing.");
    case Gap::NoNumber: return tr("The certificate has no number.");
    case Gap::NoCustomer: return tr("The customer's name is missing.");
    case Gap::NoCustomerContact: return tr("The customer's contact is missing.");
    case Gap::NoMethod: return tr("The method is not named.");
    case Gap::NoMethodEdition: return tr("The edition of the method is missing.");
    case Gap::NoDescription: return tr("The item is not described.");
    case Gap::NoMaker: return tr("The item's maker is missing.");
    case Gap::NoModel: return tr("The item's model is missing.");
    case Gap::NoSerial: return tr("The item has no serial number; enter “none” if it has none.");
    case Gap::NoRange: return tr("The item's range is not complete.");
    case Gap::NoOutput: return tr("The item's output at both ends of its range is not stated, so there is no error of indication.");
    case Gap::NoCondition: return tr("The item's condition on receipt is not described.");
    case Gap::NoReceipt: return tr("The date of receipt is missing.");
    case Gap::NoPlace: return tr("The place of calibration is missing. If it was the laboratory, say so.");
    case Gap::NoCustomerData: return tr("It is not stated which data the customer supplied. If there are none, write “none”.");
    case Gap::NoExternalProviders: return tr("It is not stated which results come from external providers. If there are none, write “none”.");
    case Gap::NumberUsedElsewhere:
        return tr("The certificate number %1 is also that of %2 in this folder.").arg(facts.plain("number"), facts.plain("file"));
    case Gap::NoCalibrationDate: return tr("The date of calibration is missing.");
    case Gap::CalibratedAfterIssue:
        return tr("The date of calibration, %1, is later than the date of issue, %2.").arg(facts.plain("calibrated"), facts.plain("issued"));
    case Gap::CalibratedBeforeReceipt:
        return tr("The date of calibration, %1, is before the date of receipt, %2.").arg(facts.plain("calibrated"), facts.plain("received"));
    case Gap::NoUnit:
        return facts.plain("quantity") == QLatin1String("reference") ? tr("The unit of the reference is missing.")
                                                                      : tr("The unit of the indication is missing.");
    case Gap::RecalibrationNotAgreed:
        return tr("A date of recalibration is entered, but not ticked as agreed with the customer; it is not printed.");
    case Gap::NoReasonOfReplacement: return tr("The reason for replacing an earlier certificate is missing.");
    case Gap::ReplacesItself: return tr("The certificate has the number of the one that it replaces.");
    default: return {};
    }
}

QString GapText::ofTraceability(Gap gap, Sentence& facts) {
    const auto standard = [&facts] { return facts.plain("standard"); };
    switch (gap) {
    case Gap::NoConditions: return tr("No ambient conditions are recorded.");
    case Gap::ConditionMissing: return tr("The %1 at the start or the end is missing.").arg(facts.plain("quantity"));
    case Gap::ConditionOutside: return tr("The %1 was outside the limits of the method.").arg(facts.plain("quantity"));
    case Gap::NoTraceability: return tr("There is no statement on metrological traceability.");
    case Gap::NoStandard: return tr("No standard is named that gives the reference value.");
    case Gap::StandardWithoutCertificate: return tr("The certificate number of the standard %1 is missing.").arg(standard());
    case Gap::StandardWithoutIssuer: return tr("The issuer of the certificate of %1 is missing.").arg(standard());
    case Gap::StandardWithoutDue: return tr("The due date of the standard %1 is missing.").arg(standard());
    case Gap::StandardWithoutUncertainty: return tr("The uncertainty of the standard %1 is missing.").arg(standard());
    case Gap::StandardUnitDiffers:
        return tr("The standard %1 is stated in %2, but its values are taken as %3.")
            .arg(standard(), facts.plain("unit"), facts.plain("expected"));
    case Gap::StandardOverdue:
        return tr("The standard %1 was overdue by %2 days on the day of calibration. Give a reason and who authorised its use, or "
                  "use another one.")
            .arg(standard(), facts.plain("days"));
    case Gap::StandardOverdueAccepted:
        return tr("The standard %1 was overdue by %2 days; %3 authorised its use.").arg(standard(), facts.plain("days"), facts.plain("by"));
    case Gap::StandardRangeTooSmall: return tr("The range of the standard %1 does not cover all values.").arg(standard());
    case Gap::CorrectionNotApplied:
        return tr("The standard %1 has a correction table, which is not applied. Say whether it was applied before.").arg(standard());
    default: return {};
    }
}

QString GapText::ofResults(Gap gap, Sentence& facts) {
    switch (gap) {
    case Gap::NoResults: return tr("There are no readings.");
    case Gap::PlanNotDone:
        return tr("%1: %2 of %3 planned readings are there.").arg(phase(facts), facts.plain("complete"), facts.plain("planned"));
    case Gap::ExclusionWithoutReason: return tr("%1 excluded readings have no reason in words.").arg(facts.plain("count"));
    case Gap::ManyExcluded:
        return tr("%1: %2 of %3 readings are excluded, more than the limit of %4 %.")
            .arg(phase(facts), facts.plain("count"), facts.plain("of"), significantText(100 * facts.plain("limit").toDouble(), 3));
    case Gap::NoUncertainty: return tr("%1: the uncertainty is not stated at every point.").arg(phase(facts));
    case Gap::NoRepeatability: return tr("%1: no reading was repeated, so the budget holds no repeatability.").arg(phase(facts));
    case Gap::OmittedWithoutReason: {
        const auto line = valueOf<DerivedLine>(facts.plain("line").toStdString());
        return tr("The budget leaves out “%1” without a reason.").arg(line ? derivedLineText(*line) : QString());
    }
    case Gap::NoAsFound: return tr("The item was adjusted, but there are no results from before. Say why.");
    case Gap::NoAsLeft: return tr("The item was adjusted, but there are no results from after.");
    case Gap::AdjustmentNotDescribed: return tr("The item was adjusted; what was adjusted is not described.");
    case Gap::AsLeftWithoutAdjustment: return tr("There are readings as left, but the item is not ticked as adjusted.");
    case Gap::NoFunction: return tr("There is no calibration function with a valid range (%1).").arg(phase(facts));
    case Gap::RobustFunction: return tr("The robust fit is for comparison only. Choose least squares.");
    default: return {};
    }
}

QString GapText::ofRelease(Gap gap, Sentence& facts) {
    switch (gap) {
    case Gap::NotPerformed: return tr("Nobody has signed off as having performed the calibration (name, position, date).");
    case Gap::NotChecked: return tr("Nobody has signed off as having checked the results (name, position, date).");
    case Gap::NotAuthorised: return tr("Nobody has authorised the certificate (name, position, date); it stays a draft.");
    case Gap::SignedBeforeCalibration:
        return tr("A date of signing off, %1, is before the date of calibration, %2.").arg(facts.plain("date"), facts.plain("calibrated"));
    case Gap::NoSpecification: return tr("Conformity is wanted, but the specification is not named.");
    case Gap::NoLimits: return tr("Conformity is wanted, but no limits are stated.");
    case Gap::NoDecision:
        return tr("%1: there is no error of indication to hold against the limits. State the output at both ends of the range.")
            .arg(phase(facts));
    case Gap::RuleNotAgreed: return tr("It is not said with whom and when the decision rule was agreed.");
    case Gap::RuleAgreedLate:
        return tr("The decision rule was agreed on %1, after the calibration of %2.").arg(facts.plain("agreed"), facts.plain("calibrated"));
    default: return {};
    }
}

QString findingText(Sentence& facts, const Record& record, const Evaluation& evaluation) {
    const bool left = facts.plain("phase") == QLatin1String("as-left");
    const PhaseEvaluation* phase = evaluation.phase(left ? Phase::AsLeft : Phase::AsFound);
    const auto index = facts.plain("index").toULongLong();
    const QString of = left ? phaseText(Phase::AsLeft) : phaseText(Phase::AsFound);
    if (phase == nullptr || index >= phase->findings.size())
        return GapText::tr("%1: there is a serious finding.").arg(of);
    return of + QStringLiteral(": ") + findingWords(phase->findings[index], record).sentence;
}

} // namespace

QString gapText(const ChecklistItem& item, const Record& record, const Evaluation& evaluation) {
    Sentence facts(item.facts);
    const auto begun = [](QString text) { return text.replace(0, 1, text.left(1).toUpper()); };
    if (item.gap == Gap::SeriousFinding)
        return begun(findingText(facts, record, evaluation));
    for (const auto& words : {&GapText::ofIdentification, &GapText::ofTraceability, &GapText::ofResults, &GapText::ofRelease})
        if (QString text = words(item.gap, facts); !text.isEmpty())
            return begun(std::move(text));
    return {};
}

} // namespace spanwright
