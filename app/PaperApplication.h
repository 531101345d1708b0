// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QtGlobal>

#include <memory>

class QGuiApplication;

namespace spanwright {

/// What Qt needs to lay out text on paper, without a display: an application that draws nothing on a screen. None is made where
/// one exists already.
class PaperApplication {
  public:
    PaperApplication();
    ~PaperApplication();
    PaperApplication(const PaperApplication&) = delete;
    PaperApplication& operator=(const PaperApplication&) = delete;

  private:
    std::unique_ptr<QGuiApplication> application_;
    QtMessageHandler previous_ = nullptr;
};

} // namespace spanwright
