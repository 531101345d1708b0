// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/import/ImportDialog.h"

#include "core/record/PlanOfReadings.h"
#include "ui/commands/PartCommand.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/commands/Together.h"
#include "ui/import/ImportTables.h"
#include "ui/look/Look.h"
#include "ui/look/PaddedDelegate.h"
#include "ui/words/Words.h"

#include <QCheckBox>
#include <QComboBox>
#include <QDialogButtonBox>
#include <QHBoxLayout>
#include <QHeaderView>
#include <QKeyEvent>
#include <QLabel>
#include <QLineEdit>
#include <QProgressBar>
#include <QPushButton>
#include <QSpinBox>
#include <QTableView>
#include <QVBoxLayout>

#include <algorithm>
#include <utility>

namespace spanwright {

namespace {

struct SeparatorChoice {
    char separator;
    const char* words;
};
constexpr SeparatorChoice separators[] = {{',', QT_TRANSLATE_NOOP("ImportDialog", "comma")},
                                          {';', QT_TRANSLATE_NOOP("ImportDialog", "semicolon")},
                                          {'\t', QT_TRANSLATE_NOOP("ImportDialog", "tab")},
                                          {'|', QT_TRANSLATE_NOOP("ImportDialog", "vertical bar")},
                                          {CsvRules::Blanks, QT_TRANSLATE_NOOP("ImportDialog", "blanks")}};
constexpr Encoding encodings[] = {Encoding::Utf8, Encoding::Utf16LittleEndian, Encoding::Utf16BigEndian, Encoding::Windows1252};

QLabel* words(const QString& id, QPalette::ColorRole role) {
    auto* label = new QLabel;
    label->setObjectName(id);
    label->setForegroundRole(role);
    label->setWordWrap(true);
    label->setTextFormat(Qt::PlainText);
    return label;
}

void addField(QHBoxLayout* row, const QString& label, QWidget* editor, const QString& id) {
    editor->setObjectName(id);
    editor->setAccessibleName(QString(label).remove(QLatin1Char('&')));
    auto* cell = new QVBoxLayout;
    cell->setSpacing(2);
    auto* name = new QLabel(label);
    name->setFont(textFont(TextRole::Small));
    name->setForegroundRole(inkRole::quiet);
    name->setBuddy(editor);
    cell->addWidget(name);
    cell->addWidget(editor);
    row->addLayout(cell, 1);
}

} // namespace

ImportDialog::ImportDialog(TableSource source, const QString& origin, const Record& record, QWidget* parent)
    : QDialog(parent), reading_(new TableReading(std::move(source), this)), origin_(origin), record_(record), encoding_(new QComboBox), separator_(new QComboBox),
      decimal_(new QComboBox), headerRows_(new QSpinBox), unitsRow_(new QCheckBox(tr("The last header line holds units"))),
      missing_(new QLineEdit), phase_(new QComboBox), takeNames_(new QCheckBox(tr("Take names and units of the columns over into the job"))),
      doubts_(words(QStringLiteral("import.doubts"), inkRole::warning)), sum_(words(QStringLiteral("import.sum"), QPalette::WindowText)), bar_(new QProgressBar),
      issuesHead_(words(QStringLiteral("import.issuesHead"), inkRole::warning)), preview_(new ImportPreview),
      issues_(new ImportIssues(this)), issuesView_(new QTableView) {
    setObjectName(QStringLiteral("importDialog"));
    setWindowTitle(tr("Take in readings from %1").arg(origin));
    resize(1040, 720);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step);
    makeTop(all);
    all->addWidget(doubts_);
    all->addWidget(preview_, 3);
    all->addWidget(sum_);
    bar_->setObjectName(QStringLiteral("import.progress"));
    bar_->setAccessibleName(tr("How far the table was read"));
    bar_->setRange(0, 100);
    bar_->hide();
    all->addWidget(bar_);
    all->addWidget(issuesHead_);
    issuesView_->setObjectName(QStringLiteral("import.issues"));
    issuesView_->setAccessibleName(tr("Cells that were not understood"));
    issuesView_->setModel(issues_);
    issuesView_->verticalHeader()->hide();
    issuesView_->verticalHeader()->setDefaultSectionSize(24);
    issuesView_->setShowGrid(false);
    issuesView_->setItemDelegate(new PaddedDelegate(issuesView_));
    issuesView_->setSelectionBehavior(QAbstractItemView::SelectRows);
    issuesView_->horizontalHeader()->setStretchLastSection(true);
    issuesView_->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    all->addWidget(issuesView_, 2);

