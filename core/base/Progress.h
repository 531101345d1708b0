// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <atomic>

namespace spanwright {

/// How far a long computation has come, and whether somebody wants it to stop. Written by the computation, read by the window.
class Progress {
  public:
    /// Asks the computation to stop; it returns ErrorCode::Cancelled within 100 ms.
    void cancel() { cancelled_.store(true, std::memory_order_relaxed); }
    [[nodiscard]] bool cancelled() const { return cancelled_.load(std::memory_order_relaxed); }

    /// Share done, 0 to 1.
    void report(double share) { share_.store(share, std::memory_order_relaxed); }
    [[nodiscard]] double share() const { return share_.load(std::memory_order_relaxed); }

  private:
    std::atomic<bool> cancelled_{false};
    std::atomic<double> share_{0.0};
};

} // namespace spanwright
