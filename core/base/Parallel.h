// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <tbb/parallel_invoke.h>
#include <tbb/task_group.h>

#include <cstddef>
#include <functional>
#include <optional>
#include <type_traits>
#include <utility>

namespace spanwright {

/// Below so many readings a second thread costs more than it gives.
inline constexpr std::size_t FewerThanThreads = 200'000;

/// Runs part(0) … part(threads − 1), at the same time where there are processors for it.
void inParallel(unsigned threads, const std::function<void(unsigned)>& part);

/// What a piece of work gives, to be fetched once by get(): of very many readings worked out beside what follows, of fewer when it
/// is fetched.
template <class Work>
class Beside {
    using Given = std::invoke_result_t<Work>;
    using Held = std::conditional_t<std::is_void_v<Given>, bool, Given>;

  public:
    Beside(std::size_t readings, Work work) : work_(std::move(work)) {
        if (readings >= FewerThanThreads)
            group_.emplace().run([this] { make(); });
    }
    Beside(const Beside&) = delete;
    Beside& operator=(const Beside&) = delete;
    ~Beside() {
        if (group_)
            group_->wait();
    }

    Given get() {
        if (group_)
            group_->wait();
        else
            make();
        if constexpr (!std::is_void_v<Given>)
            return std::move(*held_);
    }

  private:
    void make() {
        if constexpr (std::is_void_v<Given>)
            work_();
        else
            held_.emplace(work_());
    }

    Work work_;
    std::optional<Held> held_;
    std::optional<tbb::task_group> group_; ///< where it began early
};

template <class Work>
Beside<std::decay_t<Work>> beside(std::size_t readings, Work&& work) {
    return {readings, std::forward<Work>(work)};
}

/// Runs part(first, last) over 0 … n, of very many in halves at the same time; the parts must not depend on each other.
template <class Part>
void inHalves(std::size_t n, Part&& part) {
    if (n < FewerThanThreads)
        part(std::size_t{0}, n);
    else
        tbb::parallel_invoke([&] { part(std::size_t{0}, n / 2); }, [&] { part(n / 2, n); });
}

} // namespace spanwright
