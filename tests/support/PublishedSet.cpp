// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/PublishedSet.h"

#include "tests/support/Paths.h"

#include <QFile>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>

#include <algorithm>
#include <cmath>
#include <optional>

namespace spanwright::test {

namespace {

std::map<std::string, std::string> stringsOf(const QJsonObject& object) {
    std::map<std::string, std::string> result;
    for (auto it = object.begin(); it != object.end(); ++it)
        result[it.key().toStdString()] = it.value().toString().toStdString();
    return result;
}

std::vector<std::string> listOf(const QJsonArray& array) {
    std::vector<std::string> list;
    for (const QJsonValue& value : array)
        list.push_back(value.toString().toStdString());
    return list;
}

std::optional<Decimal> cell(const std::vector<std::string>& column, std::size_t row) {
    if (column.empty())
        return std::nullopt;
    const auto value = Decimal::parse(column[row]);
    return value ? std::optional<Decimal>(*value) : std::nullopt;
}

} // namespace

std::vector<std::string> PublishedSet::column(const std::string& name) const {
    std::vector<std::string> values;
    if (name.empty())
        return values;
    const auto found = std::find(columns.begin(), columns.end(), name);
    if (found == columns.end())
        qFatal("%s has no column %s", id.c_str(), name.c_str());
    for (const auto& row : rows)
        values.push_back(row[static_cast<std::size_t>(found - columns.begin())]);
    return values;
}

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
    set.id = name.toStdString();
    set.columns = listOf(root["columns"].toArray());
    for (const QJsonValue& row : root["rows"].toArray())
        set.rows.push_back(listOf(row.toArray()));
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

double digitsAgreed(double got, const std::string& wanted) {
    const auto want = Decimal::parse(wanted);
    if (!want || !std::isfinite(got))
        return 0;
    const DoubleDouble value = want->toDoubleDouble();
    const double difference = std::fabs(toDouble(value - got));
    const double size = std::fabs(toDouble(value));
    if (difference == 0 || (size == 0 && difference < 1e-12))
        return 15;
    return std::clamp(-std::log10(size == 0 ? difference : difference / size), 0.0, 15.0);
}

bool agreesAsPrinted(double got, const std::string& printed) {
    const std::string mantissa = printed.substr(0, printed.find_first_of("eE"));
    const auto point = mantissa.find('.');
    const auto decimals = point == std::string::npos ? 0 : static_cast<int>(mantissa.size() - point) - 1;
    const auto e = printed.find_first_of("eE");
    const int exponent = e == std::string::npos ? 0 : std::stoi(printed.substr(e + 1));
    return std::fabs(got - std::stod(printed)) <= 0.5 * std::pow(10.0, exponent - decimals) * (1 + 1e-9);
}

Record recordOf(const PublishedSet& set, const ReadingsFrom& from) {
    const auto reference = set.column(from.reference), indication = set.column(from.indication);
    const auto setPoint = set.column(from.setPoint), uReference = set.column(from.uReference), uIndication = set.column(from.uIndication);
    Record record;
    ReadingColumns& readings = record.readings.edit();
    for (std::size_t i = 0; i < set.rows.size(); ++i) {
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.setPoint = cell(setPoint, i);
        reading.reference = cell(reference, i);
        reading.indication = cell(indication, i);
        reading.uReference = cell(uReference, i);
        reading.uIndication = cell(uIndication, i);
        readings.append(reading);
    }
    return record;
}

Record recordOf(const std::vector<std::string>& reference, const std::vector<std::string>& indication) {
    PublishedSet set;
    set.id = "typed in the test";
    set.columns = reference.empty() ? std::vector<std::string>{"y"} : std::vector<std::string>{"x", "y"};
    for (std::size_t i = 0; i < indication.size(); ++i)
        set.rows.push_back(reference.empty() ? std::vector<std::string>{indication[i]}
                                             : std::vector<std::string>{reference[i], indication[i]});
    return recordOf(set, {.reference = reference.empty() ? "" : "x", .indication = "y", .setPoint = {}, .uReference = {}, .uIndication = {}});
}

} // namespace spanwright::test
