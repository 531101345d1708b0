// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/PublishedSet.h"

#include "tests/support/Paths.h"

#include <QFile>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>

#include <algorithm>
#include <cmath>

namespace spanwright::test {

namespace {

std::map<std::string, std::string> stringsOf(const QJsonObject& object) {
    std::map<std::string, std::string> result;
    for (auto it = object.begin(); it != object.end(); ++it)
        result[it.key().toStdString()] = it.value().toString().toStdString();
    return result;
}

} // namespace

double PublishedSet::recomputedNumber(const std::string& name) const {
    const auto found = recomputed.find(name);
    return found == recomputed.end() ? std::nan("") : std::stod(found->second);
}

PublishedSet publishedSet(const QString& name) {
    QFile file(QString::fromStdString(sourceDir()) + "/tests/published/" + name + ".json");
    PublishedSet set;
    if (!file.open(QIODevice::ReadOnly))
        return set;
    const QJsonObject root = QJsonDocument::fromJson(file.readAll()).object();
    set.source = root["source"].toString().toStdString();
    for (const QJsonValue& row : root["rows"].toArray()) {
        std::vector<std::string> cells;
        for (const QJsonValue& cell : row.toArray())
            cells.push_back(cell.toString().toStdString());
        set.rows.push_back(std::move(cells));
    }
    set.published = stringsOf(root["published"].toObject());
    set.recomputed = stringsOf(root["recomputed"].toObject());
    return set;
}

double digitsAgreed(double got, double expected) {
    if (got == expected)
        return 16;
    const double difference = std::fabs(got - expected);
    return std::min(16.0, -std::log10(expected == 0 ? difference : difference / std::fabs(expected)));
}

bool agreesAsPrinted(double got, const std::string& printed) {
    const std::string mantissa = printed.substr(0, printed.find_first_of("eE"));
    const auto point = mantissa.find('.');
    const auto decimals = point == std::string::npos ? 0 : static_cast<int>(mantissa.size() - point) - 1;
    const auto e = printed.find_first_of("eE");
    const int exponent = e == std::string::npos ? 0 : std::stoi(printed.substr(e + 1));
    return std::fabs(got - std::stod(printed)) <= 0.5 * std::pow(10.0, exponent - decimals) * (1 + 1e-9);
}

} // namespace spanwright::test
