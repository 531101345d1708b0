// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/WholeFile.h"

#include <QSaveFile>

#include <filesystem>

namespace spanwright {

Result<void> mayBeWritten(const std::string& path, const std::vector<std::string>& inputs, Replacing replacing) {
    std::error_code unknown;
    for (const std::string& input : inputs)
        if (std::filesystem::equivalent(path, input, unknown))
            return Error(ErrorCode::FileIsInput, {{"file", path}});
    const bool holdsSomething = std::filesystem::is_regular_file(path, unknown) && std::filesystem::file_size(path, unknown) > 0;
    if (holdsSomething && replacing == Replacing::Refused)
        return Error(ErrorCode::FileExists, {{"file", path}});
    return {};
}

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
