// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/shell/Actions.h"
#include "ui/shell/Dialogs.h"
#include "ui/shell/Document.h"
#include "ui/shell/FileDesk.h"
#include "ui/shell/Settings.h"
#include "ui/shell/Stage.h"

#include <QMainWindow>

class QLabel;

namespace spanwright {

class BudgetPage;
class JobPage;
class PageStack;
class StageBar;
class StatusLine;

/// What a window needs from outside; all must outlive it.
struct WindowSurroundings {
    Settings& settings;
    Dialogs& dialogs;
    Workbench::Clock clock;
    QString dataFolder; ///< of this program, for recovery files
};

/// One record in its four stages.
class MainWindow : public QMainWindow {
    Q_OBJECT

  public:
    explicit MainWindow(const WindowSurroundings& surroundings, QWidget* parent = nullptr);
    ~MainWindow() override;

    [[nodiscard]] Workbench& workbench() { return bench_; }
    [[nodiscard]] Document& document() { return document_; }
    [[nodiscard]] FileDesk& files() { return files_; }
    [[nodiscard]] const Actions& actions() const { return actions_; }
    [[nodiscard]] Stage stage() const { return stage_; }
    void showStage(Stage stage);
    /// Shows the stage and the editor of a field, "job.customer", by which the checklist leads to what is missing.
    void showField(const QString& stage, const QString& field);

  signals:
    void newWindowWanted();

  protected:
    void closeEvent(QCloseEvent* event) override;
    void dragEnterEvent(QDragEnterEvent* event) override;
    void dropEvent(QDropEvent* event) override;

  private:
    void makePages();
    /// A session with readings starts on the bench; nothing is done when a stage has been chosen.
    void showFirstStage();
    void makeFileMenu();
    void makeEditMenu();
    void makeRecordMenu();
    /// What the pages offer, into the menu and among the commands, when all of them are there.
    void takeOverActions();
    void makeViewMenu();
    void makeHelpMenu();
    void fillRecent(QMenu* menu);
    void takeUp(const QString& path);
    void showState();
    void showCompleteness();
    void findCommand();
    void askPerson();
    void pasteTable();
    void toggleScheme();
    void goToPart(int step);
    /// Takes in what stands in the editor that has the focus.
    void commitEditing();
    bool leaveRefusedText();

    WindowSurroundings around_;
    Workbench bench_;
    Document document_;
    FileDesk files_;
    Actions actions_;
    StageBar* bar_;
    PageStack* pages_;
    StatusLine* status_;
    JobPage* job_ = nullptr;
    BudgetPage* budget_ = nullptr;
    QMenu* recordMenu_ = nullptr;
    Stage stage_ = Stage::Job;
    bool begun_ = false; ///< whether a stage has been shown
};

} // namespace spanwright
