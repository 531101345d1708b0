// SPDX-License-Identifier: GPL-3.0-or-later
// Speed of writing and reading a session with 10^6 readings: times as ratios against QJsonDocument on the same bytes, in the same
// run; and of keeping one changed reading of it in the recovery file.
#include "core/session/Recovery.h"
#include "core/session/SessionFile.h"
#include "tests/bench/Stopwatch.h"

#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>
#include <QTemporaryDir>

#include <algorithm>
#include <ctime>
#include <cstdio>
#include <cstdlib>
#include <functional>

using namespace spanwright;
using test::processorSeconds;

namespace {

Record manyReadings(std::size_t n) {
    std::uint64_t state = 1;
    const auto next = [&](std::uint64_t below) {
        return static_cast<std::int64_t>((state = state * 6364136223846793005u + 1442695040888963407u) / 16 % below);
    };
    ReadingColumns::Block block;
    block.n = n;
    for (std::size_t i = 0; i < n; ++i) {
        block.setPoint.push_back(Decimal{static_cast<std::int64_t>(i % 11) * 10, 1, {}});
        block.reference.push_back(Decimal{next(10'000'000), 6, {}});
        block.indication.push_back(Decimal{40'000'000 + next(160'000'000), 7, {}});
        block.uReference.push_back(Decimal{next(20'000), 4, {}});
    }
    Record record;
    record.readings.edit().appendBlock(std::move(block), 1);
    record.nextReadingId = static_cast<ReadingId>(n) + 1;
    return record;
}

constexpr std::pair<NumberColumn, int> columnPlaces[] = {
    {NumberColumn::SetPoint, 1}, {NumberColumn::Reference, 2}, {NumberColumn::Indication, 3}, {NumberColumn::UReference, 4}};

/// What opening means with a document: parsed, then every number as typed into its column.
std::size_t openByDocument(const QByteArray& bytes) {
    const QJsonDocument document = QJsonDocument::fromJson(bytes);
    DecimalColumn columns[4];
    for (const QJsonValue& row : document.object()["readings"].toObject()["rows"].toArray()) {
        const QJsonArray cells = row.toArray();
        for (const auto& [column, place] : columnPlaces)
            columns[place - 1].push_back(*Decimal::parse(cells[place].toString().toStdString()));
    }
    return columns[0].size();
}

/// What saving means with a document: built from the columns, then written.
std::size_t saveByDocument(const Record& record) {
    QJsonArray rows;
    const ReadingColumns& readings = *record.readings;
    for (std::size_t i = 0; i < readings.size(); ++i) {
        QJsonArray cells{static_cast<qint64>(readings.ids()[i])};
        for (const auto& [column, place] : columnPlaces)
            cells << QString::fromStdString(readings.number(column).at(i)->text());
        rows << cells;
    }
    return static_cast<std::size_t>(QJsonDocument(QJsonObject{{"readings", QJsonObject{{"rows", rows}}}}).toJson().size());
}

} // namespace

int main() {
    constexpr std::size_t n = 1'000'000;
    Record record = manyReadings(n);
    const std::string bytes = writeSession(record, {});
    const QByteArray same(bytes.data(), static_cast<qsizetype>(bytes.size()));
    std::size_t sum = 0;

    const double parse = processorSeconds([&] { sum += QJsonDocument::fromJson(same).isObject() ? 1 : 0; }, 1);
    const double otherRead = processorSeconds([&] { sum += openByDocument(same); }, 1);
    const double otherWrite = processorSeconds([&] { sum += saveByDocument(record); }, 1);
    const double read = processorSeconds([&] { sum += readSession(bytes)->record.readings->size(); }, 3);
    const double write = processorSeconds([&] { sum += writeSession(record, {}).size(); }, 3);
    std::printf("session of %zu readings, %.1f MB (%zu)\n", n, static_cast<double>(bytes.size()) * 1e-6, sum);
    std::printf("  open: QJsonDocument to columns %.2f s (parsing alone %.2f s); here, seal verified, %.2f s: %.1f times faster (aim 4; "
                "than parsing alone %.1f)\n",
                otherRead, parse, read, otherRead / read, parse / read);
    std::printf("  save: QJsonDocument from columns %.2f s; here, sealed, %.2f s: %.1f times faster (aim 4)\n", otherWrite, write,
                otherWrite / write);

    const QTemporaryDir folder;
    const std::string path = folder.filePath("many.spanwright").toStdString();
    const double save = processorSeconds([&] { sum += SessionFile::saveAs(path, record, {}).ok() ? 1 : 0; }, 3);
    const double open = processorSeconds([&] { sum += SessionFile::open(path)->session.record.readings->size(); }, 3);
    std::printf("  save to disk, flushed: %.2f s; open from disk: %.2f s\n", save, open);

    Recovery recovery(path, folder.filePath("data").toStdString());
    const double first = processorSeconds([&] { sum += recovery.keep(record).ok() ? 1 : 0; }, 1);
    std::size_t row = 0;
    const double next = processorSeconds(
        [&] {
            row += 1000;
            record.readings.edit().setNumber(row, NumberColumn::Indication, Decimal{static_cast<std::int64_t>(row), 7, {}});
            sum += recovery.keep(record).ok() ? 1 : 0;
        },
        9);
    std::printf("  recovery: first %.2f s, then one changed reading %.3f s (aim: within 1 s)\n", first, next);
    if (sum == 0 || otherRead / read < 4 || otherWrite / write < 4 || next > 1)
        return 1;
    return 0;
}
