// SPDX-License-Identifier: GPL-3.0-or-later
// From the start of the process to the first painted window, Spanwright on its sample session against a minimal window with one
// Qt chart; whole processes, taken in turn. Aim: ratio of the medians at most 2.5.
#include "app/CommandLine.h"
#include "tests/support/Paths.h"

#include <QApplication>
#include <QElapsedTimer>
#include <QFileInfo>
#include <QProcess>
#include <QTemporaryDir>
#include <QTimer>
#include <QWidget>

#include <algorithm>
#include <cstdio>
#include <vector>

namespace {

constexpr int repetitions = 21;

/// Ends the program after the first paint of a window's content.
class FirstPaint : public QObject {
  public:
    using QObject::QObject;
    bool eventFilter(QObject* watched, QEvent* event) override {
        const auto* widget = qobject_cast<QWidget*>(watched);
        if (event->type() == QEvent::Paint && widget && !widget->isWindow() && widget->window()->isVisible())
            QTimer::singleShot(0, qApp, [] { QCoreApplication::exit(0); });
        return false;
    }
};

void watchFirstPaint() {
    qApp->installEventFilter(new FirstPaint(qApp));
}

double milliseconds(const QString& program, const QStringList& arguments, const QProcessEnvironment& environment) {
    QProcess process;
    process.setProcessEnvironment(environment);
    process.setProcessChannelMode(QProcess::ForwardedErrorChannel);
    QElapsedTimer timer;
    timer.start();
    process.start(program, arguments);
    if (!process.waitForFinished(60'000) || process.exitCode() != 0)
        qFatal("%s did not come to its first paint", qPrintable(program));
    return double(timer.nsecsElapsed()) / 1e6;
}

double median(std::vector<double> values) {
    std::nth_element(values.begin(), values.begin() + repetitions / 2, values.end());
    return values[repetitions / 2];
}

int compare(const QString& self) {
    const QTemporaryDir home;
    QProcessEnvironment environment = QProcessEnvironment::systemEnvironment();
    for (const char* name : {"XDG_CONFIG_HOME", "XDG_DATA_HOME", "XDG_CACHE_HOME", "XDG_RUNTIME_DIR"})
        environment.insert(name, home.path());
    const QString sample = QString::fromStdString(spanwright::test::sourceDir()) + "/sample-data/pressure-transmitter.spanwright";
    const QString minimal = QFileInfo(self).absolutePath() + "/minimal_chart_window";
    std::vector<double> ours;
    std::vector<double> theirs;
    milliseconds(self, {"--once", sample}, environment);
    milliseconds(minimal, {}, environment);
    for (int i = 0; i < repetitions; ++i) {
        theirs.push_back(milliseconds(minimal, {}, environment));
        ours.push_back(milliseconds(self, {"--once", sample}, environment));
    }
    std::printf("start-up: sample session %.0f ms, minimal chart window %.0f ms, ratio %.2f (aim at most 2.5)\n", median(ours),
                median(theirs), median(ours) / median(theirs));
    return 0;
}

} // namespace

int main(int argc, char** argv) {
    if (argc == 3 && qstrcmp(argv[1], "--once") == 0) {
        qAddPreRoutine(watchFirstPaint);
        argv[1] = argv[0];
        return spanwright::runProgram(argc - 1, argv + 1);
    }
    QCoreApplication application(argc, argv);
    return compare(QCoreApplication::applicationFilePath());
}
