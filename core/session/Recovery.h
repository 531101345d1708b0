// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <memory>

namespace spanwright {

/// Keeps the newest state of a record on disk while it has changes that are not saved, so that nothing entered is lost when the
/// program or the machine stops. Beside the session ("name.spanwright.recovery"), or in the folder given for a session that has
/// no file yet or whose folder cannot be written.
///
/// The file is a log: first the whole record, then what each keep() changed (parts, readings, exclusions, journal), each entry
/// with its length and digest, so that a torn last entry is left out when it is read back. When the log has grown beyond the
/// record it starts anew.
class Recovery {
  public:
    /// `sessionPath` may be empty. `folder` is the user's data folder for this program.
    Recovery(std::string sessionPath, std::string folder);
    ~Recovery(); ///< leaves the file, as a crash would; discard() removes it
    Recovery(Recovery&&) noexcept;
    Recovery& operator=(Recovery&&) noexcept;

    /// Appends what changed since the last call and flushes it to disk. Errors: FileNotWritable, FileWriteFailed.
    Result<void> keep(const Record& record);
    /// Removes the file: saved, or closed without saving on purpose. keep() may begin a new one.
    void discard();
    /// The file that is written; empty until the first keep().
    [[nodiscard]] std::string path() const;

    /// A recovery file left behind by a program that no longer runs.
    struct Found {
        std::string path;
        std::string sessionPath; ///< empty for a session that had no file
        std::int64_t keptAt = 0; ///< ms since 1970-01-01 UTC of its last entry
        std::size_t readings = 0;
    };
    /// In `folder`, and beside each of `sessionPaths` (the recent files).
    static std::vector<Found> find(const std::string& folder, const std::vector<std::string>& sessionPaths);
    /// The record up to the last whole entry.
    static Result<Record> restore(const std::string& recoveryPath);
    static void remove(const std::string& recoveryPath);

  private:
    class Private;
    std::unique_ptr<Private> d;
};

} // namespace spanwright
