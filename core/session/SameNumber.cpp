// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SameNumber.h"

#include <QDir>
#include <QFile>
#include <QJsonDocument>
#include <QRegularExpression>

namespace spanwright {

namespace {

constexpr qint64 Beginning = 16 * 1024;
constexpr int MostFiles = 500;

QString numberIn(const QString& path) {
    static const QRegularExpression field(QStringLiteral(R"~("certificate_number"\s*:\s*("(?:[^"\\]|\\.)*"))~"));
    QFile file(path);
    if (!file.open(QIODevice::ReadOnly))
        return {};
    const auto found = field.match(QString::fromUtf8(file.read(Beginning)));
    const QByteArray list = "[" + found.captured(1).toUtf8() + "]";
    return found.hasMatch() ? QJsonDocument::fromJson(list)[0].toString() : QString();
}

} // namespace

std::string sessionWithNumber(const std::string& path, const std::string& number) {
    const QFileInfo own(QString::fromStdString(path));
    if (path.empty() || number.empty() || !own.dir().exists())
        return {};
    int looked = 0;
    for (const QFileInfo& other : own.dir().entryInfoList({QStringLiteral("*.spanwright")}, QDir::Files, QDir::Name)) {
        if (++looked > MostFiles)
            break;
        if (other.fileName() != own.fileName() && numberIn(other.filePath()) == QString::fromStdString(number))
            return other.fileName().toStdString();
    }
    return {};
}

} // namespace spanwright
