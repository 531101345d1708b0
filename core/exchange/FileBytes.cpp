// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/FileBytes.h"

#include <cerrno>
#include <cstdlib>
#include <cstring>
#include <fcntl.h>
#include <new>
#include <sys/mman.h>
#include <sys/stat.h>
#include <unistd.h>

namespace spanwright {

namespace {

class Descriptor {
  public:
    explicit Descriptor(const std::string& path) : number_(::open(path.c_str(), O_RDONLY | O_CLOEXEC)) {}
    ~Descriptor() {
        if (number_ >= 0)
            ::close(number_);
    }
    Descriptor(const Descriptor&) = delete;
    Descriptor& operator=(const Descriptor&) = delete;
    [[nodiscard]] int number() const { return number_; }

  private:
    int number_;
};

Error systemError(ErrorCode code, const std::string& path) {
    return Error(code, {{"file", path}, {"reason", std::strerror(errno)}});
}

} // namespace

void FileBytes::Release::operator()(char* data) const {
    std::free(data);
}

/// Large pages where the system has them: a third of the time of reading a large file goes into touching new pages.
FileBytes::Room FileBytes::makeRoom(std::size_t bytes) {
    constexpr std::size_t largePage = std::size_t{2} << 20;
    const std::size_t whole = (bytes + largePage - 1) / largePage * largePage;
    auto* const data = static_cast<char*>(bytes < largePage ? std::malloc(bytes) : std::aligned_alloc(largePage, whole));
    if (data == nullptr)
        throw std::bad_alloc();
    if (bytes >= largePage)
        ::madvise(data, whole, MADV_HUGEPAGE);
    return Room(data);
}

Result<FileBytes> FileBytes::read(const std::string& path) {
    const Descriptor file(path);
    if (file.number() < 0) {
        if (errno == ENOENT || errno == ENOTDIR)
            return Error(ErrorCode::FileMissing, {{"file", path}});
        return systemError(ErrorCode::FileNotReadable, path);
    }
    struct stat about{};
    if (::fstat(file.number(), &about) != 0)
        return systemError(ErrorCode::FileReadFailed, path);
    if (S_ISDIR(about.st_mode))
        return Error(ErrorCode::FileIsDirectory, {{"file", path}});

    // A pipe tells no size, and a file may grow while it is read: read until there is no more.
    FileBytes whole;
    std::size_t room = static_cast<std::size_t>(about.st_size) + 4096;
    whole.data_ = makeRoom(room);
    for (;;) {
        if (whole.size_ == room) {
            auto larger = makeRoom(room * 2);
            std::memcpy(larger.get(), whole.data_.get(), whole.size_);
            whole.data_ = std::move(larger);
            room *= 2;
        }
        const ssize_t got = ::read(file.number(), whole.data_.get() + whole.size_, room - whole.size_);
        if (got < 0 && errno == EINTR)
            continue;
        if (got < 0)
            return systemError(ErrorCode::FileReadFailed, path);
        if (got == 0)
            break;
        whole.size_ += static_cast<std::size_t>(got);
    }
    if (whole.size_ == 0)
        return Error(ErrorCode::FileEmpty, {{"file", path}});
    return whole;
}

} // namespace spanwright