    auto* buttons = new QDialogButtonBox;
    accept_ = buttons->addButton(tr("&Take in"), QDialogButtonBox::AcceptRole);
    accept_->setObjectName(QStringLiteral("import.accept"));
    accept_->setDefault(true);
    buttons->addButton(tr("&Cancel"), QDialogButtonBox::RejectRole)->setObjectName(QStringLiteral("import.cancel"));
    connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    all->addWidget(buttons);
    connect(preview_, &ImportPreview::roleChosen, this, &ImportDialog::roleChosen, Qt::QueuedConnection);
    connect(reading_, &TableReading::progressed, this, &ImportDialog::showBusy);
    connect(reading_, &TableReading::looked, this, &ImportDialog::showLook);
    connect(reading_, &TableReading::wasRead, this, [this](const std::shared_ptr<Result<ImportedReadings>>& read) { showRead(std::move(*read)); });
    guess();
    accept_->setFocus();
}

ImportDialog::~ImportDialog() {
    missing_->disconnect(this); // it loses the focus when it goes
}

void ImportDialog::makeTop(QVBoxLayout* all) {
    auto* row = new QHBoxLayout;
    row->setSpacing(space::card);
    for (const SeparatorChoice& choice : separators)
        separator_->addItem(tr(choice.words));
    for (const Encoding encoding : encodings) {
        const std::string_view name = encodingName(encoding);
        encoding_->addItem(QString::fromUtf8(name.data(), static_cast<qsizetype>(name.size())));
    }
    decimal_->addItems({tr("point"), tr("comma")});
    headerRows_->setRange(0, 99);
    headerRows_->setKeyboardTracking(false);
    addField(row, tr("&Separator"), separator_, QStringLiteral("import.separator"));
    addField(row, tr("&Decimal mark"), decimal_, QStringLiteral("import.decimal"));
    addField(row, tr("&Encoding"), encoding_, QStringLiteral("import.encoding"));
    addField(row, tr("&Header lines"), headerRows_, QStringLiteral("import.headerRows"));
    addField(row, tr("Words for no &value"), missing_, QStringLiteral("import.missing"));
    missing_->setPlaceholderText(tr("such as OVR; error"));
    addField(row, tr("&Phase of these readings"), phase_, QStringLiteral("import.phase"));
    for (const Phase phase : bothPhases)
        phase_->addItem(phaseText(phase));
    phase_->setCurrentIndex(static_cast<int>(record_.choices.phase));
    all->addLayout(row);
    unitsRow_->setObjectName(QStringLiteral("import.unitsRow"));
    takeNames_->setObjectName(QStringLiteral("import.takeNames"));
    takeNames_->setChecked(record_.item.reference == Quantity{} && record_.item.indication == Quantity{});
    auto* checks = new QHBoxLayout;
    checks->addWidget(unitsRow_);
    checks->addSpacing(space::card);
    checks->addWidget(takeNames_);
    checks->addStretch(1);
    all->addLayout(checks);
    for (QComboBox* box : {encoding_, separator_, decimal_})
        connect(box, &QComboBox::activated, this, [this, box] {
            box->setProperty("stated", true);
            guess();
        });
    connect(headerRows_, &QSpinBox::valueChanged, this, [this] {
        if (changing_)
            return;
        headerRows_->setProperty("stated", true);
        guess();
    });
    connect(unitsRow_, &QCheckBox::clicked, this, [this] {
        unitsRow_->setProperty("stated", true);
        guess();
    });
    missing_->installEventFilter(this);
    connect(missing_, &QLineEdit::editingFinished, this, &ImportDialog::takeMissingWords);
}

