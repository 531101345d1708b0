// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/JsonSchema.h"

#include <QJsonArray>
#include <QRegularExpression>

#include <cmath>

namespace spanwright::test {

namespace {

class Walk {
  public:
    explicit Walk(const QJsonObject& root) : root_(root) {}

    void check(QJsonObject schema, const QJsonValue& value, const QString& pointer) {
        if (const QString reference = schema["$ref"].toString(); !reference.isEmpty())
            schema = root_["$defs"].toObject()[reference.section('/', -1)].toObject();
        const auto breach = [&](const char* keyword) { breaches << pointer + ": " + keyword; };
        if (schema.contains("type") && !hasType(schema["type"], value))
            breach("type");
        if (schema.contains("const") && schema["const"] != value)
            breach("const");
        if (schema.contains("enum") && !schema["enum"].toArray().contains(value))
            breach("enum");
        if (schema.contains("minimum") && value.isDouble() && value.toDouble() < schema["minimum"].toDouble())
            breach("minimum");
        if (schema.contains("pattern") && value.isString() &&
            !QRegularExpression(schema["pattern"].toString()).match(value.toString()).hasMatch())
            breach("pattern");
        if (value.isObject())
            checkObject(schema, value.toObject(), pointer);
        if (value.isArray() && schema.contains("items")) {
            const QJsonArray items = value.toArray();
            for (qsizetype i = 0; i < items.size(); ++i)
                check(schema["items"].toObject(), items[i], pointer + "/" + QString::number(i));
        }
    }

    QStringList breaches;
    QStringList undescribed;

  private:
    void checkObject(const QJsonObject& schema, const QJsonObject& object, const QString& pointer) {
        for (const QJsonValue& required : schema["required"].toArray())
            if (!object.contains(required.toString()))
                breaches << pointer + "/" + required.toString() + ": required";
        const QJsonObject properties = schema["properties"].toObject();
        for (auto member = object.begin(); member != object.end(); ++member) {
            const QString below = pointer + "/" + member.key();
            if (properties.contains(member.key()))
                check(properties[member.key()].toObject(), member.value(), below);
            else if (schema["additionalProperties"].isObject())
                check(schema["additionalProperties"].toObject(), member.value(), below);
            else
                undescribed << below;
        }
    }

    static bool hasType(const QJsonValue& type, const QJsonValue& value) {
        if (type.isArray()) {
            for (const QJsonValue& one : type.toArray())
                if (hasType(one, value))
                    return true;
            return false;
        }
        const QString name = type.toString();
        return (name == "object" && value.isObject()) || (name == "array" && value.isArray()) ||
               (name == "string" && value.isString()) || (name == "boolean" && value.isBool()) ||
               (name == "null" && value.isNull()) || (name == "number" && value.isDouble()) ||
               (name == "integer" && value.isDouble() && value.toDouble() == std::floor(value.toDouble()));
    }

    QJsonObject root_;
};

} // namespace

QStringList schemaBreaches(const QJsonObject& schema, const QJsonValue& value) {
    Walk walk(schema);
    walk.check(schema, value, {});
    return walk.breaches;
}

QStringList undescribedKeys(const QJsonObject& schema, const QJsonValue& value) {
    Walk walk(schema);
    walk.check(schema, value, {});
    return walk.undescribed;
}

} // namespace spanwright::test
