// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/Checklist.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/ScriptedDialogs.h"
#include "ui/commands/FieldForm.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/job/SetPoints.h"
#include "ui/shell/MainWindow.h"
#include "ui/shell/PageStack.h"
#include "ui/words/EnglishPlurals.h"
#include "ui/words/Words.h"

#include <QAbstractItemView>
#include <QDropEvent>
#include <QLabel>
#include <QListWidget>
#include <QMenu>
#include <QMimeData>
#include <QPointer>
#include <QProgressBar>
#include <QSpinBox>
#include <QTableView>
#include <QTimer>
#include <QToolButton>
#include <QtTest>

using namespace spanwright;
using test::number;

namespace {

constexpr std::int64_t noon = 1'791'892'800'000; // 2026-10-13 12:00 UTC

/// A window with its surroundings in a folder of its own.
struct Desk {
    QTemporaryDir folder;
    Settings settings{folder.filePath("settings.ini")};
    test::ScriptedDialogs dialogs;
    std::unique_ptr<MainWindow> window;

    Desk() { restart(); }
    void restart() {
        window.reset();
        window = std::make_unique<MainWindow>(WindowSurroundings{settings, dialogs, [] { return noon; }, folder.filePath("data")});
        window->show();
        QVERIFY(QTest::qWaitForWindowActive(window.get()));
        const auto* pages = window->findChild<PageStack*>();
        QVERIFY(QTest::qWaitFor([&] { return pages->complete(); }, 60'000)); // on a busy machine
    }
    const Record& record() const { return window->workbench().record(); }
    template <class T = QWidget>
    T* find(const QString& name) const {
        T* found = window->findChild<T*>(name);
        if (!found)
            qWarning("not there: %s", qPrintable(name));
        return found;
    }
    /// Types over a field and leaves it by Tab.
    void type(const QString& field, const QString& text) const {
        auto* line = find<QLineEdit>(field);
        QVERIFY(line);
        line->setFocus();
        line->selectAll();
        QTest::keyClicks(line, text);
        QTest::keyClick(line, Qt::Key_Tab);
    }
    void click(const QString& name) const { QTest::mouseClick(find<QWidget>(name), Qt::LeftButton); }
    void trigger(const QString& action) const { window->actions().find(action)->trigger(); }
    void keys(Qt::Key key, Qt::KeyboardModifiers modifiers) const { QTest::keyClick(window.get(), key, modifiers); }
    QString path(const QString& name) const { return folder.filePath(name); }
    QString write(const QString& name, const QByteArray& bytes) const {
        QFile file(path(name));
        if (file.open(QIODevice::WriteOnly))
            file.write(bytes);
        return file.fileName();
    }
};

const QByteArray table = "flow / L/min;voltage / V;set point\n1,002;0,203;1\n1,995;0,400;2\n3,004;x;3\n";

} // namespace

class MainWindowTest : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() {
        speakEnglish(*qApp);
        setScheme(*qApp, SchemeName::Light);
    }

    void whatIsTypedInAFieldStandsInTheRecord() {
        Desk desk;
        desk.type("item.description", "Pressure transmitter");
        desk.type("item.serial", "NV-20318");
        desk.type("job.customer", "Brackwater Pumping Station");
        QCOMPARE(desk.record().item.serial, std::string("NV-20318"));
        QCOMPARE(desk.record().job.customer, std::string("Brackwater Pumping Station"));
        QCOMPARE(desk.window->windowTitle(), QString("Pressure transmitter NV-20318[*] \u2013 Spanwright"));
        QVERIFY(desk.window->isWindowModified());
        QCOMPARE(desk.window->workbench().undoStack().count(), 3);
        QCOMPARE(desk.find<QLabel>("itemName")->text(), QString("Pressure transmitter NV-20318"));
    }

    void aNumberKeepsItsDigitsAndACommaIsADecimalMark() {
        Desk desk;
        desk.type("item.range_high", "100,10");
        QCOMPARE(desk.record().item.rangeHigh->text(), std::string("100.10"));
        QCOMPARE(desk.find<QLineEdit>("item.range_high")->text(), QString("100.10"));
    }

    void whatAFieldCannotHoldStaysAndIsRefusedInWords() {
        Desk desk;
        for (const char* text : {"about ten", "1,000.5", "nan", "1 000"}) {
            desk.type("item.range_high", text);
            QVERIFY(!desk.record().item.rangeHigh);
            QCOMPARE(desk.find<QLineEdit>("item.range_high")->text(), QString(text));
            auto* refusal = desk.find<QLabel>("item.range_high.refusal");
            QVERIFY(refusal->isVisible());
            QVERIFY2(refusal->text().size() > 20, qPrintable(refusal->text()));
        }
        desk.type("job.received", "13.10.2026");
        QVERIFY(desk.record().job.received.empty());
        QVERIFY(desk.find<QLabel>("job.received.refusal")->isVisible());
        // Escape brings the recorded value back; a good value takes the refusal away.
        QTest::keyClick(desk.find<QLineEdit>("job.received"), Qt::Key_Escape);
        QVERIFY(desk.find<QLineEdit>("job.received")->text().isEmpty());
        desk.type("item.range_high", "10");
        QVERIFY(!desk.find<QLabel>("item.range_high.refusal")->isVisible());
    }

