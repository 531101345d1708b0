// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/TrialEvaluation.h"

#include "core/evaluate/evaluate.h"

#include <QFutureWatcher>
#include <QtConcurrent/QtConcurrentRun>

namespace spanwright {

namespace {

using Snapshot = std::shared_ptr<const Evaluation>;

} // namespace

TrialEvaluation::TrialEvaluation(QObject* parent) : QObject(parent) {}

TrialEvaluation::~TrialEvaluation() {
    stop();
}

void TrialEvaluation::stop() {
    if (progress_)
        progress_->cancel();
    progress_.reset();
}

void TrialEvaluation::start(Record record) {
    stop();
    progress_ = std::make_shared<Progress>();
    auto* watcher = new QFutureWatcher<Snapshot>(this);
    connect(watcher, &QFutureWatcher<Snapshot>::finished, this, [this, watcher, asked = progress_] {
        watcher->deleteLater();
        if (asked == progress_ && watcher->result())
            emit ready(watcher->result());
    });
    watcher->setFuture(QtConcurrent::run([record = std::move(record), progress = progress_]() -> Snapshot {
        Result<Evaluation> result = evaluate(record, *progress);
        return result ? std::make_shared<const Evaluation>(std::move(result).value()) : nullptr;
    }));
}

} // namespace spanwright
