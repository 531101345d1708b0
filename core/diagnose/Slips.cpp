// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Slips.h"

#include "core/diagnose/RobustLine.h"
#include "core/diagnose/Settling.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace spanwright {
namespace {

/// Beyond the first a number is questioned; only a number within the second is offered instead. Two neighbouring digits
/// exchanged change a number by at least nine units of its last digit, so less than `leastSteps` of them is no slip
/// that could be told. Few readings do not tell hysteresis from scatter, so among them a thousandth of their range is
/// no slip either.
constexpr double questioned = 3.5, fitting = 3, leastSteps = 8, leastShare = 0.001;
constexpr std::size_t few = 20;

/// What the other readings of a phase lead to expect: the robust line, and at the same set point in the same direction
/// the median of their distances from it, so that neither curvature nor hysteresis is taken for a slip. The nearer of
/// both counts.
class Expectation {
  public:
    Expectation(const Record& record, Phase phase, ReadingId without) {
        const ReadingColumns& readings = *record.readings;
        std::map<int, int> decimals;
        for (std::size_t row = 0; row < readings.size(); ++row) {
            const ReadingId id = readings.ids()[row];
            if (readings.phases()[row] != phase || !readings.complete(row) || id == without ||
                record.exclusions->contains(id))
                continue;
            x_.push_back(readings.reference().toDouble(row));
            y_.push_back(readings.indication().toDouble(row));
            places_.push_back(placeOf(readings.directions()[row], readings.setPoint().at(row)));
            ++decimals[readings.indication().at(row)->decimals];
        }
        int most = 0;
        for (const auto& [places, count] : decimals)
            if (count >= most) {
                most = count;
                usualDecimals_ = places;
            }
        const double step =
            record.item.resolution ? record.item.resolution->toDouble() : std::pow(10.0, -usualDecimals_);
        line_ = robustLine(x_, y_, step / std::sqrt(12.0));
        least_ = leastSteps * step;
        if (line_ && x_.size() < few) {
            const auto [low, high] = std::minmax_element(x_.begin(), x_.end());
            least_ = std::max(least_, leastShare * std::abs(line_->slope) * (*high - *low));
        }
        for (std::size_t i = 0; line_ && i < x_.size(); ++i)
            if (places_[i])
                local_[*places_[i]].push_back(y_[i] - line_->at(x_[i]));
        for (auto& [place, residuals] : local_)
            std::sort(residuals.begin(), residuals.end());
    }
    [[nodiscard]] bool known() const { return line_.has_value(); }
    /// Standard deviations of an indication from what is expected at the place and reference of a reading.
    [[nodiscard]] double distance(const Reading& at, double indication) const {
        const double fromLine = line_->distance(at.reference->toDouble(), indication);
        const double fromOthers = line_->distance(at.reference->toDouble(), indication - shift(at));
        return std::abs(fromOthers) < std::abs(fromLine) ? fromOthers : fromLine;
    }
    [[nodiscard]] bool questions(const Reading& reading) const {
        const double y = reading.indication->toDouble();
        return std::abs(distance(reading, y)) > questioned && std::abs(y - expected(reading)) > least_;
    }
    [[nodiscard]] double expected(const Reading& at) const { return line_->at(at.reference->toDouble()) + shift(at); }
    [[nodiscard]] int usualDecimals() const { return usualDecimals_; }

  private:
    using Place = std::pair<Direction, double>;
    static std::optional<Place> placeOf(Direction direction, const std::optional<Decimal>& setPoint) {
        return setPoint ? std::optional<Place>({direction, setPoint->toDouble()}) : std::nullopt;
    }
    [[nodiscard]] double shift(const Reading& at) const {
        const auto place = placeOf(at.direction, at.setPoint);
        const auto found = place ? local_.find(*place) : local_.end();
        if (found == local_.end() || found->second.size() < 2)
            return 0;
        const std::size_t n = found->second.size();
        return (found->second[(n - 1) / 2] + found->second[n / 2]) / 2;
    }