    void closingDoesNotPassOverRefusedText() {
        Desk desk;
        desk.type("item.range_high", "ten");
        desk.dialogs.yes = false;
        QVERIFY(!desk.window->close());
        QVERIFY(desk.dialogs.asked.last().contains("ten"));
        desk.dialogs.yes = true;
        QVERIFY(desk.window->close());
    }

    void undoWorksFromWithinAField() {
        Desk desk;
        desk.type("job.customer", "First");
        desk.type("job.customer", "Second");
        auto* line = desk.find<QLineEdit>("job.customer");
        line->setFocus();
        QTest::keyClick(line, Qt::Key_Z, Qt::ControlModifier);
        QCOMPARE(desk.record().job.customer, std::string("First"));
        QCOMPARE(line->text(), QString("First"));
        QTest::keyClick(line, Qt::Key_Z, Qt::ControlModifier | Qt::ShiftModifier);
        QCOMPARE(line->text(), QString("Second"));
    }

    void thePlanIsFilledInOneGo() {
        Desk desk;
        desk.type("plan.fill.from", "0");
        desk.type("plan.fill.to", "10");
        desk.click("plan.fill");
        QCOMPARE(desk.record().plan.setPoints.size(), std::size_t{11});
        QCOMPARE(desk.record().plan.setPoints[3], number("3"));
        QCOMPARE(desk.find<QLineEdit>("plan.set_points")->text(), QString("0; 1; 2; 3; 4; 5; 6; 7; 8; 9; 10"));
        desk.find<QSpinBox>("plan.runs")->setValue(3);
        QCOMPARE(desk.record().plan.runs, 3);
        QCOMPARE(desk.find<QLabel>("plan.summary")->text(), QString("66 readings as found"));
        desk.type("plan.set_points", "0, 2,5, 5");
        QCOMPARE(desk.record().plan.setPoints, (std::vector<Decimal>{number("0"), number("2.5"), number("5")}));
    }

    void setPointsAreUnderstoodAsPeopleWriteThem_data() {
        QTest::addColumn<QString>("typed");
        QTest::addColumn<QString>("understood"); // empty: refused
        QTest::newRow("commas alone") << "0,25,50,75,100" << "0; 25; 50; 75; 100";
        QTest::newRow("commas part, points are decimal") << "0,2.5,5" << "0; 2.5; 5";
        QTest::newRow("commas are decimal") << "0; 2,5; 5" << "0; 2.5; 5";
        QTest::newRow("one comma is decimal") << "2,5" << "2.5";
        QTest::newRow("blanks, in any order, twice") << "5 0 2,50 5" << "0; 2.50; 5";
        QTest::newRow("one number or three") << "1,250,500" << "";
        QTest::newRow("begins with zero, so three") << "0,250,500" << "0; 250; 500";
        QTest::newRow("shares of the range") << "0; 25; 50; 75; 100 %" << "-1; 1.5; 4; 6.5; 9.00";
        QTest::newRow("each with its sign") << "0% 12,5% 100%" << "-1; 0.25; 9.00";
        QTest::newRow("some with a sign") << "0% 5 10%" << "";
        QTest::newRow("a word") << "0; five" << "";
    }

    void setPointsAreUnderstoodAsPeopleWriteThem() {
        QFETCH(QString, typed);
        QFETCH(QString, understood);
        Item item;
        item.rangeLow = number("-1");
        item.rangeHigh = number("9.00");
        const Result<std::vector<Decimal>> points = parseSetPoints(typed, item);
        QCOMPARE(points.ok() ? numberListText(*points).replace(QChar(0x2212), QLatin1Char('-')) : QString(), understood);
    }

    void sharesNeedARangeUnlessTheUnitIsPercent() {
        Item item;
        const Result<std::vector<Decimal>> refused = parseSetPoints("0 50 100 %", item);
        QVERIFY(!refused.ok());
        QVERIFY(errorText(refused.error()).contains("no range is stated"));
        item.reference.unit = "%RH";
        item.rangeLow = number("10");
        item.rangeHigh = number("95");
        QCOMPARE(numberListText(*parseSetPoints("10 35 60 %", item)), QString("10; 35; 60"));
    }

