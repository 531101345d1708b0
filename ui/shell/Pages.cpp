// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Pages.h"

#include "ui/bench/BenchPage.h"
#if __has_include("ui/certificate/CertificatePage.h")
#include "ui/certificate/CertificatePage.h"
#endif

namespace spanwright {

QWidget* makeBenchPage(Workbench& bench, const PageLinks& links) {
    auto* page = new BenchPage(bench);
    QObject::connect(page, &BenchPage::budgetRequested, page,
                     [links](DerivedLine) { links.showField(QStringLiteral("budget"), QStringLiteral("budget.contributions")); });
    QObject::connect(page, &BenchPage::planRequested, page,
                     [links] { links.showField(QStringLiteral("job"), QStringLiteral("plan.set_points")); });
    return page;
}

QWidget* makeCertificatePage(Workbench&, const PageLinks&) {
    return new QWidget;
}

} // namespace spanwright
