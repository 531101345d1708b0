// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificateSections.h"
#include "ui/certificate/CertificateText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

struct CertificateSections {
    Q_DECLARE_TR_FUNCTIONS(CertificateSections)
};

QString tr(const char* text) {
    return CertificateSections::tr(text);
}

QString text(const std::string& from) {
    return QString::fromStdString(from);
}

/// What must be there is asked for in the warning colour.
LabelledText wanted(const QString& label, const std::string& value) {
    if (value.empty())
        return {label, CertificateSections::tr("missing"), PageInk::Warning};
    return {label, text(value)};
}

/// What is only warned about is left open quietly.
LabelledText hoped(const QString& label, const std::string& value) {
    return {label, value.empty() ? CertificateSections::tr("not stated") : text(value)};
}

std::string joined(const std::string& a, const std::string& b) {
    return a.empty() || b.empty() ? a + b : a + ' ' + b;
}

QString interval(const std::optional<Decimal>& low, const std::optional<Decimal>& high, const std::string& unit) {
    if (!low || !high)
        return CertificateSections::tr("not stated");
    return CertificateSections::tr("%1 to %2").arg(typedText(*low), withUnit(typedText(*high), unit));
}

std::vector<LabelledText> itemColumn(const Certificate& certificate) {
    const Item& item = certificate.item;
    const Job& job = certificate.job;
    std::vector<LabelledText> entries;
    constexpr std::size_t mostInHead = 48;
    if (job.laboratory.size() > mostInHead || job.laboratoryAddress.size() > 2 * mostInHead)
        entries.push_back({CertificateSections::tr("Laboratory"), text(job.laboratory) + QStringLiteral(", ") + text(job.laboratoryAddress)});
    if (job.certificateNumber.size() > mostInHead)
        entries.push_back({CertificateSections::tr("Certificate"), text(job.certificateNumber)});
    const std::vector<LabelledText> identity = {
        wanted(CertificateSections::tr("Customer"), job.customer),
        wanted(CertificateSections::tr("Contact"), job.customerContact),
        wanted(CertificateSections::tr("Item"), item.description),
        wanted(CertificateSections::tr("Maker, model"), joined(item.maker, item.model)),
        wanted(CertificateSections::tr("Serial number"), item.serial),
    };
    entries.insert(entries.end(), identity.begin(), identity.end());
    if (!item.tag.empty())
        entries.push_back({CertificateSections::tr("Tag"), text(item.tag)});
    entries.push_back({CertificateSections::tr("Range"), interval(item.rangeLow, item.rangeHigh, item.reference.unit)});
    if (item.outputLow || item.outputHigh)
        entries.push_back({CertificateSections::tr("Output"), interval(item.outputLow, item.outputHigh, item.indication.unit)});
    if (item.resolution)
        entries.push_back({CertificateSections::tr("Resolution"), withUnit(typedText(*item.resolution), item.indication.unit)});
    entries.push_back({CertificateSections::tr("Condition"), orDash(job.conditionReceived)});
    return entries;
}

std::vector<LabelledText> jobColumn(const Certificate& certificate) {
    const Job& job = certificate.job;
    const QString none = CertificateSections::tr("none stated");
    std::vector<LabelledText> entries;
    if (!job.number.empty())
        entries.push_back({CertificateSections::tr("Work order"), text(job.number)});
    entries.push_back({CertificateSections::tr("Received"), orDash(job.received)});
    entries.push_back(wanted(CertificateSections::tr("Calibrated"), certificate.calibrated));
    entries.push_back({CertificateSections::tr("Issued"), job.issued.empty()
                                                             ? (certificate.state == DraftState::SignedOff ? CertificateSections::tr("not yet; drawn up on %1")
                                                                                                           : CertificateSections::tr("not yet; draft of %1"))
                                                                   .arg(text(certificate.drawnUpOn))
                                                             : text(job.issued)});
    entries.push_back(hoped(CertificateSections::tr("Place"), job.place));
    const std::string method = job.methodEdition.empty() ? job.method : job.method + ", edition " + job.methodEdition;
    entries.push_back(wanted(CertificateSections::tr("Method"), method));
    entries.push_back({CertificateSections::tr("Deviations"), job.methodDeviations.empty() ? none : text(job.methodDeviations)});
    entries.push_back(hoped(CertificateSections::tr("Customer's data"), job.customerSupplied));
    entries.push_back(hoped(CertificateSections::tr("External results"), job.externalProviders));
    return entries;
}

QString standardUncertainty(const Standard& standard) {
    if (!standard.expandedUncertainty)
        return QStringLiteral("–");
    const bool percent = standard.form == UncertaintyForm::PercentOfReading;
    const QString number = typedText(*standard.expandedUncertainty);
    const QString k = standard.coverageFactor ? typedText(*standard.coverageFactor) : QStringLiteral("2");
    return percent ? CertificateSections::tr("%1 % of reading (k = %2)").arg(number, k)
                   : CertificateSections::tr("%1 (k = %2)").arg(withUnit(number, standard.unit), k);
}

} // namespace

