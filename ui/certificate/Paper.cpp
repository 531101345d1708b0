// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/Paper.h"

#include "ui/certificate/Flow.h"

#include <QCoreApplication>
#include <QPageLayout>
#include <QPainter>
#include <QPdfWriter>
#include <QSaveFile>

namespace spanwright {

namespace {

constexpr double FootRule = 280, FootText = 284.5, AreaEnd = 275; // mm from the top of the page
constexpr double RoomOfNumber = 35;

struct Paper {
    Q_DECLARE_TR_FUNCTIONS(Paper)
};

Error fileError(ErrorCode code, const QString& path, const QString& reason) {
    return Error(code, {{"file", path.toStdString()}, {"reason", reason.toStdString()}});
}

} // namespace

QRectF areaUnder(double top) {
    return {PaperContent.left(), top, PaperContent.width(), AreaEnd - top};
}

Pages emptyPaper() {
    Pages pages;
    pages.content = PaperContent;
    return pages;
}

QString fitting(const QString& words, const TextStyle& style, double width) {
    if (textWidth(words, style) <= width)
        return words;
    QString cut = words;
    while (!cut.isEmpty() && textWidth(cut + QChar(0x2026), style) > width)
        cut.chop(1);
    return cut.trimmed() + QChar(0x2026);
}

QString pageNumber(std::size_t page, std::size_t of) {
    return Paper::tr("page %1 of %2").arg(page).arg(of);
}

void addFoot(Page& page, const QString& words, const QString& number) {
    const TextStyle small{7.5, false, PageInk::Quiet};
    page.blocks.push_back({QRectF(PaperContent.left(), FootRule, PaperContent.width(), 0), Rule{0.2, PageInk::Line}});
    page.blocks.push_back(textBlock(PaperContent.left(), FootText, fitting(words, small, PaperContent.width() - RoomOfNumber), small));
    page.blocks.push_back(textBlock(PaperContent.right(), FootText, number, small, Qt::AlignRight));
}

bool paintDocument(const Pages& pages, QPagedPaintDevice& device) {
    device.setPageLayout(QPageLayout(QPageSize(QPageSize::A4), QPageLayout::Portrait, QMarginsF(0, 0, 0, 0), QPageLayout::Millimeter));
    QPainter painter;
    if (!painter.begin(&device))
        return false;
    for (std::size_t i = 0; i < pages.pages.size(); ++i) {
        if (i > 0 && !device.newPage())
            return false;
        // A printer that cannot print to the edge still gets the page in true size.
        const double perMm = device.logicalDpiX() / 25.4;
        const QPointF printable = device.pageLayout().paintRect(QPageLayout::Millimeter).topLeft() * perMm;
        paintPage(painter, pages, i, QRectF(-printable, pages.size * perMm));
    }
    return painter.end();
}

Result<void> writePdf(const Pages& pages, const PdfNames& names, const QString& path) {
    QSaveFile file(path);
    if (!file.open(QIODevice::WriteOnly))
        return fileError(ErrorCode::FileNotWritable, path, file.errorString());
    {
        QPdfWriter writer(&file);
        writer.setPdfVersion(QPagedPaintDevice::PdfVersion_A1b);
        writer.setResolution(1200);
        writer.setTitle(names.title);
        writer.setCreator(names.creator);
        if (!paintDocument(pages, writer))
            return fileError(ErrorCode::FileWriteFailed, path, file.errorString());
    }
    if (!file.commit())
        return fileError(ErrorCode::FileWriteFailed, path, file.errorString());
    return {};
}

} // namespace spanwright
