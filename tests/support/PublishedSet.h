// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <QString>

#include <map>
#include <string>
#include <vector>

namespace spanwright::test {

/// A file of tests/published: rows as printed in the source, the source's results as printed, and the same recomputed to 30 digits.
struct PublishedSet {
    std::string id, source;
    std::vector<std::string> columns;
    std::vector<std::vector<std::string>> rows;
    std::map<std::string, std::string> published, recomputed;

    [[nodiscard]] double recomputedNumber(const std::string& name) const;
    /// The cells of a column; none when the name is empty.
    [[nodiscard]] std::vector<std::string> column(const std::string& name) const;
};

/// Reads tests/published/NAME.json; an empty set when it cannot be read.
PublishedSet publishedSet(const QString& name);

/// −log10 of the relative difference, at most 16; of the absolute difference when the expected value is 0.
double digitsAgreed(double got, double expected);
/// The same against a number in more digits than a double holds, at most 15; an expected 0 counts as met below 10⁻¹².
double digitsAgreed(double got, const std::string& expected);

/// Whether `got` is within half a unit of the last printed digit of `printed`, of 0.5 at most for printed integers.
bool agreesAsPrinted(double got, const std::string& printed);

/// A record whose readings are the named columns of a set; an empty name leaves that column out.
struct ReadingsFrom {
    std::string reference, indication, setPoint, uReference, uIndication;
};
Record recordOf(const PublishedSet& set, const ReadingsFrom& from);
/// The same from columns of numbers as typed; the reference may be empty.
Record recordOf(const std::vector<std::string>& reference, const std::vector<std::string>& indication);

} // namespace spanwright::test
