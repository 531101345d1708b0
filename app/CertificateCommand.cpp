// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "app/PaperApplication.h"
#include "app/RecordFile.h"
#include "core/evaluate/evaluate.h"
#include "ui/certificate/writeCertificate.h"

#include <QDate>

#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--to"}, {"--xml"}, {"--incomplete", OptionKind::Flag}};

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

    const std::string& file = arguments->files.front();
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
    if (const auto xml = arguments->value("--xml")) {
        const auto machineReadable =
            writeCertificateXml(loaded->record, *evaluation, QString::fromStdString(*xml), QString::fromStdString(*to), context);
        if (!machineReadable)
            return refuse(console, machineReadable.error());
        console.out << *xml << '\n';
    }
    return Done;
}

} // namespace spanwright