    void whatIsUnderstoodIsShownWhileItIsTyped() {
        Desk desk;
        desk.type("item.range_low", "0");
        desk.type("item.range_high", "10");
        desk.type("item.reference.unit", "bar");
        auto* line = desk.find<QLineEdit>("plan.set_points");
        line->setFocus();
        QTest::keyClicks(line, "0,25,50,75,100 %");
        const auto shown = [&] {
            for (const QLabel* label : line->parentWidget()->findChildren<QLabel*>())
                if (label->isVisible() && label->text().startsWith("Understood"))
                    return label->text();
            return QString();
        };
        QCOMPARE(shown(), QString("Understood: 0; 2.5; 5; 7.5; 10 bar"));
        QTest::keyClick(line, Qt::Key_Tab);
        QCOMPARE(line->text(), QString("0; 2.5; 5; 7.5; 10"));
        QCOMPARE(shown(), QString());
    }

    void anOverdueStandardIsSaidInWords() {
        Desk desk;
        desk.type("job.calibrated", "2026-10-13");
        desk.click("standards.add");
        desk.type("standards.0.id", "QR-T-04");
        desk.type("standards.0.due", "2026-10-01");
        desk.type("standards.0.corrections", "0: 0.0004; 10: -0.0003");
        const Standard& standard = desk.record().standards.at(0);
        QCOMPARE(standard.due, std::string("2026-10-01"));
        QCOMPARE(standard.corrections.size(), std::size_t{2});
        QCOMPARE(*standard.corrections[1].correction, number("-0.0003"));
        auto* list = desk.find<QAbstractItemView>("standards");
        QCOMPARE(list->model()->index(0, 2).data().toString(), QString("overdue by 12 days"));
        QVERIFY(desk.find<QLabel>("status.standard")->text().contains("QR-T-04 was overdue by 12 days"));
        desk.click("standards.add");
        desk.type("standards.1.id", "QR-E-01");
        QCOMPARE(desk.record().standards.at(1).id, std::string("QR-E-01"));
        desk.click("standards.remove");
        QCOMPARE(desk.record().standards.size(), std::size_t{1});
        while (desk.window->workbench().undoStack().canUndo())
            desk.trigger("edit.undo");
        QVERIFY(desk.record() == Record{});
    }

    void conditionsAreEnteredAndTakenAway() {
        Desk desk;
        desk.click("conditions.usual");
        QCOMPARE(desk.record().conditions.influences.size(), std::size_t{3});
        desk.type("conditions.influences.0.start", "21.4");
        QCOMPARE(*desk.record().conditions.influences[0].start, number("21.4"));
        QVERIFY(desk.find<QLabel>("status.conditions")->text().contains(QString::fromUtf8("21.4 °C")));
        desk.click("conditions.influences.1.remove");
        QCOMPARE(desk.record().conditions.influences.size(), std::size_t{2});
        desk.trigger("edit.undo");
        QCOMPARE(desk.record().conditions.influences.size(), std::size_t{3});
        QVERIFY(desk.find<QLineEdit>("conditions.influences.2.start"));
    }

    void theBudgetTakesLinesAndLeavesOut() {
        Desk desk;
        desk.window->workbench().setRecord(test::pressureTransmitter());
        desk.trigger("view.budget");
        auto* results = desk.find<QAbstractItemView>("budget.results");
        QVERIFY(results->model()->rowCount() >= 11);
        const std::size_t before = desk.record().budget.lines.size();
        desk.click("budget.lines.add");
        const QString line = QString("budget.lines.%1.").arg(before);
        desk.type(line + "name", "Head");
        desk.type(line + "amount", "0.00018");
        QCOMPARE(desk.record().budget.lines.at(before).name, std::string("Head"));
        QCOMPARE(*desk.record().budget.lines.at(before).amount, number("0.00018"));

        auto* contributions = desk.find<QAbstractItemView>("budget.contributions");
        const int rows = contributions->model()->rowCount();
        QVERIFY(!desk.find("budget.omitted.do")->isEnabled()); // a reason is required
        QTest::keyClicks(desk.find<QLineEdit>("budget.omitted.reason"), "stated apart");
        desk.click("budget.omitted.do");
        QCOMPARE(desk.record().budget.omitted.size(), std::size_t{1});
        QCOMPARE(desk.record().budget.omitted[0].reason, std::string("stated apart"));
        QVERIFY(contributions->model()->rowCount() < rows);
        desk.trigger("edit.undo");
        QCOMPARE(contributions->model()->rowCount(), rows);
    }

