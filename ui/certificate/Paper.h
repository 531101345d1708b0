// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"
#include "ui/certificate/Page.h"

#include <QString>

class QPagedPaintDevice;

namespace spanwright {

/// What every document of the program shares: A4 with these margins, a foot with the number of the page, PDF/A-1b.
inline constexpr QRectF PaperContent(17, 12, 176, 275);

/// Where text goes on, between a head that ends at `top` and the foot, mm.
QRectF areaUnder(double top);
/// Pages without content, to be filled by a Flow.
Pages emptyPaper();

/// One line that fits, cut with an ellipsis.
QString fitting(const QString& words, const TextStyle& style, double width);

/// "page 2 of 3"
QString pageNumber(std::size_t page, std::size_t of);
/// A line under the content, with words at its left and the number of the page at its right.
void addFoot(Page& page, const QString& words, const QString& number);

/// Paints all pages on a PDF writer or a printer, whose page layout is set to A4 without margins (the margins are in the
/// pages). Whether it could be begun.
bool paintDocument(const Pages& pages, QPagedPaintDevice& device);

/// What a PDF says of itself.
struct PdfNames {
    QString title, creator;
};
/// Whole or not at all. Errors: FileNotWritable, FileWriteFailed (facts: file, reason). Needs a QGuiApplication.
Result<void> writePdf(const Pages& pages, const PdfNames& names, const QString& path);

} // namespace spanwright