CsvWishes ImportDialog::wishes() const {
    const auto stated = [](const QWidget* editor) { return editor->property("stated").toBool(); };
    CsvWishes w;
    if (stated(encoding_))
        w.encoding = encodings[encoding_->currentIndex()];
    if (stated(separator_))
        w.separator = separators[separator_->currentIndex()].separator;
    if (stated(decimal_))
        w.decimal = decimal_->currentIndex() == 1 ? DecimalMark::Comma : DecimalMark::Point;
    if (stated(headerRows_))
        w.headerRows = static_cast<std::size_t>(headerRows_->value());
    if (stated(unitsRow_))
        w.hasUnitsRow = unitsRow_->isChecked();
    w.missingWords = stated_;
    return w;
}

/// Enter in the field is for the field: what follows from the words is seen before anything is taken in.
bool ImportDialog::eventFilter(QObject* watched, QEvent* event) {
    if (watched == missing_ && event->type() == QEvent::KeyPress) {
        const int key = static_cast<QKeyEvent*>(event)->key();
        if (key == Qt::Key_Return || key == Qt::Key_Enter) {
            takeMissingWords();
            return true;
        }
    }
    return QDialog::eventFilter(watched, event);
}

void ImportDialog::takeMissingWords() {
    if (std::vector<std::string> words = missingWords(); words != stated_) {
        stated_ = std::move(words);
        guess();
    }
}

std::vector<std::string> ImportDialog::missingWords() const {
    std::vector<std::string> stated;
    for (const QString& word : missing_->text().split(QLatin1Char(';'), Qt::SkipEmptyParts))
        if (!word.trimmed().isEmpty())
            stated.push_back(word.trimmed().toStdString());
    return stated;
}

void ImportDialog::guess() {
    rules_.reset();
    read_.reset();
    issues_->clear();
    accept_->setEnabled(false);
    reading_->look(wishes());
}

void ImportDialog::showLook(const TableLook& look) {
    if (!look.rules) {
        refuse(look.rules.error());
        return;
    }
    rules_ = *look.rules;
    rows_ = look.rows;
    std::vector<std::string> names;
    for (const CsvColumn& column : rules_->columns)
        names.push_back(column.name);
    if (std::exchange(columns_, names) != names || !rolesChosen_) {
        mapping_ = mappingByNames(*rules_);
        rolesChosen_ = false;
    }
    showRules();
    showDoubts();
    readAll();
}

void ImportDialog::refuse(const Error& error) {
    bar_->hide();
    preview_->clearAll();
    sum_->setText(tr("Nothing can be taken in: %1").arg(errorText(error)));
    sum_->setForegroundRole(inkRole::warning);
    doubts_->hide();
    issuesHead_->hide();
    issuesView_->hide();
    accept_->setEnabled(false);
}

/// While a large table is read nothing can be taken in.
void ImportDialog::showBusy(double share) {
    bar_->setRange(0, share > 0 ? 100 : 0);
    bar_->setValue(static_cast<int>(100 * share));
    bar_->show();
    sum_->setForegroundRole(QPalette::WindowText);
    sum_->setText(rules_ ? tr("Reading the table. Cancel gives it up; nothing is taken in before it was read whole.") : tr("Looking at the table."));
    doubts_->setVisible(rules_ && !rules_->doubts.empty());
    issuesHead_->hide();
    issuesView_->hide();
    accept_->setEnabled(false);
    accept_->setText(tr("&Take in"));
}

void ImportDialog::showRules() {
    changing_ = true;
    for (int i = 0; i < separator_->count(); ++i)
        if (separators[i].separator == rules_->separator)
            separator_->setCurrentIndex(i);
    for (int i = 0; i < encoding_->count(); ++i)
        if (encodings[i] == rules_->encoding)
            encoding_->setCurrentIndex(i);
    const auto number = std::find_if(rules_->columns.begin(), rules_->columns.end(),
                                     [](const CsvColumn& c) { return c.kind == ColumnKind::Number; });
    if (number != rules_->columns.end())
        decimal_->setCurrentIndex(number->decimal == DecimalMark::Comma ? 1 : 0);
    headerRows_->setValue(static_cast<int>(rules_->headerRows));
    unitsRow_->setChecked(rules_->unitsRow.has_value());
    unitsRow_->setEnabled(rules_->headerRows > 0);
    changing_ = false;
    preview_->show(*rules_, mapping_, rows_);
}