    // The finding's link ends at the line of the budget that holds it, taken back in where it was left out.
    void hysteresisIsCarriedFromTheBenchToItsLineOfTheBudget() {
        Desk desk;
        Record record = test::pressureTransmitter();
        record.choices.separateDirections = false;
        record.budget.omitted.push_back({DerivedLine::Hysteresis, "not asked for"});
        desk.window->workbench().setRecord(record);
        desk.trigger("view.bench");
        QToolButton* carry = nullptr;
        for (QToolButton* link : desk.window->findChildren<QToolButton*>(QStringLiteral("remedy")))
            if (link->text() == QStringLiteral("Carry to the budget"))
                carry = link;
        QVERIFY(carry);
        carry->click();
        QVERIFY(desk.record().budget.omitted.empty());
        auto* contributions = desk.find<QAbstractItemView>("budget.contributions");
        QVERIFY(contributions->isVisible());
        QVERIFY(contributions->currentIndex().isValid());
        QVERIFY(contributions->currentIndex().siblingAtColumn(0).data().toString().contains(QStringLiteral("hysteresis")));
        desk.trigger("edit.undo");
        QCOMPARE(desk.record().budget.omitted.size(), std::size_t{1});
    }

    void aCoverageBeyondReasonIsRefused() {
        Desk desk;
        desk.trigger("view.budget");
        desk.type("budget.coverage", "95");
        QCOMPARE(desk.record().budget.coverage, BudgetInput{}.coverage);
        QVERIFY(desk.find<QLabel>("budget.coverage.refusal")->isVisible());
    }

    void savingAndOpeningGivesTheRecordBack() {
        Desk desk;
        desk.window->workbench().setRecord(test::pressureTransmitter());
        desk.type("job.customer", "Someone else");
        desk.dialogs.savedAs = desk.path("a.spanwright");
        desk.keys(Qt::Key_S, Qt::ControlModifier);
        QVERIFY(desk.dialogs.told.isEmpty());
        QVERIFY(!desk.window->isWindowModified());
        QCOMPARE(desk.settings.recentFiles(), QStringList{desk.path("a.spanwright")});
        const Record saved = desk.record();

        desk.restart();
        QVERIFY(!(desk.record() == saved));
        auto* recent = desk.find<QMenu>("menu.recent");
        QCOMPARE(recent->actions().size(), 1);
        recent->actions().first()->trigger();
        QVERIFY2(desk.dialogs.told.isEmpty(), qPrintable(desk.dialogs.told.value(0).second));
        QVERIFY(desk.record() == saved);
        QVERIFY(!desk.window->isWindowModified());
        QVERIFY(!QFileInfo::exists(desk.window->document().recoveryPath()));
    }

    void aChangeTakenBackIsStillToBeSaved() {
        Desk desk;
        desk.type("job.customer", "Brackwater");
        desk.dialogs.savedAs = desk.path("c.spanwright");
        desk.keys(Qt::Key_S, Qt::ControlModifier);
        QVERIFY(!desk.window->isWindowModified());
        desk.type("job.customer", "Someone else");
        desk.window->workbench().undoStack().undo();
        QCOMPARE(desk.record().job.customer, std::string("Brackwater"));
        QVERIFY(desk.window->isWindowModified()); // the journal tells of both
        desk.keys(Qt::Key_S, Qt::ControlModifier);
        QVERIFY(!desk.window->isWindowModified());
    }

    void whatIsBeingTypedIsSavedToo() {
        Desk desk;
        auto* line = desk.find<QLineEdit>("job.customer");
        line->setFocus();
        QTest::keyClicks(line, "Half typed");
        desk.dialogs.savedAs = desk.path("b.spanwright");
        desk.trigger("file.save");
        QCOMPARE(desk.record().job.customer, std::string("Half typed"));
        desk.restart();
        QVERIFY(desk.window->files().openPath(desk.path("b.spanwright")));
        QCOMPARE(desk.record().job.customer, std::string("Half typed"));
    }

    void closingAsksAboutChanges() {
        Desk desk;
        desk.type("job.customer", "X");
        desk.dialogs.save = SaveAnswer::Cancel;
        QVERIFY(!desk.window->close());
        QCOMPARE(desk.dialogs.asked.size(), 1);
        desk.dialogs.save = SaveAnswer::Save;
        desk.dialogs.savedAs.clear(); // given up in the file dialog
        QVERIFY(!desk.window->close());
        desk.dialogs.savedAs = desk.path("c.spanwright");
        QVERIFY(desk.window->close());
        QVERIFY(QFileInfo::exists(desk.path("c.spanwright")));
    }

    void closingWithoutSavingLeavesNoRecovery() {
        Desk desk;
        desk.type("job.customer", "X");
        desk.window->document().keepNow();
        const QString kept = desk.window->document().recoveryPath();
        QVERIFY(QFileInfo::exists(kept));
        desk.dialogs.save = SaveAnswer::Discard;
        QVERIFY(desk.window->close());
        QVERIFY(!QFileInfo::exists(kept));
    }

