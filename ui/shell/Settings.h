// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/Look.h"

#include <QSettings>
#include <QString>
#include <QStringList>

#include <optional>

namespace spanwright {

/// What is remembered from one start to the next. Nothing here changes a result.
class Settings {
  public:
    /// The user's own, or those in a file (tests).
    Settings();
    explicit Settings(const QString& file);

    [[nodiscard]] SchemeName scheme() const;
    void setScheme(SchemeName name);
    [[nodiscard]] QString person() const; ///< initials
    void setPerson(const QString& initials);
    [[nodiscard]] QString lastFolder() const;
    void setLastFolder(const QString& folder);
    /// Newest first, at most eight.
    [[nodiscard]] QStringList recentFiles() const;
    void addRecentFile(const QString& path);
    void forgetRecentFile(const QString& path);
    [[nodiscard]] QByteArray geometry() const;
    void setGeometry(const QByteArray& geometry);

  private:
    mutable QSettings store_;
};

} // namespace spanwright
