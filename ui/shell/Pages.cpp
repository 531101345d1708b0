// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Pages.h"

#include "core/record/Fields.h"
#include "core/session/SameNumber.h"
#include "ui/bench/BenchPage.h"
#include "ui/certificate/CertificatePage.h"

namespace spanwright {

QWidget* makeBenchPage(Workbench& bench, const PageLinks& links, QWidget* parent) {
    auto* page = new BenchPage(bench, parent);
    QObject::connect(page, &BenchPage::budgetRequested, page,
                     [links](std::optional<DerivedLine> line) {
                         const QString field = QStringLiteral("budget.contributions");
                         links.showField(QStringLiteral("budget"), line ? field + QLatin1Char('.') + QLatin1String(nameOf(*line).data()) : field);
                     });
    QObject::connect(page, &BenchPage::planRequested, page,
                     [links] { links.showField(QStringLiteral("job"), QStringLiteral("plan.set_points")); });
    return page;
}

QWidget* makeCertificatePage(Workbench& bench, const PageLinks& links, QWidget* parent) {
    CertificateAsks asks = screenAsks();
    asks.pdfPath = links.pdfPath;
    asks.tell = links.tell;
    asks.sameNumber = [links](const QString& number) {
        return QString::fromStdString(sessionWithNumber(links.path().toStdString(), number.toStdString()));
    };
    auto* page = new CertificatePage(bench, asks, parent);
    QObject::connect(page, &CertificatePage::goTo, page, links.showField);
    return page;
}

bool enterPage(QWidget* page) {
    if (auto* bench = qobject_cast<BenchPage*>(page)) {
        bench->startTyping();
        return true;
    }
    return false;
}

} // namespace spanwright
