// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/JobCards.h"

#include "core/record/Fields.h"
#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"

#include <QCoreApplication>
#include <QLabel>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("JobCards", text);
}

/// Fields of the job by their pointer; the id is the path in the session file.
class JobFields {
  public:
    explicit JobFields(Workbench& bench) : bench_(bench) {}

    FieldBox* text(std::string Job::*field, const QString& label) const {
        return fieldBox(bench_, id(field), label, textBinding(&Record::job, label.toLower(), access(field)));
    }
    FieldBox* longText(std::string Job::*field, const QString& label) const {
        return longFieldBox(bench_, id(field), label, textBinding(&Record::job, label.toLower(), access(field)));
    }
    FieldBox* date(std::string Job::*field, const QString& label) const {
        FieldBox* box = fieldBox(bench_, id(field), label, dateBinding(&Record::job, label.toLower(), access(field)));
        box->findChild<FieldLine*>()->setPlaceholderText(tr("YYYY-MM-DD"));
        return box;
    }
    QCheckBox* check(bool Job::*field, const QString& label) const {
        return fieldCheck(bench_, id(field), label, &Record::job, [field](Job& job) -> bool& { return job.*field; });
    }

  private:
    struct Access {
        std::string Job::*field;
        std::string& operator()(Job& job) const { return job.*field; }
    };
    static Access access(std::string Job::*field) { return {field}; }
    template <class T>
    static QString id(T Job::*field) {
        static const Job job;
        QString found;
        fields(job, [&](std::string_view name, const auto& candidate) {
            if (static_cast<const void*>(&candidate) == static_cast<const void*>(&(job.*field)))
                found = QStringLiteral("job.") + QString::fromUtf8(name.data(), static_cast<qsizetype>(name.size()));
        });
        return found;
    }

    Workbench& bench_;
};

/// Shows the unit of the reference or of the indication behind a box, whatever it is at the time.
void followUnit(Workbench& bench, FieldBox* box, Quantity Item::*quantity) {
    const auto show = [&bench, box, quantity] { box->setUnit(QString::fromStdString((bench.record().item.*quantity).unit)); };
    QObject::connect(&bench, &Workbench::recordChanged, box, show);
    show();
}

FieldBox* itemText(Workbench& bench, const char* id, const QString& label, std::string Item::*field) {
    return fieldBox(bench, QLatin1String(id), label,
                    textBinding(&Record::item, label.toLower(), [field](Item& item) -> std::string& { return item.*field; }));
}

FieldBox* quantityText(Workbench& bench, const char* id, const QString& label, Quantity Item::*quantity, std::string Quantity::*field) {
    return fieldBox(bench, QLatin1String(id), label, textBinding(&Record::item, label.toLower(), [=](Item& item) -> std::string& {
                        return (item.*quantity).*field;
                    }));
}

FieldBox* itemNumber(Workbench& bench, const char* id, const QString& label, std::optional<Decimal> Item::*field,
                     Quantity Item::*unit, NumberRule rule = NumberRule::Any) {
    FieldBox* box = fieldBox(bench, QLatin1String(id), label,
                             numberBinding(&Record::item, label.toLower(),
                                           [field](Item& item) -> std::optional<Decimal>& { return item.*field; }, rule));
    followUnit(bench, box, unit);
    return box;
}

QLabel* note(const QString& text) {
    auto* label = new QLabel(text);
    label->setFont(textFont(TextRole::Small));
    label->setForegroundRole(inkRole::quiet);
    label->setWordWrap(true);
    return label;
}

/// Whose name the journal's entries carry: kept with the person's settings, not with the record.
FieldBox* personBox(Workbench& bench) {
    auto* line = new QLineEdit;
    line->setObjectName(QStringLiteral("person"));
    line->setAccessibleName(tr("Your initials"));
    line->setMaxLength(20);
    auto* box = new FieldBox(tr("Your initials"), line);
    const auto show = [&bench, line, box] {
        line->setText(bench.person());
        box->setHint(bench.person().isEmpty() ? tr("The journal does not say yet who works here.") : tr("Stand beside every change in the journal."));
    };
    QObject::connect(line, &QLineEdit::editingFinished, line, [&bench, line] { bench.setPerson(line->text().trimmed()); });
    QObject::connect(&bench, &Workbench::personChanged, line, show);
    show();
    return box;
}

} // namespace

