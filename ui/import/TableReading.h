// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/exchange/FileBytes.h"
#include "core/exchange/ReadingImport.h"

#include <QByteArray>
#include <QObject>

#include <functional>
#include <memory>

class QTimer;

namespace spanwright {

/// A table of text: bytes that are there, or a file that is still to be read.
struct TableSource {
    QByteArray bytes;
    QString path;                          ///< read when `bytes` is empty
    std::shared_ptr<const FileBytes> file; ///< once it was read

    [[nodiscard]] std::string_view view() const {
        return file ? file->bytes() : std::string_view(bytes.constData(), static_cast<std::size_t>(bytes.size()));
    }
    /// Whether it is so large that it is read beside the window.
    [[nodiscard]] bool large() const;
};

/// How a table was understood, with its first rows; or why it was not.
struct TableLook {
    std::shared_ptr<const FileBytes> file;
    Result<CsvRules> rules = Error(ErrorCode::NoDataRows);
    std::vector<PreviewRow> rows;
};

/// Looks at a table and reads it, a large one in another thread. The newest request wins; the one before is cancelled.
class TableReading : public QObject {
    Q_OBJECT

  public:
    static constexpr std::size_t PreviewCount = 12;

    explicit TableReading(TableSource source, QObject* parent = nullptr);
    ~TableReading() override;

    [[nodiscard]] const TableSource& source() const { return source_; }
    [[nodiscard]] bool busy() const { return progress_ != nullptr; }
    void look(const CsvWishes& wishes);
    void read(const CsvRules& rules, const ImportMapping& mapping);
    void cancel();

  signals:
    /// What was asked for is under way; `share` of it is done.
    void progressed(double share);
    void looked(const TableLook& look);
    void wasRead(std::shared_ptr<Result<ImportedReadings>> readings);

  private:
    template <class T>
    void run(const std::function<T(Progress&)>& work, const std::function<void(const T&)>& done);

    TableSource source_;
    std::shared_ptr<Progress> progress_; ///< of the newest request; null when nothing is under way
    QTimer* looks_;
};

} // namespace spanwright
