// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Console.h"

#include "ui/words/Words.h"

#include <ostream>

namespace spanwright {

int print(Console console, const std::string& result) {
    console.out << result;
    console.out.flush();
    return console.out.good() ? Done : refuse(console, Error(ErrorCode::FileWriteFailed, {{"file", "standard output"}}));
}

int refuse(Console console, const Error& error) {
    console.err << "spanwright: " << errorText(error).toStdString() << '\n';
    switch (error.code) {
    case ErrorCode::UsageUnknownOption:
    case ErrorCode::UsageValueBad:
    case ErrorCode::UsageValueMissing:
    case ErrorCode::UsageNoFile:
    case ErrorCode::UsageUnknownCommand: return WrongUsage;
    case ErrorCode::CertificateIncomplete: return CertificateBlocked;
    default: return Refused;
    }
}

int refuseUsage(Console console, const std::string& file, const std::string& reason) {
    console.err << "spanwright: " << file << ": " << reason << '\n';
    return WrongUsage;
}

int refuseFile(Console console, const std::string& file, const std::vector<Warning>& wrong) {
    for (const Warning& warning : wrong)
        console.err << "spanwright: " << file << ": " << warningText(warning).toStdString() << '\n';
    return Refused;
}

} // namespace spanwright
