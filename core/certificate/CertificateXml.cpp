// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/CertificateXml.h"

#include "core/certificate/DigitalUnit.h"
#include "core/certificate/XmlWriter.h"
#include "core/record/Fields.h"

#include <algorithm>
#include <functional>

namespace spanwright {

namespace {

std::string orElse(const std::string& text, const char* otherwise) {
    return text.empty() ? otherwise : text;
}

std::string orElse(const std::string& text, const std::string& otherwise) {
    return text.empty() ? otherwise : text;
}

std::string phaseWords(Phase phase) {
    return phase == Phase::AsFound ? "as found" : "as left";
}

const char* conformity(ConformityState state) {
    switch (state) {
    case ConformityState::Pass: return "pass";
    case ConformityState::ConditionalPass: return "conditionalPass";
    case ConformityState::ConditionalFail: return "conditionalFail";
    case ConformityState::Fail: return "fail";
    }
    return "fail";
}

class Document {
  public:
    Document(const Certificate& certificate, const CertificateXmlParts& parts) : c_(certificate), parts_(parts) {}

    std::string write() {
        x_.open("dcc:digitalCalibrationCertificate",
                {{"xmlns:dcc", "https://ptb.de/dcc"}, {"xmlns:si", "https://ptb.de/si"}, {"schemaVersion", "3.3.0"}});
        administrativeData();
        measurementResults();
        if (!parts_.pdfBase64.empty())
            x_.open("dcc:document")
                .leaf("dcc:fileName", parts_.pdfName)
                .leaf("dcc:mimeType", "application/pdf")
                .leaf("dcc:dataBase64", parts_.pdfBase64)
                .close();
        x_.close();
        return x_.written();
    }

  private:
    void words(const char* element, const std::string& text) {
        x_.open(element).leaf("dcc:content", text, {{"lang", "en"}}).close();
    }
    void contact(const char* element, const std::string& name, const std::string& place) {
        x_.open(element);
        words("dcc:name", name);
        x_.open("dcc:location");
        words("dcc:further", orElse(place, "not stated"));
        x_.close().close();
    }
    void identification(const char* issuer, const std::string& value, const char* name) {
        if (value.empty())
            return;
        x_.open("dcc:identification").leaf("dcc:issuer", issuer).leaf("dcc:value", value);
        words("dcc:name", name);
        x_.close();
    }

    void administrativeData() {
        x_.open("dcc:administrativeData");
        x_.open("dcc:dccSoftware").open("dcc:software");
        const auto blank = c_.program.find_last_of(' ');
        words("dcc:name", orElse(c_.program.substr(0, blank), "Spanwright"));
        x_.leaf("dcc:release", blank == std::string::npos ? "0" : c_.program.substr(blank + 1)).leaf("dcc:type", "application").close().close();
        coreData();
        item();
        x_.open("dcc:calibrationLaboratory");
        contact("dcc:contact", orElse(c_.job.laboratory, "not stated"), c_.job.laboratoryAddress);
        x_.close();
        people();
        contact("dcc:customer", orElse(c_.job.customer, "not stated"), c_.job.customerContact);
        statements();
        x_.close();
    }

    void coreData() {
        const std::string number = orElse(c_.job.certificateNumber, "unnumbered");
        const std::string day = orElse(c_.calibrated, c_.drawnUpOn);
        x_.open("dcc:coreData")
            .leaf("dcc:countryCodeISO3166_1", parts_.countryCode)
            .leaf("dcc:usedLangCodeISO639_1", "en")
            .leaf("dcc:mandatoryLangCodeISO639_1", "en")
            .leaf("dcc:uniqueIdentifier", c_.state == DraftState::SignedOff ? number : number + "-draft");
        if (!c_.job.number.empty()) {
            x_.open("dcc:identifications");
            identification("calibrationLaboratory", c_.job.number, "work order");
            x_.close();
        }
        if (!c_.job.received.empty())
            x_.leaf("dcc:receiptDate", c_.job.received);
        x_.leaf("dcc:beginPerformanceDate", day).leaf("dcc:endPerformanceDate", day);
        x_.leaf("dcc:performanceLocation", c_.job.place.empty() ? "laboratory" : "other");
        if (!c_.job.issued.empty())
            x_.leaf("dcc:issueDate", c_.job.issued);
        if (!c_.job.replaces.empty())
            x_.open("dcc:reportAmendedSubstituted")
                .leaf("dcc:typeOfChange", "substituted")
                .leaf("dcc:replacedUniqueIdentifier", c_.job.replaces)
                .close();
        x_.close();
    }

