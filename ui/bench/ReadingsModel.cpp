// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReadingsModel.h"

#include "core/diagnose/Settling.h"
#include "core/fit/fitFunction.h"
#include "ui/bench/FiguresTable.h"
#include "ui/bench/PlanRows.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/Words.h"

#include <QDateTime>

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

ReadingsModel::ReadingsModel(Workbench& workbench, QObject* parent) : QAbstractTableModel(parent), workbench_(workbench) {
    connect(&workbench_, &Workbench::recordChanged, this, &ReadingsModel::refreshRecord);
    connect(&workbench_, &Workbench::evaluationChanged, this, &ReadingsModel::refreshFigures);
    refreshRecord();
    refreshFigures();
}

/// Rows grow and shrink at the end only, so that a cell that is being typed in keeps its editor.
void ReadingsModel::refreshRecord() {
    const Record& record = workbench_.record();
    std::vector<std::uint32_t> rows;
    const auto& phases = record.readings->phases();
    for (std::size_t i = 0; i < phases.size(); ++i)
        if (phases[i] == record.choices.phase)
            rows.push_back(static_cast<std::uint32_t>(i));
    std::vector<PlannedReading> planned = remainingPlanned(record, record.choices.phase);
    amended_.follow(*record.journal);
    const int before = rowCount();
    const int after = static_cast<int>(rows.size() + std::max<std::size_t>(planned.size(), 1));
    const auto take = [&] {
        phase_ = record.choices.phase;
        rows_ = std::move(rows);
        planned_ = std::move(planned);
    };
    if (phase_ != record.choices.phase || std::abs(after - before) > 200) {
        beginResetModel();
        take();
        endResetModel();
        refreshFigures();
        return;
    }
    if (after > before) {
        beginInsertRows({}, before, after - 1);
        take();
        endInsertRows();
    } else if (after < before) {
        beginRemoveRows({}, after, before - 1);
        take();
        endRemoveRows();
    } else {
        take();
    }
    emit dataChanged(index(0, 0), index(after - 1, ColumnCount - 1));
    emit headerDataChanged(Qt::Horizontal, 0, ColumnCount - 1);
}

void ReadingsModel::refreshFigures() {
    figures_ = phaseOf(workbench_.evaluation(), phase_);
    const Record& record = workbench_.record();
    residualDecimals_ = spanwright::residualDecimals({figures_, record.item, record.readings, record.exclusions, directionOf(record.choices)});
    emit dataChanged(index(0, ResidualValue), index(rowCount() - 1, State));
}

int ReadingsModel::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : static_cast<int>(rows_.size() + std::max<std::size_t>(planned_.size(), 1));
}

int ReadingsModel::columnCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : ColumnCount;
}

std::optional<NumberColumn> ReadingsModel::numberColumn(int column) {
    switch (column) {
    case SetPoint: return NumberColumn::SetPoint;
    case ReferenceValue: return NumberColumn::Reference;
    case IndicationValue: return NumberColumn::Indication;
    case ReferenceUncertainty: return NumberColumn::UReference;
    case IndicationUncertainty: return NumberColumn::UIndication;
    case Covariance: return NumberColumn::UCovariance;
    default: return std::nullopt;
    }
}

ReadingsModel::Column ReadingsModel::columnOf(NumberColumn column) {
    switch (column) {
    case NumberColumn::SetPoint: return SetPoint;
    case NumberColumn::Reference: return ReferenceValue;
    case NumberColumn::Indication: return IndicationValue;
    case NumberColumn::UReference: return ReferenceUncertainty;
    case NumberColumn::UIndication: return IndicationUncertainty;
    case NumberColumn::UCovariance: break;
    }
    return Covariance;
}

bool ReadingsModel::isStated(Column column) const {
    const DecimalColumn& values = workbench_.record().readings->number(*numberColumn(column));
    return values.missing() < values.size();
}

std::optional<ReadingId> ReadingsModel::idAt(int row) const {
    if (row < 0 || row >= taken())
        return std::nullopt;
    return workbench_.record().readings->ids()[recordRow(row)];
}

int ReadingsModel::rowOf(ReadingId id) const {
    const std::size_t row = workbench_.record().readings->indexOf(id);
    const auto found = std::lower_bound(rows_.begin(), rows_.end(), row);
    return found != rows_.end() && *found == row ? static_cast<int>(found - rows_.begin()) : -1;
}

