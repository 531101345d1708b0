// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"

#include <string>
#include <vector>

namespace spanwright {

/// What the machine-readable certificate takes from elsewhere.
struct CertificateXmlParts {
    std::string countryCode = "ZZ"; ///< ISO 3166-1; ZZ: not stated
    std::vector<std::string> statements; ///< sentences, in English
    std::string decisionRule;            ///< in words; empty where no conformity is stated
    std::string functionForm;            ///< the calibration function as an equation
    std::string pdfName, pdfBase64;      ///< the printed draft; empty: left out
};

/// The certificate in the open schema for digital calibration certificates, version 3.3.0, with values in the SI data model
/// (D-SI 2.2). Same digits as on paper. It is a draft as the paper is: its unique identifier ends with "-draft" until all three
/// people have signed off.
std::string certificateXml(const Certificate& certificate, const CertificateXmlParts& parts);

} // namespace spanwright