    void item() {
        x_.open("dcc:items").open("dcc:item");
        words("dcc:name", orElse(c_.item.description, "not stated"));
        if (!c_.item.maker.empty()) {
            x_.open("dcc:manufacturer");
            words("dcc:name", c_.item.maker);
            x_.close();
        }
        if (!c_.item.model.empty())
            x_.leaf("dcc:model", c_.item.model);
        x_.open("dcc:identifications");
        identification("manufacturer", orElse(c_.item.serial, "not stated"), "serial number");
        identification("customer", c_.item.tag, "tag");
        x_.close().close().close();
    }

    void people() {
        x_.open("dcc:respPersons");
        for (const SignOff& one : c_.signOffs)
            person(one.name, one.position, std::string(nameOf(one.role)), one.role == SignOffRole::Authorised);
        if (c_.signOffs.empty())
            person("not yet named", "", "authorised", true);
        x_.close();
    }
    void person(const std::string& name, const std::string& position, const std::string& role, bool mainSigner) {
        x_.open("dcc:respPerson").open("dcc:person");
        words("dcc:name", orElse(name, "not yet named"));
        x_.close();
        if (!position.empty())
            words("dcc:description", position);
        x_.leaf("dcc:role", role).leaf("dcc:mainSigner", mainSigner ? "true" : "false").close();
    }

    void statements() {
        x_.open("dcc:statements");
        if (c_.state != DraftState::SignedOff)
            statement("Draft. Not valid until authorised.");
        for (const std::string& text : parts_.statements)
            statement(text);
        if (!c_.job.traceability.empty())
            statement(c_.job.traceability);
        statement("Record " + orElse(c_.digest, "without digest"));
        x_.close();
    }
    void statement(const std::string& text) {
        x_.open("dcc:statement");
        words("dcc:declaration", text);
        x_.close();
    }

    void measurementResults() {
        x_.open("dcc:measurementResults");
        x_.open("dcc:usedMethods").open("dcc:usedMethod");
        words("dcc:name", orElse(c_.job.method, "not stated"));
        if (!c_.job.methodEdition.empty())
            x_.leaf("dcc:reference", "edition " + c_.job.methodEdition);
        x_.close().close();
        equipment();
        influences();
        for (const PhaseSection& section : c_.phases)
            phase(section);
        if (c_.function)
            function(*c_.function);
        if (c_.phases.empty() && !c_.function)
            textResult("Results", "none");
        x_.close();
    }

    void equipment() {
        if (c_.standards.empty())
            return;
        x_.open("dcc:measuringEquipments");
        for (const Standard& one : c_.standards) {
            x_.open("dcc:measuringEquipment", {{"refType", one.role == StandardRole::Reference ? "basic_normalUsed" : "basic_standardUsed"}});
            words("dcc:name", orElse(one.description, one.id));
            words("dcc:description", "Certificate " + orElse(one.certificate, "not stated") + ", issued by " + orElse(one.issuer, "not stated") +
                                         ", due " + orElse(one.due, "not stated"));
            x_.open("dcc:identifications");
            identification("calibrationLaboratory", orElse(one.id, "not stated"), "identification");
            x_.close().close();
        }
        x_.close();
    }

    void influences() {
        const auto& all = c_.conditions.influences;
        const bool any = std::any_of(all.begin(), all.end(), [](const Condition& one) { return one.start && one.end; });
        if (!any)
            return;
        x_.open("dcc:influenceConditions");
        for (const Condition& one : all) {
            if (!one.start || !one.end)
                continue;
            x_.open("dcc:influenceCondition");
            words("dcc:name", orElse(one.quantity.name, "influence quantity"));
            x_.open("dcc:data");
            values("at the start and at the end", "", {one.start->text(), one.end->text()}, one.quantity.unit, {});
            x_.close().close();
        }
        x_.close();
    }

    using Column = std::function<Digits(const ResultLine&)>;
    static std::vector<Digits> column(const PhaseSection& section, const Column& of) {
        std::vector<Digits> digits;
        for (const ResultLine& line : section.results)
            digits.push_back(of(line));
        return digits;
    }
    /// Joined by blanks; empty when one of them is missing, for a list has no holes.
    static std::string joined(const std::vector<Digits>& digits, int exponent = 0) {
        std::string text;
        for (const Digits& one : digits) {
            if (one.empty())
                return {};
            text += (text.empty() ? "" : " ") + scaledDigits(one, exponent);
        }
        return text;
    }