Reading ReadingsModel::readingAt(int row) const {
    if (row < taken())
        return workbench_.record().readings->row(recordRow(row));
    const std::size_t ahead = static_cast<std::size_t>(row - taken());
    if (ahead < planned_.size())
        return readingFor(planned_[ahead], workbench_.record().plan);
    Reading free;
    free.phase = phase_;
    if (taken() > 0)
        free.run = workbench_.record().readings->runs()[recordRow(taken() - 1)];
    return free;
}

QModelIndex ReadingsModel::nextCell() const {
    const ReadingColumns& readings = *workbench_.record().readings;
    // An incomplete reading comes first; it is looked for among the newest, where typing happens.
    for (int row = std::max(0, taken() - 5000); row < taken(); ++row) {
        if (!readings.reference().has(recordRow(row)))
            return index(row, ReferenceValue);
        if (!readings.indication().has(recordRow(row)))
            return index(row, IndicationValue);
    }
    const bool given = !planned_.empty() && !workbench_.record().plan.referenceTyped;
    return index(taken(), given ? IndicationValue : ReferenceValue);
}

double ReadingsModel::residual(ReadingId id) const {
    const std::size_t row = figures_ ? figures_->rows.indexOf(id) : 0;
    return figures_ && row < figures_->rows.size() ? figures_->rows.residual[row] : std::numeric_limits<double>::quiet_NaN();
}

QString ReadingsModel::text(int row, int column) const {
    if (row >= taken())
        return plannedText(row, column);
    const ReadingColumns& readings = *workbench_.record().readings;
    const std::size_t at = recordRow(row);
    switch (column) {
    case Number: return QString::number(readings.ids()[at]);
    case Run: return readings.runs()[at] > 0 ? QString::number(readings.runs()[at]) : QString();
    case SetPoint:
    case ReferenceValue:
    case IndicationValue:
    case ReferenceUncertainty:
    case IndicationUncertainty:
    case Covariance: {
        const auto value = readings.number(*numberColumn(column)).at(at);
        return value ? typedText(*value) : QString();
    }
    case ResidualValue: {
        const double e = residual(readings.ids()[at]);
        return std::isfinite(e) ? fixedText(e, residualDecimals_, SignShown::Both) : QString();
    }
    case State: return stateText(row);
    default: return {};
    }
}

QString ReadingsModel::plannedText(int row, int column) const {
    const Reading reading = readingAt(row);
    const bool planned = !planned_.empty();
    if (column == Run && reading.run > 0 && planned)
        return QString::number(reading.run);
    if (column == SetPoint && reading.setPoint)
        return typedText(*reading.setPoint);
    if (column == ReferenceValue && reading.reference)
        return typedText(*reading.reference);
    if (column == ReferenceValue)
        return reading.setPoint ? tr("at %1").arg(typedText(*reading.setPoint)) : tr("type here");
    if (column == State)
        return planned ? tr("planned") : QString();
    return {};
}

QString ReadingsModel::stateText(int row) const {
    const Record& record = workbench_.record();
    const ReadingId id = record.readings->ids()[recordRow(row)];
    if (record.exclusions->contains(id))
        return tr("excluded");
    if (!record.readings->complete(recordRow(row)))
        return tr("incomplete");
    if (amended_.contains(id))
        return tr("amended");
    return hurriedText(row).isEmpty() ? QString() : tr("early");
}

/// Why a reading counts as taken early, in words; empty where it does not.
QString ReadingsModel::hurriedText(int row) const {
    const Plan& plan = workbench_.record().plan;
    if (plan.dwellSeconds <= 0 || row <= 0 || row >= taken())
        return {};
    const ReadingColumns& readings = *workbench_.record().readings;
    const auto waited = hurried(plan, readings.row(recordRow(row - 1)), readings.row(recordRow(row)));
    return waited ? tr("Taken early: %1 s after the reading before; the plan asks for %2 s at a new set point.").arg(*waited).arg(plan.dwellSeconds) : QString();
}

QString ReadingsModel::history(int row, int column) const {
    const auto number = numberColumn(column);
    const auto id = idAt(row);
    const bool amended = number && id && amended_.contains(*id, *number);
    return amended ? AmendedValues::history(*workbench_.record().journal, *id, *number) : QString();
}

