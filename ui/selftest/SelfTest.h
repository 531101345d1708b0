// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Progress.h"

#include <QString>

#include <vector>

namespace spanwright {

/// One published figure beside what this program computes for it.
struct SelfTestFigure {
    QString name;    ///< as in figures: "coefficients.0.value"
    QString printed; ///< as the source prints it
    double got = 0;  ///< NaN when it was not computed
    double digits = 0; ///< −log10 of the relative difference, at most 15
    bool holds = false; ///< rounds to what is printed: within half a unit of its last digit
};

struct SelfTestCase {
    QString name;
    QString source;
    std::size_t readings = 0;
    std::vector<SelfTestFigure> figures;

    [[nodiscard]] std::size_t failed() const;
};

struct SelfTestOutcome {
    std::vector<SelfTestCase> cases;

    [[nodiscard]] std::size_t figures() const;
    [[nodiscard]] std::size_t failed() const;
};

/// Recomputes the published cases built into the program (resources/self-test.json) by the one road that every record takes
/// (ISO/IEC 17025:2017, 7.11.2).
SelfTestOutcome runSelfTest();
/// The same, told how far it has come after every case; what was computed so far when it is cancelled.
SelfTestOutcome runSelfTest(Progress& progress);

/// The cases in the order in which they are looked at: those with a figure that differs first.
std::vector<const SelfTestCase*> failuresFirst(const SelfTestOutcome& outcome);

/// The outcome as lines of plain text, figures by their path in figures JSON.
QString selfTestText(const SelfTestOutcome& outcome);
/// The outcome in one sentence.
QString selfTestVerdict(const SelfTestOutcome& outcome);
/// A figure in words, from its path in figures JSON.
QString selfTestFigureText(const QString& name);
/// A computed number to 16 digits; a dash where it was not computed.
QString selfTestNumberText(double value);

/// When, where and with which program the outcome came about.
struct SelfTestOccasion {
    QString date;    ///< ISO 8601, with time
    QString program; ///< name and version
    QString machine; ///< operating system and processor
};

/// Now, here, by this program.
SelfTestOccasion selfTestOccasion();

/// A dated validation record on A4 as PDF. Whether it could be written. Needs a QGuiApplication.
bool writeSelfTestPdf(const SelfTestOutcome& outcome, const SelfTestOccasion& occasion, const QString& path);

} // namespace spanwright
