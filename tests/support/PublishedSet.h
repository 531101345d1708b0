// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include <map>
#include <string>
#include <vector>

namespace spanwright::test {

/// A file of tests/published: rows as printed in the source, the source's results as printed, and the same recomputed to 30 digits.
struct PublishedSet {
    std::string source;
    std::vector<std::vector<std::string>> rows;
    std::map<std::string, std::string> published, recomputed;

    [[nodiscard]] double recomputedNumber(const std::string& name) const;
};

/// Reads tests/published/NAME.json; an empty set when it cannot be read.
PublishedSet publishedSet(const QString& name);

/// −log10 of the relative difference, at most 16; of the absolute difference when the expected value is 0.
double digitsAgreed(double got, double expected);

/// Whether `got` is within half a unit of the last printed digit of `printed`, of 0.5 at most for printed integers.
bool agreesAsPrinted(double got, const std::string& printed);

} // namespace spanwright::test
