// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReadingsTable.h"

#include "ui/bench/NumberEdit.h"
#include "ui/bench/PastedBlock.h"
#include "ui/bench/PastedReadings.h"
#include "ui/bench/ReadingsDelegate.h"
#include "ui/bench/ReasonDialog.h"
#include "ui/bench/Suspects.h"
#include "ui/bench/recordAsked.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/commands/ReadingNumbers.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QApplication>
#include <QClipboard>
#include <QHeaderView>
#include <QKeyEvent>
#include <QLabel>
#include <QMenu>
#include <QScrollBar>

#include <algorithm>

namespace spanwright {

ReadingsTable::ReadingsTable(Workbench& workbench, QWidget* parent)
    : QTableView(parent), workbench_(workbench), model_(new ReadingsModel(workbench, this)), columns_(*this, *model_), delegate_(new ReadingsDelegate(this)),
      words_(new QLabel(viewport())) {
    setObjectName(QStringLiteral("readingsTable"));
    setAccessibleName(tr("Readings"));
    setModel(model_);
    setItemDelegate(delegate_);
    setFrameShape(QFrame::NoFrame);
    setProperty("bare", true);
    setShowGrid(false);
    setWordWrap(false);
    setCornerButtonEnabled(false);
    setTabKeyNavigation(false);
    setSelectionBehavior(SelectRows);
    setSelectionMode(ExtendedSelection);
    setEditTriggers(DoubleClicked | EditKeyPressed | AnyKeyPressed);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAsNeeded);
    setHorizontalScrollMode(ScrollPerPixel);
    setVerticalScrollMode(ScrollPerPixel);
    verticalHeader()->hide();
    verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    verticalHeader()->setDefaultSectionSize(QFontMetrics(textFont(TextRole::Body)).height() + 6);
    horizontalHeader()->setHighlightSections(false);
    horizontalHeader()->setMinimumSectionSize(20);
    horizontalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    horizontalHeader()->setFont(textFont(TextRole::Small));
    horizontalHeader()->setProperty("dense", true);
    words_->setObjectName(QStringLiteral("refusal"));
    words_->setTextFormat(Qt::PlainText);
    words_->setWordWrap(true);
    words_->setAutoFillBackground(true);
    words_->setForegroundRole(inkRole::warning);
    words_->setFont(textFont(TextRole::Small));
    words_->setMargin(6);
    words_->hide();
    connect(delegate_, &ReadingsDelegate::typed, this, &ReadingsTable::accept);
    connect(delegate_, &ReadingsDelegate::blockPasted, this, [this] { paste(QApplication::clipboard()->text()); });
    connect(delegate_, &QAbstractItemDelegate::closeEditor, this, &ReadingsTable::silence);
    connect(delegate_, &ReadingsDelegate::refused, this, [this](NumberEdit* editor, const Error& error) { say(errorText(error), editor->geometry()); });
    connect(delegate_, &ReadingsDelegate::editing, this, [this](NumberEdit* editor) {
        silence();
        connect(editor, &QLineEdit::textEdited, this, &ReadingsTable::silence);
        connect(editor, &QObject::destroyed, words_, &QWidget::hide);
    });
    connect(&workbench_, &Workbench::selectionChanged, this, &ReadingsTable::showSelection);
    connect(model_, &QAbstractItemModel::headerDataChanged, this, [this] { columns_.measure(); });
    connect(&workbench_, &Workbench::evaluationChanged, this, [this] { columns_.measure(); });
    connect(model_, &QAbstractItemModel::modelReset, this, [this] { columns_.measure(); });
    // While nobody works in the table it follows what is taken.
    connect(&workbench_, &Workbench::recordChanged, this, [this, last = model_->taken()]() mutable {
        if (last != model_->taken() && !hasFocus() && !isAncestorOf(QApplication::focusWidget()))
            scrollTo(model_->nextCell());
        last = model_->taken();
    });
    columns_.measure();
}