    void whatWasEnteredBeforeAStopIsOfferedBack() {
        Desk desk;
        desk.type("job.customer", "Kept");
        std::vector<Reading> rows(1);
        rows[0].reference = number("1.0");
        rows[0].indication = number("100.10");
        desk.window->workbench().perform(std::make_unique<AddReadings>(rows));
        desk.window->document().keepNow();
        const Record before = desk.record();
        desk.restart(); // destroyed without closing, as a kill leaves it

        const auto found = Document::leftBehind(desk.path("data"), {});
        QCOMPARE(found.size(), std::size_t{1});
        QCOMPARE(found[0].readings, std::size_t{1});
        QVERIFY(desk.window->files().recover(found[0]));
        QVERIFY(desk.record() == before);
        QVERIFY(desk.window->isWindowModified());
        QCOMPARE(desk.record().readings->indication().at(0)->text(), std::string("100.10"));
    }

    void aChangeIsKeptWithinASecond() {
        Desk desk;
        QElapsedTimer timer;
        timer.start();
        desk.type("job.customer", "Kept");
        QTRY_VERIFY_WITH_TIMEOUT(QFileInfo::exists(desk.window->document().recoveryPath()), 1000);
        qInfo("kept after %lld ms", timer.elapsed());
    }

    void whatCannotBeOpenedIsSaidAndNothingIsLost() {
        Desk desk;
        desk.type("job.customer", "Kept");
        desk.dialogs.save = SaveAnswer::Discard;
        const Record before = desk.record();
        const QString bad[] = {desk.path("missing.spanwright"), desk.write("empty.spanwright", ""),
                               desk.write("cut.spanwright", "{\"layout\": \"spanwright-session\", \"ver"),
                               desk.write("other.spanwright", "{\"a\": 1}")};
        for (const QString& path : bad) {
            desk.dialogs.told.clear();
            QVERIFY(!desk.window->files().openPath(path));
            QCOMPARE(desk.dialogs.told.size(), 1);
            QVERIFY2(desk.dialogs.told[0].second.size() > 20, qPrintable(desk.dialogs.told[0].second));
            QVERIFY(desk.record() == before);
        }
    }

    void aTableIsTakenInAsOneStepAfterItWasAccepted() {
        Desk desk;
        const QString path = desk.write("flow.csv", table);
        desk.dialogs.inDialog = [](QDialog& dialog) {
            auto* preview = dialog.findChild<QAbstractItemView*>("import.preview");
            if (!preview || preview->model()->rowCount() != 4)
                return false;
            auto* issues = dialog.findChild<QAbstractItemView*>("import.issues");
            // Line 4 of the file holds the cell that is no number.
            if (!issues->isVisible() || issues->model()->index(0, 0).data().toString() != "4")
                return false;
            return dialog.findChild<QWidget*>("import.accept")->isEnabled();
        };
        QVERIFY(desk.window->files().openPath(path));
        const ReadingColumns& readings = *desk.record().readings;
        QCOMPARE(readings.size(), std::size_t{3});
        QCOMPARE(readings.reference().at(0)->text(), std::string("1.002"));
        QVERIFY(!readings.indication().has(2));
        QCOMPARE(desk.record().item.indication, (Quantity{"voltage", "V"}));
        QCOMPARE(desk.record().plan.setPoints.size(), std::size_t{3});
        QCOMPARE(desk.record().plan.directions, PlanDirections::Rising); // as the readings rise
        QCOMPARE(desk.window->stage(), Stage::Bench);
        QCOMPARE(desk.window->workbench().undoStack().count(), 1);
        desk.trigger("edit.undo");
        QVERIFY(desk.record() == Record{});
    }

    void aTableGivenUpLeavesNothing() {
        Desk desk;
        desk.dialogs.inDialog = [](QDialog&) { return false; };
        QVERIFY(!desk.window->files().openPath(desk.write("flow.csv", table)));
        QVERIFY(desk.record() == Record{});
        QCOMPARE(desk.window->workbench().undoStack().count(), 0);
    }

