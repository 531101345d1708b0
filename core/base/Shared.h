// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <utility>

namespace spanwright {

/// A value whose copies share storage until one of them is edited, so that a snapshot of a million readings costs a pointer.
template <class T>
class Shared {
  public:
    Shared() : held_(std::make_shared<T>()) {}
    Shared(T value) : held_(std::make_shared<T>(std::move(value))) {}

    const T& operator*() const { return *held_; }
    const T* operator->() const { return held_.get(); }

    /// The value to change; cloned first when another copy still looks at it.
    T& edit() {
        if (held_.use_count() > 1)
            held_ = std::make_shared<T>(*held_);
        return *held_;
    }

    friend bool operator==(const Shared& a, const Shared& b) { return a.held_ == b.held_ || *a.held_ == *b.held_; }

  private:
    std::shared_ptr<T> held_;
};

} // namespace spanwright