QString ReadingsTable::refusal() const {
    return words_->isVisibleTo(viewport()) ? words_->text() : QString();
}

void ReadingsTable::typeNext() {
    const QModelIndex next = model_->nextCell();
    setCurrentIndex(next);
    scrollTo(next);
    edit(next);
}

void ReadingsTable::goOn(const QModelIndex& from) {
    const QModelIndex beside = from.siblingAtColumn(ReadingsModel::IndicationValue);
    if (from.column() > ReadingsModel::IndicationValue && from.row() + 1 < model_->taken()) { // what is stated is typed down a column
        setCurrentIndex(from.siblingAtRow(from.row() + 1));
        edit(currentIndex());
        return;
    }
    const bool indicationNext = from.column() == ReadingsModel::ReferenceValue && beside.data().toString().isEmpty();
    const QModelIndex next = from.column() == ReadingsModel::SetPoint ? from.siblingAtColumn(ReadingsModel::ReferenceValue)
                             : indicationNext                         ? beside
                                                                      : model_->nextCell();
    setCurrentIndex(next);
    scrollTo(next);
    edit(next);
}

void ReadingsTable::accept(const QModelIndex& index, const Decimal& value, Onward onward) {
    const auto column = ReadingsModel::numberColumn(index.column());
    if (!column)
        return;
    const std::optional<ReadingId> id = model_->idAt(index.row());
    const auto before = id ? workbench_.record().readings->number(*column).at(workbench_.record().readings->indexOf(*id)) : std::nullopt;
    if (before && *before != value)
        amend(*id, *column, *before, value, onward);
    else if (!before)
        enter(model_->readingAt(index.row()), *column, value, onward);
    else if (onward == Onward::Yes)
        goOn(model_->index(model_->rowOf(*id), index.column()));
}

/// A value where there was none: of a new reading, or of one that was begun.
void ReadingsTable::enter(Reading reading, NumberColumn column, const Decimal& value, Onward onward) {
    const ReadingId id = reading.id != 0 ? reading.id : workbench_.record().nextReadingId;
    const int row = reading.id != 0 ? model_->rowOf(reading.id) : currentIndex().row();
    const int shown = ReadingsModel::columnOf(column);
    numberOf(reading, column) = value;
    const QString step = reading.id != 0 ? tr("complete a reading") : tr("enter a reading");
    recordAsked(
        workbench_, {step, {std::move(reading)}, {column}, {}}, this,
        [=, this] {
            setFocus();
            if (onward == Onward::Yes && model_->rowOf(id) >= 0)
                goOn(model_->index(model_->rowOf(id), shown));
        },
        [=, this] { editAgain(row, column, value); });
}

/// What was typed stands in its cell again, to be looked at.
void ReadingsTable::editAgain(int row, NumberColumn column, const Decimal& value) {
    const QModelIndex index = model_->index(row, ReadingsModel::columnOf(column));
    setFocus();
    setCurrentIndex(index);
    edit(index);
    for (NumberEdit* editor : viewport()->findChildren<NumberEdit*>()) {
        if (!editor->isVisible()) // the one that was closed before
            continue;
        editor->setText(typedText(value));
        editor->setModified(true);
        editor->selectAll();
    }
}