QString ReadingsModel::tip(int row, int column) const {
    const auto id = idAt(row);
    if (!id)
        return {};
    const Record& record = workbench_.record();
    QString text = readingText({figures_, record.item, record.readings, record.exclusions, directionOf(record.choices)}, *id);
    const Reading reading = readingAt(row);
    if (!reading.enteredBy.empty() || reading.enteredAt != 0)
        text += QLatin1Char('\n') + tr("entered %1 %2").arg(QString::fromStdString(reading.enteredBy),
                                                          reading.enteredAt == 0 ? QString() : QLocale().toString(QDateTime::fromMSecsSinceEpoch(reading.enteredAt), QLocale::ShortFormat)).simplified();
    if (const QString early = hurriedText(row); !early.isEmpty())
        text += QLatin1Char('\n') + early;
    const QString past = history(row, column);
    return past.isEmpty() ? text : text + QLatin1Char('\n') + past;
}

/// Digits by which a number falls short of the longest of its column, so that decimal marks stand below each other.
int ReadingsModel::missingDigits(int row, int column) const {
    if (column == ResidualValue || row >= taken())
        return 0;
    const auto number = numberColumn(column);
    if (!number)
        return 0;
    const DecimalColumn& values = workbench_.record().readings->number(*number);
    const auto value = values.at(recordRow(row));
    return value ? std::clamp(values.scale() - value->decimals, 0, 12) : 0;
}

QVariant ReadingsModel::data(const QModelIndex& index, int role) const {
    const int row = index.row(), column = index.column();
    const auto id = idAt(row);
    switch (role) {
    case Qt::DisplayRole: return text(row, column);
    case Qt::EditRole: return numberColumn(column) && (id || column != ReferenceValue) ? text(row, column) : QVariant();
    case Qt::ToolTipRole: return tip(row, column);
    case Qt::TextAlignmentRole: return static_cast<int>((column == DirectionMark ? Qt::AlignHCenter : column == State ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        if (column == DirectionMark)
            return directionText(readingAt(row).direction);
        return text(row, column);
    case ExcludedRole: return id && workbench_.record().exclusions->contains(*id);
    case AmendedRole: {
        const auto number = numberColumn(column);
        return id && number && amended_.contains(*id, *number);
    }
    case PlannedRole: return !id;
    case HurriedRole: return !hurriedText(row).isEmpty();
    case DirectionRole: return static_cast<int>(readingAt(row).direction);
    case MissingDigitsRole: return missingDigits(row, column);
    default: return {};
    }
}

QVariant ReadingsModel::headerData(int section, Qt::Orientation orientation, int role) const {
    if (orientation != Qt::Horizontal)
        return {};
    if (role == Qt::TextAlignmentRole)
        return static_cast<int>((section == State ? Qt::AlignLeft : section == DirectionMark ? Qt::AlignHCenter : Qt::AlignRight) | Qt::AlignVCenter);
    if (role != Qt::DisplayRole)
        return {};
    const Item& item = workbench_.record().item;
    const QString x = QString::fromStdString(item.reference.unit), y = QString::fromStdString(item.indication.unit);
    switch (section) {
    case Number: return tr("#");
    case Run: return tr("run");
    case SetPoint: return headed(tr("set point"), x);
    case ReferenceValue: return headed(tr("reference"), x);
    case IndicationValue: return headed(tr("indication"), y);
    case ReferenceUncertainty: return headed(tr("u ref."), x);
    case IndicationUncertainty: return headed(tr("u ind."), y);
    case Covariance: return headed(tr("covariance"), x.isEmpty() || y.isEmpty() ? x + y : x + QChar(0x00B7) + y);
    case ResidualValue: return headed(tr("residual"), directionOf(workbench_.record().choices) == FitDirection::Indication ? y : x);
    case State: return tr("state");
    default: return {};
    }
}

Qt::ItemFlags ReadingsModel::flags(const QModelIndex& index) const {
    Qt::ItemFlags flags = Qt::ItemIsSelectable | Qt::ItemIsEnabled | Qt::ItemNeverHasChildren;
    if (workbench_.readOnly() || !numberColumn(index.column()))
        return flags;
    const bool ahead = index.row() >= taken(), planned = ahead && !planned_.empty();
    if (ahead && index.column() > IndicationValue)
        return flags; // stated of readings that are there
    if (planned && (index.column() == SetPoint || (index.column() == ReferenceValue && !workbench_.record().plan.referenceTyped)))
        return flags;
    return flags | Qt::ItemIsEditable;
}

} // namespace spanwright
