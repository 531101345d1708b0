// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/session/SessionJson.h"

#include <memory>

namespace spanwright {

/// A session file that is open: holds its lock, and knows what was on disk when it was last read or written.
class SessionFile {
  public:
    SessionFile(SessionFile&&) noexcept;
    SessionFile& operator=(SessionFile&&) noexcept;
    ~SessionFile();

    struct Opened;
    /// Reads and locks. When another program holds the lock, `heldBy` says who, and the session is only to be looked at; when the
    /// folder cannot be written there is no lock, and saving will say why. Errors: as FileBytes::read() and readSession(), with
    /// fact file.
    static Result<Opened> open(const std::string& path);

    /// Writes a session to a path that no SessionFile holds yet (save as; where one does, use save()). Whether an existing file
    /// may be replaced was asked before. Errors: FileInUse (facts: holder), FileIsDirectory, FileNotWritable, FileWriteFailed
    /// (facts: reason); all with fact file.
    static Result<SessionFile> saveAs(const std::string& path, const Record& record, const StoredResults& results);

    /// Writes over the file that was opened, whole or not at all. Errors: FileChangedOnDisk; FileInUse, while another program
    /// holds it; NewerLayout, when it was written by a newer program; FileNotWritable, FileWriteFailed. The old file is then as
    /// it was.
    Result<void> save(const Record& record, const StoredResults& results);

    [[nodiscard]] const std::string& path() const;
    /// Whether the file on disk is not the one that was last read or written here.
    [[nodiscard]] bool changedOnDisk() const;

  private:
    class Private;
    explicit SessionFile(std::unique_ptr<Private> p);
    std::unique_ptr<Private> d;
};

struct SessionFile::Opened {
    SessionFile file;
    Session session;
    std::string heldBy; ///< program and host that hold the lock; empty when this one does
};

/// Reads without locking, for commands that only look. Errors: as open().
Result<Session> readSessionFile(const std::string& path);

} // namespace spanwright
