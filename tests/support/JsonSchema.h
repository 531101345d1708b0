// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QJsonObject>
#include <QStringList>

namespace spanwright::test {

/// Where the value does not hold the schema, as "pointer: keyword". Knows the keywords type, const, enum, pattern, required,
/// properties, additionalProperties (as a schema), items, minimum and $ref into $defs (JSON Schema 2020-12).
QStringList schemaBreaches(const QJsonObject& schema, const QJsonValue& value);

/// Keys of objects in the value of which the schema says nothing, as pointers.
QStringList undescribedKeys(const QJsonObject& schema, const QJsonValue& value);

} // namespace spanwright::test
