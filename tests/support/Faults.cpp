// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/Faults.h"

#include <cerrno>
#include <csignal>
#include <cstdio>
#include <sys/resource.h>
#include <sys/syscall.h>
#include <unistd.h>

namespace {

int failing = 0; // number of the call that fails; 0: none
int calls = 0;

bool fails() {
    if (failing == 0 || ++calls != failing)
        return false;
    errno = ENOSPC;
    return true;
}

} // namespace

extern "C" {

ssize_t write(int file, const void* bytes, size_t count) {
    if (file > STDERR_FILENO && fails())
        return -1;
    return syscall(SYS_write, file, bytes, count);
}

int fsync(int file) {
    return fails() ? -1 : static_cast<int>(syscall(SYS_fsync, file));
}

int fdatasync(int file) {
    return fails() ? -1 : static_cast<int>(syscall(SYS_fdatasync, file));
}

int rename(const char* from, const char* to) noexcept {
    return fails() ? -1 : static_cast<int>(syscall(SYS_renameat2, -100, from, -100, to, 0)); // -100: AT_FDCWD
}

} // extern "C"

namespace spanwright::test {

DiskFault::DiskFault(int n) {
    calls = 0;
    failing = n;
}

DiskFault::~DiskFault() {
    failing = 0;
}

bool DiskFault::happened() const {
    return calls >= failing;
}

SizeLimit::SizeLimit(unsigned long bytes) {
    // Without this the limit would end the process instead of failing the write.
    std::signal(SIGXFSZ, SIG_IGN);
    rlimit limit{};
    getrlimit(RLIMIT_FSIZE, &limit);
    before_ = limit.rlim_cur;
    limit.rlim_cur = bytes;
    setrlimit(RLIMIT_FSIZE, &limit);
}

SizeLimit::~SizeLimit() {
    rlimit limit{};
    getrlimit(RLIMIT_FSIZE, &limit);
    limit.rlim_cur = before_;
    setrlimit(RLIMIT_FSIZE, &limit);
}

AsNobody::AsNobody() : before_(geteuid()) {
    constexpr uid_t nobody = 65534;
    if (before_ == 0 && seteuid(nobody) != 0)
        std::perror("seteuid");
}

AsNobody::~AsNobody() {
    if (before_ == 0 && seteuid(0) != 0)
        std::perror("seteuid");
}

} // namespace spanwright::test