void ReadingsTable::amend(ReadingId id, NumberColumn column, const Decimal& before, const Decimal& after, Onward onward) {
    const int shown = ReadingsModel::columnOf(column);
    Reading amended = workbench_.record().readings->row(workbench_.record().readings->indexOf(id));
    numberOf(amended, column) = after;
    QString ask = tr("&Why? The value before is kept beside the new one.");
    for (const Suspect& suspect : suspectsAmong(workbench_.record(), workbench_.evaluation()->phase(amended.phase), {amended}, {column}))
        ask.prepend(suspect.sentence + QLatin1Char('\n'));
    const QString what = tr("Reading %1, %2").arg(id).arg(model_->headerData(shown, Qt::Horizontal, Qt::DisplayRole).toString());
    const ReasonDialog::Question question{tr("Change a recorded value"),
                                          what,
                                          typedText(before) + QStringLiteral("  →  ") + typedText(after),
                                          ask,
                                          {tr("typed wrongly"), tr("read again at the instrument"), tr("typed in the wrong place")},
                                          tr("Record the change"),
                                          tr("Keep the value")};
    auto* dialog = new ReasonDialog(QStringLiteral("amendDialog"), question, this);
    connect(dialog, &QDialog::accepted, this, [=, this] {
        workbench_.perform(std::make_unique<AmendValue>(id, column, after, dialog->reason().toStdString()));
        setFocus();
        if (onward == Onward::Yes)
            goOn(model_->index(model_->rowOf(id), shown));
    });
    connect(dialog, &QDialog::rejected, this, [this] { setFocus(); });
    dialog->open();
}

void ReadingsTable::paste(const QString& text) {
    if (workbench_.readOnly() || text.trimmed().isEmpty())
        return;
    const QModelIndex start = currentIndex().isValid() ? currentIndex() : model_->nextCell();
    PastedReadings pasted = pastedReadings(readPasted(text), *model_, columns_, start);
    if (!pasted.refusal.isEmpty()) {
        say(pasted.refusal, visualRect(start));
        return;
    }
    const auto back = [this] { setFocus(); };
    recordAsked(workbench_, {tr("paste readings"), std::move(pasted.rows), std::move(pasted.columns), tr("pasted").toStdString()}, this, back, back);
}

QString ReadingsTable::selectedText() const {
    QString text;
    QList<int> rows;
    for (const QModelIndex& index : selectionModel()->selectedRows())
        rows << index.row();
    std::sort(rows.begin(), rows.end());
    for (const int row : rows) {
        QStringList cells;
        for (int column = 0; column < ReadingsModel::ColumnCount; ++column)
            if (!isColumnHidden(column) || !ReadingsModel::numberColumn(column) || column <= ReadingsModel::IndicationValue)
                cells << model_->index(row, column).data(column == ReadingsModel::DirectionMark ? Qt::AccessibleTextRole : Qt::DisplayRole).toString().replace(QChar(0x2212), QLatin1Char('-'));
        text += cells.join(QLatin1Char('\t')) + QLatin1Char('\n');
    }
    return text;
}

void ReadingsTable::keyPressEvent(QKeyEvent* event) {
    silence();
    if (event->matches(QKeySequence::Paste))
        paste(QApplication::clipboard()->text());
    else if (event->matches(QKeySequence::Copy))
        QApplication::clipboard()->setText(selectedText());
    else if (event->key() == Qt::Key_X || event->key() == Qt::Key_Delete)
        emit excludeRequested();
    else if (event->key() == Qt::Key_R)
        emit readmitRequested();
    else if (event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter)
        model_->flags(currentIndex()).testFlag(Qt::ItemIsEditable) ? static_cast<void>(edit(currentIndex(), EditKeyPressed, event)) : typeNext();
    else
        QTableView::keyPressEvent(event);
}

/// A cell with something refused in it is not left by a click.
void ReadingsTable::mousePressEvent(QMouseEvent* event) {
    for (const NumberEdit* editor : viewport()->findChildren<NumberEdit*>())
        if (editor->isVisible() && editor->isModified() && !editor->number()) {
            say(errorText(editor->number().error()), editor->geometry());
            return;
        }
    silence();
    QTableView::mousePressEvent(event);
}

void ReadingsTable::place(const std::function<void(Place&)>& edit) {
    const auto& chosen = workbench_.selection();
    Place place;
    edit(place);
    if (!chosen.empty())
        workbench_.perform(std::make_unique<PlaceReadings>(std::vector<ReadingId>(chosen.begin(), chosen.end()), place));
}

