// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/MainWindow.h"

#include "core/certificate/Checklist.h"
#include "ui/bench/ChoiceMenus.h"
#include "ui/budget/BudgetPage.h"
#include "ui/commands/FieldForm.h"
#include "ui/job/JobPage.h"
#include "ui/look/Card.h"
#include "ui/shell/CommandFinder.h"
#include "ui/shell/HelpDialogs.h"
#include "ui/shell/PageStack.h"
#include "ui/shell/Pages.h"
#include "ui/shell/StageBar.h"
#include "ui/shell/StatusLine.h"
#include "ui/shell/UndoKeys.h"
#include "ui/words/Words.h"

#include <QApplication>
#include <QClipboard>
#include <QCloseEvent>
#include <QDateTime>
#include <QDragEnterEvent>
#include <QDropEvent>
#include <QMenu>
#include <QMenuBar>
#include <QMimeData>
#include <QScreen>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// "as left · 3 runs, rising and falling"
QString planText(const Record& record) {
    QStringList words{phaseText(record.choices.phase)};
    const int runs = record.choices.phase == Phase::AsFound ? record.plan.runs : record.plan.asLeftRuns;
    if (!record.plan.setPoints.empty() && runs > 0) {
        const QString direction = record.plan.directions == PlanDirections::Rising    ? MainWindow::tr("rising")
                                  : record.plan.directions == PlanDirections::Falling ? MainWindow::tr("falling")
                                                                                      : MainWindow::tr("rising and falling");
        words << MainWindow::tr("%n run(s), %1", nullptr, runs).arg(direction);
    }
    return words.join(QStringLiteral(" · "));
}

QString savedText(const Document& document) {
    if (document.modified())
        return document.hasFile() ? MainWindow::tr("changes not saved") : MainWindow::tr("not saved yet");
    if (!document.hasFile())
        return {};
    const QDateTime at = QDateTime::fromMSecsSinceEpoch(document.savedAt());
    const bool today = at.date() == QDate::currentDate();
    return MainWindow::tr("saved %1").arg(at.toString(today ? QStringLiteral("HH:mm") : QStringLiteral("yyyy-MM-dd HH:mm")));
}

/// To the widget or the first thing in it that takes the focus.
bool giveFocus(QWidget* widget) {
    QList<QWidget*> candidates = widget->findChildren<QWidget*>();
    candidates.prepend(widget);
    for (QWidget* candidate : candidates)
        if (candidate->focusPolicy() & Qt::TabFocus && candidate->isVisible() && candidate->isEnabled()) {
            candidate->setFocus(Qt::ShortcutFocusReason);
            return true;
        }
    return false;
}

QStringList localFiles(const QMimeData* data) {
    QStringList paths;
    for (const QUrl& url : data->urls())
        if (url.isLocalFile())
            paths << url.toLocalFile();
    return paths;
}

} // namespace

MainWindow::MainWindow(const WindowSurroundings& surroundings, QWidget* parent)
    : QMainWindow(parent), around_(surroundings), bench_(surroundings.clock), document_(bench_, surroundings.dataFolder),
      files_(this, bench_, document_, surroundings.settings, surroundings.dialogs), actions_(this), bar_(new StageBar),
      pages_(new PageStack), status_(new StatusLine) {
    setObjectName(QStringLiteral("mainWindow"));
    setAcceptDrops(true);
    resize(QSize(1440, 900).boundedTo(screen()->availableSize() - QSize(0, 40)));
    bench_.setPerson(around_.settings.person());
    connect(&bench_, &Workbench::personChanged, this, [this] { around_.settings.setPerson(bench_.person()); });

    auto* sheet = new QWidget;
    auto* all = new QVBoxLayout(sheet);
    all->setContentsMargins(0, 0, 0, 0);
    all->setSpacing(0);
    all->addWidget(bar_);
    all->addWidget(pages_, 1);
    all->addWidget(status_);
    setCentralWidget(sheet);
    makePages();

    makeFileMenu();
    makeEditMenu();
    makeRecordMenu();
    makeViewMenu();
    makeHelpMenu();
    new UndoKeys(this);
    bar_->addAtEnd(actions_.find(QStringLiteral("edit.undo")), tr("Undo"));
    bar_->addAtEnd(actions_.find(QStringLiteral("edit.redo")), tr("Redo"));
    bar_->addAtEnd(actions_.find(QStringLiteral("edit.find")), tr("Find a command  Ctrl+K"));

    connect(bar_, &StageBar::stageChosen, this, &MainWindow::showStage);
    connect(&bench_, &Workbench::recordChanged, this, &MainWindow::showState);
    connect(&bench_, &Workbench::evaluationChanged, this, &MainWindow::showCompleteness);
    connect(&bench_, &Workbench::evaluatingChanged, status_, &StatusLine::setBusy);
    connect(&document_, &Document::stateChanged, this, &MainWindow::showState);
    connect(&files_, &FileDesk::imported, this, [this] { showStage(Stage::Bench); });
    connect(&files_, &FileDesk::opened, this, &MainWindow::showFirstStage);
    showState();
    showCompleteness();
    bar_->setCurrent(stage_);
    // Whoever opens the window with a session or for a stage does so before this is called.
    QMetaObject::invokeMethod(this, &MainWindow::showFirstStage, Qt::QueuedConnection);
}

