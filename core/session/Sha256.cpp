// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/Sha256.h"

#include <openssl/evp.h>

#include <new>

namespace spanwright {

class Sha256::Private {
  public:
    EVP_MD_CTX* context = EVP_MD_CTX_new();
    ~Private() { EVP_MD_CTX_free(context); }
};

Sha256::Sha256() : d(std::make_unique<Private>()) {
    // The library refuses only for want of memory.
    if (d->context == nullptr || EVP_DigestInit_ex(d->context, EVP_sha256(), nullptr) != 1)
        throw std::bad_alloc();
}

Sha256::~Sha256() = default;

Sha256& Sha256::add(std::string_view bytes) {
    EVP_DigestUpdate(d->context, bytes.data(), bytes.size());
    return *this;
}

std::string Sha256::digest() {
    unsigned char bytes[EVP_MAX_MD_SIZE];
    unsigned int length = 0;
    EVP_DigestFinal_ex(d->context, bytes, &length);
    std::string text = "sha256:";
    for (unsigned int i = 0; i < length; ++i) {
        constexpr std::string_view hexadecimal = "0123456789abcdef";
        text += hexadecimal[bytes[i] >> 4];
        text += hexadecimal[bytes[i] & 15];
    }
    return text;
}

std::string sha256(std::string_view bytes) {
    return Sha256().add(bytes).digest();
}

} // namespace spanwright
