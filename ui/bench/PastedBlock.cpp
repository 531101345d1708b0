// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/PastedBlock.h"

#include "ui/look/TypedNumber.h"

#include <QStringList>

#include <algorithm>

namespace spanwright {

PastedBlock readPasted(const QString& text) {
    PastedBlock block;
    QString all = text;
    all.replace(QStringLiteral("\r\n"), QStringLiteral("\n")).replace(QLatin1Char('\r'), QLatin1Char('\n'));
    QStringList lines = all.split(QLatin1Char('\n'));
    while (!lines.isEmpty() && lines.back().trimmed().isEmpty())
        lines.removeLast();
    const QChar parting = all.contains(QLatin1Char('\t')) || !all.contains(QLatin1Char(';')) ? QLatin1Char('\t') : QLatin1Char(';');
    qsizetype width = 0;
    for (int row = 0; row < lines.size(); ++row) {
        const QStringList cells = lines[row].split(parting);
        if (row == 0)
            width = cells.size();
        if (cells.size() != width)
            block.refused.push_back({row + 1, static_cast<int>(std::min(cells.size(), width)) + 1,
                                     Error(ErrorCode::RaggedRow, {{"line", std::to_string(row + 1)}, {"expected", std::to_string(width)}, {"cells", std::to_string(cells.size())}})});
        std::vector<Decimal> numbers;
        for (int column = 0; column < cells.size() && column < width; ++column) {
            Result<Decimal> number = parseTyped(cells[column]);
            if (number)
                numbers.push_back(std::move(number).value());
            else
                block.refused.push_back({row + 1, column + 1, number.error()});
        }
        block.rows.push_back(std::move(numbers));
    }
    if (!block.refused.empty())
        block.rows.clear();
    return block;
}

} // namespace spanwright