MainWindow::~MainWindow() {
    // The undo stack tells its views about its end; by then the window must not listen any more.
    bench_.undoStack().disconnect();
    bench_.disconnect();
    document_.disconnect();
    // The pages look at the workbench to their last moment, so they go before it does.
    hide();
    delete takeCentralWidget();
}

void MainWindow::makePages() {
    const PageLinks links{.showField = [this](const QString& stage, const QString& field) { showField(stage, field); },
                          .pdfPath = [this](QWidget* from, const QString& suggestion) { return around_.dialogs.pdfPath(from, suggestion); },
                          .tell = [this](QWidget* from, const QString& title,
                                         const QString& text) { around_.dialogs.tell(from, title, text); },
                          .path = [this] { return document_.path(); }};
    pages_->append([this](QWidget* parent) { return job_ = new JobPage(bench_, parent); });
    pages_->append([this, links](QWidget* parent) { return makeBenchPage(bench_, links, parent); });
    pages_->append([this](QWidget* parent) { return budget_ = new BudgetPage(bench_, parent); });
    pages_->append([this, links](QWidget* parent) { return makeCertificatePage(bench_, links, parent); });
    connect(pages_, &PageStack::completed, this, &MainWindow::takeOverActions);
}

void MainWindow::showFirstStage() {
    if (!begun_)
        showStage(bench_.record().readings->empty() ? Stage::Job : Stage::Bench);
}

void MainWindow::showStage(Stage stage) {
    begun_ = true;
    commitEditing();
    stage_ = stage;
    bar_->setCurrent(stage);
    QWidget* const page = pages_->page(static_cast<int>(stage));
    pages_->setCurrentWidget(page);
    if (!enterPage(page))
        goToPart(0);
}

void MainWindow::showField(const QString& stage, const QString& field) {
    showStage(stageOfName(stage).value_or(stage_));
    QString name = field;
    if (stage_ == Stage::Job)
        job_->prepareField(field);
    if (stage_ == Stage::Budget)
        budget_->prepareField(field);
    // The editor of the field itself, else of what it is part of: "conditions.influences.2.start" → "conditions.influences".
    while (!name.isEmpty()) {
        auto* editor = pages_->currentWidget()->findChild<QWidget*>(name);
        if (editor && !editor->isHidden()) {
            // What takes no focus itself hands it to its first child, and an empty part to what its card offers.
            for (QWidget* place = editor; place && !giveFocus(place); place = place->parentWidget()) {
            }
            if (stage_ == Stage::Job)
                job_->bringIntoView(editor);
            return;
        }
        name = name.contains(QLatin1Char('.')) ? name.section(QLatin1Char('.'), 0, -2) : QString();
    }
}

void MainWindow::takeUp(const QString& path) {
    commitEditing();
    files_.openPath(path);
}

void MainWindow::showState() {
    const Record& record = bench_.record();
    const QString name = recordName(record, document_.path());
    QStringList subtitle{planText(record)};
    if (const QString saved = savedText(document_); !saved.isEmpty())
        subtitle << saved;
    if (bench_.readOnly())
        subtitle << tr("to be looked at only");
    bar_->setItem(name, subtitle.join(QStringLiteral(" · ")));
    setWindowTitle(tr("%1[*] \u2013 Spanwright").arg(name));
    setWindowModified(document_.modified());
    status_->show(record, *bench_.evaluation());
}

void MainWindow::showCompleteness() {
    const Record& record = bench_.record();
    std::array<int, allStages.size()> missing{};
    int all = 0;
    bool groundless = false; // a budget without readings or a standard is not complete, even where it asks for nothing
    for (const ChecklistItem& item : checklist(record, *bench_.evaluation())) {
        groundless = groundless || item.gap == Gap::NoResults || item.gap == Gap::NoStandard;
        if (item.level == GapLevel::Block) {
            ++all;
            if (const auto stage = stageOfName(QString::fromStdString(item.stage)))
                ++missing[static_cast<std::size_t>(*stage)];
        }
    }
    // The certificate is complete when nothing at all is missing.
    missing[static_cast<std::size_t>(Stage::Certificate)] = all;
    const bool begun = !document_.pristine();
    for (const Stage stage : allStages) {
        const int here = missing[static_cast<std::size_t>(stage)];
        const bool shown = begun && !(stage == Stage::Budget && here == 0 && groundless);
        bar_->button(stage)->setMissing(shown ? std::optional<int>(here) : std::nullopt);
    }
    status_->show(record, *bench_.evaluation());
}

