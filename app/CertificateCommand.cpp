// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "app/PaperApplication.h"
#include "app/RecordFile.h"
#include "core/evaluate/evaluate.h"
#include "core/session/SameNumber.h"
#include "core/session/WholeFile.h"
#include "ui/certificate/CertificateText.h"
#include "ui/certificate/writeCertificate.h"

#include <QDate>

#include <algorithm>
#include <filesystem>
#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--to"}, {"--xml"}, {"--country"}, {"--incomplete", OptionKind::Flag}, {"--replace", OptionKind::Flag}};

/// Two capital letters (ISO 3166-1).
bool isCountryCode(const std::string& text) {
    return text.size() == 2 && std::all_of(text.begin(), text.end(), [](char c) { return c >= 'A' && c <= 'Z'; });
}

bool sameFile(const std::string& a, const std::string& b) {
    std::error_code unknown;
    return std::filesystem::equivalent(a, b, unknown) ||
           std::filesystem::absolute(a, unknown).lexically_normal() == std::filesystem::absolute(b, unknown).lexically_normal();
}

/// Whether the files that the options name may be written: neither over the session, nor one over the other.
Result<void> targetsFree(const Arguments& arguments, const std::string& session) {
    const std::string to = *arguments.value("--to");
    const auto xml = arguments.value("--xml");
    if (xml && xml->empty())
        return Error(ErrorCode::UsageValueMissing, {{"option", "--xml"}});
    if (xml && sameFile(to, *xml))
        return Error(ErrorCode::UsageValueBad, {{"option", "--xml"}, {"text", *xml}});
    const Replacing replacing = arguments.has("--replace") ? Replacing::Allowed : Replacing::Refused;
    const auto free = mayBeWritten(to, {session}, replacing);
    return free && xml ? mayBeWritten(*xml, {session}, replacing) : free;
}

/// Every gap on a line of its own: each is something to enter.
int refuseGaps(Console console, const std::string& file, const Error& error) {
    std::size_t count = 0;
    for (const Fact& fact : error.facts)
        if (fact.name == "missing") {
            console.err << "spanwright: " << file << ": " << fact.value << '\n';
            ++count;
        }
    console.err << "spanwright: " << file << ": " << count
                << (count == 1 ? " item blocks" : " items block") << " the certificate; --incomplete prints it marked as incomplete\n";
    return CertificateBlocked;
}

} // namespace

int certificateCommand(const Words& words, Console console) {
    const auto arguments = parseArguments(words, known);
    if (!arguments)
        return refuse(console, arguments.error());
    if (arguments->files.size() != 1)
        return refuse(console, Error(ErrorCode::UsageNoFile, {{"command", "certificate"}}));
    const auto to = arguments->value("--to");
    if (!to || to->empty())
        return refuse(console, Error(ErrorCode::UsageValueMissing, {{"option", "--to"}}));

    if (const auto country = arguments->value("--country"); country && !isCountryCode(*country))
        return refuse(console, Error(ErrorCode::UsageValueBad, {{"option", "--country"}, {"text", *country}}));
    const std::string& file = arguments->files.front();
    if (const auto free = targetsFree(*arguments, file); !free)
        return refuse(console, free.error());
    const auto loaded = loadSessionFile(file);
    if (!loaded)
        return refuse(console, loaded.error());
    if (!loaded->broken.empty())
        return refuseFile(console, file, loaded->broken);
    Progress progress;
    const auto evaluation = evaluate(loaded->record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));

    const PaperApplication paper;
    const CertificateContext context =
        certificateContext(loaded->record, *evaluation, QDate::currentDate().toString(Qt::ISODate));
    const WithGaps withGaps = arguments->has("--incomplete") ? WithGaps::MarkIncomplete : WithGaps::Refuse;
    const auto written = writeCertificatePdf(loaded->record, *evaluation, QString::fromStdString(*to), context, withGaps);
    if (!written)
        return written.error().code == ErrorCode::CertificateIncomplete ? refuseGaps(console, file, written.error())
                                                                        : refuse(console, written.error());
    console.out << *to << '\n';
    const std::string other = sessionWithNumber(file, loaded->record.job.certificateNumber);
    if (!other.empty())
        console.err << "spanwright: " << file << ": "
                    << gapText(numberUsedElsewhere(loaded->record.job.certificateNumber, other), loaded->record, *evaluation).toStdString() << '\n';
    if (const auto xml = arguments->value("--xml")) {
        const std::string country = arguments->value("--country").value_or(std::string());
        if (country.empty())
            console.err << "spanwright: " << *xml << ": no country is stated, so it stands as ZZ, not stated; give it with --country\n";
        const auto machineReadable =
            writeCertificateXml(loaded->record, *evaluation, QString::fromStdString(*xml), {QString::fromStdString(*to), country}, context);
        if (!machineReadable)
            return refuse(console, machineReadable.error());
        console.out << *xml << '\n';
    }
    return Done;
}

} // namespace spanwright
