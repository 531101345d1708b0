// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/selftest/SelfTest.h"

#include <QBuffer>
#include <QCoreApplication>
#include <QPageLayout>
#include <QPdfWriter>
#include <QSaveFile>
#include <QTextDocument>

#include <cmath>

namespace spanwright {

namespace {

struct Text {
    Q_DECLARE_TR_FUNCTIONS(SelfTest)
};

QString gotText(double value) {
    return std::isnan(value) ? QStringLiteral("–") : QString::number(value, 'g', 16);
}

QString verdictText(const SelfTestOutcome& outcome) {
    const std::size_t failed = outcome.failed();
    if (outcome.cases.empty())
        return Text::tr("No case could be read.");
    return failed == 0 ? Text::tr("All %1 figures of %2 cases agree with their sources to the last digit printed.")
                             .arg(outcome.figures())
                             .arg(outcome.cases.size())
                       : Text::tr("%1 of %2 figures do not agree with their sources.").arg(failed).arg(outcome.figures());
}

QString cell(const QString& text) {
    return QStringLiteral("<td>") + text.toHtmlEscaped() + QStringLiteral("</td>");
}

QString pageText(const SelfTestOutcome& outcome, const SelfTestOccasion& occasion) {
    QString html = QStringLiteral("<h2>%1</h2><p>%2<br/>%3<br/>%4</p><p><b>%5</b></p>")
                       .arg(Text::tr("Validation record").toHtmlEscaped(), occasion.program.toHtmlEscaped(),
                            occasion.machine.toHtmlEscaped(), occasion.date.toHtmlEscaped(), verdictText(outcome).toHtmlEscaped());
    html += QStringLiteral("<p>%1</p>")
                .arg(Text::tr("Published cases, recomputed with this program on this machine. A figure agrees when it rounds to what the "
                              "source prints. The record is one part of a validation; it does not replace the laboratory's own.")
                         .toHtmlEscaped());
    for (const SelfTestCase& one : outcome.cases) {
        html += QStringLiteral("<h4>%1</h4><p>%2; %3</p><table cellpadding='2' width='100%'><tr>")
                    .arg(one.name.toHtmlEscaped(), one.source.toHtmlEscaped(), Text::tr("%1 readings").arg(one.readings));
        for (const QString& head : {Text::tr("Figure"), Text::tr("Printed"), Text::tr("Computed"), Text::tr("Digits"), QString()})
            html += QStringLiteral("<th align='left'>") + head.toHtmlEscaped() + QStringLiteral("</th>");
        html += QStringLiteral("</tr>");
        for (const SelfTestFigure& figure : one.figures)
            html += QStringLiteral("<tr>") + cell(figure.name) + cell(figure.printed) + cell(gotText(figure.got)) +
                    cell(QString::number(figure.digits, 'f', 1)) + cell(figure.holds ? Text::tr("agrees") : Text::tr("differs")) +
                    QStringLiteral("</tr>");
        html += QStringLiteral("</table>");
    }
    return html;
}

} // namespace

QString selfTestText(const SelfTestOutcome& outcome) {
    QString text;
    for (const SelfTestCase& one : outcome.cases) {
        text += one.name + QStringLiteral("   (") + one.source + QStringLiteral(")\n");
        for (const SelfTestFigure& figure : one.figures)
            text += QStringLiteral("  %1 %2 %3 %4  %5\n")
                        .arg(figure.name, -40)
                        .arg(figure.printed, 24)
                        .arg(gotText(figure.got), 24)
                        .arg(figure.digits, 5, 'f', 1)
                        .arg(figure.holds ? Text::tr("agrees") : Text::tr("DIFFERS"));
    }
    return text + verdictText(outcome) + QLatin1Char('\n');
}

bool writeSelfTestPdf(const SelfTestOutcome& outcome, const SelfTestOccasion& occasion, const QString& path) {
    QByteArray bytes;
    {
        QBuffer buffer(&bytes);
        buffer.open(QIODevice::WriteOnly);
        QPdfWriter writer(&buffer);
        writer.setTitle(Text::tr("Validation record"));
        writer.setCreator(occasion.program);
        writer.setPageLayout(QPageLayout(QPageSize(QPageSize::A4), QPageLayout::Portrait, QMarginsF(18, 18, 18, 18), QPageLayout::Millimeter));
        QTextDocument document;
        document.setDefaultFont(QFont(QStringLiteral("Sans Serif"), 8));
        document.setHtml(pageText(outcome, occasion));
        document.print(&writer);
    }
    QSaveFile file(path);
    return file.open(QIODevice::WriteOnly) && file.write(bytes) == bytes.size() && file.commit();
}

} // namespace spanwright
