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

/// "value-amended" as it stands on screen.
QString journalWord(const std::string& what);

} // namespace spanwright
