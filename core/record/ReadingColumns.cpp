// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/ReadingColumns.h"

#include <algorithm>
#include <cassert>
#include <cstring>

namespace spanwright {

namespace {

template <class T>
void insertAt(std::vector<T>& column, std::size_t row, T value) {
    column.insert(column.begin() + static_cast<std::ptrdiff_t>(row), std::move(value));
}

template <class T>
void eraseAt(std::vector<T>& column, std::size_t row) {
    column.erase(column.begin() + static_cast<std::ptrdiff_t>(row));
}

/// Appends `block`, or `n` missing values when it is empty.
void extend(DecimalColumn& column, DecimalColumn block, std::size_t n) {
    if (column.empty() && block.size() == n) {
        column = std::move(block);
        return;
    }
    column.reserve(column.size() + n);
    for (std::size_t i = 0; i < n; ++i)
        column.push_back(block.empty() ? std::nullopt : block.at(i));
}

template <class T>
void extend(std::vector<T>& column, const std::vector<T>& block, std::size_t n, T otherwise) {
    assert(block.empty() || block.size() == n);
    if (block.empty())
        column.resize(column.size() + n, otherwise);
    else
        column.insert(column.end(), block.begin(), block.end());
}

} // namespace

bool ReadingColumns::anyIn(Phase phase) const {
    static_assert(sizeof(Phase) == 1);
    return !phases_.empty() && std::memchr(phases_.data(), static_cast<int>(phase), phases_.size()) != nullptr;
}

void ReadingColumns::reserve(std::size_t n) {
    ids_.reserve(n);
    phases_.reserve(n);
    runs_.reserve(n);
    directions_.reserve(n);
    for (DecimalColumn* column : {&setPoint_, &reference_, &indication_, &uReference_, &uIndication_, &uCovariance_})
        column->reserve(n);
    enteredAt_.reserve(n);
    enteredBy_.reserve(n);
}

void ReadingColumns::append(const Reading& reading) {
    assert(ids_.empty() || reading.id > ids_.back());
    restore(reading);
}

void ReadingColumns::restore(const Reading& reading) {
    const auto row = static_cast<std::size_t>(std::lower_bound(ids_.begin(), ids_.end(), reading.id) - ids_.begin());
    assert(row == ids_.size() || ids_[row] != reading.id);
    insertAt(ids_, row, reading.id);
    insertAt(phases_, row, reading.phase);
    insertAt(runs_, row, static_cast<std::int32_t>(reading.run));
    insertAt(directions_, row, reading.direction);
    setPoint_.insert(row, reading.setPoint);
    reference_.insert(row, reading.reference);
    indication_.insert(row, reading.indication);
    uReference_.insert(row, reading.uReference);
    uIndication_.insert(row, reading.uIndication);
    uCovariance_.insert(row, reading.uCovariance);
    insertAt(enteredAt_, row, reading.enteredAt);
    insertAt(enteredBy_, row, person(reading.enteredBy));
}

void ReadingColumns::remove(ReadingId id) {
    const std::size_t row = indexOf(id);
    assert(row < size());
    eraseAt(ids_, row);
    eraseAt(phases_, row);
    eraseAt(runs_, row);
    eraseAt(directions_, row);
    for (DecimalColumn* column : {&setPoint_, &reference_, &indication_, &uReference_, &uIndication_, &uCovariance_})
        column->erase(row);
    eraseAt(enteredAt_, row);
    eraseAt(enteredBy_, row);
}

Reading ReadingColumns::row(std::size_t index) const {
    return {.id = ids_[index],
            .phase = phases_[index],
            .run = runs_[index],
            .direction = directions_[index],
            .setPoint = setPoint_.at(index),
            .reference = reference_.at(index),
            .indication = indication_.at(index),
            .uReference = uReference_.at(index),
            .uIndication = uIndication_.at(index),
            .uCovariance = uCovariance_.at(index),
            .enteredAt = enteredAt_[index],
            .enteredBy = people_[enteredBy_[index]]};
}

std::size_t ReadingColumns::indexOf(ReadingId id) const {
    const auto found = std::lower_bound(ids_.begin(), ids_.end(), id);
    return found != ids_.end() && *found == id ? static_cast<std::size_t>(found - ids_.begin()) : size();
}

const DecimalColumn& ReadingColumns::number(NumberColumn column) const {
    switch (column) {
    case NumberColumn::SetPoint: return setPoint_;
    case NumberColumn::Reference: return reference_;
    case NumberColumn::Indication: return indication_;
    case NumberColumn::UReference: return uReference_;
    case NumberColumn::UIndication: return uIndication_;
    case NumberColumn::UCovariance: break;
    }
    return uCovariance_;
}

void ReadingColumns::setNumber(std::size_t row, NumberColumn column, const std::optional<Decimal>& value) {
    const_cast<DecimalColumn&>(number(column)).set(row, value);
}

void ReadingColumns::setPlace(std::size_t row, Phase phase, int run, Direction direction) {
    phases_[row] = phase;
    runs_[row] = static_cast<std::int32_t>(run);
    directions_[row] = direction;
}

void ReadingColumns::setEntry(std::size_t row, std::int64_t enteredAt, const std::string& enteredBy) {
    enteredAt_[row] = enteredAt;
    enteredBy_[row] = person(enteredBy);
}

void ReadingColumns::appendBlock(Block block, ReadingId firstId) {
    assert(ids_.empty() || firstId > ids_.back());
    const std::size_t n = block.n;
    ids_.reserve(ids_.size() + n);
    for (std::size_t i = 0; i < n; ++i)
        ids_.push_back(firstId + static_cast<ReadingId>(i));
    phases_.resize(phases_.size() + n, block.phase);
    extend(runs_, block.runs, n, std::int32_t{0});
    extend(directions_, block.directions, n, Direction::Unknown);
    extend(setPoint_, std::move(block.setPoint), n);
    extend(reference_, std::move(block.reference), n);
    extend(indication_, std::move(block.indication), n);
    extend(uReference_, std::move(block.uReference), n);
    extend(uIndication_, std::move(block.uIndication), n);
    extend(uCovariance_, std::move(block.uCovariance), n);
    extend(enteredAt_, block.enteredAt, n, std::int64_t{0});
    enteredBy_.resize(enteredBy_.size() + n, person(block.enteredBy));
}

ReadingColumns ReadingColumns::fromWhole(Whole whole) {
    ReadingColumns all;
    all.ids_ = std::move(whole.ids);
    all.phases_ = std::move(whole.phases);
    all.runs_ = std::move(whole.runs);
    all.directions_ = std::move(whole.directions);
    all.setPoint_ = std::move(whole.setPoint);
    all.reference_ = std::move(whole.reference);
    all.indication_ = std::move(whole.indication);
    all.uReference_ = std::move(whole.uReference);
    all.uIndication_ = std::move(whole.uIndication);
    all.uCovariance_ = std::move(whole.uCovariance);
    all.enteredAt_ = std::move(whole.enteredAt);
    all.enteredBy_ = std::move(whole.enteredBy);
    all.people_ = std::move(whole.people);
    return all;
}

void ReadingColumns::removeBlock(ReadingId firstId, std::size_t n) {
    const std::size_t from = indexOf(firstId);
    assert(from + n <= size());
    const bool atEnd = from + n == size();
    const auto cut = [&](auto& column) {
        column.erase(column.begin() + static_cast<std::ptrdiff_t>(from),
                     column.begin() + static_cast<std::ptrdiff_t>(from + n));
    };
    cut(ids_);
    cut(phases_);
    cut(runs_);
    cut(directions_);
    for (DecimalColumn* column : {&setPoint_, &reference_, &indication_, &uReference_, &uIndication_, &uCovariance_}) {
        if (atEnd) {
            column->resize(from);
            continue;
        }
        DecimalColumn kept;
        kept.reserve(column->size() - n);
        for (std::size_t i = 0; i < column->size(); ++i)
            if (i < from || i >= from + n)
                kept.push_back(column->at(i));
        *column = std::move(kept);
    }
    cut(enteredAt_);
    cut(enteredBy_);
}

bool operator==(const ReadingColumns& a, const ReadingColumns& b) {
    if (a.ids_ != b.ids_ || a.phases_ != b.phases_ || a.runs_ != b.runs_ || a.directions_ != b.directions_ ||
        a.enteredAt_ != b.enteredAt_)
        return false;
    for (std::size_t i = 0; i < a.size(); ++i)
        if (a.enteredBy(i) != b.enteredBy(i))
            return false;
    return a.setPoint_ == b.setPoint_ && a.reference_ == b.reference_ && a.indication_ == b.indication_ &&
           a.uReference_ == b.uReference_ && a.uIndication_ == b.uIndication_ && a.uCovariance_ == b.uCovariance_;
}

std::uint16_t ReadingColumns::person(const std::string& initials) {
    const auto known = std::find(people_.begin(), people_.end(), initials);
    if (known != people_.end())
        return static_cast<std::uint16_t>(known - people_.begin());
    people_.push_back(initials);
    return static_cast<std::uint16_t>(people_.size() - 1);
}

} // namespace spanwright
