// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/TextTable.h"

#include <algorithm>

namespace spanwright {

QString TextTable::text() const {
    if (empty())
        return {};
    constexpr qsizetype indent = 2;
    std::vector<qsizetype> width;
    for (std::size_t r = 0; r < rows_.size(); ++r)
        for (qsizetype c = 0; c < rows_[r].size(); ++c) {
            if (static_cast<std::size_t>(c) == width.size())
                width.push_back(0);
            const qsizetype own = rows_[r][c].size() + (r > 0 && c == 0 ? indent : 0);
            width[static_cast<std::size_t>(c)] = std::max(width[static_cast<std::size_t>(c)], own);
        }
    QString all;
    for (std::size_t r = 0; r < rows_.size(); ++r) {
        QString line;
        for (qsizetype c = 0; c < rows_[r].size(); ++c) {
            const qsizetype space = width[static_cast<std::size_t>(c)];
            if (c == 0)
                line = (QString(r > 0 ? indent : 0, QLatin1Char(' ')) + rows_[r][c]).leftJustified(space);
            else
                line += QStringLiteral("  ") + rows_[r][c].rightJustified(space);
        }
        while (line.endsWith(QLatin1Char(' ')))
            line.chop(1);
        all += line + QLatin1Char('\n');
    }
    return all;
}

} // namespace spanwright
