// SPDX-License-Identifier: GPL-3.0-or-later
// Speed of evaluate(): of a straight line on 10^6 readings as a ratio to summing the two columns in the same run, once with eleven
// set points and once with references that all differ; and of a usual calibration.
#include "core/base/LargeBlocks.h"
#include "core/evaluate/evaluate.h"
#include "tests/bench/Stopwatch.h"
#include "tests/support/SampleRecord.h"

#include <algorithm>
#include <chrono>
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <functional>
#include <random>
#include <thread>

using namespace spanwright;
using test::processorSeconds;
using test::wallSeconds;

namespace {

enum class References { ElevenSetPoints, AllDiffer };

Record manyReadings(std::size_t n, References references) {
    std::mt19937_64 random(1);
    std::normal_distribution<double> noise(0, 20);
    ReadingColumns::Block block;
    block.n = n;
    for (std::size_t i = 0; i < n; ++i) {
        const auto x = references == References::AllDiffer ? static_cast<std::int64_t>(random() % 10'000'000)
                                                           : static_cast<std::int64_t>(i % 11) * 1'000'000;
        block.reference.push_back(Decimal{x, 6, {}});
        block.indication.push_back(Decimal{40'000 + x * 16 / 1000 + static_cast<std::int64_t>(noise(random)), 4, {}});
    }
    Record record;
    record.readings.edit().appendBlock(std::move(block), 1);
    return record;
}

void evaluateOnce(const Record& record) {
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    if (!evaluation || !evaluation->phase(Phase::AsFound) || !evaluation->phase(Phase::AsFound)->fit)
        std::abort();
}

/// Longest wait, in seconds, until an evaluation is gone that is cancelled at ten moments of its course.
double longestCancel(const Record& record, double whole) {
    double longest = 0;
    for (int tenth = 0; tenth < 10; ++tenth) {
        Progress progress;
        std::thread other([&] { (void)evaluate(record, progress); });
        std::this_thread::sleep_for(std::chrono::duration<double>(whole * tenth / 10));
        longest = std::max(longest, wallSeconds(
                                        [&] {
                                            progress.cancel();
                                            other.join();
                                        },
                                        1));
    }
    return longest;
}

volatile std::int64_t sink = 0;

void compare(const char* what, References references) {
    const Record record = manyReadings(1'000'000, references);
    const double sum = processorSeconds(
        [&] {
            std::int64_t total = 0;
            for (const std::int64_t value : record.readings->reference().grid())
                total += value;
            for (const std::int64_t value : record.readings->indication().grid())
                total += value;
            sink = total;
        },
        51);
    const double whole = processorSeconds([&] { evaluateOnce(record); }, 9);
    const double felt = wallSeconds([&] { evaluateOnce(record); }, 9);
    const double cancelled = longestCancel(record, felt);
    std::printf("evaluate() of a line on 10^6 readings, %s: %.1f ms of processor, %.0f times summing the two columns "
                "(%.2f ms); %.1f ms until it is there, %.0f times; gone at most %.1f ms after it is cancelled\n",
                what, whole * 1e3, whole / sum, sum * 1e3, felt * 1e3, felt / sum, cancelled * 1e3);
}

} // namespace

int main() {
    keepLargeBlocks(); // as the program does
    const Record usual = test::pressureTransmitter();
    std::printf("evaluate() of the sample, 66 readings as found and 10 as left: %.2f ms\n",
                processorSeconds([&] { evaluateOnce(usual); }, 51) * 1e3);
    compare("eleven set points", References::ElevenSetPoints);
    compare("references that all differ", References::AllDiffer);
    return 0;
}
