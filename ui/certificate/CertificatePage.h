// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <QWidget>

#include <functional>

class QLabel;
class QPrinter;

namespace spanwright {

class ChecklistView;
class PagePreview;

/// What the page asks before it prints or saves; tests answer in the user's place.
struct CertificateAsks {
    /// Where to save; empty when given up.
    std::function<QString(QWidget* parent, const QString& suggestion)> pdfPath;
    /// Sets the printer up; false when given up.
    std::function<bool(QWidget* parent, QPrinter& printer)> printer;
    std::function<void(QWidget* parent, const QString& title, const QString& text)> tell;
    /// Another file with this certificate number, where the files are known; empty: none.
    std::function<QString(const QString& number)> sameNumber = {};
};
CertificateAsks screenAsks();

/// The certificate: the draft as it will print, what is still missing, who signed off, and the way to paper or PDF. Its actions()
/// belong into menus and the finder of commands.
class CertificatePage : public QWidget {
    Q_OBJECT

  public:
    explicit CertificatePage(Workbench& workbench, CertificateAsks asks = screenAsks(), QWidget* parent = nullptr);

  signals:
    /// A gap was chosen: the stage and the field where it is mended.
    void goTo(const QString& stage, const QString& field);

  protected:
    void showEvent(QShowEvent* event) override;

  private:
    QWidget* buildSide();
    void addPageAction(const char* id, const QString& text, const QKeySequence& keys, void (CertificatePage::*what)());
    void refresh();
    void saveAsPdf();
    void print();
    [[nodiscard]] QString today() const;
    void lookForNumber();

    Workbench& workbench_;
    CertificateAsks asks_;
    PagePreview* preview_;
    ChecklistView* checklist_ = nullptr;
    QLabel* state_ = nullptr;
    std::string number_, sameNumberIn_; ///< looked for when the page is shown and when the number changes
    bool stale_ = true; ///< laid out only while it can be seen
};

} // namespace spanwright