void ReadingsTable::contextMenuEvent(QContextMenuEvent* event) {
    auto* menu = new QMenu(this);
    menu->setAttribute(Qt::WA_DeleteOnClose);
    const bool any = !workbench_.selection().empty();
    menu->addAction(tr("Exclude…"), this, &ReadingsTable::excludeRequested)->setEnabled(any);
    menu->addAction(tr("Take back in"), this, &ReadingsTable::readmitRequested)->setEnabled(any);
    menu->addSeparator();
    for (const Direction direction : {Direction::Rising, Direction::Falling, Direction::Unknown})
        menu->addAction(tr("Direction: %1").arg(directionText(direction)), this, [=, this] { place([=](Place& p) { p.direction = direction; }); })
            ->setEnabled(any);
    QMenu* runs = menu->addMenu(tr("Run"));
    for (int run = 1; run <= 6; ++run)
        runs->addAction(tr("run %1").arg(run), this, [=, this] { place([=](Place& p) { p.run = run; }); });
    runs->setEnabled(any);
    menu->addSeparator();
    menu->addAction(tr("Copy"), this, [this] { QApplication::clipboard()->setText(selectedText()); })->setEnabled(any);
    menu->addAction(tr("Paste"), this, [this] { paste(QApplication::clipboard()->text()); });
    menu->addSeparator();
    QAction* stated = menu->addAction(tr("Columns of stated uncertainties"), this, &ReadingsTable::showStated);
    stated->setCheckable(true);
    stated->setChecked(columns_.statedShown());
    menu->popup(event->globalPos());
}

void ReadingsTable::resizeEvent(QResizeEvent* event) {
    QTableView::resizeEvent(event);
    columns_.fit();
}

void ReadingsTable::scrollContentsBy(int dx, int dy) {
    QTableView::scrollContentsBy(dx, dy);
    silence();
}

void ReadingsTable::selectionChanged(const QItemSelection& now, const QItemSelection& before) {
    QTableView::selectionChanged(now, before);
    if (following_)
        return;
    std::set<ReadingId> ids;
    for (const QItemSelectionRange& range : selectionModel()->selection())
        for (int row = range.top(); row <= range.bottom(); ++row)
            if (const auto id = model_->idAt(row))
                ids.insert(ids.end(), *id);
    following_ = true;
    workbench_.select(std::move(ids));
    following_ = false;
}

void ReadingsTable::showSelection() {
    if (following_)
        return;
    QItemSelection selection;
    int first = -1;
    for (const ReadingId id : workbench_.selection()) {
        const int row = model_->rowOf(id);
        if (row < 0)
            continue;
        first = first < 0 ? row : first;
        if (!selection.isEmpty() && selection.back().bottom() == row - 1)
            selection.back() = QItemSelectionRange(selection.back().topLeft(), model_->index(row, ReadingsModel::ColumnCount - 1));
        else
            selection.append(QItemSelectionRange(model_->index(row, 0), model_->index(row, ReadingsModel::ColumnCount - 1)));
    }
    following_ = true;
    selectionModel()->select(selection, QItemSelectionModel::ClearAndSelect | QItemSelectionModel::Rows);
    if (first >= 0) {
        selectionModel()->setCurrentIndex(model_->index(first, ReadingsModel::IndicationValue), QItemSelectionModel::NoUpdate);
        scrollTo(model_->index(first, ReadingsModel::Number));
    }
    following_ = false;
    viewport()->update();
}

void ReadingsTable::say(const QString& words, const QRect& under) {
    words_->setText(words);
    const int width = viewport()->width() - 16;
    const int height = words_->heightForWidth(width);
    const bool below = under.bottom() + 4 + height <= viewport()->height();
    words_->setGeometry(8, below ? under.bottom() + 3 : std::max(0, under.top() - height - 3), width, height);
    words_->show();
    words_->raise();
}

void ReadingsTable::silence() {
    words_->hide();
}

} // namespace spanwright
