// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/import/TableReading.h"

#include <QFileInfo>
#include <QFutureWatcher>
#include <QTimer>
#include <QtConcurrent/QtConcurrentRun>

namespace spanwright {

namespace {

constexpr qint64 Large = 1 << 20; // bytes: below, reading takes less than a hundredth of a second
constexpr int LookEvery = 50;     // ms

TableLook lookAt(const TableSource& source, const CsvWishes& wishes) {
    TableLook look;
    TableSource known = source;
    if (!known.path.isEmpty() && !known.file) {
        Result<FileBytes> file = FileBytes::read(known.path.toStdString());
        if (!file) {
            look.rules = file.error();
            return look;
        }
        known.file = std::make_shared<const FileBytes>(std::move(file).value());
    }
    look.file = known.file;
    look.rules = guessRules(known.view(), wishes);
    if (look.rules)
        if (Result<std::vector<PreviewRow>> rows = previewRows(known.view(), *look.rules, TableReading::PreviewCount))
            look.rows = std::move(rows).value();
    return look;
}

} // namespace

bool TableSource::large() const {
    return (path.isEmpty() ? bytes.size() : QFileInfo(path).size()) > Large;
}

TableReading::TableReading(TableSource source, QObject* parent) : QObject(parent), source_(std::move(source)), looks_(new QTimer(this)) {
    looks_->setInterval(LookEvery);
    connect(looks_, &QTimer::timeout, this, [this] {
        if (progress_)
            emit progressed(progress_->share());
    });
}

/// The threads hold what they read by themselves, so nobody waits for them.
TableReading::~TableReading() {
    cancel();
}

void TableReading::cancel() {
    if (progress_)
        progress_->cancel();
    progress_.reset();
    looks_->stop();
}

template <class T>
void TableReading::run(const std::function<T(Progress&)>& work, const std::function<void(const T&)>& done) {
    cancel();
    const auto progress = std::make_shared<Progress>();
    if (!source_.large()) {
        done(work(*progress));
        return;
    }
    progress_ = progress;
    looks_->start();
    emit progressed(0);
    auto* watcher = new QFutureWatcher<T>(this);
    connect(watcher, &QFutureWatcherBase::finished, this, [this, watcher, progress, done] {
        watcher->deleteLater();
        if (progress != progress_)
            return;
        progress_.reset();
        looks_->stop();
        done(watcher->result());
    });
    watcher->setFuture(QtConcurrent::run([work, progress] { return work(*progress); }));
}

void TableReading::look(const CsvWishes& wishes) {
    run<std::shared_ptr<TableLook>>([source = source_, wishes](Progress&) { return std::make_shared<TableLook>(lookAt(source, wishes)); },
                                    [this](const std::shared_ptr<TableLook>& look) {
                                        source_.file = look->file;
                                        emit looked(*look);
                                    });
}

void TableReading::read(const CsvRules& rules, const ImportMapping& mapping) {
    using Readings = std::shared_ptr<Result<ImportedReadings>>;
    run<Readings>(
        [source = source_, rules, mapping](Progress& progress) {
            return std::make_shared<Result<ImportedReadings>>(readReadings(source.view(), rules, mapping, progress));
        },
        [this](const Readings& readings) { emit wasRead(readings); });
}

} // namespace spanwright
