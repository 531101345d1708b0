// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/Look.h"
#include "ui/shell/Stage.h"

#include <QStringList>

class QApplication;

namespace spanwright {

struct StartOptions {
    std::optional<Stage> stage;        ///< empty: the bench where there are readings, else the job
    std::optional<SchemeName> scheme;  ///< empty: as last time
    QStringList files;                 ///< sessions or tables; one window each
};

/// Opens the windows and runs until the last is closed. The exit status.
int runWindow(QApplication& application, const StartOptions& options);

} // namespace spanwright
