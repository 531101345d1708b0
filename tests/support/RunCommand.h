// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QByteArray>
#include <QJsonObject>
#include <QString>
#include <QTemporaryDir>

#include <string>
#include <vector>

namespace spanwright::test {

/// What a command printed and how it ended, run within the test's process.
struct Ran {
    int status = -1;
    std::string out, err;

    [[nodiscard]] QJsonObject json() const; ///< of `out`; empty when it is none
};

Ran runWords(const std::vector<std::string>& words);

/// A folder of a test's own, gone after it, and the files written there.
class Desk {
  public:
    /// Writes the bytes and returns the path.
    std::string file(const QString& name, const QByteArray& bytes);
    [[nodiscard]] std::string path(const QString& name) const { return folder_.filePath(name).toStdString(); }

  private:
    QTemporaryDir folder_;
};

} // namespace spanwright::test
