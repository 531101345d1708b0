// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/StandardEditor.h"

#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"

#include <QCoreApplication>
#include <QLabel>
#include <QRegularExpression>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("StandardEditor", text);
}

class StandardFields {
  public:
    StandardFields(Workbench& bench, std::size_t index) : bench_(bench), index_(index) {}

    /// A reference to a field of this standard. While the list is shorter than the index (an undo is under way and these editors
    /// are about to go) a spare one is shown instead.
    template <class T>
    auto access(T Standard::*field) const {
        return [index = index_, field, spare = std::make_shared<Standard>()](std::vector<Standard>& all) -> T& {
            return (index < all.size() ? all[index] : *spare).*field;
        };
    }
    QString id(const char* name) const { return QStringLiteral("standards.%1.%2").arg(index_).arg(QLatin1String(name)); }

    FieldBox* text(const char* name, const QString& label, std::string Standard::*field) const {
        return fieldBox(bench_, id(name), label, textBinding(&Record::standards, label.toLower(), access(field)));
    }
    FieldBox* date(const char* name, const QString& label, std::string Standard::*field) const {
        FieldBox* box = fieldBox(bench_, id(name), label, dateBinding(&Record::standards, label.toLower(), access(field)));
        box->findChild<FieldLine*>()->setPlaceholderText(tr("YYYY-MM-DD"));
        return box;
    }
    FieldBox* number(const char* name, const QString& label, std::optional<Decimal> Standard::*field, NumberRule rule) const {
        return fieldBox(bench_, id(name), label, numberBinding(&Record::standards, label.toLower(), access(field), rule));
    }
    template <class E>
    FieldBox* choice(const char* name, const QString& label, const QStringList& words, E Standard::*field) const {
        return new FieldBox(label, fieldChoice(bench_, id(name), label, words, &Record::standards, access(field)));
    }
    FieldBox* corrections() const;

  private:
    Workbench& bench_;
    std::size_t index_;
};

/// "0: +0.0004; 5: −0.0003": pairs of where and what to add.
QString correctionsText(const std::vector<CorrectionPoint>& points) {
    QStringList pairs;
    for (const CorrectionPoint& p : points)
        pairs << QStringLiteral("%1: %2").arg(shownNumber(p.at), shownNumber(p.correction));
    return pairs.join(QStringLiteral("; "));
}

Result<std::vector<CorrectionPoint>> parseCorrections(const QString& text) {
    std::vector<CorrectionPoint> points;
    static const QRegularExpression ends(QStringLiteral("[;\\n]"));
    for (const QString& pair : text.split(ends, Qt::SkipEmptyParts)) {
        if (pair.trimmed().isEmpty())
            continue;
        const QStringList sides = pair.split(QLatin1Char(':'));
        if (sides.size() != 2)
            return Error(ErrorCode::CellNotANumber, {{"text", pair.trimmed().toStdString()}});
        CorrectionPoint point;
        for (int i = 0; i < 2; ++i) {
            Result<Decimal> number = parseTyped(sides[i]);
            if (!number)
                return number.error();
            (i == 0 ? point.at : point.correction) = *number;
        }
        points.push_back(point);
    }
    std::stable_sort(points.begin(), points.end(),
                     [](const CorrectionPoint& a, const CorrectionPoint& b) { return compareValue(*a.at, *b.at) < 0; });
    return points;
}

FieldBox* StandardFields::corrections() const {
    const auto points = access(&Standard::corrections);
    FieldBinding binding{[points](const Record& record) {
                             std::vector<Standard> copy = record.standards;
                             return correctionsText(points(copy));
                         },
                         [points](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                             Result<std::vector<CorrectionPoint>> parsed = parseCorrections(text);
                             if (!parsed)
                                 return parsed.error();
                             return changePart(record, &Record::standards, tr("correction table"),
                                               [&](std::vector<Standard>& all) { points(all) = *parsed; });
                         }};
    FieldBox* box = fieldBox(bench_, id("corrections"), tr("Corrections, as value: correction"), std::move(binding));
    box->findChild<FieldLine*>()->setPlaceholderText(tr("0: 0.0004; 10: \u22120.0003"));
    box->setHint(tr("Value indicated by the standard, and what is to be added to it."));
    return box;
}

} // namespace

QWidget* makeStandardEditor(Workbench& bench, std::size_t index) {
    const StandardFields f(bench, index);
    auto* grid = new FieldGrid(3);
    FieldBox* first = f.text("id", tr("Id"), &Standard::id);
    grid->add(first);
    grid->setFocusProxy(first->findChild<FieldLine*>());
    grid->add(f.text("description", tr("What it is"), &Standard::description), 2);
    grid->add(f.choice("role", tr("Gives the"), {tr("reference"), tr("indication")}, &Standard::role));
    grid->add(f.text("certificate", tr("Certificate"), &Standard::certificate));
    grid->add(f.text("issuer", tr("Issued by"), &Standard::issuer));
    grid->add(f.date("calibrated_on", tr("Calibrated on"), &Standard::calibratedOn));
    grid->add(f.date("due", tr("Due"), &Standard::due));
    grid->add(f.text("unit", tr("Unit"), &Standard::unit));
    grid->add(f.number("range_low", tr("Range from"), &Standard::rangeLow, NumberRule::Any));
    grid->add(f.number("range_high", tr("Range to"), &Standard::rangeHigh, NumberRule::Any));
    grid->add(f.number("resolution", tr("Resolution"), &Standard::resolution, NumberRule::NotNegative));
    grid->add(f.number("expanded_uncertainty", tr("U"), &Standard::expandedUncertainty, NumberRule::NotNegative));
    grid->add(f.number("coverage_factor", tr("k"), &Standard::coverageFactor, NumberRule::Positive));
    grid->add(f.choice("form", tr("U stated"), {tr("in the unit"), tr("in % of reading")}, &Standard::form));
    grid->add(f.number("drift", tr("Drift since, \u00b1"), &Standard::drift, NumberRule::NotNegative));
    grid->add(f.choice("correction_use", tr("Correction table"), {tr("there is none"), tr("apply it to the readings"), tr("was applied before typing")},
                       &Standard::correctionUse),
              2);
    grid->add(f.corrections(), 3);
    grid->add(f.text("overdue_reason", tr("If overdue: why used all the same"), &Standard::overdueReason), 2);
    grid->add(f.text("overdue_by", tr("Authorised by"), &Standard::overdueBy));
    return grid;
}

} // namespace spanwright
