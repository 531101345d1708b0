// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <QDialog>

namespace spanwright {

/// Everything that happened to the record, newest first.
class JournalDialog : public QDialog {
    Q_OBJECT

  public:
    explicit JournalDialog(const Record& record, QWidget* parent);
};

} // namespace spanwright