    /// 100 000 rows are read beside the window: it goes on living, nothing is there before they were read whole, and giving up in between
    /// leaves nothing.
    void aLargeTableIsReadBesideTheWindow() {
        Desk desk;
        QByteArray rows = "reference / bar,indication / mA\n";
        for (int i = 0; i < 100'000; ++i)
            rows += QByteArray::number(i % 11) + ".0001," + QByteArray::number(4 + 1.6 * (i % 11) + 0.001 * (i % 7), 'f', 4) + '\n';
        const QString path = desk.write("large.csv", rows);
        desk.dialogs.inDialog = [](QDialog& dialog) { return dialog.findChild<QWidget*>("import.accept")->isEnabled(); };
        QVERIFY(!desk.window->files().openPath(path)); // at once: still being read
        QVERIFY(desk.record() == Record{});

        bool seenBusy = false;
        int turns = 0;
        desk.dialogs.inDialog = [&](QDialog& dialog) {
            auto* accept = dialog.findChild<QWidget*>("import.accept");
            auto* bar = dialog.findChild<QProgressBar*>("import.progress");
            seenBusy = bar->isVisible() && !accept->isEnabled();
            QTimer turning;
            connect(&turning, &QTimer::timeout, &dialog, [&] { ++turns; });
            turning.start(0);
            return QTest::qWaitFor([&] { return accept->isEnabled(); }) && !bar->isVisible();
        };
        QVERIFY(desk.window->files().openPath(path));
        QVERIFY(seenBusy);
        QVERIFY(turns > 0);
        QCOMPARE(desk.record().readings->size(), std::size_t{100'000});
        desk.window->workbench().settle();
        QCOMPARE(desk.window->workbench().undoStack().count(), 1);
        desk.trigger("edit.undo");
        QVERIFY(desk.record() == Record{});
        desk.window->workbench().settle();
    }

    /// A spin box or a line editor in which nothing waits to be handed over leaves the keys of undo to the record.
    void undoReachesTheRecordFromAnEditor() {
        Desk desk;
        desk.window->workbench().setRecord(test::pressureTransmitter());
        const Record before = desk.record();
        desk.type("job.customer", "Someone else");
        auto* spin = desk.find<QSpinBox>("plan.runs");
        QVERIFY(spin);
        spin->setFocus();
        QVERIFY(spin->hasFocus());
        QTest::keyClick(spin, Qt::Key_Z, Qt::ControlModifier);
        QCOMPARE(desk.record().job.customer, before.job.customer);
        QTest::keyClick(spin, Qt::Key_Z, Qt::ControlModifier | Qt::ShiftModifier);
        QCOMPARE(desk.record().job.customer, std::string("Someone else"));
        auto* line = desk.find<QLineEdit>("item.serial");
        line->setFocus();
        QTest::keyClicks(line, "7"); // being typed: the keys are the editor's
        QTest::keyClick(line, Qt::Key_Z, Qt::ControlModifier);
        QCOMPARE(desk.record().job.customer, std::string("Someone else"));
    }

    void theSelfTestStandsUnderHelp() {
        Desk desk;
        desk.dialogs.pdf = desk.path("record.pdf");
        desk.dialogs.inDialog = [](QDialog& dialog) {
            auto* save = dialog.findChild<QAbstractButton*>("selfTestSave");
            if (!QTest::qWaitFor([&] { return save->isEnabled(); }))
                return false;
            save->click();
            return true;
        };
        desk.trigger("help.self-test");
        QVERIFY(QFileInfo(desk.path("record.pdf")).size() > 10'000);
    }

    void columnsCanBeTakenAsSomethingElse() {
        Desk desk;
        desk.dialogs.inDialog = [](QDialog& dialog) {
            const auto choose = [&](int column, int role) {
                const QPointer<QComboBox> chooser = dialog.findChild<QComboBox*>(QString("import.role.%1").arg(column));
                chooser->setCurrentIndex(role);
                emit chooser->activated(role);
                return QTest::qWaitFor([&] { return chooser.isNull(); }); // the preview shows others in its place
            };
            const bool chosen = choose(0, 2) && choose(1, 1); // indication, reference
            return chosen && dialog.findChild<QWidget*>("import.accept")->isEnabled();
        };
        QVERIFY(desk.window->files().openPath(desk.write("flow.csv", table)));
        QCOMPARE(desk.record().readings->reference().at(0)->text(), std::string("0.203"));
        QCOMPARE(desk.record().readings->indication().at(0)->text(), std::string("1.002"));
    }

    void aDroppedTableIsShownForImport() {
        Desk desk;
        bool shown = false;
        desk.dialogs.inDialog = [&](QDialog& dialog) { return shown = dialog.objectName() == "importDialog"; };
        QMimeData data;
        data.setUrls({QUrl::fromLocalFile(desk.write("flow.csv", table))});
        QDragEnterEvent enter(QPoint(300, 300), Qt::CopyAction, &data, Qt::LeftButton, Qt::NoModifier);
        QCoreApplication::sendEvent(desk.window.get(), &enter);
        QVERIFY(enter.isAccepted());
        QDropEvent drop(QPointF(300, 300), Qt::CopyAction, &data, Qt::LeftButton, Qt::NoModifier);
        QCoreApplication::sendEvent(desk.window.get(), &drop);
        QTRY_VERIFY(shown);
        QCOMPARE(desk.record().readings->size(), std::size_t{3});
    }

    void everyActionHasTextAndAKeyOrAReason() {
        Desk desk;
        QSet<QString> keys, ids;
        for (const QAction* action : desk.window->actions().all()) {
            QVERIFY(!action->objectName().isEmpty());
            QVERIFY2(!plainText(action).isEmpty(), qPrintable(action->objectName()));
            QVERIFY2(!ids.contains(action->objectName()), qPrintable(action->objectName()));
            ids.insert(action->objectName());
            const QString key = action->shortcut().toString();
            QVERIFY2(!key.isEmpty() || !action->property("noShortcutReason").toString().isEmpty(), qPrintable(action->objectName()));
            QVERIFY2(key.isEmpty() || !keys.contains(key), qPrintable(action->objectName() + " " + key));
            if (!key.isEmpty())
                keys.insert(key);
        }
        QVERIFY(ids.size() > 20);
    }

    void everyInputHasAName() {
        Desk desk;
        desk.window->workbench().setRecord(test::pressureTransmitter());
        for (const Stage stage : allStages) {
            desk.window->showStage(stage);
            for (const QWidget* widget : desk.window->findChildren<QWidget*>()) {
                if (!(widget->focusPolicy() & Qt::TabFocus) || !widget->isVisible() || widget->objectName().startsWith("qt_"))
                    continue;
                // What a plot is painted on is named by the plot.
                if (qstrcmp(widget->metaObject()->className(), "QWidget") == 0 && !widget->parentWidget()->accessibleName().isEmpty())
                    continue;
                const auto* button = qobject_cast<const QAbstractButton*>(widget);
                QVERIFY2(!widget->accessibleName().isEmpty() || (button && !button->text().isEmpty()),
                         qPrintable(stageName(stage) + ": " + widget->metaObject()->className() + " " + widget->objectName() + " in " +
                                    widget->parentWidget()->metaObject()->className() + " " + widget->parentWidget()->objectName()));
            }
        }
    }

    void aCommandIsFoundByTyping() {
        Desk desk;
        QStringList shown, unknown;
        desk.dialogs.inDialog = [&](QDialog& dialog) {
            auto* words = dialog.findChild<QLineEdit*>("commandFinder.words");
            auto* list = dialog.findChild<QListWidget*>("commandFinder.list");
            QTest::keyClicks(words, "qqq");
            for (int i = 0; i < list->count(); ++i)
                unknown << list->item(i)->text();
            QTest::keyClick(words, Qt::Key_Return);
            words->clear();
            QTest::keyClicks(words, "go budget");
            for (int i = 0; i < list->count(); ++i)
                shown << list->item(i)->text();
            QTest::keyClick(words, Qt::Key_Return);
            return dialog.result() == QDialog::Accepted;
        };
        desk.keys(Qt::Key_K, Qt::ControlModifier);
        QCOMPARE(unknown, QStringList{"Nothing found"});
        QCOMPARE(shown, QStringList{"Go to Budget"});
        QCOMPARE(desk.window->stage(), Stage::Budget);
    }

    void aFunctionIsFoundAndChosenByTyping() {
        Desk desk;
        QStringList weights;
        desk.dialogs.inDialog = [&](QDialog& dialog) {
            auto* words = dialog.findChild<QLineEdit*>("commandFinder.words");
            auto* list = dialog.findChild<QListWidget*>("commandFinder.list");
            QTest::keyClicks(words, "weights:");
            for (int i = 0; i < list->count(); ++i)
                weights << list->item(i)->text();
            words->clear();
            QTest::keyClicks(words, "function polynomial degree 3");
            QTest::keyClick(words, Qt::Key_Return);
            return dialog.result() == QDialog::Accepted;
        };
        desk.keys(Qt::Key_K, Qt::ControlModifier);
        QCOMPARE(desk.window->workbench().record().choices.function, (FunctionChoice{FunctionFamily::Polynomial, 3}));
        desk.dialogs.inDialog = [&](QDialog& dialog) {
            auto* words = dialog.findChild<QLineEdit*>("commandFinder.words");
            auto* list = dialog.findChild<QListWidget*>("commandFinder.list");
            QTest::keyClicks(words, "weights and method");
            for (int i = 0; i < list->count(); ++i)
                weights << list->item(i)->text();
            return false;
        };
        desk.keys(Qt::Key_K, Qt::ControlModifier);
        QVERIFY(weights.contains("Weights and method: Weights proportional to level"));
        desk.keys(Qt::Key_Z, Qt::ControlModifier);
        QCOMPARE(desk.window->workbench().record().choices.function, FunctionChoice{});
    }

    void initialsTypedOnTheJobStandInTheJournal() {
        Desk desk;
        desk.keys(Qt::Key_1, Qt::ControlModifier);
        desk.type("person", "TL");
        desk.type("job.customer", "X");
        QCOMPARE(desk.window->workbench().record().journal->entries().back().who, std::string("TL"));
        desk.restart();
        QCOMPARE(desk.window->workbench().person(), QStringLiteral("TL"));
    }

    void stagesAreReachedByKeyAndSayWhatIsMissing() {
        Desk desk;
        desk.keys(Qt::Key_2, Qt::ControlModifier);
        QCOMPARE(desk.window->stage(), Stage::Bench);
        desk.keys(Qt::Key_1, Qt::ControlModifier);
        desk.type("job.customer", "X");
        QVERIFY(desk.find("stage.job")->accessibleDescription().endsWith("missing"));
        desk.window->workbench().setRecord(test::pressureTransmitter());
        QVERIFY(desk.find("stage.job")->accessibleDescription().startsWith("complete"));
        QVERIFY(desk.find("stage.budget")->accessibleDescription().startsWith("complete"));
        // A budget of nothing is not complete.
        Record record = test::pressureTransmitter();
        record.standards.clear();
        desk.window->workbench().setRecord(record);
        QVERIFY(!desk.find("stage.budget")->accessibleDescription().startsWith("complete"));
        record = test::pressureTransmitter();
        record.readings = ReadingColumns{};
        desk.window->workbench().setRecord(record);
        QVERIFY(!desk.find("stage.budget")->accessibleDescription().startsWith("complete"));
    }

    void eachGapLeadsToItsField() {
        Desk desk;
        Record record = test::pressureTransmitter();
        record.standards[1].certificate.clear();
        record.standards[0].due.clear();
        desk.window->workbench().setRecord(record);
        for (const Record& r : {Record{}, record})
            for (const ChecklistItem& item : checklist(r, Evaluation{})) {
                desk.window->workbench().setRecord(r);
                desk.window->showField(QString::fromStdString(item.stage), QString::fromStdString(item.field));
                QCOMPARE(stageName(desk.window->stage()), QString::fromStdString(item.stage));
                const QWidget* focus = desk.window->focusWidget();
                QVERIFY2(focus, item.field.c_str());
                if (item.stage == "job" || item.field.starts_with("limits."))
                    QVERIFY2(QString::fromStdString(item.field).startsWith(focus->objectName().section('.', 0, 0)),
                             qPrintable(QString::fromStdString(item.field) + " led to " + focus->objectName()));
            }
        desk.window->workbench().setRecord(record);
        desk.window->showField("job", "standards.1.certificate");
        QCOMPARE(desk.window->focusWidget()->objectName(), QString("standards.1.certificate"));
        desk.window->showField("budget", "limits.specification");
        QCOMPARE(desk.window->focusWidget()->objectName(), QString("limits.specification"));
    }

    void initialsAreRememberedAndStandInTheJournal() {
        Desk desk;
        desk.dialogs.typed = "IO";
        desk.trigger("record.person");
        desk.type("job.customer", "X");
        QCOMPARE(desk.record().journal->entries().back().who, std::string("IO"));
        desk.dialogs.inDialog = [](QDialog& dialog) {
            const auto* model = dialog.findChild<QTableView*>("journal.table")->model();
            return model->index(0, 3).data().toString() == "job.customer";
        };
        desk.trigger("record.journal");
        desk.restart();
        QCOMPARE(desk.window->workbench().person(), QString("IO"));
    }

    void theSchemeIsChangedAndRemembered() {
        Desk desk;
        desk.keys(Qt::Key_D, Qt::ControlModifier | Qt::ShiftModifier);
        QCOMPARE(scheme().name, SchemeName::Dark);
        QCOMPARE(desk.settings.scheme(), SchemeName::Dark);
        desk.trigger("view.scheme");
        QCOMPARE(scheme().name, SchemeName::Light);
    }

    void helpIsThereAndMarksNothingUp() {
        Desk desk;
        QStringList names;
        desk.dialogs.inDialog = [&](QDialog& dialog) {
            names << dialog.objectName();
            return false;
        };
        desk.trigger("help.user");
        desk.trigger("help.keyboard");
        desk.trigger("help.about");
        QCOMPARE(names, (QStringList{"userHelp", "keyboardHelp", "aboutProgram"}));
    }

    void textFromAFileIsNeverMarkup() {
        Desk desk;
        desk.type("item.description", "<b>bold</b>");
        QCOMPARE(desk.find<QLabel>("itemName")->text(), QString("<b>bold</b>"));
        QCOMPARE(desk.find<QLabel>("itemName")->textFormat(), Qt::PlainText);
    }
};

QTEST_MAIN(MainWindowTest)
#include "tst_main_window.moc"