void ImportDialog::showDoubts() {
    QStringList sentences;
    for (const Error& doubt : rules_->doubts)
        sentences << errorText(doubt);
    doubts_->setText(sentences.join(QLatin1Char('\n')));
    doubts_->setVisible(!sentences.isEmpty());
}

void ImportDialog::readAll() {
    read_.reset();
    issues_->clear();
    if (mapping_.reference && mapping_.indication) {
        reading_->read(*rules_, mapping_);
        return;
    }
    reading_->cancel();
    showSum(tr("Choose which column is the reference and which the indication."));
}

void ImportDialog::showRead(Result<ImportedReadings> read) {
    if (!read) {
        showSum(errorText(read.error()));
        return;
    }
    read_ = std::move(read).value();
    issues_->fill(read_->issues, *rules_);
    QString sum = tr("%n reading(s) will be taken in", nullptr, static_cast<int>(read_->block.n));
    if (read_->missing > 0)
        sum += tr("; %n cell(s) [is|are] empty or [stands|stand] for no value", nullptr, static_cast<int>(read_->missing));
    showSum(sum + QLatin1Char('.'));
}

void ImportDialog::showSum(const QString& sum) {
    bar_->hide();
    sum_->setText(sum);
    sum_->setForegroundRole(read_ ? QPalette::WindowText : inkRole::warning);
    const std::size_t issues = read_ ? read_->issues.count : 0;
    issuesHead_->setText(tr("%n cell(s) cannot be taken in as [it stands|they stand]. [Its row comes|Their rows come] in without that value, "
                            "to be completed on the bench. Or name the text above as a word for no value, or correct the file and open it again.",
                            nullptr, static_cast<int>(issues)));
    issuesHead_->setVisible(issues > 0);
    issuesView_->setVisible(issues > 0);
    accept_->setEnabled(read_ && read_->block.n > 0);
    accept_->setText(read_ ? tr("&Take in %n reading(s)", nullptr, static_cast<int>(read_->block.n)) : tr("&Take in"));
    if (accept_->isEnabled() && !focusWidget())
        accept_->setFocus();
}

void ImportDialog::roleChosen(std::size_t column, int role) {
    // A column has one role, and a role one column.
    for (int r = 1; r < ImportRoles; ++r)
        if (auto& held = roleColumn(mapping_, static_cast<ImportRole>(r)); held == column)
            held.reset();
    if (role != static_cast<int>(ImportRole::None))
        roleColumn(mapping_, static_cast<ImportRole>(role)) = column;
    rolesChosen_ = true;
    preview_->show(*rules_, mapping_, rows_);
    readAll();
    if (auto* chooser = preview_->findChild<QComboBox*>(QStringLiteral("import.role.%1").arg(column)))
        chooser->setFocus();
}

std::unique_ptr<RecordCommand> ImportDialog::takeCommand() {
    if (!read_ || read_->block.n == 0)
        return nullptr;
    ReadingColumns::Block block = std::move(read_->block);
    read_.reset();
    block.phase = static_cast<Phase>(phase_->currentIndex());
    std::vector<std::unique_ptr<RecordCommand>> changes;
    if (takeNames_->isChecked())
        changes.push_back(changePart(record_, &Record::item, tr("names of the quantities"), [&](Item& item) {
            const auto take = [&](const std::optional<std::size_t>& column, Quantity& quantity) {
                const CsvColumn& from = rules_->columns[*column];
                if (!from.name.empty())
                    quantity.name = from.name;
                if (!from.unit.empty())
                    quantity.unit = from.unit;
            };
            take(mapping_.reference, item.reference);
            take(mapping_.indication, item.indication);
        }));
    if (const Plan followed = planOfReadings(record_.plan, block); record_.plan.setPoints.empty() && followed != record_.plan)
        changes.push_back(changePart(record_, &Record::plan, tr("plan of the readings taken in"), [&](Plan& plan) { plan = followed; }));
    if (block.phase != record_.choices.phase)
        changes.push_back(changePart(record_, &Record::choices, tr("phase"), [&](Choices& choices) { choices.phase = block.phase; }));
    changes.push_back(std::make_unique<ImportReadings>(std::move(block), origin_.toStdString()));
    return std::make_unique<Together>(tr("take in readings"), std::move(changes));
}

} // namespace spanwright
