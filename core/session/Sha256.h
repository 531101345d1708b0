// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <string>
#include <string_view>

namespace spanwright {

/// SHA-256 (FIPS 180-4) of bytes that come in pieces.
class Sha256 {
  public:
    Sha256();
    ~Sha256();
    Sha256(const Sha256&) = delete;
    Sha256& operator=(const Sha256&) = delete;

    Sha256& add(std::string_view bytes);
    /// "sha256:" and 64 hexadecimal digits; nothing may be added afterwards.
    [[nodiscard]] std::string digest();

  private:
    class Private;
    std::unique_ptr<Private> d;
};

std::string sha256(std::string_view bytes);

} // namespace spanwright
