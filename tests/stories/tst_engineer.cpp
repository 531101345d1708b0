// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SessionFile.h"
#include "tests/support/Paths.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/StoryWindow.h"
#include "ui/plot/PlotView.h"

#include <QComboBox>
#include <QLabel>
#include <QLineEdit>
#include <QMimeData>
#include <QPushButton>
#include <QTableView>

using namespace spanwright;
using namespace spanwright::test;

/// The engineer drops a table, sets readings aside by eye for a reason, sees what it did, and takes it back.
class EngineerTest : public QObject {
    Q_OBJECT

    QTemporaryDir home_;

    static QString sample(const char* name) { return QString::fromStdString(sourceDir()) + "/sample-data/" + name; }

    static void drop(QWidget& on, const QString& path) {
        QMimeData data;
        data.setUrls({QUrl::fromLocalFile(path)});
        const QPoint at = on.rect().center();
        QDragEnterEvent enter(at, Qt::CopyAction, &data, Qt::LeftButton, Qt::NoModifier);
        QCoreApplication::sendEvent(&on, &enter);
        QVERIFY(enter.isAccepted());
        QDropEvent event(at, Qt::CopyAction, &data, Qt::LeftButton, Qt::NoModifier);
        QCoreApplication::sendEvent(&on, &event);
    }

    /// Drags a rectangle about a reading; the readings that stand inside it.
    static std::set<ReadingId> dragAbout(PlotView& plot, ReadingId id) {
        const QPoint centre = plot.placeOf(id).toPoint();
        const QRect rectangle(centre - QPoint(12, 9), centre + QPoint(12, 9));
        std::set<ReadingId> inside;
        for (const ReadingId other : plot.points().ids)
            if (QRectF(rectangle).contains(plot.placeOf(other)))
                inside.insert(other);
        QTest::mousePress(plot.viewport(), Qt::LeftButton, {}, rectangle.topLeft());
        QTest::mouseMove(plot.viewport(), rectangle.center());
        QTest::mouseMove(plot.viewport(), rectangle.bottomRight());
        QTest::mouseRelease(plot.viewport(), Qt::LeftButton, {}, rectangle.bottomRight());
        return inside;
    }

  private slots:
    void dropsATableAndTakesItIn() {
        StoryWindow story(home_.path());
        QStringList heads;
        int previewed = 0;
        story.dialogs.inDialog = [&](QDialog& dialog) {
            auto* preview = dialog.findChild<QTableView*>("import.preview");
            if (!preview)
                return false;
            previewed = preview->model()->rowCount();
            for (int column = 0; column < preview->model()->columnCount(); ++column)
                heads << preview->model()->headerData(column, Qt::Horizontal).toString();
            auto* accept = dialog.findChild<QPushButton*>("import.accept");
            QTest::mouseClick(accept, Qt::LeftButton);
            return dialog.result() == QDialog::Accepted;
        };
        drop(story.window(), sample("temperature-probe.csv"));
        QTRY_COMPARE(story.record().readings->size(), std::size_t(28));
        QVERIFY(previewed > 0);
        QVERIFY2(heads.join(' ').contains("reference"), qPrintable(heads.join(' ')));
        QCOMPARE(story.record().item.reference.unit, std::string("°C"));
        QCOMPARE(story.record().readings->reference().at(0)->text(), std::string("-0.008"));
        QCOMPARE(story.window().stage(), Stage::Bench);
        story.act("edit.undo");
        QVERIFY(story.record().readings->empty());
    }

    void isToldOfCellsThatAreNoNumbers() {
        StoryWindow story(home_.path());
        QString said;
        story.dialogs.inDialog = [&](QDialog& dialog) {
            const auto* issues = dialog.findChild<QTableView*>("import.issues");
            for (int row = 0; issues && row < issues->model()->rowCount(); ++row)
                for (int column = 0; column < issues->model()->columnCount(); ++column)
                    said += issues->model()->index(row, column).data().toString() + ' ';
            return false;
        };
        drop(story.window(), sample("climate-logger.csv"));
        QTRY_VERIFY(!said.isEmpty());
        QVERIFY2(said.contains("OVR") && said.contains("92"), qPrintable(said));
        QVERIFY(story.record().readings->empty());
    }

