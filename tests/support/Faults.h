// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace spanwright::test {

/// While it lives, the n-th write, flush or rename of a file by this process fails as on a full disk (n from 1). Works by taking
/// the place of the C library's functions in the test program.
class DiskFault {
  public:
    explicit DiskFault(int n);
    ~DiskFault();
    DiskFault(const DiskFault&) = delete;
    DiskFault& operator=(const DiskFault&) = delete;
    /// Whether the n-th call came and failed.
    [[nodiscard]] bool happened() const;
};

/// While it lives, no file of this process can grow beyond so many bytes, as where a quota ends.
class SizeLimit {
  public:
    explicit SizeLimit(unsigned long bytes);
    ~SizeLimit();
    SizeLimit(const SizeLimit&) = delete;
    SizeLimit& operator=(const SizeLimit&) = delete;

  private:
    unsigned long before_;
};

/// While it lives, the process has the rights of nobody, so that permissions hold even for tests that run as the superuser.
class AsNobody {
  public:
    AsNobody();
    ~AsNobody();
    AsNobody(const AsNobody&) = delete;
    AsNobody& operator=(const AsNobody&) = delete;

  private:
    unsigned int before_;
};

} // namespace spanwright::test
