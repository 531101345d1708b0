// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Error.h"

#include <cassert>
#include <optional>
#include <utility>
#include <variant>

namespace spanwright {

/// Either a value or the Error that kept it from being made.
template <class T>
class [[nodiscard]] Result {
  public:
    Result(T value) : held_(std::in_place_index<0>, std::move(value)) {}
    Result(Error error) : held_(std::in_place_index<1>, std::move(error)) {}

    [[nodiscard]] bool ok() const { return held_.index() == 0; }
    explicit operator bool() const { return ok(); }

    [[nodiscard]] T& value() & { assert(ok()); return std::get<0>(held_); }
    [[nodiscard]] const T& value() const& { assert(ok()); return std::get<0>(held_); }
    [[nodiscard]] T value() && { assert(ok()); return std::get<0>(std::move(held_)); }
    [[nodiscard]] const Error& error() const { assert(!ok()); return std::get<1>(held_); }

    T& operator*() & { return value(); }
    const T& operator*() const& { return value(); }
    T* operator->() { return &value(); }
    const T* operator->() const { return &value(); }

  private:
    std::variant<T, Error> held_;
};

template <>
class [[nodiscard]] Result<void> {
  public:
    Result() = default;
    Result(Error error) : error_(std::move(error)) {}

    [[nodiscard]] bool ok() const { return !error_.has_value(); }
    explicit operator bool() const { return ok(); }
    [[nodiscard]] const Error& error() const { assert(!ok()); return *error_; }

  private:
    std::optional<Error> error_;
};

} // namespace spanwright
