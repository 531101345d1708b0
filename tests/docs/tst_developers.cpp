// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/Paths.h"

#include <QDir>
#include <QFile>
#include <QRegularExpression>
#include <QTest>

using namespace spanwright::test;

namespace {

QString root() {
    return QString::fromStdString(sourceDir());
}

QString textOf(const QString& path) {
    QFile file(root() + "/" + path);
    return file.open(QIODevice::ReadOnly) ? QString::fromUtf8(file.readAll()) : QString();
}

/// Everything in a page that stands in code marks and looks like a path of this tree.
QStringList pathsNamed(const QString& text) {
    static const QRegularExpression path("`\\./?((?:core|ui|app|tests|resources|sample-data|\\.ci)[\\w./-]*)[^`]*`"
                                         "|`((?:core|ui|app|tests|resources|sample-data|\\.ci)(?:/[\\w./-]*)?)`");
    QStringList found;
    for (auto match = path.globalMatch(text); match.hasNext();) {
        const QRegularExpressionMatch one = match.next();
        found += one.captured(1).isEmpty() ? one.captured(2) : one.captured(1);
    }
    return found;
}

QStringList rooms() {
    QStringList all{"app", "tests"};
    for (const QString& half : {QStringLiteral("core"), QStringLiteral("ui")})
        for (const QString& room : QDir(root() + "/" + half).entryList(QDir::Dirs | QDir::NoDotAndDotDot))
            all += half + "/" + room;
    return all;
}

} // namespace

/// What the pages for people say of this tree is so.
class DevelopersTest : public QObject {
    Q_OBJECT

  private slots:
    void everyPathThatIsNamedExists_data() {
        QTest::addColumn<QString>("page");
        for (const char* page : {"DEVELOPERS.md", "README.md", "sample-data/README.md"})
            QTest::newRow(page) << page;
    }
    void everyPathThatIsNamedExists() {
        QFETCH(QString, page);
        const QString text = textOf(page);
        QVERIFY(!text.isEmpty());
        for (const QString& path : pathsNamed(text))
            QVERIFY2(QFileInfo::exists(root() + "/" + path), qPrintable(path));
    }

    void pathsAreFoundInAPage() {
        QCOMPARE(pathsNamed("see `core/fit`, `./tests/run.sh --sanitize` and `std::vector`, `app`"),
                 QStringList({"core/fit", "tests/run.sh", "app"}));
        QVERIFY(pathsNamed(textOf("DEVELOPERS.md")).size() > 30);
    }

    void everyRoomHasItsLine() {
        const QStringList named = pathsNamed(textOf("DEVELOPERS.md"));
        for (const QString& room : rooms())
            QVERIFY2(named.contains(room), qPrintable(room));
    }
};

QTEST_APPLESS_MAIN(DevelopersTest)
#include "tst_developers.moc"
