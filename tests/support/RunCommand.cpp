// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/RunCommand.h"

#include "app/CommandLine.h"

#include <QFile>
#include <QJsonDocument>

#include <sstream>

namespace spanwright::test {

QJsonObject Ran::json() const {
    return QJsonDocument::fromJson(QByteArray::fromStdString(out)).object();
}

Ran runWords(const std::vector<std::string>& words) {
    std::ostringstream out, err;
    const auto status = runCommand(words, {out, err});
    return {status.value_or(-1), out.str(), err.str()};
}

std::string Desk::file(const QString& name, const QByteArray& bytes) {
    QFile file(folder_.filePath(name));
    if (!file.open(QIODevice::WriteOnly) || file.write(bytes) != bytes.size())
        qFatal("cannot write %s", qPrintable(name));
    return file.fileName().toStdString();
}

} // namespace spanwright::test
