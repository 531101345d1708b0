// SPDX-License-Identifier: GPL-3.0-or-later
// Processor time from a typed reading to everything brought up to date and painted, with the window open on each stage in turn: as
// a share of the frame of 16 ms of a screen with 60 pictures a second, and beside a repaint of the whole window in the same run.
#include "core/evaluate/evaluate.h"
#include "tests/bench/Stopwatch.h"
#include "tests/support/StoryWindow.h"
#include "ui/commands/ReadingCommands.h"

#include <QApplication>

#include <cstdio>
#include <random>

using namespace spanwright;
namespace {

constexpr double frame = 0.016;

/// Runs of eleven set points, rising and falling, each read `repeats` times.
Record recordWith(int readings, int repeats) {
    std::mt19937_64 random(3);
    std::normal_distribution<double> noise(0, 20);
    Record record;
    for (int i = 0; i < readings; ++i) {
        Reading reading;
        reading.id = record.nextReadingId++;
        const int place = i / repeats % 22, point = place < 11 ? place : 21 - place;
        reading.run = 1 + i / (22 * repeats);
        reading.direction = place < 11 ? Direction::Rising : Direction::Falling;
        reading.setPoint = Decimal{point, 0, {}};
        reading.reference = Decimal{point * 100'000 + static_cast<int>(noise(random)), 5, {}};
        reading.indication = Decimal{40'000 + point * 16'000 + static_cast<int>(noise(random)), 4, {}};
        record.readings.edit().append(reading);
    }
    return record;
}

Reading typed(const Record& record) {
    Reading reading = record.readings->row(record.readings->size() - 1);
    reading.id = record.nextReadingId;
    return reading;
}

void typeOn(test::StoryWindow& story, Stage stage, const char* name, int readings, int repeats) {
    MainWindow& window = story.window();
    Workbench& bench = window.workbench();
    bench.setRecord(recordWith(readings, repeats));
    bench.settle();
    window.showStage(stage);
    const auto paint = [&] { window.repaint(); };
    paint();
    const double painting = test::processorSeconds(paint, 5);
    const double evaluating = test::processorSeconds(
        [&] {
            Progress progress;
            (void)evaluate(bench.record(), progress);
        },
        5);
    const double typing = test::processorSeconds(
        [&] {
            bench.perform(std::make_unique<AddReadings>(std::vector<Reading>{typed(bench.record())}));
            QCoreApplication::sendPostedEvents(); // paints what has changed
        },
        15);
    std::printf("%5d readings in %2d runs, %-11s typed to painted %5.1f ms, %.2f frames; evaluation %5.2f ms, a repaint of the window %5.1f ms\n",
                readings, (readings + 22 * repeats - 1) / (22 * repeats), name, typing * 1e3, typing / frame, evaluating * 1e3, painting * 1e3);
}

} // namespace

int main(int argc, char** argv) {
    QApplication application(argc, argv);
    const QTemporaryDir home;
    test::StoryWindow story(home.path());
    for (const auto& [readings, repeats] : {std::pair{66, 1}, {1000, 5}, {1000, 1}}) {
        typeOn(story, Stage::Job, "job", readings, repeats);
        typeOn(story, Stage::Bench, "bench", readings, repeats);
        typeOn(story, Stage::Budget, "budget", readings, repeats);
        typeOn(story, Stage::Certificate, "certificate", readings, repeats);
    }
    return 0;
}
