// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Stage.h"

#include <QCoreApplication>

namespace spanwright {

QString stageName(Stage stage) {
    switch (stage) {
    case Stage::Job: return QStringLiteral("job");
    case Stage::Bench: return QStringLiteral("bench");
    case Stage::Budget: return QStringLiteral("budget");
    case Stage::Certificate: break;
    }
    return QStringLiteral("certificate");
}

std::optional<Stage> stageOfName(const QString& name) {
    for (const Stage stage : allStages)
        if (stageName(stage) == name)
            return stage;
    return std::nullopt;
}

QString stageTitle(Stage stage) {
    switch (stage) {
    case Stage::Job: return QCoreApplication::translate("Stage", "Job");
    case Stage::Bench: return QCoreApplication::translate("Stage", "Bench");
    case Stage::Budget: return QCoreApplication::translate("Stage", "Budget");
    case Stage::Certificate: break;
    }
    return QCoreApplication::translate("Stage", "Certificate");
}

} // namespace spanwright
