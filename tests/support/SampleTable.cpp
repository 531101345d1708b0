// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleTable.h"

#include "tests/support/Paths.h"
#include "tests/support/SampleLaboratory.h"

#include <QFile>

namespace spanwright::test {

Record sampleTable(const char* name) {
    QFile file(QString::fromStdString(sourceDir()) + QStringLiteral("/sample-data/") + QLatin1String(name));
    if (!file.open(QIODevice::ReadOnly))
        qFatal("no %s", name);
    const QList<QByteArray> heads = file.readLine().trimmed().split(',');
    file.readLine(); // units
    Record record;
    while (!file.atEnd()) {
        const QList<QByteArray> cells = file.readLine().trimmed().split(',');
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.reference = number(cells[0].constData());
        reading.indication = number(cells[1].constData());
        for (qsizetype i = 2; i < cells.size(); ++i) {
            if (heads[i] == "set point")
                reading.setPoint = number(cells[i].constData());
            if (heads[i] == "run")
                reading.run = cells[i].toInt();
            if (heads[i] == "direction")
                reading.direction = cells[i] == "rising" ? Direction::Rising : Direction::Falling;
        }
        record.readings.edit().append(reading);
    }
    return record;
}

Record sampleTableAtReferences(const char* name) {
    Record record = sampleTable(name);
    for (std::size_t row = 0; row < record.readings->size(); ++row)
        record.readings.edit().setNumber(row, NumberColumn::SetPoint, record.readings->reference().at(row));
    return record;
}

} // namespace spanwright::test