    struct Uncertainty {
        std::vector<Digits> expanded, factor;
    };
    /// A list of values, with their expanded uncertainties where there are any.
    void values(const std::string& name, const char* refType, const std::vector<Digits>& digits, const std::string& unit,
                const Uncertainty& uncertainty, const std::function<void()>& metaData = {}) {
        const DigitalUnit written = digitalUnit(unit);
        const std::string list = joined(digits, written.exponent);
        if (list.empty())
            return;
        x_.open("dcc:quantity", *refType == '\0' ? XmlWriter::Attributes{} : XmlWriter::Attributes{{"refType", refType}});
        words("dcc:name", name);
        x_.open("si:realListXMLList").leaf("si:valueXMLList", list).leaf("si:unitXMLList", written.name);
        if (!joined(uncertainty.expanded).empty())
            x_.open("si:measurementUncertaintyUnivariateXMLList")
                .open("si:expandedMUXMLList")
                .leaf("si:valueExpandedMUXMLList", joined(uncertainty.expanded, written.exponent))
                .leaf("si:coverageFactorXMLList", joined(uncertainty.factor))
                .leaf("si:coverageProbabilityXMLList", probability())
                .close()
                .close();
        x_.close();
        if (metaData)
            metaData();
        x_.close();
    }
    [[nodiscard]] std::string probability() const {
        std::string digits = c_.coveragePercent;
        digits.erase(std::remove(digits.begin(), digits.end(), '.'), digits.end());
        return "0." + digits;
    }

    void phase(const PhaseSection& section) {
        x_.open("dcc:measurementResult");
        words("dcc:name", "Results " + phaseWords(section.phase));
        if (c_.job.adjusted) {
            x_.open("dcc:influenceConditions").open("dcc:influenceCondition", {{"refType", "basic_adjustment"}});
            words("dcc:name", "Adjustment");
            x_.leaf("dcc:status", section.phase == Phase::AsFound ? "beforeAdjustment" : "afterAdjustment");
            x_.open("dcc:data");
            words("dcc:text", orElse(c_.job.adjustment, "adjusted"));
            x_.close().close().close();
        }
        x_.open("dcc:results").open("dcc:result");
        words("dcc:name", "Indication and error of indication");
        x_.open("dcc:data").open("dcc:list");
        const Uncertainty u{column(section, [](const ResultLine& line) { return line.expanded; }),
                            column(section, [](const ResultLine& line) { return line.coverageFactor; })};
        const std::string &reference = c_.item.reference.unit, &indication = c_.item.indication.unit;
        values("reference value", "basic_referenceValue", column(section, [](const ResultLine& line) { return line.reference; }), reference, {});
        values("indication", "basic_measuredValue", column(section, [](const ResultLine& line) { return line.indication; }), indication,
               section.errorKnown ? Uncertainty{} : u);
        values("error of indication", "basic_measurementError", column(section, [](const ResultLine& line) { return line.error; }), indication, u,
               [&] { conformities(section); });
        x_.close().close().close().close().close();
    }

    void conformities(const PhaseSection& section) {
        std::string list;
        for (const ResultLine& line : section.results)
            if (line.state)
                list += (list.empty() ? "" : " ") + std::string(conformity(*line.state));
        if (list.empty())
            return;
        x_.open("dcc:measurementMetaData").open("dcc:metaData", {{"refType", "basic_conformity"}});
        words("dcc:declaration", orElse(parts_.decisionRule, "decision rule not stated"));
        x_.leaf("dcc:conformityXMLList", list).close().close();
    }

    void function(const FunctionSection& function) {
        std::string text = parts_.functionForm;
        for (const auto& term : function.terms)
            text += (text.empty() ? "" : "; ") + term.name + " = " + term.value + (term.unit.empty() ? "" : ' ' + term.unit) +
                    (term.uncertainty.empty() ? "" : ", standard uncertainty " + term.uncertainty);
        const bool forward = function.direction == FitDirection::Indication;
        const std::string& unit = forward ? c_.item.reference.unit : c_.item.indication.unit;
        text += "; valid from " + function.low + " to " + function.high + (unit.empty() ? "" : ' ' + unit);
        textResult("Calibration function from the readings " + phaseWords(function.phase), text);
    }
    void textResult(const std::string& name, const std::string& text) {
        x_.open("dcc:measurementResult");
        words("dcc:name", name);
        x_.open("dcc:results").open("dcc:result");
        words("dcc:name", name);
        x_.open("dcc:data");
        words("dcc:text", text);
        x_.close().close().close().close();
    }

    const Certificate& c_;
    const CertificateXmlParts& parts_;
    XmlWriter x_;
};

} // namespace

std::string certificateXml(const Certificate& certificate, const CertificateXmlParts& parts) {
    return Document(certificate, parts).write();
}

} // namespace spanwright