void MainWindow::findCommand() {
    pages_->makeAll();
    std::vector<FindableCommand> commands;
    for (QAction* action : actions_.all())
        commands.push_back({plainText(action), action});
    // What the menus over the plots offer is found under the name of the menu.
    for (ChoiceButton* button : findChildren<ChoiceButton*>())
        for (QAction* choice : button->choices())
            commands.push_back({button->accessibleName() + QStringLiteral(": ") + plainText(choice), choice});
    CommandFinder finder(std::move(commands), this);
    if (around_.dialogs.run(finder) && finder.chosen())
        finder.chosen()->trigger();
}

void MainWindow::askPerson() {
    const QString initials = around_.dialogs.askText(this, tr("Your initials"), tr("Initials that stand in the journal"), bench_.person());
    if (initials.isNull())
        return;
    bench_.setPerson(initials.trimmed());
}

void MainWindow::pasteTable() {
    const QByteArray bytes = QApplication::clipboard()->text().toUtf8();
    if (bytes.trimmed().isEmpty())
        around_.dialogs.tell(this, tr("Nothing to paste"), tr("The clipboard holds no text. Copy a table of readings first."));
    else
        files_.importTable(bytes, tr("the clipboard"));
}

void MainWindow::toggleScheme() {
    const SchemeName other = scheme().name == SchemeName::Light ? SchemeName::Dark : SchemeName::Light;
    spanwright::setScheme(*static_cast<QApplication*>(QCoreApplication::instance()), other);
    around_.settings.setScheme(other);
}

void MainWindow::goToPart(int step) {
    QList<Card*> cards;
    for (Card* card : pages_->currentWidget()->findChildren<Card*>())
        if (card->isVisibleTo(pages_->currentWidget()))
            cards << card;
    if (cards.isEmpty())
        return;
    qsizetype now = -step;
    for (qsizetype i = 0; i < cards.size(); ++i)
        if (cards[i]->isAncestorOf(QApplication::focusWidget()))
            now = i;
    // The next card that has something to hold the focus.
    for (qsizetype tries = 0; tries < cards.size(); ++tries) {
        now = (now + step + cards.size()) % cards.size();
        for (QWidget* child : cards[now]->findChildren<QWidget*>())
            if (child->focusPolicy() & Qt::TabFocus && child->isVisibleTo(cards[now]) && child->isEnabled()) {
                child->setFocus(Qt::TabFocusReason);
                return;
            }
        if (step == 0)
            step = 1;
    }
}

void MainWindow::commitEditing() {
    QWidget* editor = focusWidget();
    if (auto* line = qobject_cast<FieldLine*>(editor)) {
        line->commit();
    } else if (auto* text = qobject_cast<FieldText*>(editor)) {
        text->commit();
    } else if (editor && isActiveWindow()) {
        // A cell that is being edited hands over its value when it loses the focus.
        editor->clearFocus();
        if (editor->isVisible())
            editor->setFocus();
    }
}

bool MainWindow::leaveRefusedText() {
    QStringList names;
    for (const FieldLine* line : findChildren<FieldLine*>())
        if (line->refused())
            names << tr("%1: “%2”").arg(line->accessibleName(), line->text());
    return names.isEmpty() || around_.dialogs.confirm(this, tr("Some fields hold text that was not taken in"),
                                                      names.join(QLatin1Char('\n')), tr("&Leave it out"));
}

void MainWindow::closeEvent(QCloseEvent* event) {
    commitEditing();
    if (!leaveRefusedText() || !files_.askToLeave()) {
        event->ignore();
        return;
    }
    around_.settings.setGeometry(saveGeometry());
    event->accept();
}

void MainWindow::dragEnterEvent(QDragEnterEvent* event) {
    if (!localFiles(event->mimeData()).isEmpty() || event->mimeData()->hasText())
        event->acceptProposedAction();
}

void MainWindow::dropEvent(QDropEvent* event) {
    const QStringList paths = localFiles(event->mimeData());
    const QByteArray text = event->mimeData()->text().toUtf8();
    event->acceptProposedAction();
    // After the drop has ended, so that the program it came from does not wait for an answer to our questions.
    QMetaObject::invokeMethod(
        this,
        [this, paths, text] {
            for (const QString& path : paths)
                takeUp(path);
            if (paths.isEmpty() && !text.trimmed().isEmpty())
                files_.importTable(text, tr("dropped text"));
        },
        Qt::QueuedConnection);
}

} // namespace spanwright
