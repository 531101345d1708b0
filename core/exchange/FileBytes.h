// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"

#include <cstddef>
#include <memory>
#include <string>
#include <string_view>

namespace spanwright {

/// A file as it was read, whole. Read rather than mapped, so that a file that shrinks meanwhile cannot stop the program.
class FileBytes {
  public:
    /// Errors: FileMissing, FileIsDirectory, FileNotReadable (no permission), FileReadFailed, FileEmpty. Facts: file, and the
    /// system's reason where there is one.
    static Result<FileBytes> read(const std::string& path);

    [[nodiscard]] std::string_view bytes() const { return {data_.get(), size_}; }

  private:
    struct Release {
        void operator()(char* data) const;
    };
    using Room = std::unique_ptr<char[], Release>;
    static Room makeRoom(std::size_t bytes);

    Room data_;
    std::size_t size_ = 0;
};

} // namespace spanwright
