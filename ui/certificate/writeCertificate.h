// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"
#include "ui/certificate/Page.h"

#include <QString>
#include <QStringList>

namespace spanwright {

/// What still blocks a complete draft, one sentence each.
QStringList blockingGaps(const Record& record, const Evaluation& evaluation);

/// What the certificate says about its making: this program, the date, and the seal that a session file saved from this record
/// carries, so that paper and file can be told to belong together.
CertificateContext certificateContext(const Record& record, const Evaluation& evaluation, const QString& date);

/// The pages of the certificate of a record.
Pages layOutCertificate(const Record& record, const Evaluation& evaluation, const CertificateContext& context);

/// What to do with a draft that has gaps.
enum class WithGaps { Refuse, MarkIncomplete };

/// Writes the certificate draft as PDF (PDF/A-1b, whole or not at all). Errors: CertificateIncomplete (a fact "missing" for
/// each gap, in words) where gaps are refused; FileNotWritable, FileWriteFailed (facts: file, reason). Needs a QGuiApplication.
Result<void> writeCertificatePdf(const Record& record, const Evaluation& evaluation, const QString& path,
                                 const CertificateContext& context, WithGaps withGaps);

/// What the machine-readable form takes from elsewhere.
struct XmlWishes {
    QString pdfPath;     ///< the PDF that goes inside; empty: none
    std::string country; ///< of the laboratory, ISO 3166-1; empty: not stated
};

/// Writes the same draft in machine-readable form (core/certificate/CertificateXml). Errors: FileNotReadable (of the PDF), FileNotWritable, FileWriteFailed.
Result<void> writeCertificateXml(const Record& record, const Evaluation& evaluation, const QString& path, const XmlWishes& wishes,
                                 const CertificateContext& context);

} // namespace spanwright
