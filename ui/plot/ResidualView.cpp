// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/ResidualView.h"

#include <QCoreApplication>

#include <boost/math/distributions/normal.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

namespace spanwright {

namespace {

constexpr double none = std::numeric_limits<double>::quiet_NaN();

QString tr(const char* text) {
    return QCoreApplication::translate("ResidualView", text);
}

ResidualAbscissa againstTime(const PlotSubject& subject) {
    ResidualAbscissa found;
    const auto& times = subject.readings->enteredAt();
    std::int64_t first = 0, last = 0;
    std::vector<std::int64_t> at;
    for (const ReadingId id : subject.phase->rows.ids) {
        const std::size_t row = subject.readings->indexOf(id);
        at.push_back(row < times.size() ? times[row] : 0);
        if (at.back() != 0) {
            first = first == 0 ? at.back() : std::min(first, at.back());
            last = std::max(last, at.back());
        }
    }
    if (first == 0 || first == last) {
        found.emptyText = tr("The readings carry no times.");
        return found;
    }
    const double span = static_cast<double>(last - first);
    const auto [scale, unit] = span < 600e3 ? std::pair(1e3, tr("s")) : span < 4 * 3600e3 ? std::pair(60e3, tr("min"))
                             : span < 3 * 86400e3 ? std::pair(3600e3, tr("h")) : std::pair(86400e3, tr("d"));
    for (const std::int64_t t : at)
        found.x.push_back(t == 0 ? none : static_cast<double>(t - first) / scale);
    found.unit = unit;
    return found;
}

ResidualAbscissa againstRun(const PlotSubject& subject) {
    ResidualAbscissa found;
    int most = 0;
    for (const std::int32_t run : subject.phase->rows.runs) {
        found.x.push_back(run > 0 ? run : none);
        most = std::max(most, static_cast<int>(run));
    }
    if (most == 0)
        found.emptyText = tr("The readings carry no run numbers.");
    for (int run = 1; run <= most && most <= 30; ++run)
        found.names.push_back(tr("run %1").arg(run));
    return found;
}

} // namespace

QString residualViewText(ResidualView view, const PlotSubject& subject) {
    switch (view) {
    case ResidualView::Reference:
        return subject.fit == FitDirection::Indication ? tr("against reference") : tr("against indication");
    case ResidualView::Fitted: return tr("against fitted value");
    case ResidualView::Order: return tr("in order of taking");
    case ResidualView::Time: return tr("against time");
    case ResidualView::Run: return tr("by run");
    case ResidualView::Normal: break;
    }
    return tr("normal probability");
}

ResidualAbscissa residualAbscissa(ResidualView view, const PlotSubject& subject) {
    ResidualAbscissa found;
    const RowFigures& rows = subject.phase->rows;
    switch (view) {
    case ResidualView::Reference:
        found.x = subject.x();
        found.unit = QString::fromStdString(subject.abscissa().unit);
        break;
    case ResidualView::Fitted:
        found.x = rows.fitted;
        found.unit = QString::fromStdString(subject.ordinate().unit);
        break;
    case ResidualView::Order:
        found.x.resize(rows.size());
        std::iota(found.x.begin(), found.x.end(), 1.0);
        break;
    case ResidualView::Time: return againstTime(subject);
    case ResidualView::Run: return againstRun(subject);
    case ResidualView::Normal:
        found.x = normalScores(rows.residual, rows.excluded);
        found.unit = tr("normal score");
        break;
    }
    return found;
}

std::vector<double> normalScores(const std::vector<double>& values, const std::vector<std::uint8_t>& leftOut) {
    std::vector<std::size_t> order;
    for (std::size_t i = 0; i < values.size(); ++i)
        if (std::isfinite(values[i]) && !leftOut[i])
            order.push_back(i);
    std::sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return values[a] < values[b] || (values[a] == values[b] && a < b); });
    std::vector<double> scores(values.size(), none);
    const boost::math::normal standard;
    const double n = static_cast<double>(order.size());
    for (std::size_t i = 0; i < order.size(); ++i)
        scores[order[i]] = boost::math::quantile(standard, (static_cast<double>(i + 1) - 0.375) / (n + 0.25));
    return scores;
}

} // namespace spanwright