    std::vector<double> x_, y_;
    std::vector<std::optional<Place>> places_;
    std::map<Place, std::vector<double>> local_;
    std::optional<RobustLine> line_;
    int usualDecimals_ = 0;
    double least_ = 0;
};

/// Explanations of an indication that lies far off, best first: the simplest slip, then the closest fit. At most three.
std::vector<Slip> explained(const Record& record, const Reading& typed, const Expectation& expectation) {
    const double z = expectation.distance(typed, typed.indication->toDouble());
    std::vector<Slip> slips;
    if (!expectation.questions(typed))
        return slips;
    Slip slip;
    slip.id = typed.id;
    slip.distance = z;
    slip.expected = expectation.expected(typed);
    for (const SlipCandidate& candidate :
         slipCandidates(*typed.indication, expectation.usualDecimals(), record.item.indication.unit)) {
        if (!(std::abs(expectation.distance(typed, candidate.value.toDouble())) < fitting))
            continue;
        slip.kind = candidate.kind;
        slip.suggestion = candidate.value;
        const auto same =
            std::find_if(slips.begin(), slips.end(), [&](const Slip& other) { return other.kind == slip.kind; });
        if (same == slips.end())
            slips.push_back(slip);
        else if (std::abs(expectation.distance(typed, candidate.value.toDouble())) <
                 std::abs(expectation.distance(typed, same->suggestion->toDouble())))
            *same = slip;
    }
    std::stable_sort(slips.begin(), slips.end(), [](const Slip& a, const Slip& b) { return a.kind < b.kind; });
    if (slips.size() > 3)
        slips.resize(3);
    if (slips.empty()) {
        slip.kind = SlipKind::Unexplained;
        slip.suggestion.reset();
        slips.push_back(slip);
    }
    return slips;
}

void plain(std::vector<Slip>& slips, const Reading& typed, SlipKind kind, NumberColumn column) {
    Slip slip;
    slip.id = typed.id;
    slip.kind = kind;
    slip.column = column;
    slips.push_back(slip);
}

bool beyond(const Decimal& value, const std::optional<Decimal>& a, const std::optional<Decimal>& b) {
    if (!a || !b)
        return false;
    const double low = std::min(a->toDouble(), b->toDouble()), high = std::max(a->toDouble(), b->toDouble());
    const double margin = (high - low) / 10;
    return value.toDouble() < low - margin || value.toDouble() > high + margin;
}

bool offResolution(const Decimal& value, const std::optional<Decimal>& resolution) {
    if (!resolution || value.isWide() || resolution->isWide() || resolution->mantissa <= 0)
        return false;
    const double steps = toDouble(value.toDoubleDouble() / resolution->toDoubleDouble());
    return std::abs(steps - std::round(steps)) > 1e-6 * std::max(1.0, std::abs(steps));
}

/// The plan asks for further readings where the one before was taken: they may well be the same.
bool repeatPlanned(const Plan& plan, const Reading& before, const Reading& typed) {
    return plan.repeats > 1 && typed.setPoint && before.setPoint == typed.setPoint && before.direction == typed.direction;
}

/// Checks that need no other reading of the same kind, and work from the first reading on.
void plainChecks(const Record& record, const Reading& typed, const std::optional<Reading>& before,
                 std::vector<Slip>& slips) {
    const Item& item = record.item;
    if (typed.indication) {
        if (beyond(*typed.indication, item.outputLow, item.outputHigh))
            plain(slips, typed, SlipKind::OutsideItemRange, NumberColumn::Indication);
        if (offResolution(*typed.indication, item.resolution))
            plain(slips, typed, SlipKind::OffResolution, NumberColumn::Indication);
    }
    if (typed.reference) {
        if (beyond(*typed.reference, item.rangeLow, item.rangeHigh))
            plain(slips, typed, SlipKind::OutsideItemRange, NumberColumn::Reference);
        if (offResolution(*typed.reference, item.referenceResolution))
            plain(slips, typed, SlipKind::OffResolution, NumberColumn::Reference);
        for (const Standard& standard : record.standards)
            if (standard.role == StandardRole::Reference && standard.rangeLow && standard.rangeHigh &&
                standard.unit == item.reference.unit &&
                (typed.reference->toDouble() > standard.rangeHigh->toDouble() ||
                 beyond(*typed.reference, standard.rangeLow, standard.rangeHigh))) {
                plain(slips, typed, SlipKind::OutsideStandardRange, NumberColumn::Reference);
                break;
            }
    }
    if (!before || before->phase != typed.phase || before->run != typed.run)
        return;
    const bool same = typed.reference && before->reference == typed.reference && typed.indication && before->indication == typed.indication;
    if (same && record.plan.referenceTyped && !repeatPlanned(record.plan, *before, typed))
        plain(slips, typed, SlipKind::RepeatsRowBefore, NumberColumn::Indication);
    if (typed.reference && before->reference && typed.direction == before->direction && typed.setPoint &&
        before->setPoint && compareValue(*typed.setPoint, *before->setPoint) != 0) {
        const int moved = compareValue(*typed.reference, *before->reference);
        if ((typed.direction == Direction::Rising && moved <= 0) ||
            (typed.direction == Direction::Falling && moved >= 0))
            plain(slips, typed, SlipKind::AgainstDirection, NumberColumn::Reference);
    }
    if (hurried(record.plan, *before, typed))
        plain(slips, typed, SlipKind::BeforeSettled, NumberColumn::Indication);
}

/// The reading before one in the order taken.
std::optional<Reading> readingBefore(const ReadingColumns& readings, ReadingId id) {
    const std::size_t at = readings.indexOf(id);
    if (at < readings.size())
        return at > 0 ? std::optional<Reading>(readings.row(at - 1)) : std::nullopt;
    return readings.empty() ? std::nullopt : std::optional<Reading>(readings.row(readings.size() - 1));
}

/// Pairs of questioned readings that both fit in the other's place.
void exchanges(const Expectation& expectation, const std::vector<Reading>& readings, std::vector<Slip>& slips) {
    for (const Reading& one : readings)
        for (const Reading& other : readings) {
            if (one.id == other.id || !(std::abs(expectation.distance(one, other.indication->toDouble())) < fitting) ||
                !(std::abs(expectation.distance(other, one.indication->toDouble())) < fitting))
                continue;
            std::erase_if(slips,
                          [&](const Slip& slip) { return slip.id == one.id && slip.kind == SlipKind::Unexplained; });
            Slip slip;
            slip.id = one.id;
            slip.other = other.id;
            slip.kind = SlipKind::RowsExchanged;
            slip.distance = expectation.distance(one, one.indication->toDouble());
            slip.expected = expectation.expected(one);
            slip.suggestion = other.indication;
            slips.push_back(slip);
        }
}

/// More questioned readings than this are no slips of the hand; pairs among them are not searched.
constexpr std::size_t mostForPairs = 200;

} // namespace

