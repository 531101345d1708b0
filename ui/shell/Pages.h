// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QByteArray>
#include <QString>

#include <functional>

class QWidget;

namespace spanwright {

class Workbench;

/// What a page asks of the window.
struct PageLinks {
    std::function<void(const QString& stage, const QString& field)> showField;
    std::function<void(const QByteArray& bytes, const QString& origin)> importTable;
};

QWidget* makeBenchPage(Workbench& bench, const PageLinks& links);
QWidget* makeCertificatePage(Workbench& bench, const PageLinks& links);

} // namespace spanwright
