// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include <functional>

class QWidget;

namespace spanwright {

class Workbench;

/// What a page asks of the window.
struct PageLinks {
    std::function<void(const QString& stage, const QString& field)> showField;
    std::function<QString(QWidget* parent, const QString& suggestion)> pdfPath;
    std::function<void(QWidget* parent, const QString& title, const QString& text)> tell;
    std::function<QString()> path; ///< of the session's file; empty where it has none
};

QWidget* makeBenchPage(Workbench& bench, const PageLinks& links, QWidget* parent);
QWidget* makeCertificatePage(Workbench& bench, const PageLinks& links, QWidget* parent);

/// Puts the cursor where the work of the page goes on. False: the page leaves that to the window.
bool enterPage(QWidget* page);

} // namespace spanwright