QString withUnit(const QString& number, const std::string& unit) {
    return unit.empty() ? number : number + QChar(0xa0) + QString::fromStdString(unit);
}

QString orDash(const std::string& from) {
    return from.empty() ? QStringLiteral("–") : QString::fromStdString(from);
}

void addTitle(Flow& flow, const Certificate& certificate, const QStringList& gaps) {
    flow.title(tr("Calibration certificate"));
    const TextStyle accent{9.5, true, PageInk::Accent}, warning{9.5, true, PageInk::Warning};
    switch (certificate.state) {
    case DraftState::Incomplete:
        flow.paragraph(gaps.size() == 1 ? tr("Incomplete draft, not valid: one item is missing, named at the end.")
                                        : CertificateSections::tr("Incomplete draft, not valid: %1 items are missing, listed at the end.")
                                              .arg(gaps.size()),
                       warning);
        break;
    case DraftState::Draft: flow.paragraph(tr("Draft for review. Not valid until authorised."), accent); break;
    case DraftState::SignedOff:
        flow.paragraph(tr("Names are entered below. Valid only with the release of the laboratory named above."), accent);
        break;
    }
    for (const StatementLine& notice : certificate.notices)
        flow.notice(statementText(notice), notice.statement == Statement::HysteresisLeft ? PageInk::Accent : PageInk::Warning);
    flow.space(4.5);
}

void addIdentification(Flow& flow, const Certificate& certificate) {
    flow.labelled(itemColumn(certificate), jobColumn(certificate));
}

void addStandards(Flow& flow, const Certificate& certificate) {
    const TextStyle quiet{8.5, false, PageInk::Quiet};
    // The heading and its sentence stay with the first standard.
    const double sentence = static_cast<double>(wrapped(text(certificate.job.traceability), quiet, flow.area().width()).size()) * lineHeight(quiet);
    flow.heading(tr("Standards and traceability"), {}, 34 + sentence);
    if (!certificate.job.traceability.empty()) {
        flow.paragraph(text(certificate.job.traceability), quiet);
        flow.space(1.2);
    }
    Table table;
    table.columns = {{tr("standard"), {}, ColumnAlign::Left, 3.3},
                     {tr("gives"), {}, ColumnAlign::Left, 1.5},
                     {tr("certificate"), {}, ColumnAlign::Left, 1.6},
                     {tr("issued by"), {}, ColumnAlign::Left, 3.0},
                     {tr("due"), {}, ColumnAlign::Left, 1.4},
                     {tr("expanded uncertainty"), {}, ColumnAlign::Left, 2.7}};
    for (const Standard& standard : certificate.standards) {
        const QString name = standard.description.empty() ? text(standard.id)
                                                          : text(standard.id) + QStringLiteral(", ") + text(standard.description);
        const bool reference = standard.role == StandardRole::Reference;
        const bool late = !standard.due.empty() && !certificate.calibrated.empty() && standard.due < certificate.calibrated;
        table.rows.push_back({{name},
                              {reference ? tr("reference") : tr("indication")},
                              {orDash(standard.certificate), standard.certificate.empty() ? PageInk::Warning : PageInk::Text},
                              {orDash(standard.issuer)},
                              {orDash(standard.due), late ? PageInk::Warning : PageInk::Text, late},
                              {standardUncertainty(standard)}});
    }
    if (table.rows.empty())
        flow.paragraph(tr("No standard is named."), {9, false, PageInk::Warning});
    else
        flow.table(table);
}

void addConditions(Flow& flow, const Certificate& certificate) {
    const Conditions& conditions = certificate.conditions;
    flow.heading(tr("Conditions"), {}, 10);
    std::vector<LabelledText> left, right;
    for (const Condition& condition : conditions.influences) {
        QString value = CertificateSections::tr("missing");
        const bool known = condition.start && condition.end;
        if (known) {
            const bool same = compareValue(*condition.start, *condition.end) == 0;
            value = same ? withUnit(typedText(*condition.start), condition.quantity.unit)
                         : CertificateSections::tr("start %1, end %2")
                               .arg(withUnit(typedText(*condition.start), condition.quantity.unit),
                                    withUnit(typedText(*condition.end), condition.quantity.unit));
        }
        QString name = text(condition.quantity.name);
        left.push_back({name.replace(0, 1, name.left(1).toUpper()), value, known ? PageInk::Text : PageInk::Warning});
    }
    if (conditions.influences.empty())
        left.push_back({tr("Surroundings"), tr("missing"), PageInk::Warning});
    if (!conditions.remarks.empty())
        right.push_back({tr("Set-up"), text(conditions.remarks)});
    if (!certificate.job.adjustment.empty())
        right.push_back({tr("Adjustment"), text(certificate.job.adjustment)});
    else
        right.push_back({tr("Adjustment"), certificate.job.adjusted ? tr("adjusted") : tr("none")});
    flow.labelled(left, right);
}

} // namespace spanwright
