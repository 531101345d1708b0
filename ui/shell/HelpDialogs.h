// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include <vector>

class QAction;
class QDialog;
class QWidget;

namespace spanwright {

/// The work in short, and what the program does not decide.
QDialog* userHelp(QWidget* parent);
/// Every action with its key, and the keys of the screens.
QDialog* keyboardHelp(const std::vector<QAction*>& actions, QWidget* parent);
QDialog* aboutProgram(QWidget* parent);

} // namespace spanwright
