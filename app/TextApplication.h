// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>

class QCoreApplication;

namespace spanwright {

/// What Qt needs to put counts into words, without a display. None is made where an application exists already.
class TextApplication {
  public:
    TextApplication();
    ~TextApplication();
    TextApplication(const TextApplication&) = delete;
    TextApplication& operator=(const TextApplication&) = delete;

  private:
    std::unique_ptr<QCoreApplication> application_;
};

} // namespace spanwright