    void namesTheWordsThatStandForNoValue() {
        StoryWindow story(home_.path());
        QStringList before, after, roles;
        story.dialogs.inDialog = [&](QDialog& dialog) {
            const auto* issues = dialog.findChild<QTableView*>("import.issues");
            const auto* accept = dialog.findChild<QPushButton*>("import.accept");
            const auto texts = [&] {
                QStringList all;
                for (int row = 0; row < issues->model()->rowCount(); ++row)
                    all << issues->model()->index(row, 2).data().toString();
                return all;
            };
            if (!QTest::qWaitFor([&] { return accept->isEnabled(); }))
                return false;
            before = texts();
            auto* role = dialog.findChild<QComboBox*>("import.role.3");
            role->setCurrentIndex(0); // a choice of columns outlives the words
            emit role->activated(0);
            if (!QTest::qWaitFor([&] { return dialog.findChild<QComboBox*>("import.role.3") != role && accept->isEnabled(); }))
                return false;
            auto* words = dialog.findChild<QLineEdit*>("import.missing");
            words->setFocus();
            QTest::keyClicks(words, "nothing; ovr");
            QTest::keyClick(words, Qt::Key_Return);
            if (!dialog.isVisible() || !QTest::qWaitFor([&] { return accept->isEnabled(); }))
                return false;
            after = texts();
            roles << dialog.findChild<QComboBox*>("import.role.3")->currentText();
            return false;
        };
        drop(story.window(), sample("climate-logger.csv"));
        QTRY_VERIFY(!roles.isEmpty());
        QVERIFY2(before.contains("OVR"), qPrintable(before.join(' ')));
        QVERIFY2(!after.contains("OVR"), qPrintable(after.join(' ')));
        QCOMPARE(roles, QStringList{"not taken in"});
    }

    void setsReadingsAsideByEyeAndTakesThemBack() {
        StoryWindow story(home_.path());
        story.window().document().begin(pressureTransmitter());
        story.act("view.bench");
        const Record before = story.record();
        auto* plot = story.find<PlotView>("residualPlot");
        QTRY_VERIFY(plot->points().size() == 66);
        const double spread = story.workbench().evaluation()->phase(Phase::AsFound)->fit->residualSd;

        const ReadingId lowest = 50;
        const std::set<ReadingId> dragged = dragAbout(*plot, lowest);
        QVERIFY(dragged.contains(lowest));
        QCOMPARE(story.workbench().selection(), dragged);
        plot->setFocus();
        story.press(Qt::Key_X);
        auto* dialog = story.window().findChild<QDialog*>("excludeDialog");
        QVERIFY(dialog);
        auto* accept = dialog->findChild<QPushButton*>("excludeAccept");
        QVERIFY2(!accept->isEnabled(), "a reason is required");
        QTest::keyClick(dialog->findChild<QComboBox*>("excludeReason"), Qt::Key_Down);
        QTest::keyClicks(dialog->findChild<QLineEdit*>("excludeWords"), "valve still moving");
        QVERIFY(accept->isEnabled());
        QTest::mouseClick(accept, Qt::LeftButton);

        QCOMPARE(story.record().exclusions->size(), dragged.size());
        const Exclusion* made = story.record().exclusions->find(lowest);
        QVERIFY(made);
        QCOMPARE(made->reason, ExclusionReason::NotSettled);
        QCOMPARE(made->words, std::string("valve still moving"));
        QCOMPARE(made->by, std::string("IO"));
        QCOMPARE(plot->points().size(), std::size_t(66));
        const PhaseEvaluation* now = story.workbench().evaluation()->phase(Phase::AsFound);
        QCOMPARE(now->excluded, dragged.size());
        QVERIFY(now->fit->residualSd != spread);
        QVERIFY(now->withoutExclusions.has_value());
        QCOMPARE(now->withoutExclusions->residualSd, spread);

        story.act("edit.undo");
        QVERIFY(story.record() == before);
        QCOMPARE(story.workbench().evaluation()->phase(Phase::AsFound)->fit->residualSd, spread);
        QVERIFY(story.record().journal->size() > before.journal->size());
    }

    void selectsInOnePlaceAndSeesItEverywhere() {
        StoryWindow story(home_.path());
        story.window().document().begin(pressureTransmitter());
        story.act("view.bench");
        auto* line = story.find<PlotView>("linePlot");
        QTRY_VERIFY(line->points().size() == 66);
        QTest::mouseClick(line->viewport(), Qt::LeftButton, {}, line->placeOf(33).toPoint());
        QCOMPARE(story.workbench().selection().size(), std::size_t(1));
        const ReadingId chosen = *story.workbench().selection().begin();
        QCOMPARE(line->placeOf(chosen).toPoint(), line->placeOf(33).toPoint());
        QCOMPARE(story.find<PlotView>("residualPlot")->cloud().selection(), story.workbench().selection());
        auto* table = story.find<QTableView>("readingsTable");
        QCOMPARE(table->selectionModel()->selectedRows().size(), 1);
        QCOMPARE(table->selectionModel()->selectedRows().front().row(), int(chosen) - 1);
    }
};

QTEST_MAIN(EngineerTest)
#include "tst_engineer.moc"
