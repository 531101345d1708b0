// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"
#include "ui/certificate/Page.h"

#include <QStringList>

namespace spanwright {

/// The certificate as pages. `gaps`: what still blocks, one sentence each; printed on an incomplete draft.
Pages certificatePages(const Certificate& certificate, const QStringList& gaps);

} // namespace spanwright
