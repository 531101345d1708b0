// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Settings.h"

#include <QDir>
#include <QFileInfo>

namespace spanwright {

namespace {
constexpr qsizetype mostRecent = 8;
const QString recentKey = QStringLiteral("files/recent");
} // namespace

Settings::Settings() : store_(QStringLiteral("spanwright"), QStringLiteral("spanwright")) {}

Settings::Settings(const QString& file) : store_(file, QSettings::IniFormat) {}

SchemeName Settings::scheme() const {
    return store_.value(QStringLiteral("window/scheme")).toString() == QLatin1String("dark") ? SchemeName::Dark : SchemeName::Light;
}

void Settings::setScheme(SchemeName name) {
    store_.setValue(QStringLiteral("window/scheme"), name == SchemeName::Dark ? QStringLiteral("dark") : QStringLiteral("light"));
}

QString Settings::person() const {
    return store_.value(QStringLiteral("person/initials")).toString();
}

void Settings::setPerson(const QString& initials) {
    store_.setValue(QStringLiteral("person/initials"), initials);
}

QString Settings::lastFolder() const {
    const QString folder = store_.value(QStringLiteral("files/folder")).toString();
    return QFileInfo(folder).isDir() ? folder : QDir::homePath();
}

void Settings::setLastFolder(const QString& folder) {
    store_.setValue(QStringLiteral("files/folder"), folder);
}

QStringList Settings::recentFiles() const {
    return store_.value(recentKey).toStringList();
}

void Settings::addRecentFile(const QString& path) {
    QStringList all = recentFiles();
    all.removeAll(path);
    all.prepend(path);
    store_.setValue(recentKey, all.mid(0, mostRecent));
}

void Settings::forgetRecentFile(const QString& path) {
    QStringList all = recentFiles();
    all.removeAll(path);
    store_.setValue(recentKey, all);
}

QByteArray Settings::geometry() const {
    return store_.value(QStringLiteral("window/geometry")).toByteArray();
}

void Settings::setGeometry(const QByteArray& geometry) {
    store_.setValue(QStringLiteral("window/geometry"), geometry);
}

} // namespace spanwright