std::vector<Slip> slipsOf(const Record& record, const Reading& typed) {
    std::vector<Slip> slips;
    if (typed.reference && typed.indication) {
        const Expectation expectation(record, typed.phase, typed.id);
        if (expectation.known())
            slips = explained(record, typed, expectation);
    }
    plainChecks(record, typed, readingBefore(*record.readings, typed.id), slips);
    return slips;
}

std::vector<Slip> slipsIn(const Record& record, Phase phase) {
    const ReadingColumns& readings = *record.readings;
    const Expectation expectation(record, phase, 0);
    std::vector<Slip> slips;
    std::vector<Reading> questionable;
    std::optional<Reading> before;
    for (std::size_t row = 0; row < readings.size(); ++row) {
        if (readings.phases()[row] != phase || record.exclusions->contains(readings.ids()[row]))
            continue;
        const Reading reading = readings.row(row);
        if (expectation.known() && reading.reference && reading.indication) {
            const std::vector<Slip> here = explained(record, reading, expectation);
            if (!here.empty())
                questionable.push_back(reading);
            slips.insert(slips.end(), here.begin(), here.end());
        }
        plainChecks(record, reading, before, slips);
        before = reading;
    }
    if (questionable.size() <= mostForPairs)
        exchanges(expectation, questionable, slips);
    std::stable_sort(slips.begin(), slips.end(),
                     [](const Slip& a, const Slip& b) { return a.id != b.id ? a.id < b.id : a.kind < b.kind; });
    return slips;
}

} // namespace spanwright
