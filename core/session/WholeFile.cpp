// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/WholeFile.h"

#include <QSaveFile>

namespace spanwright {

Result<void> writeWhole(const std::string& path, const std::string& bytes) {
    QSaveFile file(QString::fromStdString(path));
    const auto failed = [&](ErrorCode code) { return Error(code, {{"file", path}, {"reason", file.errorString().toStdString()}}); };
    if (!file.open(QIODevice::WriteOnly))
        return failed(ErrorCode::FileNotWritable);
    if (file.write(bytes.data(), static_cast<qint64>(bytes.size())) != static_cast<qint64>(bytes.size()) || !file.commit())
        return failed(ErrorCode::FileWriteFailed);
    return {};
}

} // namespace spanwright
