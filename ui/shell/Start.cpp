// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Start.h"

#include "ui/shell/MainWindow.h"
#include "ui/words/EnglishPlurals.h"

#include <QApplication>
#include <QDateTime>
#include <QFileInfo>
#include <QStandardPaths>

namespace spanwright {

namespace {

/// Makes windows for as long as the program runs.
class Windows {
  public:
    Windows(Settings& settings, Dialogs& dialogs)
        : around_{settings, dialogs, [] { return QDateTime::currentMSecsSinceEpoch(); },
                  QStandardPaths::writableLocation(QStandardPaths::GenericDataLocation) + QStringLiteral("/spanwright")} {}

    MainWindow* add() {
        auto* window = new MainWindow(around_);
        window->setAttribute(Qt::WA_DeleteOnClose);
        if (!around_.settings.geometry().isEmpty())
            window->restoreGeometry(around_.settings.geometry());
        QObject::connect(window, &MainWindow::newWindowWanted, window, [this] { add()->show(); });
        return window;
    }

    /// Offers what a stopped program left behind; a window for each that is taken up.
    int offerRecovery() {
        int taken = 0;
        for (const Recovery::Found& found : Document::leftBehind(around_.dataFolder, around_.settings.recentFiles())) {
            const QString name =
                found.sessionPath.empty() ? QObject::tr("A session without a file") : QString::fromStdString(found.sessionPath);
            const QString text = QObject::tr("%1, with %n reading(s), kept %2.", nullptr, static_cast<int>(found.readings))
                                     .arg(name, QDateTime::fromMSecsSinceEpoch(found.keptAt).toString(QStringLiteral("yyyy-MM-dd HH:mm:ss")));
            switch (around_.dialogs.askRecovery(nullptr, text)) {
            case RecoveryAnswer::TakeUp: {
                MainWindow* window = add();
                window->show();
                window->files().recover(found);
                window->showStage(Stage::Bench);
                ++taken;
                break;
            }
            case RecoveryAnswer::Discard: Recovery::remove(found.path); break;
            case RecoveryAnswer::Later: break;
            }
        }
        return taken;
    }

  private:
    WindowSurroundings around_;
};

} // namespace

int runWindow(QApplication& application, const StartOptions& options) {
    speakEnglish(application);
    Settings settings;
    ScreenDialogs dialogs;
    setScheme(application, options.scheme.value_or(settings.scheme()));
    Windows windows(settings, dialogs);

    const int recovered = windows.offerRecovery();
    QStringList files = options.files;
    if (files.isEmpty() && recovered == 0)
        files << QString();
    for (const QString& file : files) {
        MainWindow* window = windows.add();
        window->show();
        if (!file.isEmpty())
            window->files().openPath(QFileInfo(file).absoluteFilePath());
        if (options.stage)
            window->showStage(*options.stage);
    }
    return QApplication::exec();
}

} // namespace spanwright