Card* itemCard(Workbench& bench) {
    auto* card = new Card(tr("Item under calibration"));
    auto* grid = new FieldGrid(2);
    grid->add(itemText(bench, "item.description", tr("Description"), &Item::description), 2);
    grid->add(itemText(bench, "item.maker", tr("Maker"), &Item::maker));
    grid->add(itemText(bench, "item.model", tr("Model"), &Item::model));
    FieldBox* serial = itemText(bench, "item.serial", tr("Serial number"), &Item::serial);
    serial->findChild<FieldLine*>()->setPlaceholderText(tr("“none” when it has none"));
    grid->add(serial);
    grid->add(itemText(bench, "item.tag", tr("Tag"), &Item::tag));
    grid->add(quantityText(bench, "item.reference.name", tr("Reference quantity"), &Item::reference, &Quantity::name));
    grid->add(quantityText(bench, "item.reference.unit", tr("Unit of the reference"), &Item::reference, &Quantity::unit));
    grid->add(itemNumber(bench, "item.range_low", tr("Range from"), &Item::rangeLow, &Item::reference));
    grid->add(itemNumber(bench, "item.range_high", tr("Range to"), &Item::rangeHigh, &Item::reference));
    grid->add(quantityText(bench, "item.indication.name", tr("Indicated quantity"), &Item::indication, &Quantity::name));
    grid->add(quantityText(bench, "item.indication.unit", tr("Unit of the indication"), &Item::indication, &Quantity::unit));
    grid->add(itemNumber(bench, "item.output_low", tr("Indication at the low end"), &Item::outputLow, &Item::indication));
    grid->add(itemNumber(bench, "item.output_high", tr("Indication at the high end"), &Item::outputHigh, &Item::indication));
    grid->add(itemNumber(bench, "item.reference_resolution", tr("Resolution of the reference"), &Item::referenceResolution, &Item::reference,
                         NumberRule::NotNegative));
    grid->add(itemNumber(bench, "item.resolution", tr("Resolution of the indication"), &Item::resolution, &Item::indication,
                         NumberRule::NotNegative));
    card->body()->addWidget(grid);
    card->body()->addWidget(note(tr("Error of indication = indication \u2212 ideal indication at the reference value. A correction has the "
                                    "opposite sign.")));
    return card;
}

Card* orderCard(Workbench& bench) {
    const JobFields job(bench);
    auto* card = new Card(tr("Laboratory, customer and dates"));
    auto* grid = new FieldGrid(2);
    grid->add(job.text(&Job::number, tr("Work order")));
    grid->add(job.text(&Job::certificateNumber, tr("Certificate number")));
    grid->add(job.text(&Job::laboratory, tr("Laboratory")));
    grid->add(job.text(&Job::laboratoryAddress, tr("Address of the laboratory")));
    grid->add(job.text(&Job::customer, tr("Customer")));
    grid->add(job.text(&Job::customerContact, tr("Contact")));
    grid->add(job.text(&Job::place, tr("Place, if not the laboratory")));
    grid->add(job.text(&Job::customerSupplied, tr("Data supplied by the customer")));
    grid->add(job.date(&Job::received, tr("Received on")));
    grid->add(job.text(&Job::conditionReceived, tr("Condition on receipt")));
    FieldBox* calibrated = job.date(&Job::calibrated, tr("Calibrated on"));
    calibrated->setHint(tr("Empty: from the readings"));
    grid->add(calibrated);
    grid->add(job.date(&Job::issued, tr("Issued on")));
    grid->add(personBox(bench), 2);
    card->body()->addWidget(grid);
    return card;
}

Card* methodCard(Workbench& bench) {
    const JobFields job(bench);
    auto* card = new Card(tr("Method"));
    auto* grid = new FieldGrid(2);
    grid->add(job.text(&Job::method, tr("Procedure")));
    grid->add(job.text(&Job::methodEdition, tr("Edition")));
    grid->add(job.longText(&Job::methodDeviations, tr("Additions, deviations, exclusions")), 2);
    card->body()->addWidget(grid);
    return card;
}

Card* adjustmentCard(Workbench& bench) {
    const JobFields job(bench);
    auto* card = new Card(tr("Adjustment and recalibration"));
    auto* grid = new FieldGrid(2);
    grid->add(job.check(&Job::adjusted, tr("The item was adjusted")), 2);
    grid->add(job.longText(&Job::adjustment, tr("What was adjusted")), 2);
    grid->add(job.text(&Job::noAsFoundReason, tr("Why there are no results as found")), 2);
    grid->add(job.check(&Job::recalibrationAgreed, tr("A recalibration date is agreed with the customer")), 2);
    grid->add(job.date(&Job::recalibrationDate, tr("Recalibration date")));
    card->body()->addWidget(grid);
    return card;
}

Card* statementsCard(Workbench& bench) {
    const JobFields job(bench);
    auto* card = new Card(tr("Statements"));
    auto* grid = new FieldGrid(2);
    grid->add(job.longText(&Job::traceability, tr("Metrological traceability")), 2);
    grid->add(job.text(&Job::externalProviders, tr("Results from external providers")), 2);
    grid->add(job.longText(&Job::opinions, tr("Opinions and interpretations")), 2);
    grid->add(job.text(&Job::replaces, tr("Replaces certificate")));
    grid->add(job.text(&Job::replacesReason, tr("Reason of the replacement")));
    card->body()->addWidget(grid);
    return card;
}

} // namespace spanwright
