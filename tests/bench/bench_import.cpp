// SPDX-License-Identifier: GPL-3.0-or-later
// Speed of the import of a CSV: time as a ratio against mmap and std::from_chars over the same bytes, in the same run.
#include "core/exchange/FileBytes.h"
#include "core/exchange/ReadingImport.h"
#include "tests/bench/Stopwatch.h"

#include <QTemporaryDir>

#include <algorithm>
#include <charconv>
#include <ctime>
#include <cstdio>
#include <cstdlib>
#include <cstring>
#include <functional>

#include <fcntl.h>
#include <sys/mman.h>
#include <unistd.h>

using namespace spanwright;
using test::processorSeconds;

namespace {

/// A logger's file: ISO time with milliseconds, then numbers with 6, 7 and 4 decimals.
std::string loggerFile(const std::string& folder, std::size_t rows) {
    std::string text = "time,reference,indication,nominal\n";
    std::uint64_t state = 1;
    const auto next = [&](std::uint64_t below) { return (state = state * 6364136223846793005u + 1442695040888963407u) / 16 % below; };
    char line[128];
    for (std::size_t i = 0; i < rows; ++i) {
        const std::int64_t at = 1'772'352'930'000 + static_cast<std::int64_t>(i) * 250;
        std::snprintf(line, sizeof line, "%s,%.6f,%.7f,%.4f\n", isoTime(at % 1000 == 0 ? at + 1 : at).c_str(),
                      static_cast<double>(next(10'000'000)) * 1e-6, 4 + static_cast<double>(next(160'000'000)) * 1e-7,
                      static_cast<double>(next(11)));
        text += line;
    }
    const std::string path = folder + "/logger.csv";
    std::FILE* file = std::fopen(path.c_str(), "w");
    if (file == nullptr || std::fwrite(text.data(), 1, text.size(), file) != text.size() || std::fclose(file) != 0)
        std::exit(1);
    return path;
}

struct Doubles {
    std::vector<double> columns[3];
};

/// The reference: the mapped file, each number by from_chars, the time passed over.
Doubles readMapped(const std::string& path, std::size_t rows) {
    const int file = ::open(path.c_str(), O_RDONLY);
    const auto size = static_cast<std::size_t>(::lseek(file, 0, SEEK_END));
    void* const mapped = ::mmap(nullptr, size, PROT_READ, MAP_PRIVATE, file, 0);
    const char* p = static_cast<const char*>(mapped);
    const char* const end = p + size;
    Doubles read;
    for (auto& column : read.columns)
        column.reserve(rows);
    p = static_cast<const char*>(std::memchr(p, '\n', size)) + 1;
    while (p < end) {
        p = static_cast<const char*>(std::memchr(p, ',', static_cast<std::size_t>(end - p))) + 1;
        for (auto& column : read.columns) {
            double value = 0;
            p = std::from_chars(p, end, value).ptr + 1;
            column.push_back(value);
        }
    }
    ::munmap(mapped, size);
    ::close(file);
    return read;
}

std::size_t import(const std::string& path, const ImportMapping& mapping) {
    const auto file = FileBytes::read(path);
    const auto rules = guessRules(file->bytes());
    Progress progress;
    const auto imported = readReadings(file->bytes(), *rules, mapping, progress);
    if (!imported || imported->issues.count != 0)
        std::exit(1);
    return imported->block.n;
}

} // namespace

int main() {
    constexpr std::size_t rows = 1'000'000;
    const QTemporaryDir folder;
    const std::string path = loggerFile(folder.path().toStdString(), rows);
    ImportMapping numbers;
    numbers.reference = 1;
    numbers.indication = 2;
    numbers.setPoint = 3;
    ImportMapping all = numbers;
    all.time = 0;

    std::size_t read = 0;
    const double reference = processorSeconds([&] { read += readMapped(path, rows).columns[2].size(); }, 5);
    const double three = processorSeconds([&] { read += import(path, numbers); }, 5);
    const double four = processorSeconds([&] { read += import(path, all); }, 5);
    const double guess = processorSeconds([&] { read += guessRules(FileBytes::read(path)->bytes())->columns.size(); }, 5);
    std::printf("import of %zu rows (%zu read): mmap + from_chars %.3f s\n", rows, read, reference);
    std::printf("  three columns of numbers, guess included: %.3f s, ratio %.2f (aim 3)\n", three, three / reference);
    std::printf("  and the times:                            %.3f s, ratio %.2f\n", four, four / reference);
    std::printf("  reading the file and guessing alone:      %.3f s, ratio %.2f\n", guess, guess / reference);
    return three / reference <= 3 ? 0 : 1;
}
