// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "core/exchange/CsvRules.h"

#include <functional>

namespace spanwright {

/// The name by which a table or a text goes to standard output.
inline constexpr std::string_view StandardOutput = "-";

/// Whether bytes are a result of one kind as this program wrote it: that may be written anew without being asked for.
using OwnResult = std::function<bool(std::string_view bytes)>;

/// Whether a result may be written there. A file that holds something is replaced where it is an own result of the same kind, or with
/// --replace; never what is read (`inputs`, by whatever name or link it is reached), and never a session. Errors: FileIsInput, FileIsSession, FileExists,
/// FileNotWritable (no regular file). Fact: file.
Result<void> resultFree(const std::string& path, const std::vector<std::string>& inputs, const Arguments& arguments, const OwnResult& own);

/// The name that an option gives for a document. Errors: UsageValueMissing (none, or an empty one), UsageValueBad ("-": a document goes to
/// a file).
Result<std::string> documentName(const Arguments& arguments, const char* option);

/// As Qt writes a PDF with this title under this program's name, and nobody added to it since (a signature, a remark).
bool isOwnPdf(std::string_view bytes, std::string_view title);
bool isOwnCertificate(std::string_view bytes);
bool isOwnValidationRecord(std::string_view bytes);
/// By their mark (core/session/TextMark).
bool isOwnCertificateXml(std::string_view bytes);
bool isOwnCoefficients(std::string_view bytes);
/// A table of values bears no mark, so that every reader of tables takes it: it is known by a header that is the one of `table`, where this
/// has one.
bool isOwnTable(std::string_view bytes, std::string_view table, const CsvRules& rules);

} // namespace spanwright
