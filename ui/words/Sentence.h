// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Error.h"

#include <QString>
#include <QStringList>

#include <vector>

namespace spanwright {

/// The facts of one error, warning or finding while its sentence is made. Text that came from a file stays text: it is put on
/// one line, cut to a readable length and quoted. Facts that the sentence did not use are shown behind it, so none is lost.
class Sentence {
  public:
    explicit Sentence(const std::vector<Fact>& facts) : facts_(facts) {}

    /// The fact as it is, or `otherwise` when it is not known.
    QString plain(const char* name, const QString& otherwise = {});
    /// The fact between quotation marks, or `otherwise`.
    QString quoted(const char* name, const QString& otherwise);
    [[nodiscard]] bool has(const char* name) const;
    /// "readings.csv, line 12, column 3: ", empty when none of them is known.
    QString place();
    /// "readings.csv: ", empty when it is not known.
    QString file();
    /// " (reason: …; key: …)" from the facts that were not used yet; empty when there are none.
    QString rest();

  private:
    const Fact* find(const char* name) const;

    const std::vector<Fact>& facts_;
    QStringList used_;
};

} // namespace spanwright
