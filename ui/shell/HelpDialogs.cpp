// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/HelpDialogs.h"

#include "ui/look/Look.h"
#include "ui/shell/Actions.h"

#include <QCoreApplication>
#include <QDialog>
#include <QDialogButtonBox>
#include <QPushButton>
#include <QTextBrowser>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("Help", text);
}

QDialog* reader(const QString& name, const QString& title, const QString& html, QWidget* parent) {
    auto* dialog = new QDialog(parent);
    dialog->setAttribute(Qt::WA_DeleteOnClose);
    dialog->setObjectName(name);
    dialog->setWindowTitle(title);
    dialog->resize(620, 640);
    auto* all = new QVBoxLayout(dialog);
    auto* text = new QTextBrowser;
    text->setObjectName(name + QStringLiteral(".text"));
    text->setAccessibleName(title);
    text->setOpenLinks(false);
    text->document()->setDocumentMargin(space::card);
    text->setHtml(html);
    all->addWidget(text);
    auto* buttons = new QDialogButtonBox;
    QPushButton* close = buttons->addButton(tr("&Close"), QDialogButtonBox::RejectRole);
    close->setDefault(true);
    QObject::connect(buttons, &QDialogButtonBox::rejected, dialog, &QDialog::reject);
    all->addWidget(buttons);
    return dialog;
}

QString section(const QString& title, const QStringList& sentences) {
    QString html = QStringLiteral("<h3>%1</h3>").arg(title.toHtmlEscaped());
    for (const QString& sentence : sentences)
        html += QStringLiteral("<p>%1</p>").arg(sentence.toHtmlEscaped());
    return html;
}

} // namespace

QDialog* userHelp(QWidget* parent) {
    const QString html =
        section(tr("The work in four stages"),
                {tr("Job: say what is calibrated, for whom, by which method, against which reference standards, under which conditions, and "
                    "plan set points, directions and runs."),
                 tr("Bench: type each reading where the cursor waits; Enter goes to the next planned cell. A table of readings can be "
                    "dropped on the window, opened or pasted; nothing is taken in before you have seen how it was understood."),
                 tr("Budget: look at the contributions to the uncertainty at each set point, add what the readings cannot show, and state "
                    "limits and the decision rule."),
                 tr("Certificate: the draft as it will print, and what is still missing. Each entry of the list leads to its field.")}) +
        section(tr("Reading the bench"),
                {tr("The line plot shows readings and the fitted function; departures can be drawn enlarged, and the plot then says by how "
                    "much. A triangle that points up is a rising reading, one that points down a falling one, a hollow one is excluded."),
                 tr("The variance split shows how much of the spread is signal and what the rest is made of. Look there, not at R²."),
                 tr("To exclude, drag a rectangle over readings on a plot, or choose them in the table, and give the reason. They stay "
                    "visible, and can be readmitted.")}) +
        section(tr("Cautions"),
                {tr("Nothing is excluded, corrected or rounded in the record by the program itself. An outlier test is a reason to look for "
                    "a cause, not a reason to exclude."),
                 tr("A correction table of a reference standard is applied once: say for each standard whether the values were already "
                    "corrected when they were typed."),
                 tr("What is printed is a draft until the laboratory's authorised people have checked and authorised it by the "
                    "laboratory's own procedures. The program is no accreditation and replaces no procedure."),
                 tr("Interval and verdict hold for the item as it was at the time of calibration; drift afterwards is not in them unless a "
                    "line of the budget says so.")}) +
        section(tr("Nothing is lost"),
                {tr("Every change is written beside the session within a second. After a stop of the program or the machine the next start "
                    "offers it back."),
                 tr("Every change can be undone. The journal keeps the value before and after, who, when and why; undoing adds to it and "
                    "takes nothing out.")});
    return reader(QStringLiteral("userHelp"), tr("How to work with Spanwright"), html, parent);
}

QDialog* keyboardHelp(const std::vector<QAction*>& actions, QWidget* parent) {
    QString rows;
    const auto row = [&](const QString& keys, const QString& what) {
        rows += QStringLiteral("<tr><td style='padding-right:24px'>%1</td><td>%2</td></tr>").arg(keys.toHtmlEscaped(), what.toHtmlEscaped());
    };
    for (const QAction* action : actions)
        if (!action->shortcut().isEmpty())
            row(action->shortcut().toString(QKeySequence::NativeText), plainText(action));
    QString screens;
    std::swap(rows, screens);
    row(tr("Enter"), tr("in the readings: take in the value and go to the next planned cell"));
    row(tr("Escape"), tr("in a field: bring back the recorded value"));
    row(tr("Tab, Shift+Tab"), tr("next and previous field"));
    row(tr("F6, Shift+F6"), tr("next and previous part of the stage"));
    row(tr("Alt and the underlined letter"), tr("menus and labelled fields"));
    return reader(QStringLiteral("keyboardHelp"), tr("Keyboard"),
                  QStringLiteral("<h3>%1</h3><table>%2</table><h3>%3</h3><table>%4</table>")
                      .arg(tr("Commands").toHtmlEscaped(), screens, tr("On the screens").toHtmlEscaped(), rows),
                  parent);
}

QDialog* aboutProgram(QWidget* parent) {
    const QString html =
        section(QStringLiteral("Spanwright %1").arg(QLatin1String(SPANWRIGHT_VERSION)),
                {tr("A workbench for calibrating sensors: readings, calibration function, variance split, uncertainty budget and "
                    "certificate draft."),
                 tr("Free software under the GNU General Public License, version 3 or later. It comes without any warranty."),
                 tr("Built with Qt, Eigen, Boost and QD. Readings are held as the decimals that were typed."),
                 tr("Results are drafts for the laboratory's authorised people to check. Vocabulary after VIM and GUM.")});
    return reader(QStringLiteral("aboutProgram"), tr("About Spanwright"), html, parent);
}

} // namespace spanwright
